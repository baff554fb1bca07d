import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { scoreBasis } from '../../src/foods/score.ts'
import type { Mark, PairingProblem, ShelfFood } from '../../src/pairing/problem.ts'

export const table = loadTable()
export const basis = scoreBasis(table)

export function food(id: string): Food {
  const found = table.foodById.get(id)
  if (found === undefined) throw new Error(`the table has no "${id}"`)
  return found
}

/** A shelf from `id grams [mark]` lines. */
export const shelfOf = (...lines: string[]): ShelfFood[] =>
  lines.map(line => {
    const [id, grams, mark = ''] = line.split(' ')
    return { food: food(id!), onHandG: Number(grams), mark: mark as Mark }
  })

export const problemOf = (
  shelf: readonly ShelfFood[],
  more: Partial<PairingProblem> = {},
): PairingProblem => ({
  shelf,
  targetG: 35,
  servings: 1,
  foodsAtMost: 3,
  basis,
  without: [],
  allow: { eggs: false, dairy: false },
  energyAtMostKcal: null,
  massAtMostG: null,
  pairings: 3,
  ...more,
})

export const GALLEY = shelfOf(
  'lentils-red-dry 1500',
  'chickpeas-canned 1440',
  'kidney-beans-dry 900',
  'tofu-firm 1050',
  'rice-white-dry 3000',
  'rice-brown-dry 1500',
  'oats-rolled 1500',
  'bulgur-dry 1000',
  'peanut-butter 700',
  'sesame-seeds 300',
  'potatoes-raw 4000',
  'eggs-raw 600',
  'milk-whole 2000',
  'olive-oil 900',
  'carrots-raw 1500',
)
