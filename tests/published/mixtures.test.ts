import { describe, expect, it } from 'vitest'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { Pattern } from '../../src/nutrition/pattern.ts'
import { pdcaasOf } from '../../src/nutrition/pdcaas.ts'
import type { Portion } from '../../src/nutrition/protein-source.ts'
import { bandOf } from '../../src/nutrition/uncertainty.ts'
import { food, pattern, table } from './lookup.ts'

const child = pattern('fao-2013-child')
const over3 = pattern('fao-2013-over-3y')

/** So many g of crude protein of each food. */
const byProtein = (...parts: [id: string, proteinG: number][]): Portion[] =>
  parts.map(([id, proteinG]) => ({
    food: food(id),
    grams: (100 * proteinG) / food(id).per100g.crudeProteinG,
  }))
const byMass = (...parts: [id: string, grams: number][]): Portion[] =>
  parts.map(([id, grams]) => ({ food: food(id), grams }))
const halfBand = (portions: Portion[], against: Pattern) => {
  const band = bandOf(portions, against, table.coefficients)!
  return Math.log(band.high / band.low) / 2
}

describe('FAO 2013, section 4.2: 400 g wheat, 100 g peas, 35 g milk powder', () => {
  // Published 68 and 82 (read in secondary texts; the amounts and protein from memory, see worked-examples.test.ts).
  // Here with the table's own wheat, peas and milk, at the example's protein. Two draws of a plate with the stated
  // uncertainty differ by less than 0.58 half bands in half of all cases; this one must be as near.
  const plate = byProtein(
    ['wheat-berries-dry', 44],
    ['split-peas-green-dry', 21],
    ['milk-powder-skimmed', 9.8],
  )
  it.each([
    ['0.5-3 years', child, 68],
    ['over 3 years', over3, 82],
  ] as const)('%s', (_, against, published) => {
    const { diaas, limiting } = diaasOf(plate, against)
    expect(limiting).toBe('lys')
    expect(Math.abs(Math.log(diaas! / published))).toBeLessThan(0.58 * halfBand(plate, against))
  })

  it('is missed where foods` own scores are averaged, truncated first, or weighed by grams', () => {
    const tolerance = 0.58 * halfBand(plate, child)
    const weighed = (weight: (portion: Portion) => number, score: (own: number) => number) => {
      const total = plate.reduce((sum, portion) => sum + weight(portion), 0)
      return (
        plate.reduce(
          (sum, portion) =>
            sum + weight(portion) * score(diaasOf([{ food: portion.food, grams: 1 }], child).diaas!),
          0,
        ) / total
      )
    }
    const protein = ({ food: of, grams }: Portion) => of.per100g.crudeProteinG * grams
    for (const wrong of [
      weighed(protein, own => own),
      weighed(protein, own => Math.min(100, own)),
      weighed(
        ({ grams }) => grams,
        own => own,
      ),
    ]) {
      expect(Math.abs(Math.log(wrong / 68))).toBeGreaterThan(tolerance)
    }
    // Lysine averaged by grams instead of protein.
    const grams = plate.reduce((sum, portion) => sum + portion.grams, 0)
    const lysine =
      plate.reduce(
        (sum, portion) => sum + portion.grams * portion.food.aminoMgPerG.lys * portion.food.digestibility.lys,
        0,
      ) / grams
    expect(Math.abs(Math.log((100 * lysine) / 57 / 68))).toBeGreaterThan(tolerance)
  })
})

describe('PDCAAS of wheat, chickpeas and milk powder', () => {
  // FAO Food and Nutrition Paper 51 (1991): 350, 150 and 50 g; published 75 (memory), of which the inputs as remembered
  // give 74. The table's own foods at the example's protein.
  const plate = byProtein(['wheat-berries-dry', 45.5], ['chickpeas-dry', 33], ['milk-powder-skimmed', 17])

  it('FAO/WHO 1991: 75', () => {
    expect(Math.abs(Math.log(pdcaasOf(plate, pattern('fao-who-1991'))! / 75))).toBeLessThan(0.05)
  })

  it('Institute of Medicine 2005, Table 10-27 (doi:10.17226/10490): wheat 44, chickpeas 87; amounts of the mixture not read', () => {
    const iom: Pattern = {
      ...pattern('fao-who-1991'),
      mgPerG: { his: 18, ile: 25, leu: 55, lys: 51, saa: 25, aaa: 47, thr: 27, trp: 7, val: 32 },
    }
    // One analysis of lysine or tryptophan differs from another by 7-15 %.
    expect(Math.abs(Math.log(pdcaasOf(byMass(['wheat-berries-dry', 1]), iom)! / 44))).toBeLessThan(0.1)
    expect(Math.abs(Math.log(pdcaasOf(byMass(['chickpeas-dry', 1]), iom)! / 87))).toBeLessThan(0.15)
    // Printed 110 for the mixture, which is counted as 100: truncated after the mixture is computed, so wheat, at 44,
    // does not keep a plate with enough chickpea and milk from 100.
    expect(
      pdcaasOf(byProtein(['wheat-berries-dry', 20], ['chickpeas-dry', 40], ['milk-powder-skimmed', 40]), iom),
    ).toBe(100)
  })
})

describe('published DIAAS of mixtures whose ratio was read', () => {
  // Food Funct, doi:10.1039/d5fo03804a (abstract): quinoa flour 2, pea protein isolate 8: 68 and 80, extruded 76 and 89.
  // Whether by mass or protein was not read: both are tried. Tolerance as for single foods: 2.21 half bands reach 99 %
  // of differences between two draws; here the published values must lie within one half band.
  it.each([
    ['by mass', byMass(['quinoa-dry', 20], ['pea-protein', 80])],
    ['by protein', byProtein(['quinoa-dry', 20], ['pea-protein', 80])],
  ] as const)('quinoa and pea protein 2:8, %s', (_, plate) => {
    for (const [against, published] of [
      [child, 68],
      [child, 76],
      [over3, 80],
      [over3, 89],
    ] as const) {
      const diaas = diaasOf([...plate], against).diaas!
      expect(Math.abs(Math.log(diaas / published))).toBeLessThan(halfBand([...plate], against))
    }
  })
})

describe('published DIAAS of mixtures whose ratio was not read: met at some usual ratio', () => {
  const shares = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9]

  it('mung beans and millet: 66, limited by lysine, parts 93 and 22 (Plants 2021;10:1999, pig; read)', () => {
    const scores = shares.map(share =>
      diaasOf(byProtein(['mung-beans-boiled', share], ['millet-boiled', 1 - share]), over3),
    )
    const below = scores.filter(({ diaas, limiting }) => limiting === 'lys' && diaas! < 66)
    const above = scores.filter(({ diaas, limiting }) => limiting === 'lys' && diaas! > 66)
    expect(below.length).toBeGreaterThan(0)
    expect(above.length).toBeGreaterThan(0)
  })

  // Protein of the parts: a burger of about 20 g protein in a bun of 5 g; two eggs and two slices; a glass of milk's
  // protein as much as that of the cereal (common practice).
  it.each([
    [
      'soy burger and bun: 75-99 over 3 years',
      over3,
      byProtein(['textured-soy-dry', 19], ['bread-white', 5]),
      75,
      99,
    ],
    [
      'beef burger and bun: 100 or more',
      over3,
      byProtein(['beef-minced-fried', 22], ['bread-white', 5]),
      100,
      140,
    ],
    [
      'pork burger and bun: 100 or more',
      over3,
      byProtein(['pork-loin-roasted', 22], ['bread-white', 5]),
      100,
      140,
    ],
  ] as const)('%s (Eur J Nutr 2022;61, burgers and buns, pig; read)', (_, against, plate, low, high) => {
    const { diaas } = diaasOf([...plate], against)
    expect(Math.round(diaas!)).toBeGreaterThanOrEqual(low)
    expect(Math.round(diaas!)).toBeLessThanOrEqual(high)
  })

  it.each([child, over3])(
    'eggs with bread or potatoes: above 75 (J Nutr Sci 2024, pig; read): $id',
    against => {
      expect(diaasOf(byMass(['eggs-boiled', 100], ['bread-white', 60]), against).diaas!).toBeGreaterThan(75)
      expect(diaasOf(byMass(['eggs-boiled', 100], ['potatoes-boiled', 100]), against).diaas!).toBeGreaterThan(
        75,
      )
    },
  )

  it.each([child, over3])(
    'dry milk with oats: close to or above 100 (J Nutr 2021, pig; read): $id',
    against => {
      const { diaas } = diaasOf(byProtein(['milk-powder-skimmed', 50], ['oats-rolled', 50]), against)
      expect(diaas!).toBeGreaterThan(95)
      expect(diaas!).toBeLessThan(diaasOf(byMass(['milk-powder-skimmed', 1]), against).diaas!)
    },
  )
})
