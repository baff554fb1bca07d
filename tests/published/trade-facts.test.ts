import { describe, expect, it } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { STAVES } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { stavesOfPlate } from '../../src/nutrition/staves.ts'
import { food, pattern as patternOf, table } from './lookup.ts'

/** Facts of the trade: common practice, as textbooks of nutrition and of food science have them. */
const pattern = patternOf('fao-2013-over-3y')

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
    'potato-protein',
  ])('%s scores 100 or more', id => expect(own(food(id)).diaas!).toBeGreaterThanOrEqual(100))

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
