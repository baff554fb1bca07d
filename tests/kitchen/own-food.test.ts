import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { foodSchema } from '../../src/foods/food.ts'
import { ingredientsOf, readLabel } from '../../src/foods/ingredient-list.ts'
import {
  editOwnFood,
  madeOf,
  type OwnFoodInput,
  ownFoodOf,
  ownFoodToFood,
  ownIdOf,
  usesOfOwnFood,
} from '../../src/foods/own-food.ts'
import { withOwnFoods } from '../../src/foods/own-table.ts'
import { readParts } from '../../src/foods/protein-parts.ts'
import { tableOf } from '../../src/foods/table.ts'
import { profileOf } from '../../src/nutrition/amino-acids.ts'
import { aFood } from './a-food.ts'

const pea = aFood({
  id: 'pea-protein-powder',
  name: 'Pea protein powder',
  state: 'powder',
  role: 'powder',
  aminoMgPerG: profileOf(() => 70),
  digestibility: { ...profileOf(() => 0.9), proteinFaecal: 0.95 },
  digestibilityTier: 'ileal, this food',
  cautions: ['favism', 'kidney-bean-raw'],
})
const rice = aFood({
  id: 'rice-white-dry',
  name: 'Rice, white, dry',
  role: 'grain',
  state: 'dry',
  aminoMgPerG: profileOf(() => 30),
  digestibility: { ...profileOf(() => 0.6), proteinFaecal: 0.8 },
})
const wheat = aFood({ id: 'wheat-flour', name: 'Wheat flour', role: 'grain', allergens: ['gluten', 'wheat'] })
const sugar = aFood({ id: 'sugar', name: 'Sugar', per100g: { proteinG: 0, crudeProteinG: 0 } })
const egg = aFood({ id: 'egg-raw', name: 'Egg, raw', origin: 'egg', allergens: ['egg'] })
const milk = aFood({ id: 'milk-cow', name: 'Milk', origin: 'dairy', allergens: ['milk'] })
const table = tableOf({
  patterns: [],
  coefficients: {} as never,
  sources: [],
  foods: [pea, rice, wheat, sugar, egg, milk],
})
const words: Record<string, string> = {
  pea: pea.id,
  'pea protein': pea.id,
  rice: rice.id,
  wheat: wheat.id,
  sugar: sugar.id,
  'rice, white': rice.id,
}
const resolve = (text: string) => {
  const food = table.foodById.get(words[text.toLowerCase()] ?? '')
  return food === undefined
    ? ({ ok: false, problem: 'no food is called that' } as const)
    : ({ ok: true, food } as const)
}

const powder: OwnFoodInput = {
  name: 'Galley powder',
  perG: 30,
  proteinG: 24,
  kcal: 115,
  fatG: 1.5,
  carbohydrateG: 1,
  sharesKnown: true,
  parts: [
    { food: pea.id, share: 0.8 },
    { food: rice.id, share: 0.2 },
  ],
}
const made = (given: Partial<OwnFoodInput> = {}) => {
  const reading = ownFoodOf({ ...powder, ...given }, table)
  if (!reading.ok) throw new Error(reading.problems.join('; '))
  return reading.own
}
const problems = (given: Partial<OwnFoodInput>) => {
  const reading = ownFoodOf({ ...powder, ...given }, table)
  return reading.ok ? '' : reading.problems.join('\n')
}

describe('what the protein is made of', () => {
  test.each([
    ['80 % pea, 20 % rice', [0.8, 0.2], true],
    ['80% pea and 20% rice', [0.8, 0.2], true],
    ['pea 80 %; rice, white 20 %', [0.8, 0.2], true],
    ['pea (80%), rice (20%)', [0.8, 0.2], true],
    ['80 percent of pea + rice', [0.8, 0.2], true],
    ['pea and rice', [0.5, 0.5], false],
    ['PEA', [1], true],
    ['62,5 % pea, 37,5 % rice', [0.625, 0.375], true],
  ])('%j', (text, shares, known) => {
    const reading = readParts(text, resolve)
    expect(reading.ok).toBe(true)
    if (!reading.ok) return
    reading.parts.forEach((part, i) => {
      expect(part.share).toBeCloseTo(shares[i]!, 9)
    })
    expect(reading.parts).toHaveLength(shares.length)
    expect(reading.sharesKnown).toBe(known)
  })

  test('the same food twice is one part', () => {
    const reading = readParts('30 % pea, 50 % rice, 20 % pea', resolve)
    expect(reading.ok && reading.parts).toEqual([
      { food: pea.id, share: expect.closeTo(0.5, 9) },
      { food: rice.id, share: expect.closeTo(0.5, 9) },
    ])
  })

  test.each([
    ['', /say what its protein is made of/],
    [' , ', /say what its protein is made of/],
    ['80 % pea, 30 % rice', /come to 110 %/],
    ['40 % pea, 30 % rice', /come to 70 %/],
    ['100 % pea, rice', /100 % before the last part/],
    ['0 % pea, 100 % rice', /between 0 and 100/],
    ['120 % pea', /between 0 and 100/],
    ['80 %, 20 % rice', /names no food/],
    ['unobtainium', /"unobtainium": no food is called that/],
    [Array.from({ length: 40 }, () => 'pea').join(','), /40 parts are too many/],
    ['\u001b[31munobtainium\u0007', /^"unobtainium": no food/],
  ])('%j is refused with the reason', (text, reason) => {
    const reading = readParts(text, resolve)
    expect(reading.ok).toBe(false)
    if (!reading.ok) {
      expect(reading.problem).toMatch(reason)
      expect(reading.problem).not.toMatch(/\p{Cc}/u)
    }
  })

  test('any text is read or refused, never thrown at', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 200 }), text => {
        const reading = readParts(text, resolve)
        if (reading.ok) expect(reading.parts.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 6)
        else expect(reading.problem.length).toBeGreaterThan(5)
      }),
    )
  })
})

describe('an own food', () => {
  test('is a whole food of the table, its figures per 100 g', () => {
    const food = ownFoodToFood(made(), table)
    expect(foodSchema.safeParse(food).error).toBeUndefined()
    expect(food.id).toBe('own-galley-powder')
    expect(food.per100g.proteinG).toBeCloseTo(80, 9)
    expect(food.per100g.crudeProteinG).toBeCloseTo(80, 9)
    expect(food.per100g.kcal).toBeCloseTo(383.33, 1)
    expect(food.per100g.fibreG).toBeNull()
    expect(food.portionG.usual).toBe(30)
    expect(food.measures).toEqual([{ name: '1 serving', grams: 30, source: 'own' }])
  })

  test('borrows its profile by protein, and digestibility by what each part brings', () => {
    const food = ownFoodToFood(made(), table)
    // 0.8 x 70 + 0.2 x 30 = 62 mg/g; (0.8 x 70 x 0.9 + 0.2 x 30 x 0.6) / 62 = 54/62
    expect(food.aminoMgPerG.lys).toBeCloseTo(62, 9)
    expect(food.digestibility.lys).toBeCloseTo(54 / 62, 9)
    expect(food.digestibility.proteinFaecal).toBeCloseTo(0.8 * 0.95 + 0.2 * 0.8, 9)
  })

  test('is never surer than its parts: borrowed where shares are known, estimated where guessed', () => {
    const known = ownFoodToFood(made(), table)
    expect([known.profileTier, known.digestibilityTier, known.doubts]).toEqual([
      'borrowed',
      'ileal, this class',
      ['own-food'],
    ])
    expect(ownFoodToFood(made({ sharesKnown: false }), table).profileTier).toBe('estimated')
    expect(madeOf(made({ sharesKnown: false }), table)).toMatch(/guess/)
    const single = made({ parts: [{ food: pea.id, share: 1 }], sharesKnown: false })
    expect(ownFoodToFood(single, table).profileTier).toBe('borrowed')
  })

  test('always carries the allergens of its parts, with those of its label', () => {
    const own = made({ parts: [{ food: wheat.id, share: 1 }], allergens: ['sesame'] })
    expect(ownFoodToFood(own, table).allergens).toEqual(['gluten', 'wheat', 'sesame'])
  })

  test('keeps cautions on the food itself, not those on cooking it from raw', () => {
    expect(ownFoodToFood(made(), table).cautions).toEqual(['favism'])
  })

  test('is plant only where all its parts are', () => {
    const origin = (...ids: string[]) =>
      ownFoodToFood(made({ parts: ids.map(food => ({ food, share: 1 / ids.length })) }), table).origin
    expect(origin(pea.id, rice.id)).toBe('plant')
    expect(origin(pea.id, egg.id)).toBe('egg')
    expect(origin(milk.id, egg.id)).toBe('animal')
  })

  test('half protein or more is a powder, else what its first part is', () => {
    expect(made().role).toBe('powder')
    expect(made({ proteinG: 6, kcal: 42, parts: [{ food: rice.id, share: 1 }] }).role).toBe('grain')
    expect(made({ role: 'seasoning' }).role).toBe('seasoning')
  })

  test.each([
    [{ proteinG: 31 }, /protein: 103.3 g in 100 g is more than the food weighs/],
    [{ fatG: 20 }, /more than the food weighs/],
    [{ kcal: 500 }, /energy: 1667 kcal.*cannot be/],
    [{ kcal: 480 }, /is that kJ\? 382 kcal/],
    [{ kcal: 20 }, /energy: 67 kcal.*at least/],
    [{ kcal: 0 }, /energy: 0 kcal/],
    [{ fibreG: 40 }, /fibre/],
    [{ sodiumMg: 15_000 }, /sodium.*not g of salt/],
    [{ parts: [{ food: 'no-such-food', share: 1 }] }, /no food "no-such-food"/],
    [{ parts: [{ food: sugar.id, share: 1 }] }, /Sugar brings no protein/],
    [{ parts: [{ food: pea.id, share: 0.5 }] }, /come to 50 %/],
    [{ parts: [] }, /parts/],
    [{ parts: [{ food: 'own-other', share: 1 }] }, /parts/],
    [{ name: '' }, /name/],
    [{ name: '\u001b[2J\u0007' }, /name/],
    [{ name: 'x'.repeat(81) }, /name/],
    [{ perG: 0 }, /perG/],
    [{ perG: -5 }, /perG/],
    [{ proteinG: -1 }, /proteinG/],
    [{ proteinG: Number.NaN }, /proteinG/],
    [{ kcal: Number.POSITIVE_INFINITY }, /kcal/],
    [{ measures: [{ name: '1 scoop', grams: 0 }] }, /measures/],
  ])('%j is refused with the reason', (given, reason) => {
    expect(problems(given as Partial<OwnFoodInput>)).toMatch(reason)
  })

  test('a food without protein, fat or carbohydrate told is judged by what is told', () => {
    expect(problems({ fatG: null, carbohydrateG: null })).toBe('')
    expect(problems({ fatG: null, carbohydrateG: null, kcal: 180 })).toBe('')
    expect(problems({ fatG: null, carbohydrateG: null, kcal: 300 })).toMatch(/energy/)
  })

  test('ids are plain, prefixed and never taken', () => {
    expect(ownIdOf('Crème brûlée №5!')).toBe('own-creme-brulee-no5')
    expect(ownIdOf('豆腐')).toBe('own-food')
    expect(ownIdOf('Bar', ['own-bar', 'own-bar-2'])).toBe('own-bar-3')
  })

  test('whatever the label, either refused or a possible food', () => {
    const figure = fc.double({ min: 0, max: 120, noNaN: true })
    fc.assert(
      fc.property(
        figure,
        figure,
        figure,
        fc.double({ min: 0, max: 1000, noNaN: true }),
        (proteinG, fatG, carbohydrateG, kcal) => {
          const reading = ownFoodOf({ ...powder, perG: 100, proteinG, fatG, carbohydrateG, kcal }, table)
          if (!reading.ok) return
          const { per100g } = ownFoodToFood(reading.own, table)
          expect(per100g.proteinG).toBeLessThanOrEqual(100)
          expect(per100g.kcal).toBeLessThanOrEqual(915)
        },
      ),
    )
  })
})

describe('changing an own food', () => {
  test('keeps its id, and is checked like a new one', () => {
    const own = made()
    const edited = editOwnFood(own, { name: 'Another name', kcal: 120 }, table)
    expect(edited).toMatchObject({
      ok: true,
      own: { id: own.id, name: 'Another name', kcal: 120, proteinG: 24 },
    })
    expect(editOwnFood(own, { kcal: 1 }, table)).toMatchObject({ ok: false })
  })

  test('warns of what uses it', () => {
    const plates = [{ name: 'Monday\u0007 box', foods: ['own-bar', 'rice-white-dry'] }]
    expect(usesOfOwnFood('own-bar', [{ food: 'own-bar' }], plates)).toBe(
      'it is used by your shelf, Monday box',
    )
    expect(usesOfOwnFood('own-bar', [], [])).toBeNull()
    expect(usesOfOwnFood('own-other', [{ food: 'own-bar' }], plates)).toBeNull()
  })
})

describe('the table with own foods', () => {
  test('holds them behind its own, and tells of those that no longer hold', () => {
    const own = made()
    const gone = { ...own, id: 'own-gone', name: 'Gone', parts: [{ food: 'no-such', share: 1 }] }
    const { table: all, problems: told } = withOwnFoods(table, [own, gone])
    expect(all.foods).toHaveLength(table.foods.length + 1)
    expect(all.foodById.get(own.id)?.name).toBe('Galley powder')
    expect(all.sourceById.has('own')).toBe(true)
    expect(told).toEqual([expect.stringMatching(/^Gone is left out: .*no-such/)])
    expect(table.foodById.has(own.id)).toBe(false)
  })
})

describe('ingredients of a label', () => {
  test.each([
    [
      'Ingredients: wheat flour (wheat, iron), soy protein 20 %, oats.',
      ['wheat flour', 'soy protein', 'oats'],
    ],
    ['oats', ['oats']],
    ['pea (yellow (split)), [salt]; rice*', ['pea', 'rice']],
    ['', []],
    [' , ;,', []],
    ['open (bracket, oats', ['open bracket', 'oats']],
  ])('%j', (text, expected) => {
    expect(ingredientsOf(text)).toEqual(expected)
  })

  test('foods of a label in its order, each once; what is not known is told', () => {
    const reading = readLabel('Rice, salt, pea protein, rice, flavouring', resolve)
    expect(reading).toMatchObject({ ok: true, leftOut: ['salt', 'flavouring'] })
    expect(reading.ok && reading.foods.map(({ id }) => id)).toEqual([rice.id, pea.id])
  })

  test.each([
    ['', /give the ingredients/],
    ['salt, water', /no ingredient that brings protein is known: salt, water/],
    ['sugar', /no ingredient that brings protein/],
    ['rice,'.repeat(50), /50 ingredients are too many/],
  ])('%j is refused with the reason', (text, reason) => {
    const reading = readLabel(text, resolve)
    expect(reading.ok ? '' : reading.problem).toMatch(reason)
  })
})
