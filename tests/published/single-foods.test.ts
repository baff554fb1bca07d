import { describe, expect, it } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { PatternId } from '../../src/nutrition/pattern.ts'
import { pdcaasOf } from '../../src/nutrition/pdcaas.ts'
import { bandOf } from '../../src/nutrition/uncertainty.ts'

const table = loadTable()

function food(id: string): Food {
  const found = table.foodById.get(id)
  if (found === undefined) throw new Error(`the table has no "${id}"`)
  return found
}

const child: PatternId = 'fao-2013-child'
const over3: PatternId = 'fao-2013-over-3y'

/**
 * Published DIAAS of single foods against this table. The published value and ours are two draws of one food from
 * different laboratories, varieties and animals. Ours has a stated 90 % band, of +/- 1.645 standard deviations; the
 * difference of two draws with that spread has sqrt(2) times the deviation, and 99 % of differences lie within 2.576
 * of those: so a value is met within 2.576 x sqrt(2) / 1.645 = 2.21 half bands. That is wide for one food; what makes
 * the set strict is that half of the foods must be met within 15 %, and that the wrong formulas below are not.
 */
const HALF_BANDS = 2.21

const PUBLISHED: [id: string, pattern: PatternId, diaas: number, source: string][] = [
  ['soy-protein-isolate', over3, 98, 'Br J Nutr 2017;117:490, pig; read in Nutr Rev 2022;80:1648'],
  ['soy-flour-defatted', over3, 105, 'Br J Nutr 2017;117:490, pig; read in Nutr Rev 2022;80:1648'],
  ['pea-protein', over3, 73, 'Br J Nutr 2017;117:490, pig; read in Nutr Rev 2022;80:1648'],
  ['milk-powder-skimmed', over3, 123, 'Br J Nutr 2017;117:490, pig; read in Nutr Rev 2022;80:1648'],
  ['whey-protein', over3, 133, 'Br J Nutr 2017;117:490, pig; read in Nutr Rev 2022;80:1648'],
  ['wheat-berries-dry', over3, 54, 'Br J Nutr 2017;117:490, pig; memory'],
  ['rice-protein', child, 37, 'J Nutr 2015;145:372, rat; memory'],
  ['peanuts-roasted', child, 43, 'J Nutr 2015;145:372, rat; memory'],
  ['wheat-bran', child, 41, 'J Nutr 2015;145:372, rat; memory'],
  ['rice-white-boiled', child, 60, 'J Nutr 2015;145:372, rat; memory'],
  ['maize-dry', child, 36, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['hemp-seeds-hulled', child, 54, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['broad-beans-boiled', child, 55, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['oats-rolled', child, 57, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['lupins-boiled', child, 68, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['split-peas-green-boiled', child, 70, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['soybeans-boiled', child, 91, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['potato-protein', child, 100, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['eggs-boiled', child, 101, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['casein', child, 117, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  ['pork-loin-roasted', child, 117, 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'],
  [
    'barley-hulled-dry',
    over3,
    51,
    'Br J Nutr 2014;111:1663, pig, raw; read in a summary, pattern as its review says',
  ],
  ['rye-dry', over3, 47, 'Br J Nutr 2014;111:1663, pig, raw; read in a summary'],
  ['sorghum-dry', over3, 29, 'Br J Nutr 2014;111:1663, pig, raw; read in a summary'],
  ['oats-steel-cut-dry', over3, 77, 'Br J Nutr 2014;111:1663, pig, raw; read in a summary'],
  ['maize-dry', over3, 48, 'Br J Nutr 2014;111:1663, pig, raw; read in a summary'],
  ['rice-white-dry', over3, 64, 'Br J Nutr 2014;111:1663, pig, raw; read in a summary'],
  ['lentils-red-boiled', child, 54, 'Food Chem 2018;240:588, rat; read (abstract)'],
  ['lentils-green-boiled', child, 49, 'Food Chem 2018;240:588, rat; read (abstract)'],
  ['split-peas-green-boiled', child, 67, 'J Agric Food Chem 2017;65:7790, rat; read (abstract)'],
  ['chickpeas-boiled', child, 78, 'Food Sci Nutr 2020;8:2950, rat; read (abstract)'],
  ['pinto-beans-boiled', child, 61, 'Nutrients 2018;10:671, mean of Phaseolus beans, rat; read (abstract)'],
  ['navy-beans-boiled', child, 61, 'Nutrients 2018;10:671, mean of Phaseolus beans, rat; read (abstract)'],
  ['kidney-beans-boiled', child, 59, 'J Nutr 2015;145:372, rat; memory'],
  ['broad-beans-boiled', child, 61, 'Nutrients 2018;10:671, baked, rat; read (abstract)'],
  ['adzuki-beans-boiled', over3, 78, 'Plants 2021;10:1999, pig; read (abstract)'],
  ['mung-beans-boiled', over3, 93, 'Plants 2021;10:1999, pig; read (abstract)'],
  ['millet-boiled', over3, 22, 'Plants 2021;10:1999, pig; read (abstract)'],
  ['buckwheat-boiled', child, 68, 'Br J Nutr 2018, nine cooked cereals, rat; read (abstract)'],
  ['pistachios', over3, 83, 'J Sci Food Agric 2020, roasted, pig; read; pattern not stated'],
  ['tofu-firm', over3, 97, 'Food Chem 2021;338:128020, minipig; read (abstract), pattern not stated'],
  ['soy-milk', over3, 117, 'Food Chem 2021;338:128020, minipig; read (abstract), pattern not stated'],
]

const ours = (id: string, pattern: PatternId) =>
  diaasOf([{ food: food(id), grams: 100 }], table.patternById.get(pattern)!).diaas!

const deviations = (score: (id: string, pattern: PatternId) => number): number[] =>
  PUBLISHED.map(([id, pattern, diaas]) => Math.abs(Math.log(score(id, pattern) / diaas))).sort(
    (a, b) => a - b,
  )

const median = (sorted: number[]): number => sorted[Math.floor(sorted.length / 2)]!

describe('published DIAAS of single foods', () => {
  it.each(PUBLISHED)('%s, %s: %d (%s)', (id, pattern, published) => {
    const of = table.patternById.get(pattern)!
    const band = bandOf([{ food: food(id), grams: 100 }], of, table.coefficients)!
    const half = Math.log(band.high / band.low) / 2
    const deviation = Math.abs(Math.log(ours(id, pattern) / published))
    expect(deviation).toBeLessThan(HALF_BANDS * half + 0.5 / published)
  })

  it('half of them are met within 15 %, and there is no lean of more than 10 % to either side', () => {
    expect(median(deviations(ours))).toBeLessThan(0.15)
    const lean = PUBLISHED.map(([id, pattern, diaas]) => Math.log(ours(id, pattern) / diaas)).sort(
      (a, b) => a - b,
    )
    expect(Math.abs(median(lean))).toBeLessThan(0.1)
  })

  it('wrong formulas miss them by more', () => {
    const right = median(deviations(ours))
    const swapped = (id: string, pattern: PatternId) => ours(id, pattern === child ? over3 : child)
    const undigested = (id: string, pattern: PatternId) => {
      const whole = food(id)
      const digestibility = Object.fromEntries(
        Object.keys(whole.digestibility).map(key => [key, 1]),
      ) as typeof whole.digestibility
      return diaasOf([{ food: { ...whole, digestibility }, grams: 1 }], table.patternById.get(pattern)!)
        .diaas!
    }
    for (const wrong of [swapped, undigested]) expect(median(deviations(wrong))).toBeGreaterThan(1.2 * right)
  })
})

describe('published PDCAAS of single foods', () => {
  const of1991 = table.patternById.get('fao-who-1991')!
  // The pattern of 1991 is rounded and the faecal digestibilities are few: 20 % covers the spread between the lists
  // that are commonly cited (whole wheat stands in them at 0.40, 0.42 and 0.54; lentils at 0.52 and 0.63).
  it.each([
    ['casein', 100, 'commonly cited list (US regulation, 1993 onward), read'],
    ['egg-white-raw', 100, 'commonly cited list, read'],
    ['soy-protein-isolate', 100, 'commonly cited list, read; J Nutr 2015;145:372 gives 98-100'],
    ['beef-minced-fried', 92, 'commonly cited list, read'],
    ['black-beans-boiled', 75, 'commonly cited list, read'],
    ['kidney-beans-boiled', 68, 'commonly cited list, read'],
    ['peanuts-raw', 52, 'commonly cited list, read'],
    ['wheat-berries-dry', 42, 'commonly cited list, read'],
    ['wheat-gluten', 25, 'commonly cited list, read'],
    ['chickpeas-boiled', 78, 'commonly cited list, read'],
    ['soybeans-boiled', 91, 'commonly cited list, read'],
    ['oats-rolled', 57, 'commonly cited list, memory'],
    ['pistachios', 81, 'J Sci Food Agric 2020, roasted; read'],
    ['lentils-green-boiled', 63, 'Food Sci Nutr 2017;5:896; memory'],
    ['rice-white-boiled', 62, 'J Nutr 2015;145:372; memory'],
  ] as const)('%s: %d (%s)', (id, published, _source) => {
    const pdcaas = pdcaasOf([{ food: food(id), grams: 100 }], of1991)!
    expect(Math.abs(Math.log(pdcaas / published))).toBeLessThan(0.2)
  })

  it('hulled hemp: 63-66 (J Agric Food Chem 2010;58:11801) is met on the protein basis of seeds only', () => {
    // The published score is per g of nitrogen x 5.3, the seeds' own factor; FAO's basis is nitrogen x 6.25.
    const pdcaas = pdcaasOf([{ food: food('hemp-seeds-hulled'), grams: 100 }], of1991)!
    expect(Math.abs(Math.log((pdcaas * 6.25) / 5.3 / 64.5))).toBeLessThan(0.1)
    expect(Math.abs(Math.log(pdcaas / 64.5))).toBeGreaterThan(0.1)
  })
})
