import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { createFinder, foodByWords, nearestFoods } from '../../src/foods/search.ts'
import { SMALL_TABLE } from './small-table.ts'

const finder = createFinder(SMALL_TABLE)
const first = (words: string) => finder.find(words)[0]?.food.id

describe('the order of hits', () => {
  test.each([
    // whole words before words that merely begin so
    ['peanuts', 'peanuts-raw'],
    ['pea', 'peanuts-raw'],
    // a name that is about the word before one that has it in passing
    ['rice', 'rice-white-boiled'],
    ['potato', 'potatoes-boiled'],
    ['eggs', 'egg-raw'],
    ['butter', 'peanut-butter'],
    // word order is free, states are understood, in the food's own words or others
    ['boiled lentils', 'lentils-brown-boiled'],
    ['lentils boiled', 'lentils-brown-boiled'],
    ['dry lentils', 'lentils-brown-dry'],
    ['uncooked red lentils', 'lentils-red-dry'],
    ['simmered red lentils', 'lentils-red-boiled'],
    ['sprouted lentils', 'lentils-brown-sprouted'],
    ['lentil sprouts', 'lentils-brown-sprouted'],
    ['dry chickpeas', 'chickpeas-dry'],
    ['tinned garbanzos', 'chickpeas-canned'],
    ['chickpeas from a can', 'chickpeas-canned'],
    ['chickpea flour', 'chickpea-flour'],
    ['canned black beans', 'black-beans-canned'],
    ['steamed brown rice', 'rice-brown-boiled'],
    ['raw brown rice', 'rice-brown-dry'],
    ['dry roasted peanuts', 'peanuts-roasted'],
    ['toasted peanuts', 'peanuts-roasted'],
    ['dried apricots', 'apricots-dried'],
    // an alias of one state finds the kin in another
    ['boiled masoor dal', 'lentils-red-boiled'],
    ['garbanzo beans dry', 'chickpeas-dry'],
    // spelling: British, American, Indian, accents, case, hyphens, words run together or apart
    ['BRINJAL', 'eggplant-raw'],
    ['aubergines', 'eggplant-raw'],
    ['eggplant', 'eggplant-raw'],
    ['বেগুন', 'eggplant-raw'],
    ['soya milk', 'soy-milk'],
    ['soymilk', 'soy-milk'],
    ['chick-peas', 'chickpeas-boiled'],
    ['Tófü', 'tofu-firm'],
    ['wholemeal bread', 'bread-whole-wheat'],
    ['hen’s egg', 'egg-raw'],
    ["hen's egg", 'egg-raw'],
    // typing mistakes and words not yet typed to their end
    ['chikpea', 'chickpeas-boiled'],
    ['tofoo', 'tofu-firm'],
    ['lentles', 'lentils-brown-boiled'],
    ['quinua', 'quinoa-boiled'],
    ['potatos boild', 'potatoes-boiled'],
    ['len', 'lentils-brown-boiled'],
    ['chickp', 'chickpeas-boiled'],
    ['red lent', 'lentils-red-dry'],
    // words of praise and preparation cost nothing
    ['a bunch of fresh organic spinach, chopped', 'spinach-raw'],
    ['lentils-red-dry', 'lentils-red-dry'],
  ])('%j first finds %s', (words, id) => {
    expect(first(words)).toBe(id)
  })

  test('ranking does not need first answers to put everyday foods first', () => {
    const bare = createFinder(SMALL_TABLE.map(food => ({ ...food, firstFor: [] })))
    const firsts = (words: string, n: number) => bare.find(words, { limit: n }).map(hit => hit.food.id)
    expect(firsts('rice', 4)).not.toContain('rice-bran')
    expect(firsts('rice', 4)).not.toContain('rice-protein')
    expect(firsts('potato', 2)).toEqual(['potatoes-boiled', 'potatoes-raw'])
    expect(firsts('egg', 1)).not.toEqual(['egg-white-raw'])
  })

  test('a state that is not there comes after, not instead', () => {
    const [hit] = finder.find('boiled lentils')
    const other = finder.find('boiled lentils').find(({ food }) => food.state === 'dry')
    expect(other).toBeDefined()
    expect(other!.score).toBeLessThan(hit!.score)
  })
})

describe('find', () => {
  test('nothing for nothing', () => {
    for (const words of ['', '   ', '\u0000\u001b[31m', '!?;']) expect(finder.find(words)).toEqual([])
  })

  test('limit and accept', () => {
    expect(finder.find('lentils', { limit: 2 })).toHaveLength(2)
    expect(finder.find('lentils', { limit: 0 })).toEqual([])
    const dry = finder.find('lentils', { accept: food => food.state === 'dry' }).map(hit => hit.food.id)
    expect(dry).toEqual(['lentils-brown-dry', 'lentils-red-dry'])
  })

  test('scores fall from hit to hit, and no food comes twice', () => {
    for (const words of ['lentils', 'r', 'boiled', 'beans canned', 'lentils-red-dry', 'chikpea']) {
      const hits = finder.find(words, { limit: 100 })
      expect(hits.length).toBeGreaterThan(0)
      const scores = hits.map(hit => hit.score)
      expect(scores).toEqual([...scores].sort((a, b) => b - a))
      expect(new Set(hits.map(hit => hit.food.id)).size).toBe(hits.length)
    }
  })

  test.each([
    ['lentils', 'lentils-brown-boiled', ['Lentils']],
    ['boiled lentil', 'lentils-brown-boiled', ['Lentils', 'boiled']],
    ['len', 'lentils-brown-boiled', ['Len']],
    ['tofoo', 'tofu-firm', ['Tofu']],
    ['masur', 'lentils-brown-boiled', []],
    ["hen's egg", 'egg-raw', ['Hen’s', 'egg']],
  ])('%j marks in the name of %s the letters %j', (words, id, marked) => {
    const { food, matched } = finder.find(words).find(hit => hit.food.id === id)!
    expect(matched.map(([start, end]) => food.name.slice(start, end))).toEqual(marked)
  })

  test('whatever is typed, the marks lie in the name, in order and apart', () => {
    const piece = fc.oneof(
      fc.constantFrom('lentil', 'red', 'tof', 'beans', 'canned', 'egg', ' ', '-', '\u001b[1m', '½', 'é'),
      fc.string({ unit: 'grapheme', maxLength: 6 }),
    )
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 6 }), pieces => {
        for (const { food, score, matched } of finder.find(pieces.join(''))) {
          expect(Number.isFinite(score)).toBe(true)
          let before = 0
          for (const [start, end] of matched) {
            expect(start).toBeGreaterThanOrEqual(before)
            expect(end).toBeGreaterThan(start)
            expect(end).toBeLessThanOrEqual(food.name.length)
            before = end
          }
        }
      }),
      { numRuns: 500 },
    )
  })

  test('long junk is answered like any other text', () => {
    for (const junk of [
      'x'.repeat(10_000),
      'lentils '.repeat(2000),
      '\u001b['.repeat(5000),
      'ab '.repeat(4000),
    ])
      expect(Array.isArray(finder.find(junk))).toBe(true)
    expect(finder.find('lentils '.repeat(2000))[0]?.food.kin).toBe('lentil-brown')
  })

  test('words that every object has are only words', () => {
    for (const word of ['constructor', '__proto__', 'toString', 'hasOwnProperty'])
      expect(() => finder.find(word)).not.toThrow()
  })
})

describe('foodByWords', () => {
  test.each([
    ['lentils-red-dry', 'lentils-red-dry'],
    ['Lentils-Red-Dry', 'lentils-red-dry'],
    ['Lentils, red, split, dry', 'lentils-red-dry'],
    ['lentils', 'lentils-brown-boiled'],
    ['dry red lentils', 'lentils-red-dry'],
    ['garbanzo beans', 'chickpeas-boiled'],
    ['besan', 'chickpea-flour'],
    ['chikpeas', 'chickpeas-boiled'],
    ['tofu', 'tofu-firm'],
  ])('%j is %s', (words, id) => {
    const reading = foodByWords(words, finder)
    expect(reading.ok ? reading.food.id : reading.problem).toBe(id)
  })

  test.each([
    // several kinds fit alike
    ['beans', /several/, ['black-beans-boiled', 'kidney-beans-boiled']],
    // the state is not there
    ['fried lentils', /state/, ['lentils-brown-boiled']],
    // a word is left over
    ['lentil soup', /no food is called "lentil soup"/, ['lentils-brown-boiled']],
    ['unobtainium', /no food is called "unobtainium"/, []],
    ['', /no food is named/, []],
  ])('%j is refused in one line', (words, problem, among) => {
    const reading = foodByWords(words, finder)
    if (reading.ok) throw new Error(`took ${words} for ${reading.food.id}`)
    expect(reading.problem).toMatch(problem)
    expect(reading.problem).not.toContain('\n')
    expect(reading.nearest.length).toBeLessThanOrEqual(3)
    for (const id of among) expect(reading.nearest.map(food => food.id)).toContain(id)
    for (const food of reading.nearest) expect(reading.problem).toContain(food.id)
  })

  test('what the problem quotes is safe for a terminal, and short', () => {
    const reading = foodByWords(`\u001b[31munob\u0000tainium\n${'x'.repeat(9000)}`, finder)
    if (reading.ok) throw new Error('taken for a food')
    expect(reading.problem).not.toMatch(/\p{Cc}/u)
    expect(reading.problem.length).toBeLessThan(250)
  })

  test('every food answers to its id and its name', () => {
    for (const food of SMALL_TABLE) {
      expect(foodByWords(food.id, finder)).toEqual({ ok: true, food })
      expect(foodByWords(food.name, finder)).toEqual({ ok: true, food })
    }
  })
})

test('nearestFoods gives at most so many, the best first', () => {
  expect(nearestFoods('lentil soup', finder).map(food => food.kin)).toContain('lentil-brown')
  expect(nearestFoods('lentils', finder, 2)).toHaveLength(2)
  expect(nearestFoods('zzzzzzzzzz', finder)).toEqual([])
})
