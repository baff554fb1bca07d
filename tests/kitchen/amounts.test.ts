import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { aboutMass, formatAmount, massText, waterText } from '../../src/kitchen/amounts.ts'
import { fractionText, roundToOneOf } from '../../src/kitchen/fractions.ts'
import type { FoodYield } from '../../src/kitchen/kitchen-file.ts'
import { cupOf, measureText } from '../../src/kitchen/measures.ts'
import { yieldByWater } from '../../src/kitchen/water-balance.ts'
import { cookedFrom, dryFor } from '../../src/kitchen/yields.ts'
import { aFood } from './a-food.ts'

const measure = (name: string, grams: number) => ({ name, grams, source: 'test' })
const dry = aFood({ id: 'beans-dry', state: 'dry', measures: [measure('1 cup', 192), measure('1 tbsp', 12)] })
const boiled = aFood({ id: 'beans-boiled', measures: [measure('1 cup', 198)] })
const beans: FoodYield = {
  from: 'beans-dry',
  to: 'beans-boiled',
  before: 'dry',
  after: 'boiled',
  factor: 2.4,
  low: 2.2,
  high: 2.6,
  basis: 'curated',
  source: 'test',
  provenance: 'test',
}

describe('dry to cooked and back', () => {
  test('by the yield, with its range', () => {
    expect(cookedFrom(dry, 100, [beans])).toMatchObject({
      food: 'beans-boiled',
      grams: 240,
      lowG: expect.closeTo(220),
      highG: expect.closeTo(260),
      state: 'boiled',
    })
    const back = dryFor(boiled, 240, [beans])!
    expect(back).toMatchObject({ food: 'beans-dry', state: 'dry' })
    expect(back.grams).toBeCloseTo(100, 9)
    expect(back.lowG).toBeLessThan(back.grams)
    expect(back.highG).toBeGreaterThan(back.grams)
  })

  test('there and back is the same weight', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1e6, noNaN: true }), grams => {
        expect(dryFor(boiled, cookedFrom(dry, grams, [beans])!.grams, [beans])!.grams).toBeCloseTo(grams, 6)
      }),
    )
  })

  test('a food without a yield has none either way', () => {
    expect(cookedFrom(boiled, 100, [beans])).toBeNull()
    expect(dryFor(dry, 100, [beans])).toBeNull()
    expect(cookedFrom(aFood({ id: 'oil' }), 100, [beans])).toBeNull()
  })

  test('the water balance refuses rows that do not belong together', () => {
    expect(yieldByWater({ waterG: 10, crudeProteinG: 20 }, { waterG: 70, crudeProteinG: 12 })).toBeNull()
    expect(yieldByWater({ waterG: 10, crudeProteinG: 20 }, { waterG: 100, crudeProteinG: 8 })).toBeNull()
    expect(yieldByWater({ waterG: 10, crudeProteinG: 0 }, { waterG: 60, crudeProteinG: 0 })).toBeNull()
  })
})

describe('amounts as the cook has the food', () => {
  test.each([
    [95, '95 g dry = 1/2 cup, about 230 g boiled'],
    [190, '190 g dry = 1 cup, about 460 g boiled'],
    [24, '24 g dry = 2 tbsp, about 60 g boiled'],
    [128, '130 g dry = 2/3 cup, about 310 g boiled'],
    [75, '75 g dry = 1/3 cup + 1 tbsp, about 180 g boiled'],
    [1152, '1.15 kg dry = 6 cups, about 2.75 kg boiled'],
  ])('%d g', (grams, text) => {
    expect(formatAmount(dry, grams, 'metric', [beans])).toBe(text)
  })

  test.each([
    [95, '3 1/4 oz dry = 1/2 cup, about 8 oz boiled'],
    [453.6, '1 lb dry = 2 1/3 cups, about 2 lb 6 oz boiled'],
    [2000, '4 lb 7 oz dry = 10 1/3 cups, about 10 lb 9 oz boiled'],
  ])('%d g in US measures', (grams, text) => {
    expect(formatAmount(dry, grams, 'us', [beans])).toBe(text)
  })

  test('pieces are counted, in halves', () => {
    const bread = aFood({
      id: 'bread',
      state: 'product',
      measures: [measure('1 slice, thin', 30), measure('1/4 block', 81)],
    })
    expect(measureText(bread, 60)).toBe('2 slices, thin')
    expect(measureText(bread, 45)).toBe('1 1/2 slices, thin')
    expect(measureText(bread, 324)).toBe('1 block')
    expect(measureText(bread, 162)).toBe('1/2 block')
  })

  test('a cup is found in any measure that is filled', () => {
    expect(cupOf(aFood({ measures: [measure('2 tbsp', 32)] }))).toBe(256)
    expect(cupOf(aFood({ measures: [measure('1 tsp', 4)] }))).toBe(192)
    expect(cupOf(aFood({ measures: [measure('1/2 cup, mashed', 100)] }))).toBe(200)
    expect(cupOf(aFood({ measures: [measure('½ cup', 100)] }))).toBe(200)
    expect(cupOf(aFood({ measures: [measure('1 can', 400)] }))).toBeNull()
    expect(cupOf(aFood({ measures: [measure('a cupful', 400), measure('0 cup', 10)] }))).toBeNull()
  })

  test('where a cup can be filled in several forms, the form is said', () => {
    const nuts = aFood({
      id: 'nuts',
      measures: [measure('1 cup, whole', 140), measure('1 cup, chopped', 110), measure('1 kernel,', 5)],
    })
    expect(measureText(nuts, 70)).toBe('1/2 cup, whole')
    expect(measureText(nuts, 10)).toBe('2 kernels')
    expect(measureText(aFood({ measures: [measure('1 cup, cooked', 160)] }), 80)).toBe('1/2 cup')
  })

  test('small amounts come in spoons', () => {
    const sesame = aFood({ id: 's', state: 'raw', stepG: 1, measures: [measure('1 tbsp', 9)] })
    expect(formatAmount(sesame, 9, 'metric', [])).toBe('9 g = 1 tbsp')
    expect(formatAmount(sesame, 3, 'metric', [])).toBe('3 g = 1 tsp')
    expect(formatAmount(sesame, 1.5, 'metric', [])).toBe('1.5 g = 1/2 tsp')
    expect(formatAmount(sesame, 14, 'metric', [])).toBe('14 g = 1 1/2 tbsp')
  })

  test('what no spoon can do is not said', () => {
    expect(measureText(dry, 0)).toBeNull()
    expect(measureText(dry, Number.NaN)).toBeNull()
    expect(measureText(aFood({ measures: [] }), 100)).toBeNull()
    expect(measureText(aFood({ measures: [measure('1 can', 400)] }), 100)).toBeNull()
  })

  test('a measure is never further off than it says: 4 %, or 15 % with "about"', () => {
    const inCups = (text: string): number => {
      let grams = 0
      for (const part of text.replace('about ', '').split(' + ')) {
        const match = /^(?:(\d+) )?(?:(\d+)\/(\d+) )?(cups?|tbsp|tsp)$/.exec(part)!
        const count =
          Number(match[1] ?? 0) + (match[2] === undefined ? 0 : Number(match[2]) / Number(match[3]))
        grams += count * (match[4]!.startsWith('cup') ? 192 : match[4] === 'tbsp' ? 12 : 4)
      }
      return grams
    }
    fc.assert(
      fc.property(fc.double({ min: 1, max: 5000, noNaN: true }), grams => {
        const text = measureText(dry, grams)
        if (text === null) return
        const error = Math.abs(inCups(text) - grams) / grams
        expect(error).toBeLessThanOrEqual(text.startsWith('about') ? 0.15 : 0.0401)
      }),
    )
  })

  test('weights are what a scale shows', () => {
    expect(massText(0.04, 'metric')).toBe('under 0.1 g')
    expect(massText(0.26, 'metric')).toBe('0.3 g')
    expect(massText(7.3, 'metric')).toBe('7.5 g')
    expect(massText(33.4, 'metric')).toBe('33 g')
    expect(massText(132, 'metric', 5)).toBe('130 g')
    expect(massText(999.6, 'metric')).toBe('1 kg')
    expect(massText(12_340, 'metric')).toBe('12.3 kg')
    expect(massText(1, 'us')).toBe('under 1/4 oz')
    expect(massText(28.35, 'us')).toBe('1 oz')
    expect(massText(453.59, 'us')).toBe('1 lb')
    expect(aboutMass(2, 'metric')).toBe('about 5 g')
    expect(aboutMass(1234, 'metric')).toBe('about 1.25 kg')
  })

  test('water is what a jug shows', () => {
    expect(waterText(20, 'metric')).toBe('50 ml')
    expect(waterText(433, 'metric')).toBe('450 ml')
    expect(waterText(990, 'metric')).toBe('1 litre')
    expect(waterText(1410, 'metric')).toBe('1.4 litres')
    expect(waterText(5200, 'metric')).toBe('5 litres')
    expect(waterText(240, 'us')).toBe('1 cup')
    expect(waterText(20, 'us')).toBe('1/4 cup')
    expect(waterText(4000, 'us')).toBe('4 quarts')
  })

  test('fractions', () => {
    expect(fractionText(roundToOneOf(1.49, [0, 1 / 2]))).toBe('1 1/2')
    expect(fractionText(roundToOneOf(0.9, [0, 1 / 4, 1 / 3, 1 / 2, 2 / 3, 3 / 4]))).toBe('1')
    expect(fractionText(roundToOneOf(0, [0, 1 / 2]))).toBe('0')
  })
})
