import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { readInputs } from '../../src/build/compile/inputs.ts'
import { rowsOf } from '../../src/build/compile/rows.ts'
import { foodSchema } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { createFinder } from '../../src/foods/search.ts'

const { foods, sourceById } = loadTable()
const finder = createFinder(foods)
const inputs = readInputs()
const curation = (name: string) =>
  rowsOf(readFileSync(new URL(`../../data/curation/${name}.csv`, import.meta.url), 'utf8'), name)

describe('the table', () => {
  it('has at least 450 foods, each complete, each with sources that are listed', () => {
    expect(foods.length).toBeGreaterThanOrEqual(450)
    for (const food of foods) {
      expect(foodSchema.safeParse(food).success, food.id).toBe(true)
      for (const id of food.sources) expect(sourceById.has(id), `${food.id}: ${id}`).toBe(true)
    }
  })

  it('is counted right where it is described', () => {
    const read = (path: string) => readFileSync(new URL(`../../${path}`, import.meta.url), 'utf8')
    const described = read('data/README.md')
    const count = (pattern: RegExp) => Number(pattern.exec(described)?.[1])
    const having = (tier: string) => foods.filter(food => food.profileTier === tier).length
    expect(count(/`foods\.json` \((\d+) foods\)/)).toBe(foods.length)
    expect(count(/`measured` \((\d+) foods\)/)).toBe(having('measured'))
    expect(count(/`borrowed` \((\d+)\)/)).toBe(having('borrowed'))
    expect(count(/`estimated` \((\d+)\)/)).toBe(having('estimated'))
    expect(count(/most nuts: (\d+) foods/)).toBe(
      foods.filter(food => food.digestibilityTier === 'class default').length,
    )
    expect(/\*\*Data\.\*\* (\d+) foods/.exec(read('README.md'))?.[1]).toBe(String(foods.length))
  })

  it('names no brand', () => {
    // Descriptions of the American table write brands in capitals.
    for (const { name, aliases } of foods)
      for (const text of [name, ...aliases]) expect(text).not.toMatch(/\b[A-Z]{5,}\b|®|™/)
  })

  it('uses every plant row of the Indian table that has amino acids, or says why not', () => {
    const used = new Set(
      inputs.foods.flatMap(({ text }) =>
        [...`${text.composition} ${text.profile}`.matchAll(/[A-K]\d{3}/g)].map(match => match[0]),
      ),
    )
    for (const { text } of curation('local-names')) used.add(text.code!)
    const leftOut = new Map(curation('ifct-left-out').map(({ text }) => [text.code!, text.why!]))
    for (const why of leftOut.values()) expect(why.length).toBeGreaterThan(10)
    const plants = [...inputs.ifct.values()].filter(
      ({ code, mgPerG }) => /^[A-K]/.test(code) && mgPerG !== null,
    )
    expect(plants.length).toBeGreaterThan(300)
    expect(
      plants
        .filter(({ code }) => !used.has(code) && !leftOut.has(code))
        .map(({ code, name }) => `${code} ${name}`),
    ).toEqual([])
  })

  it('does with the Indian profiles what cross-check.csv says', () => {
    const profiles = new Set(
      inputs.foods.flatMap(({ text }) =>
        [...(text.profile ?? '').matchAll(/[A-K]\d{3}/g)].map(match => match[0]),
      ),
    )
    const rows = curation('cross-check')
    expect(rows.length).toBeGreaterThanOrEqual(91)
    for (const { text } of rows) {
      expect(text.why!.length, text.ifct_code).toBeGreaterThan(10)
      if (text.done!.startsWith('profile used'))
        expect(profiles.has(text.ifct_code!), text.ifct_code).toBe(true)
      else expect(profiles.has(text.ifct_code!), text.ifct_code).toBe(false)
    }
  })
})

describe('what must be there', () => {
  // One line a kitchen's shelf; each is found under these words, by its name or by an alias.
  const MUST =
    `rolled oats; steel-cut oats; oat bran; white flour; whole wheat flour; dry bulgur; boiled bulgur; couscous; dry pasta;
    boiled pasta; white bread; whole wheat bread; seitan; vital gluten; wheat germ; spelt; farro; white rice; boiled white rice; brown rice;
    boiled brown rice; wild rice; boiled wild rice; cornmeal; masa; corn tortilla; hominy; sweet corn; popcorn; barley; rye; buckwheat;
    millet; sorghum; teff; quinoa; boiled quinoa; amaranth; brown lentils; red lentils; green lentils; boiled lentils; canned lentils;
    dry chickpeas; boiled chickpeas; canned chickpeas; split peas; boiled split peas; green peas; dry black beans; boiled black beans;
    canned black beans; dry kidney beans; boiled kidney beans; canned kidney beans; dry pinto beans; canned pinto beans; navy beans;
    cannellini; lima beans; adzuki; mung beans; boiled mung beans; black-eyed peas; fava beans; broad beans; lupin; pigeon peas; hummus;
    besan; soybeans; boiled soybeans; edamame; silken tofu; soft tofu; firm tofu; extra firm tofu; fried tofu; freeze-dried tofu; tempeh;
    natto; miso; soy milk; soy yoghurt; textured soy protein dry; textured soy protein rehydrated; soy flour; peanuts; peanut butter;
    almonds; walnuts; cashews; hazelnuts; pistachios; pecans; brazil nuts; pine nuts; macadamias; chestnuts; coconut; pumpkin seeds;
    sunflower seeds; sesame; tahini; flaxseed; chia; hemp seeds; poppy seeds; potatoes; sweet potatoes; cassava; yam; plantain; nori;
    wakame; spirulina; nutritional yeast; baker's yeast; soy protein isolate; pea protein; rice protein; wheat protein; hemp protein;
    potato protein; pea and rice protein; soy sauce; olive oil; sugar; hen's egg; egg white; cow's milk; yoghurt; curd cheese; cheddar;
    whey; casein; chicken breast; pork; beef; cod; garbanzo; aubergine; eggplant; brinjal; coriander; cilantro; urad; toor; rajma`
      .split(';')
      .map(words => words.trim().replace(/\s+/g, ' '))

  it.each(MUST)('%s', words => {
    const [first] = finder.find(words, { limit: 1 })
    const head = words.split(' ').at(-1)!.replace(/s$/, '').slice(0, 4).toLowerCase()
    const { name, aliases, firstFor } = first!.food
    expect([name, ...aliases, ...firstFor].join(' ').toLowerCase()).toContain(head)
  })

  it('animal foods are marked so, and meat and fish are for comparison only', () => {
    for (const food of foods) {
      const animal = ['egg', 'dairy', 'meat-fish'].includes(food.role)
      expect(food.origin !== 'plant', food.id).toBe(animal)
      expect(food.place === 'comparator', food.id).toBe(food.role === 'meat-fish')
    }
  })
})
