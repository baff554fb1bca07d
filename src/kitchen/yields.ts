import type { Food } from '../foods/food.ts'
import type { FoodYield } from './kitchen-file.ts'
import { loadKitchen } from './load.ts'

/**
 * Dry to cooked and back, by the yield of each food (data/kitchen.json, compiled from data/curation/yields.csv and,
 * where that has no row, from the water of the table's two rows).
 *
 *     cookedFrom(redLentilsDry, 100)      // about 280 g, between 246 and 314
 *     dryFor(riceWhiteBoiled, 275)        // about 100 g
 */
export interface Converted {
  /** id of the food in its other state, or null where the table has none */
  food: string | null
  grams: number
  lowG: number
  highG: number
  /** the other state as a cook says it: `boiled`, `dry` */
  state: string
  yield: FoodYield
}

/** What so many grams of a dry food weigh when cooked, or null for a food that has no yield. */
export function cookedFrom(
  food: Pick<Food, 'id'>,
  gramsDry: number,
  yields: readonly FoodYield[] = loadKitchen().yields,
): Converted | null {
  const found = yields.find(({ from }) => from === food.id)
  if (found === undefined) return null
  return {
    food: found.to,
    grams: gramsDry * found.factor,
    lowG: gramsDry * found.low,
    highG: gramsDry * found.high,
    state: found.after,
    yield: found,
  }
}

/** What must be weighed out dry for so many grams of a cooked food, or null for a food that has no yield. */
export function dryFor(
  food: Pick<Food, 'id'>,
  gramsCooked: number,
  yields: readonly FoodYield[] = loadKitchen().yields,
): Converted | null {
  const found = yields.find(({ to }) => to === food.id)
  if (found === undefined) return null
  return {
    food: found.from,
    grams: gramsCooked / found.factor,
    // The more a food takes up, the less of it is needed dry.
    lowG: gramsCooked / found.high,
    highG: gramsCooked / found.low,
    state: found.before,
    yield: found,
  }
}
