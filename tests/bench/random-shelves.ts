import type { Food } from '../../src/foods/food.ts'
import { scoreBasis } from '../../src/foods/score.ts'
import type { Table } from '../../src/foods/table.ts'
import { seededUniform } from '../../src/nutrition/random.ts'
import type { PairingProblem, ShelfFood } from '../../src/pairing/problem.ts'

const isPaired = (food: Food): boolean => food.place === 'protein' && food.origin === 'plant'

/** A random pairing problem: a shelf of `size` foods that may be paired, some of them scarce, and a target. */
export const randomProblem = (
  table: Table,
  uniform: () => number,
  size: number,
  foodsAtMost: number,
): PairingProblem => problemFrom(table, table.foods.filter(isPaired), uniform, size, foodsAtMost)

/** One of the kind that seldom reaches 100: grains, nuts and roots, with few pulses and no soy or powders. */
export function hardProblem(
  table: Table,
  uniform: () => number,
  size: number,
  foodsAtMost: number,
): PairingProblem {
  const paired = table.foods.filter(isPaired)
  const poor = paired.filter(({ role }) => ['grain', 'nut-seed', 'root'].includes(role))
  const rich = paired.filter(({ role }) => role === 'pulse')
  return problemFrom(table, [...poor, ...sample(rich, 3, uniform)], uniform, size, foodsAtMost)
}

function problemFrom(
  table: Table,
  pool: readonly Food[],
  uniform: () => number,
  size: number,
  foodsAtMost: number,
): PairingProblem {
  const shelf = sample(pool, size, uniform).map(
    (food): ShelfFood => ({
      food,
      onHandG: Math.round(food.portionG.most * (0.4 + 6 * uniform())),
      mark: '',
    }),
  )
  return {
    shelf,
    targetG: 20 + Math.round(25 * uniform()),
    servings: 1 + Math.floor(3 * uniform()),
    foodsAtMost,
    basis: scoreBasis(table),
    without: [],
    allow: { eggs: false, dairy: false },
    energyAtMostKcal: null,
    massAtMostG: null,
    pairings: 3,
  }
}

/** Random problems of 10 to 60 foods and 2 to 5 places, from a seed. */
export function randomProblems(table: Table, count: number, seed: number): PairingProblem[] {
  const uniform = seededUniform(seed)
  return Array.from({ length: count }, () =>
    randomProblem(table, uniform, 10 + Math.floor(51 * uniform()), 2 + Math.floor(4 * uniform())),
  )
}

function sample(pool: readonly Food[], size: number, uniform: () => number): Food[] {
  const rest = [...pool]
  return Array.from(
    { length: Math.min(size, rest.length) },
    () => rest.splice(Math.floor(rest.length * uniform()), 1)[0]!,
  )
}
