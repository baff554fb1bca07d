import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { Pattern, PatternId } from '../../src/nutrition/pattern.ts'

export const table = loadTable()

/** A food of the built table; a check of a food that is not there fails loudly. */
export function food(id: string): Food {
  const found = table.foodById.get(id)
  if (found === undefined) throw new Error(`data/foods.json has no "${id}"`)
  return found
}

export function pattern(id: PatternId): Pattern {
  return table.patternById.get(id)!
}

/** DIAAS of one food of the table alone, in per cent. */
export function diaasAlone(id: string, against: PatternId): number {
  return diaasOf([{ food: food(id), grams: 100 }], pattern(against)).diaas!
}

/** Middle value; of an even number, the upper of the two. */
export function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!
}
