import { describe, expect, it } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { Pattern } from '../../src/nutrition/pattern.ts'
import { pdcaasOf } from '../../src/nutrition/pdcaas.ts'
import { stavesOfPlate } from '../../src/nutrition/staves.ts'
import { sourceOf } from './source-of.ts'

const { patternById } = loadTable()
const child = patternById.get('fao-2013-child')!
const over3 = patternById.get('fao-2013-over-3y')!
const of1991 = patternById.get('fao-who-1991')!

/**
 * FAO Food and Nutrition Paper 92 (2013), section 4.2. The scores were read in secondary texts; the inputs are from
 * memory, and five of the published scores come back from them exactly.
 */
const wheat = sourceOf('wheat', {
  proteinG: 11,
  lys: 28,
  saa: 39,
  thr: 29,
  trp: 11,
  digestibility: { lys: 0.82, saa: 0.89, thr: 0.86, trp: 0.91 },
})
const peas = sourceOf('peas', {
  proteinG: 21,
  lys: 71,
  saa: 25,
  thr: 37,
  trp: 9,
  digestibility: { lys: 0.79, saa: 0.69, thr: 0.73, trp: 0.66 },
})
const milkPowder = sourceOf('milk-powder', {
  proteinG: 28,
  lys: 78,
  saa: 35,
  thr: 44,
  trp: 13,
  digestibility: { lys: 0.95, saa: 0.94, thr: 0.9, trp: 0.9 },
})
const mixture = [
  { food: wheat, grams: 400 },
  { food: peas, grams: 100 },
  { food: milkPowder, grams: 35 },
]

describe('FAO 2013, section 4.2', () => {
  it.each([
    ['whole milk powder', milkPowder, child, 122, 'saa'],
    ['whole milk powder', milkPowder, over3, 143, 'saa'],
    ['wheat', wheat, child, 40, 'lys'],
    ['peas', peas, child, 64, 'saa'],
  ] as const)('%s: %s', (_, food, pattern, published, limiting) => {
    const { diaas, limiting: shortest } = diaasOf([{ food, grams: 100 }], pattern)
    expect(Math.round(diaas!)).toBe(published)
    expect(shortest).toBe(limiting)
  })

  it('birth to 6 months, as published: milk powder 69, tryptophan; mixture 56 by lysine', () => {
    // Of the infant pattern the example needs four; the others are put out of the way. It stands here only: the program
    // does not offer it.
    const infant: Pattern = {
      ...child,
      mgPerG: { his: 1, ile: 1, leu: 1, lys: 69, saa: 33, aaa: 1, thr: 44, trp: 17, val: 1 },
    }
    const milk = diaasOf([{ food: milkPowder, grams: 100 }], infant)
    expect([Math.round(milk.diaas!), milk.limiting]).toEqual([69, 'trp'])
    // The tryptophan of wheat is misremembered by about 1 mg/g (with 12 it would not limit): lysine gives the 56.
    expect(Math.round(stavesOfPlate(mixture, infant)!.lys)).toBe(56)
    expect(Math.round(diaasOf(mixture, infant).diaas!)).toBeGreaterThanOrEqual(53)
  })

  it('is rounded to the nearest at the end, not truncated: 121.85, 63.89, 40.28', () => {
    expect(diaasOf([{ food: milkPowder, grams: 1 }], child).diaas!).toBeCloseTo(121.85, 2)
    expect(diaasOf([{ food: peas, grams: 1 }], child).diaas!).toBeCloseTo(63.89, 2)
    expect(diaasOf([{ food: wheat, grams: 1 }], child).diaas!).toBeCloseTo(40.28, 2)
  })

  it('mixture, child pattern: 68, lysine', () => {
    const { diaas, limiting } = diaasOf(mixture, child)
    expect(Math.round(diaas!)).toBe(68)
    expect(limiting).toBe('lys')
  })

  it('mixture, over 3 years: 81 to 82', () => {
    // Published as 82, which can't be had from 68 where lysine limits both: 68 x 57/48 = 80.75. So 81 is allowed.
    const { diaas } = diaasOf(mixture, over3)
    expect(diaas!).toBeGreaterThanOrEqual(80.5)
    expect(diaas!).toBeLessThan(82.5)
  })

  it('the wrong formulas do not give the published scores', () => {
    // The mean of the foods' own scores, weighted by protein.
    const own = mixture.map(({ food, grams }) => ({
      diaas: diaasOf([{ food, grams: 1 }], child).diaas!,
      g: food.per100g.crudeProteinG * grams,
    }))
    const mean =
      own.reduce((sum, part) => sum + part.diaas * part.g, 0) / own.reduce((sum, part) => sum + part.g, 0)
    expect(Math.round(mean)).not.toBe(68)
    // Scores truncated before they are mixed.
    const truncated =
      own.reduce((sum, part) => sum + Math.min(100, part.diaas) * part.g, 0) /
      own.reduce((sum, part) => sum + part.g, 0)
    expect(Math.round(truncated)).not.toBe(68)
    // Total instead of digestible lysine.
    const total = mixture.reduce(
      (sum, { food, grams }) => sum + food.per100g.crudeProteinG * grams * food.aminoMgPerG.lys,
      0,
    )
    const protein = mixture.reduce((sum, { food, grams }) => sum + food.per100g.crudeProteinG * grams, 0)
    expect(Math.round((100 * total) / protein / 57)).not.toBe(68)
  })
})

describe('FAO/WHO 1991 (FAO Food and Nutrition Paper 51): PDCAAS of a mixture', () => {
  const flat = (protein: number) => ({ lys: 1, saa: 1, thr: 1, trp: 1, protein })
  const plate = [
    {
      food: sourceOf('wheat', {
        proteinG: 13,
        lys: 25,
        saa: 35,
        thr: 30,
        trp: 11,
        digestibility: flat(0.85),
      }),
      grams: 350,
    },
    {
      food: sourceOf('chickpea', {
        proteinG: 22,
        lys: 70,
        saa: 25,
        thr: 42,
        trp: 13,
        digestibility: flat(0.8),
      }),
      grams: 150,
    },
    {
      food: sourceOf('milk', { proteinG: 34, lys: 80, saa: 30, thr: 37, trp: 12, digestibility: flat(0.95) }),
      grams: 50,
    },
  ]

  it('is 73 to 76 %, published 75', () => {
    // The inputs are from memory and give 74: with the lysine remembered, no order of rounding gives the printed 75.
    const pdcaas = pdcaasOf(plate, of1991)!
    expect(pdcaas).toBeGreaterThan(73)
    expect(pdcaas).toBeLessThan(76)
    // Worked through by hand: lysine 4807.5 mg in 95.5 g protein, of which 81.225 g are digested.
    expect(pdcaas).toBeCloseTo((100 * (4807.5 / 95.5) * (81.225 / 95.5)) / 58, 9)
  })

  it('is truncated only after the mixture is computed (Institute of Medicine 2005, Table 10-27: 110 is reported as 100)', () => {
    const rich = sourceOf('rich', {
      proteinG: 30,
      lys: 100,
      saa: 60,
      thr: 60,
      trp: 20,
      digestibility: flat(1),
    })
    expect(pdcaasOf([{ food: rich, grams: 100 }], of1991)).toBe(100)
    const half = pdcaasOf([...plate, { food: rich, grams: 100 }], of1991)!
    expect(half).toBeGreaterThan(pdcaasOf(plate, of1991)!)
  })
})

describe('one-line PDCAAS from abstracts', () => {
  it('walnut: 0.45 x 0.8622 is printed as 39 % (Front Nutr 2021;8:702857)', () => {
    const lys = 0.45 * 58
    const walnut = sourceOf('walnut', {
      proteinG: 15,
      lys,
      saa: 100,
      thr: 100,
      trp: 100,
      digestibility: { lys: 1, saa: 1, thr: 1, trp: 1, protein: 0.8622 },
    })
    expect(Math.round(pdcaasOf([{ food: walnut, grams: 100 }], of1991)!)).toBe(39)
  })

  it.each([
    ['Nonpareil', 0.56, 47.8],
    ['Monterey', 0.49, 44.3],
  ])(
    'almond, %s: %d x 0.857-0.899 allows the printed %d (Food Sci Nutr 2019;7:2932)',
    (_, score, printed) => {
      const almond = (lysineScore: number, protein: number) =>
        pdcaasOf(
          [
            {
              food: sourceOf('almond', {
                proteinG: 20,
                lys: lysineScore * 58,
                saa: 100,
                thr: 100,
                trp: 100,
                digestibility: { lys: 1, saa: 1, thr: 1, trp: 1, protein },
              }),
              grams: 30,
            },
          ],
          of1991,
        )!
      // The amino acid score is printed to two decimals, the digestibility as a range over varieties.
      expect(almond(score - 0.005, 0.857)).toBeLessThanOrEqual(printed)
      expect(almond(score + 0.005, 0.899)).toBeGreaterThanOrEqual(printed)
    },
  )
})

describe('one food against two patterns', () => {
  // The same amino acid limits under both: score(over 3 y) = score(child) x the patterns' ratio, both as printed.
  it.each([
    ['dry milk', 'saa', 123, 144, 'J Nutr 2021, DIAAS in pigs, milk and cereals'],
    ['quick oats', 'lys', 57, 67, 'J Nutr 2021, DIAAS in pigs, milk and cereals'],
    ['cornflakes', 'lys', 16, 19, 'J Nutr 2021, DIAAS in pigs, milk and cereals'],
    ['quinoa flour + pea isolate 2:8', 'saa', 68, 80, 'doi:10.1039/d5fo03804a'],
    ['the same, extruded', 'saa', 76, 89, 'doi:10.1039/d5fo03804a'],
    ['whole milk powder', 'saa', 122, 143, 'FAO Food and Nutrition Paper 92 (2013)'],
    ['whey isolate', 'his', 100, 125, 'Br J Nutr 2017;117:490, doi:10.1017/S0007114517000125'],
    ['whey concentrate', 'his', 107, 133, 'Br J Nutr 2017;117:490'],
    ['milk protein concentrate', 'saa', 120, 141, 'Br J Nutr 2017;117:490'],
    ['skimmed milk powder', 'saa', 105, 123, 'Br J Nutr 2017;117:490'],
    ['pea concentrate', 'saa', 62, 73, 'Br J Nutr 2017;117:490'],
    ['soya isolate', 'saa', 84, 98, 'Br J Nutr 2017;117:490'],
    ['soya flour', 'saa', 89, 105, 'Br J Nutr 2017;117:490'],
  ] as const)('%s', (_, stave, childScore, over3Score, _source) => {
    const ratio = child.mgPerG[stave] / over3.mgPerG[stave]
    // Both are printed as whole numbers: half a unit on either side.
    expect(over3Score).toBeGreaterThanOrEqual((childScore - 0.5) * ratio - 0.5)
    expect(over3Score).toBeLessThanOrEqual((childScore + 0.5) * ratio + 0.5)
  })

  it('holds for the program: wheat, where lysine limits under both', () => {
    const [a, b] = [diaasOf([{ food: wheat, grams: 1 }], child), diaasOf([{ food: wheat, grams: 1 }], over3)]
    expect(b.diaas! / a.diaas!).toBeCloseTo(57 / 48, 9)
  })
})

describe('patterns', () => {
  it('WHO 2007 adult: the requirement / 0.66 g protein, to 1 mg (WHO Technical Report Series 935)', () => {
    // mg/kg/day, from memory and read in a secondary table. saa is printed 22: the report adds 15.8 and 6.2.
    const requirement = { his: 10, ile: 20, leu: 39, lys: 30, aaa: 25, thr: 15, trp: 4, val: 26 }
    const adult = patternById.get('who-2007-adult')!.mgPerG
    for (const [stave, mg] of Object.entries(requirement)) {
      expect(Math.abs(adult[stave as keyof typeof requirement] - mg / 0.66)).toBeLessThan(0.75)
    }
    expect(adult.saa).toBe(22)
  })
})
