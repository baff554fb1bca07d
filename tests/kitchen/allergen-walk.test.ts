import { describe, expect, test } from 'vitest'
import { readCurationRows } from '../../src/build/compile/kitchen.ts'
import { ALLERGEN_IDS, type AllergenId } from '../../src/foods/allergens.ts'
import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { ownFoodOf } from '../../src/foods/own-food.ts'
import { withOwnFoods } from '../../src/foods/own-table.ts'
import { scoreBasis } from '../../src/foods/score.ts'
import { complementsOf } from '../../src/pairing/complement.ts'
import { findPairings } from '../../src/pairing/find-pairings.ts'
import { liftContext, liftOptions } from '../../src/pairing/lift.ts'
import type { PairingProblem } from '../../src/pairing/problem.ts'

const plain = loadTable()

/** An own food of each protein food that carries an allergen, under a name that gives nothing away. */
const disguised = plain.foods
  .filter(
    ({ allergens, place, per100g }) =>
      allergens.length > 0 && place === 'protein' && per100g.crudeProteinG > 0,
  )
  .flatMap((food, i) => {
    const reading = ownFoodOf(
      {
        name: `Plain bar ${i}`,
        perG: 100,
        proteinG: Math.min(60, food.per100g.proteinG),
        kcal: food.per100g.kcal,
        parts: [{ food: food.id, share: 1 }],
      },
      plain,
      [],
    )
    return reading.ok ? [reading.own] : []
  })
const { table } = withOwnFoods(plain, disguised)
const words = readCurationRows('allergen-keywords').filter(({ certainty }) => certainty === 'contains')

/** By its row, by its parts, or by a word of its names: whatever may tell of the allergen. */
function tellsOf(food: Food, allergen: AllergenId): boolean {
  if (food.allergens.includes(allergen)) return true
  return [food.name, ...food.aliases].some(name =>
    words.some(
      row =>
        row.allergens!.split(' ').includes(allergen) &&
        new RegExp(`(?<!\\p{L})${row.keyword!.replace(/[()']/g, '.')}(?:s|es)?(?!\\p{L})`, 'iu').test(name) &&
        !(row.unless ?? '').split(' ').some(word => word !== '' && name.toLowerCase().includes(word)),
    ),
  )
}

const problem = (without: AllergenId[]): PairingProblem => ({
  shelf: table.foods.map(food => ({ food, onHandG: null, mark: '' as const })),
  targetG: 35,
  servings: 2,
  foodsAtMost: 3,
  basis: scoreBasis(table),
  without,
  allow: { eggs: true, dairy: true },
  energyAtMostKcal: null,
  massAtMostG: null,
  pairings: 5,
  market: () => table.foods,
})

const starts = [
  'rice-white-dry',
  'lentils-red-dry',
  'chickpeas-dry',
  'oats-rolled',
  'potatoes-boiled',
  'maize-dry',
]

describe('what is left out stays out, over the whole table and own foods that hide it', () => {
  test('there are own foods that hide every allergen which a plant protein brings', () => {
    expect(disguised.length).toBeGreaterThan(50)
    for (const id of [
      'gluten',
      'wheat',
      'soy',
      'peanut',
      'tree-nuts',
      'sesame',
      'lupin',
      'milk',
      'egg',
    ] as const)
      expect(
        table.foods.some(food => food.id.startsWith('own-') && food.allergens.includes(id)),
        id,
      ).toBe(true)
  })

  test.each(ALLERGEN_IDS)('without %s: pairings, complements and lifts', allergen => {
    const asked = problem([allergen])
    const answer = findPairings(asked)
    expect(answer.pairings.length).toBeGreaterThan(0)
    const suggested: Food[] = []
    for (const pairing of answer.pairings) {
      suggested.push(...pairing.portions.map(({ food }) => food))
      if (pairing.nextLift !== null) suggested.push(pairing.nextLift.food)
    }
    for (const id of starts) {
      const start = table.foodById.get(id)
      if (start === undefined) continue
      const options = {
        pattern: asked.basis.pattern,
        without: [allergen],
        allow: asked.allow,
        count: 40,
        perRole: 8,
      }
      suggested.push(...complementsOf(start, table.foods, options).map(({ food }) => food))
      const lifts = liftOptions([{ food: start, grams: 100 }], liftContext(asked))
      suggested.push(...lifts.map(({ food }) => food).filter(food => food.id !== id))
    }
    expect(suggested.length).toBeGreaterThan(20)
    for (const food of suggested)
      expect(tellsOf(food, allergen), `${food.id} without ${allergen}`).toBe(false)
  })

  test('all of the fourteen at once still leave something to eat', () => {
    const answer = findPairings(problem([...ALLERGEN_IDS]))
    expect(answer.pairings.length).toBeGreaterThan(0)
    for (const { portions } of answer.pairings)
      for (const { food } of portions) expect(food.allergens, food.id).toEqual([])
  })
})
