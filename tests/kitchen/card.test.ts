import stringWidth from 'string-width'
import { describe, expect, test } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { scoreBasis } from '../../src/foods/score.ts'
import { type Card, type CardRequest, cardOf, cardProblem, stavesInWords } from '../../src/kitchen/card.ts'
import { cardHtml } from '../../src/kitchen/card-html.ts'
import { cardJson } from '../../src/kitchen/card-json.ts'
import { cardMarkdown } from '../../src/kitchen/card-markdown.ts'
import { cardText } from '../../src/kitchen/card-text.ts'
import type { CookingMethod, KitchenFile } from '../../src/kitchen/kitchen-file.ts'
import { loadKitchen } from '../../src/kitchen/load.ts'
import { b12NoteFor } from '../../src/kitchen/vitamin-b12.ts'
import { STAVES } from '../../src/nutrition/amino-acids.ts'
import { scorePlate } from '../../src/nutrition/plate-score.ts'
import { aFood } from './a-food.ts'

const basis = scoreBasis(loadTable())
const kidney = loadKitchen().cooking.find(({ id }) => id === 'kidney-beans') as CookingMethod
const beans = aFood({
  id: 'test-beans-dry',
  name: 'Test beans, dry',
  state: 'dry',
  cautions: ['kidney-bean-raw', 'cooked-pulse-cooling'],
  measures: [{ name: '1 cup', grams: 190, source: 'test' }],
  per100g: { proteinG: 22, crudeProteinG: 22, phytateMg: 900, zincMg: 3, ironMg: 7, fibreG: 15 },
})
const rice = aFood({
  id: 'test-rice-boiled',
  name: 'Test rice, boiled',
  role: 'grain',
  allergens: ['sesame'],
  cautions: ['cooked-grain-cooling'],
  per100g: { proteinG: 2.7, crudeProteinG: 2.8, phytateMg: 60, zincMg: 0.5, ironMg: 0.2, fibreG: 0.4 },
})
const kitchen: KitchenFile = {
  ...loadKitchen(),
  cookingOf: { 'test-beans-dry': 'kidney-beans' },
  yields: [
    {
      from: beans.id,
      to: null,
      before: 'dry',
      after: 'boiled',
      factor: 2.5,
      low: 2.2,
      high: 2.8,
      basis: 'curated',
      source: 's',
      provenance: 'p',
    },
    {
      from: null,
      to: rice.id,
      before: 'dry',
      after: 'boiled',
      factor: 2.75,
      low: 2.4,
      high: 3.1,
      basis: 'curated',
      source: 's',
      provenance: 'p',
    },
  ],
}
const plate = (portions: [Food, number][]) =>
  scorePlate(
    portions.map(([food, grams]) => ({ food, grams })),
    basis,
  )
const request: CardRequest = {
  score: plate([
    [beans, 60],
    [rice, 150],
  ]),
  servings: 6,
  eatAt: '19:00',
  settings: { units: 'metric', conditions: [] },
}
const card = (given: Partial<CardRequest> = {}) => cardOf({ ...request, ...given }, kitchen)

const renderers: [string, (card: Card) => string][] = [
  ['text', card => cardText(card)],
  ['Markdown', cardMarkdown],
  ['HTML', cardHtml],
]

describe('the card', () => {
  test('servings scale exactly', () => {
    const [one, six, many] = [card({ servings: 1 }), card(), card({ servings: 1000 })]
    one.take.forEach((taken, i) => {
      expect(six.take[i]!.gramsInAll).toBe(taken.gramsInAll * 6)
      expect(many.take[i]!.gramsInAll).toBe(taken.gramsInAll * 1000)
      expect(six.take[i]!.gramsPerServing).toBe(taken.gramsPerServing)
    })
    expect(six.score).toEqual(one.score)
    expect(six.steps.map(({ minutesBefore }) => minutesBefore)).toEqual(
      one.steps.map(({ minutesBefore }) => minutesBefore),
    )
  })

  test('amounts as the cook has the food, dry or cooked', () => {
    const [b, r] = card().take
    expect(b!.amount).toBe('360 g dry = 1 3/4 cups + 2 tbsp, about 900 g boiled')
    expect(r!.amount).toBe('900 g')
    expect(r!.fromDry).toBe('about 330 g dry')
  })

  test('times are those of the clock, from soaking to the meal', () => {
    const { steps } = card()
    expect(kidney.cookMinMost).toBe(120)
    expect(steps[0]).toMatchObject({ kind: 'soak', when: '08:45', notBefore: '04:45' })
    expect(steps.find(({ kind }) => kind === 'boil hard')!.when).toBe('17:00')
    expect(card({ eatAt: null }).steps[0]!.when).toBe('10 h 15 min before')
    expect(card({ eatAt: '06:00' }).steps[0]!.when).toBe('19:45 the day before')
  })

  test('minerals, and the ratio of phytate to zinc', () => {
    const { iron, zinc, phytateZincRatio } = card()
    expect(iron.amount).toBeCloseTo(0.6 * 7 + 1.5 * 0.2, 9)
    expect(zinc.amount).toBeCloseTo(0.6 * 3 + 1.5 * 0.5, 9)
    expect(phytateZincRatio).toBeCloseTo((0.6 * 900 + 1.5 * 60) / 660.04 / (2.55 / 65.38), 6)
  })

  test('an unknown figure is said to be unknown, not zero', () => {
    const unknown = aFood({
      id: 'u',
      name: 'Unknown',
      per100g: { zincMg: null, phytateMg: null, ironMg: null },
    })
    const of = card({
      score: plate([
        [beans, 60],
        [unknown, 100],
      ]),
    })
    expect(of.phytateZincRatio).toBeNull()
    expect(of.zinc.unknown).toEqual(['Unknown'])
    expect(cardText(of)).toMatch(/Zinc +at least 1\.8 mg \(no figure for 1 of 2 foods\)/)
    expect(cardText(card({ score: plate([[unknown, 100]]) }))).toMatch(/Zinc +not known/)
  })

  test('allergens, cautions, storage: each once, the strictest', () => {
    const of = card()
    expect(of.allergens).toEqual(['sesame'])
    expect(of.cautions.map(({ id }) => id)).toEqual(['kidney-bean-raw', 'cooked-grain-cooling'])
    expect(of.storage.map(({ id }) => id)).toEqual(['grain', 'pulse', 'cool', 'reheat'])
    expect(card({ boxed: true }).cautions[0]!.id).toBe('cooked-grain-cooling')
  })

  test('a person who is better off without figures gets none', () => {
    const of = card({ settings: { units: 'metric', conditions: ['eating-disorder-history'] } })
    for (const [, render] of renderers) {
      expect(render(of)).not.toMatch(/DIAAS|kcal/)
      expect(render(of)).toMatch(/dietitian/)
      expect(render(card())).toMatch(/DIAAS/)
    }
  })

  test('foods that nothing is known to be done with are said to be as they are', () => {
    expect(card().asItIs.map(({ id }) => id)).toEqual([rice.id])
  })

  test('the line on vitamin B12 stands where it is given', () => {
    const b12 = b12NoteFor([beans, rice], { lastDay: null, today: '2026-12-01' })
    for (const [, render] of renderers) {
      expect(render(card({ b12 }))).toContain('B12')
      expect(render(card())).not.toContain('B12')
    }
  })

  test('staves in words', () => {
    const staves = Object.fromEntries(STAVES.map(stave => [stave, 120])) as Record<
      (typeof STAVES)[number],
      number
    >
    expect(stavesInWords({ staves, pattern: basis.pattern })).toMatch(/^Every amino acid reaches/)
    expect(stavesInWords({ staves: { ...staves, lys: 91.7, saa: 99.96 }, pattern: basis.pattern })).toMatch(
      /^Shortest: lysine, 91 % of the pattern; also short: methionine \+ cysteine \(99 %\)/,
    )
    expect(stavesInWords({ staves: null, pattern: basis.pattern })).toMatch(/no protein/)
  })
})

describe('what no card can be made of', () => {
  test.each([
    [{ servings: 0 }, /0 servings/],
    [{ servings: -2 }, /-2 servings/],
    [{ servings: 1.5 }, /whole number/],
    [{ servings: Number.NaN }, /NaN servings/],
    [{ servings: 1e9 }, /1 to 1000/],
    [{ eatAt: '25:00' }, /"25:00" is no time of day/],
    [{ eatAt: '\u001b[31m7pm' }, /"7pm" is no time of day/],
    [{ eatAt: '' }, /no time of day/],
    [{ score: plate([]) }, /the plate is empty/],
    [{ score: plate([[beans, 0]]) }, /the plate is empty/],
  ])('%j', (given, reason) => {
    expect(cardProblem({ ...request, ...given })).toMatch(reason)
  })
  test('a good request has none', () => {
    expect(cardProblem(request)).toBeNull()
    expect(cardProblem({ ...request, eatAt: null })).toBeNull()
  })
})

const nasty = aFood({
  id: 'own-nasty',
  name: '<script>alert(1)</script> "& \'*_|`[x](y) \u001b[31mred\u0007\nsecond line',
  state: 'product',
})

describe('renderers', () => {
  test.each(renderers)('%s tells of every food, step, caution and the standing note', (_, render) => {
    const of = card()
    const flat = (text: string) =>
      text
        .replace(/\\/g, '')
        .replace(/&quot;/g, '"')
        .replace(/&#39;/g, "'")
        .replace(/\s+/g, ' ')
    const text = flat(render(of))
    for (const { food } of of.take) expect(text).toContain(food.name)
    for (const step of of.steps) expect(text).toContain(flat(step.text))
    for (const caution of of.cautions) expect(text).toContain(flat(caution.text))
    for (const { text: keep } of of.storage) expect(text).toContain(flat(keep))
    expect(text).toContain('not medical advice')
    expect(text).toContain('cross-contact')
  })

  test('the terminal gets no line wider than asked, no control characters', () => {
    const of = card({
      score: plate([
        [nasty, 100],
        [beans, 60],
        [aFood({ id: 'long', name: 'x'.repeat(300) }), 10],
        [aFood({ id: 'wide', name: '大豆'.repeat(60) }), 10],
      ]),
    })
    for (const columns of [40, 80, 120]) {
      for (const line of cardText(of, columns).split('\n'))
        expect(stringWidth(line)).toBeLessThanOrEqual(columns)
    }
    expect(cardText(of).replaceAll('\n', '')).not.toMatch(/\p{Cc}/u)
  })

  test('the page is whole in itself and everything on it is escaped', () => {
    const page = cardHtml(
      card({
        score: plate([
          [nasty, 100],
          [beans, 60],
        ]),
      }),
    )
    expect(page).not.toMatch(/<script|<img|<link|<iframe|@import|url\(|https?:|src=|\son\w+=/i)
    expect(page).toContain('&lt;script&gt;alert(1)&lt;/script&gt; &quot;&amp; &#39;')
    expect(page).toMatch(/^<!doctype html>/)
    expect(page).toContain("default-src 'none'")
    expect(page).toContain('@page')
    const opened = [...page.matchAll(/<([a-z0-9]+)[ >]/g)].map(([, tag]) => tag!)
    const open: string[] = []
    for (const [, slash, tag] of page.matchAll(/<(\/?)([a-z0-9]+)(?:[ >])/g)) {
      if (tag === 'meta') continue
      if (slash === '') open.push(tag!)
      else expect(open.pop()).toBe(tag)
    }
    expect(open).toEqual([])
    expect(opened).toContain('table')
  })

  test('Markdown signs in a name are escaped', () => {
    const text = cardMarkdown(
      card({
        score: plate([
          [nasty, 100],
          [beans, 60],
        ]),
      }),
    )
    expect(text).toContain('\\<script\\>')
    expect(text).toContain('\\[x\\](y)')
    expect(text).not.toContain('\u001b')
  })

  test('JSON: numbers unrounded, the unit in the key', () => {
    const json = cardJson(card())
    expect(JSON.parse(JSON.stringify(json))).toEqual(json)
    expect(json.take[0]).toMatchObject({ food: 'test-beans-dry', grams_per_serving: 60, grams_in_all: 360 })
    expect(json.per_serving.protein_g).toBeCloseTo(0.6 * 22 + 1.5 * 2.7, 9)
    expect(json.per_serving.phytate_zinc_molar_ratio).toBeGreaterThan(5)
    const keys = (value: unknown): string[] =>
      value !== null && typeof value === 'object'
        ? Object.entries(value).flatMap(([key, inner]) => [
            ...(Array.isArray(value) ? [] : [key]),
            ...keys(inner),
          ])
        : []
    for (const key of keys(json)) expect(key).toMatch(/^[a-z0-9_]+$/)
  })
})
