import { describe, expect, it } from 'vitest'
import { profileOf } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { pdcaasOf } from '../../src/nutrition/pdcaas.ts'
import type { ProteinSource } from '../../src/nutrition/protein-source.ts'
import { food, median, pattern, table } from './lookup.ts'

const of1991 = pattern('fao-who-1991')

const R2015 = 'J Nutr 2015;145:372, rat'
const E2017 = 'Food Sci Nutr 2017;5:896, rat; memory'
const LIST = 'commonly cited list (US regulation, 1993 onward)'

/** Published PDCAAS (per cent) of foods that the table has; a second process of one flour is left out. */
const PUBLISHED: readonly [id: string, pdcaas: number, source: string][] = [
  ['whey-protein', 100, `${R2015}; read`],
  ['soy-protein-isolate', 98, `${R2015}; read`],
  ['pea-protein', 89, `${R2015}; read`],
  ['rice-protein', 42, `${R2015}; read`],
  ['kidney-beans-boiled', 64.8, `${R2015}; memory`],
  ['peas-whole-boiled', 59.7, `${R2015}; memory`],
  ['rice-white-boiled', 61.6, `${R2015}; memory`],
  ['oats-boiled', 67, `${R2015}; memory`],
  ['wheat-bran', 52.5, `${R2015}; memory`],
  ['peanuts-roasted', 50.9, `${R2015}; memory`],
  ['pistachios-raw', 73, 'J Sci Food Agric 2020, pig; read'],
  ['pistachios', 81, 'J Sci Food Agric 2020, roasted, pig; read'],
  ['lentils-red-boiled', 57.4, 'Food Chem 2018;240:588, cooked, rat; read (abstract)'],
  ['lentils-green-boiled', 52.9, 'Food Chem 2018;240:588, cooked, rat; read (abstract)'],
  ['split-peas-green-boiled', 69.2, 'J Agric Food Chem 2017;65:7790, cooked, rat; read (abstract)'],
  ['split-peas-yellow-boiled', 69.2, 'J Agric Food Chem 2017;65:7790, cooked, rat; read (abstract)'],
  ['chickpeas-boiled', 75.2, 'Food Sci Nutr 2020;8:2950, cooked, rat; read (abstract)'],
  ['pinto-beans-boiled', 66, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['navy-beans-boiled', 66, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['black-beans-boiled', 66, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['broad-beans-boiled', 66, 'Nutrients 2018;10:671, baked, rat; read (abstract)'],
  ['kidney-beans-boiled', 54.9, E2017],
  ['navy-beans-boiled', 66.7, E2017],
  ['lentils-green-boiled', 62.8, E2017],
  ['lentils-red-boiled', 53.9, E2017],
  ['split-peas-yellow-boiled', 64.3, E2017],
  ['split-peas-green-boiled', 50, E2017],
  ['black-beans-boiled', 53.4, E2017],
  ['chickpeas-boiled', 51.9, E2017],
  ['pinto-beans-boiled', 59, E2017],
  ['casein', 100, `${LIST}; read`],
  ['egg-white-raw', 100, `${LIST}; read`],
  ['soy-protein-isolate', 100, `${LIST}; read`],
  ['beef-minced-fried', 92, `${LIST}; read`],
  ['black-beans-boiled', 75, `${LIST}; read`],
  ['kidney-beans-boiled', 68, `${LIST}; read`],
  ['lentils-brown-boiled', 52, `${LIST}; read`],
  ['peanuts-roasted', 52, `${LIST}; read`],
  ['wheat-berries-dry', 42, `${LIST}; read; other lists 40 and 54`],
  ['wheat-gluten', 25, `${LIST}; read`],
  ['chickpeas-boiled', 78, `${LIST}; read`],
  ['soybeans-boiled', 91, `${LIST}; read`],
  ['split-peas-green-boiled', 69, `${LIST}, pea flour; memory`],
  ['oats-rolled', 57, `${LIST}; memory`],
]

/** What cannot be met, and why; a row that is met after all must be struck out. */
const CANNOT_BE_MET: readonly [id: string, pdcaas: number, why: string][] = [
  [
    'split-peas-green-boiled',
    50,
    'from memory; the same food has 69 in the study that was read, yellow peas 64',
  ],
]

/** The food with all of each amino acid absorbed: its amino acid score is its DIAAS. */
const whole = (of: ProteinSource): ProteinSource => ({
  ...of,
  digestibility: { ...profileOf(() => 1), proteinFaecal: 1 },
})

/**
 * One standard deviation of ln PDCAAS as the table states it: the profile's at the limiting amino acid, its doubts',
 * and 5 % for the faecal digestibility (which varies less between studies than the ileal one of single amino acids).
 * Two draws of it differ by sqrt(2) as much: 99 % within 2.576 x sqrt(2), half of them within 0.674 x sqrt(2).
 */
function sigma(of: ProteinSource): number {
  const limiting = diaasOf([{ food: whole(of), grams: 1 }], of1991).limiting!
  const { profile, doubt } = table.coefficients
  return Math.hypot(
    profile[of.profileTier][limiting],
    ...of.doubts.map(known => doubt[known][limiting]),
    0.05,
  )
}
type Formula = (food: ProteinSource) => number
const right: Formula = of => pdcaasOf([{ food: of, grams: 100 }], of1991)!
const deviation = (formula: Formula, [id, pdcaas]: (typeof PUBLISHED)[number]) =>
  Math.abs(Math.log(formula(food(id)) / pdcaas)) / (Math.SQRT2 * sigma(food(id)))

const excused = (row: (typeof PUBLISHED)[number]) =>
  CANNOT_BE_MET.some(([id, pdcaas]) => id === row[0] && pdcaas === row[1])

describe('published PDCAAS of single foods', () => {
  it.each(PUBLISHED.filter(row => !excused(row)))('%s: %d (%s)', (...row) => {
    expect(deviation(right, row)).toBeLessThan(2.576)
  })

  it.each(CANNOT_BE_MET)('%s: %d cannot be met: %s', (id, pdcaas) => {
    expect(PUBLISHED.filter(excused).length).toBe(CANNOT_BE_MET.length)
    expect(deviation(right, [id, pdcaas, ''])).toBeGreaterThan(2.576)
  })

  it('deviate as two draws would; wrong formulas miss them by more', () => {
    const middle = (formula: Formula) => median(PUBLISHED.map(row => deviation(formula, row))) / 0.674
    expect(middle(right)).toBeGreaterThan(0.5)
    expect(middle(right)).toBeLessThan(1.2)
    const against2013: Formula = of => pdcaasOf([{ food: of, grams: 1 }], pattern('fao-2013-over-3y'))!
    expect(middle(against2013)).toBeGreaterThan(1.2)
    expect(middle(of => right(of) * 1.25)).toBeGreaterThan(1.2)
    // Of foods above 100 the score is 100, not more.
    const untruncated: Formula = of =>
      diaasOf([{ food: whole(of), grams: 1 }], of1991).diaas! * of.digestibility.proteinFaecal
    expect(right(food('milk-powder-skimmed'))).toBe(100)
    expect(untruncated(food('milk-powder-skimmed'))).toBeGreaterThan(105)
  })

  // These were printed per g of nitrogen x the seed's own factor; FAO's basis is nitrogen x 6.25, on which they score less.
  it.each([
    ['hemp-seeds-hulled', 63, 66, 5.3, 'J Agric Food Chem 2010;58:11801, rat; read (abstract)'],
    ['almonds', 44.3, 47.8, 5.18, 'Food Sci Nutr 2019;7:2932, rat; read (abstract)'],
  ] as const)('%s: %d-%d is met on the basis of nitrogen x %d (%s)', (id, low, high, factor, _source) => {
    const own = (right(food(id)) * 6.25) / factor
    expect(own).toBeGreaterThan(low * Math.exp(-1.645 * sigma(food(id))))
    expect(own).toBeLessThan(high * Math.exp(1.645 * sigma(food(id))))
    expect(right(food(id))).toBeLessThan(0.9 * low)
  })

  it('walnuts: 39 against the pattern of 0.5-3 years, on nitrogen x 5.3 (Front Nutr 2021;8:702857, rat; read)', () => {
    const child = pdcaasOf([{ food: food('walnuts'), grams: 1 }], pattern('fao-2013-child'))!
    expect(Math.abs(Math.log((child * 6.25) / 5.3 / 39))).toBeLessThan(1.645 * sigma(food('walnuts')))
  })
})
