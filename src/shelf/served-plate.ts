import * as z from 'zod/mini'
import { daySchema } from './shelf.ts'

/** A plate that was served: the day, and grams a serving by food. */
export const servedPlateSchema = z.object({
  day: daySchema,
  servings: z.int().check(z.positive()),
  portions: z.array(z.object({ food: z.string(), grams: z.number().check(z.positive()) })),
})
export type ServedPlate = z.infer<typeof servedPlateSchema>

/** So many served plates are kept, the latest. */
export const PLATES_KEPT = 400

/** The plates with one more, the oldest dropped where there are too many. */
export const withPlate = (plates: readonly ServedPlate[], plate: ServedPlate): ServedPlate[] =>
  [...plates, plate].slice(-PLATES_KEPT)

/** The plates without the latest that equals the one given. */
export function withoutPlate(plates: readonly ServedPlate[], plate: ServedPlate): ServedPlate[] {
  const text = JSON.stringify(plate)
  const at = plates.findLastIndex(other => JSON.stringify(other) === text)
  return plates.filter((_, i) => i !== at)
}
