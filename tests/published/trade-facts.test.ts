import { describe, expect, it } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { STAVES } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { stavesOfPlate } from '../../src/nutrition/staves.ts'

/** Facts of the trade: common practice, as textbooks of nutrition and of food science have them. */
const table = loadTable()
const pattern = table.patternById.get('fao-2013-over-3y')!

function food(id: string): Food {
  const found = table.foodById.get(id)
  if (found === undefined) throw new Error(`the table has no "${id}"`)
  return found
}
const own = (of: Food) => diaasOf([{ food: of, grams: 100 }], pattern)

describe('common practice', () => {
  it('pulses are limited by the sulphur amino acids, tryptophan close behind', () => {
    const boiled = table.foods.filter(
      ({ role, state, profileTier }) => role === 'pulse' && state === 'boiled' && profileTier !== 'estimated',
    )
    expect(boiled.length).toBeGreaterThan(25)
    // Lysine, which they are rich in, is in none of them the shortest.
    expect(boiled.filter(pulse => own(pulse).limiting === 'lys')).toEqual([])
    // Against the over-3 pattern valine or leucine comes within a hair of the sulphur pair in a few.
    const bySulphur = boiled.filter(pulse => {
      const staves = stavesOfPlate([{ food: pulse, grams: 1 }], pattern)!
      return staves.saa <= 1.1 * Math.min(...STAVES.map(stave => staves[stave]))
    })
    expect(bySulphur.length / boiled.length).toBeGreaterThan(0.75)
  })

  it('cereals are limited by lysine', () => {
    const cereals = table.foods.filter(
      ({ id, role }) =>
        role === 'grain' &&
        /^(wheat|rice|maize|cornmeal|barley|rye|oats|sorghum|millet|pasta|bulgur|couscous|bread|spelt|teff)/.test(
          id,
        ) &&
        !/germ/.test(id),
    )
    expect(cereals.length).toBeGreaterThan(30)
    expect(cereals.filter(cereal => own(cereal).limiting !== 'lys').map(({ id }) => id)).toEqual([])
  })

  it.each([
    'eggs-boiled',
    'egg-white-raw',
    'milk-whole',
    'milk-powder-skimmed',
    'pork-loin-roasted',
    'casein',
    'whey-protein',
  ])('%s scores 100 or more', id => expect(own(food(id)).diaas!).toBeGreaterThanOrEqual(100))

  it('potato protein scores 100', () => {
    // 99.97 with histidine between two sources that differ by a quarter (see its note): 100 as it would be printed.
    expect(Math.round(own(food('potato-protein')).diaas!)).toBeGreaterThanOrEqual(100)
  })

  it('whole potatoes and potato protein are different foods', () => {
    expect(food('potatoes-boiled').aminoMgPerG.leu).not.toBeCloseTo(food('potato-protein').aminoMgPerG.leu, 0)
    expect(food('potatoes-boiled').digestibilityClass).not.toBe(food('potato-protein').digestibilityClass)
  })

  it.each([
    ['soy and wheat', ['tofu-firm', 'bulgur-boiled']],
    ['beans and maize', ['black-beans-boiled', 'maize-boiled']],
    ['beans and potatoes', ['kidney-beans-boiled', 'potatoes-boiled']],
    ['lentils and rice', ['lentils-red-boiled', 'rice-brown-boiled']],
    ['peas and rice', ['split-peas-green-boiled', 'rice-brown-boiled']],
    ['hummus: chickpeas and sesame', ['chickpeas-boiled', 'tahini']],
  ] as const)('%s beat each of their parts', (_, [a, b]) => {
    const [first, second] = [food(a), food(b)]
    const parts = Math.max(own(first).diaas!, own(second).diaas!)
    const mixtures = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9].map(
      share =>
        diaasOf(
          [
            { food: first, grams: 100 * share },
            { food: second, grams: 100 * (1 - share) },
          ],
          pattern,
        ).diaas!,
    )
    expect(Math.max(...mixtures)).toBeGreaterThan(parts + 1)
  })

  it('cooking a pulse or grain leaves its score: boiled and dry share profile and digestibility', () => {
    for (const boiled of table.foods.filter(
      ({ state, role }) => state === 'boiled' && (role === 'pulse' || role === 'grain'),
    )) {
      const dry = table.foods.find(({ kin, state }) => kin === boiled.kin && state === 'dry')
      if (dry !== undefined) expect(own(boiled).diaas!, boiled.id).toBeCloseTo(own(dry).diaas!, 6)
    }
  })
})

describe('the Indian table against the American one, for the same food', () => {
  // Indian Food Composition Tables 2017 and USDA SR28: protein and fat on dry matter, on one nitrogen factor. The
  // spread between samples of one crop is 5-10 % for protein (1 sigma); 3 sigma of the difference of two is 30-40 %.
  it.each([
    ['bulgur-dry', 10.84, 8.55],
    ['chickpeas-dry', 18.77, 8.7],
    ['lentils-brown-dry', 22.49, 9.2],
    ['mung-beans-dry', 22.53, 9.95],
    ['quinoa-dry', 13.11, 10.43],
    ['rice-brown-dry', 9.16, 9.33],
    ['wheat-flour-whole', 10.57, 11.1],
    ['peanuts-raw', 23.65, 6.97],
    ['sesame-seeds', 21.7, 3.5],
    ['pigeon-peas-dry', 20.47, 9.33],
  ] as const)('%s', (id, proteinG, waterG) => {
    const american = food(id).per100g
    const indianDry = proteinG / (1 - waterG / 100)
    const americanDry = american.proteinG / (1 - american.waterG! / 100)
    expect(Math.abs(Math.log(indianDry / americanDry))).toBeLessThan(0.35)
  })
})
