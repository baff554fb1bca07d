import { describe, expect, test } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { readPortion } from '../../src/foods/read-portion.ts'
import { createFinder, foodByWords } from '../../src/foods/search.ts'
import { QUERIES } from './queries.ts'

const table = loadTable()
const finder = createFinder(table.foods)
const idsFor = (words: string, limit: number) => finder.find(words, { limit }).map(hit => hit.food.id)

describe('what cooks type, on the whole table', () => {
  test('no query stands twice, and each expects foods that the table has', () => {
    expect(QUERIES.length).toBeGreaterThanOrEqual(220)
    expect(new Set(QUERIES.map(([words]) => words)).size).toBe(QUERIES.length)
    for (const [words, ...ids] of QUERIES) {
      const unknown = ids.filter(id => !table.foodById.has(id))
      expect([words, unknown]).toEqual([words, []])
    }
  })

  test('the food that is meant comes first for at least 95 of 100', () => {
    const missed = QUERIES.filter(([words, ...ids]) => !ids.includes(idsFor(words, 1)[0] ?? ''))
    const rate = 1 - missed.length / QUERIES.length
    const shown = missed.map(([words]) => `${words} -> ${idsFor(words, 1)[0]}`)
    expect(rate, shown.join('; ')).toBeGreaterThanOrEqual(0.95)
  })

  test('the food that is meant is always among the first five', () => {
    const missed = QUERIES.filter(([words, ...ids]) => !idsFor(words, 5).some(id => ids.includes(id)))
    expect(missed.map(([words]) => `${words} -> ${idsFor(words, 5).join(' ')}`)).toEqual([])
  })
})

test('the first searches of a command, answered from few foods, are answered as from all', () => {
  const forms = (query: string) => [query, query.slice(0, 5), `${query} boiled`, query.toUpperCase()]
  const words = QUERIES.map(([query], i) => forms(query)[i % 4]!)
  const all = createFinder(table.foods)
  // a beginning of one letter needs the whole index, which then answers all that follows
  all.find('a')
  for (const query of words) {
    const quick = createFinder(table.foods).weigh(query)
    expect([query, quick]).toEqual([query, all.weigh(query)])
  }
})

describe('every food of the table', () => {
  test('comes first for its own name and its own id, and is taken for neither more nor less', () => {
    for (const food of table.foods) {
      expect(foodByWords(food.name, finder)).toEqual({ ok: true, food })
      expect(foodByWords(food.id, finder)).toEqual({ ok: true, food })
    }
  })

  test('is found by each of its aliases, by itself or in another state of its kin', () => {
    const lost: string[] = []
    for (const food of table.foods)
      for (const alias of food.aliases) {
        const hits = finder.find(alias, { limit: 10 })
        if (!hits.some(hit => hit.food.kin === food.kin)) lost.push(`${alias} (${food.id})`)
      }
    expect(lost).toEqual([])
  })

  test('is the first for the bare words that the table gives it', () => {
    for (const food of table.foods)
      for (const bare of food.firstFor) expect([bare, idsFor(bare, 1)[0]]).toEqual([bare, food.id])
  })

  test('is read in grams by its name, and in each of its measures', () => {
    for (const food of table.foods) {
      const inGrams = readPortion(`120 g ${food.name}`, finder)
      expect([food.name, inGrams]).toMatchObject([food.name, { ok: true, grams: 120, food: { id: food.id } }])
      for (const measure of food.measures) {
        const reading = readPortion(`${measure.name.replace(/,.*/, '')} ${food.id}`, finder)
        // two measures of one unit (chopped, sliced) may be asked back, one must be read
        if (reading.ok) expect(reading.food.id).toBe(food.id)
        else expect([reading.problem, reading.nearest.length > 0]).toEqual([reading.problem, true])
      }
    }
  })
})

test.each([
  ...[
    'dosa',
    'muesli',
    'granola',
    'croissant',
    'salmon',
    'marmite',
    'oat flour',
    'hazelnut milk',
    'lentil soup',
    'kimchi',
  ],
  ...[
    'french fries',
    'smoked tofu',
    'roasted chickpeas',
    'boiled egg white',
    'seeds',
    'margarine',
    'juice',
    'e',
    'pe',
  ],
])('%j, which the table does not have or has several of, is not taken for another food', words => {
  const reading = foodByWords(words, finder)
  expect(reading.ok ? reading.food.id : null).toBeNull()
})

test.each([
  ['lentles', 'lentils-brown'],
  ['chikpea', 'chickpeas'],
  ['garbonzo', 'chickpeas'],
  ['penut butter', 'peanut-butter'],
  ['kidny beans', 'kidney-beans'],
  ['quinuoa', 'quinoa'],
])('a plain mistake such as %j is understood', (words, kin) => {
  const reading = foodByWords(words, finder)
  expect(reading.ok ? reading.food.kin : reading.problem).toBe(kin)
})

test.each([
  ['200 g lentils, boiled', 'lentils-brown-boiled', 200],
  ['1 1/2 cups cooked brown rice', 'rice-brown-boiled', null],
  ['½ cup dry red lentils', 'lentils-red-dry', null],
  ['2 tbsp tahini', 'tahini', null],
  ['1 can chickpeas', 'chickpeas-canned', null],
  ['3 slices whole wheat bread', 'bread-whole-wheat', null],
  ['a handful of almonds', 'almonds', null],
  ['8 oz tofu', 'tofu-firm', 226.796185],
  ['1 kg potatoes', 'potatoes-boiled', 1000],
  ['two eggs', 'eggs-raw', null],
  ['half a block of tofu', 'tofu-firm', null],
  ['250ml soy milk', 'soy-milk', null],
])('the table reads %j', (text, id, grams) => {
  const reading = readPortion(text, finder)
  if (!reading.ok) throw new Error(reading.problem)
  expect(reading.food.id).toBe(id)
  if (grams !== null) expect(reading.grams).toBeCloseTo(grams, 6)
  else {
    // a cup, can, slice or handful of any of these weighs between a bite and a meal
    expect(reading.grams).toBeGreaterThan(10)
    expect(reading.grams).toBeLessThan(400)
    expect(reading.measure).not.toBeNull()
  }
})
