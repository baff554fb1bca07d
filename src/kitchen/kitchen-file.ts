import { z } from 'zod'

/**
 * What data/kitchen.json holds: the kitchen's curated knowledge, compiled from data/curation by the build, which
 * checks every row against these schemas.
 */
const id = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
const positive = z.number().positive()
const nonNegative = z.number().nonnegative()

export const cautionTextSchema = z.object({
  id,
  /** the most important first */
  weight: z.number().int().positive(),
  /** its weight where the food goes into a box for later, or null where that changes nothing */
  weightBoxed: z.number().int().positive().nullable(),
  /** ids of cautions that this one says already */
  covers: z.array(id),
  text: z.string().min(20).max(320),
  source: z.string().min(1),
  provenance: z.string().min(1),
})
export type CautionText = z.infer<typeof cautionTextSchema>

export const conditionTextSchema = z.object({
  id,
  /** as a person says it: `kidney disease` */
  words: z.string().min(1),
  /** no pairing at all */
  refusesPlanning: z.boolean(),
  /** may a target be worked out from body mass? */
  bodyMassTargets: z.boolean(),
  /** are grams, scores and targets to be shown unless asked for? */
  numbers: z.boolean(),
  text: z.string().min(20).max(400),
  source: z.string().min(1),
  provenance: z.string().min(1),
})
export type ConditionText = z.infer<typeof conditionTextSchema>

/** How the factor of a yield is known. */
export const YIELD_BASES = ['curated', 'water balance'] as const

export const foodYieldSchema = z
  .object({
    /** food weighed before, and the food that it becomes; `to` is null where the table has no such row */
    from: id,
    to: id.nullable(),
    /** what happened to it: `boiled`, `soaked` */
    method: z.string().min(1),
    /** g after / g before */
    factor: positive.max(15),
    low: positive.max(15),
    high: positive.max(15),
    basis: z.enum(YIELD_BASES),
    source: z.string().min(1),
    provenance: z.string().min(1),
  })
  .refine(({ factor, low, high }) => low <= factor && factor <= high, 'low <= factor <= high')
export type FoodYield = z.infer<typeof foodYieldSchema>

export const cookingMethodSchema = z
  .object({
    id,
    /** food ids that are cooked so */
    foods: z.array(id),
    /** hours; both 0: no soak needed; least 0: may be soaked */
    soakHLeast: nonNegative.max(48),
    soakHMost: nonNegative.max(48),
    /** parts water to one part food by volume; null: soaked or cooked without a set amount */
    waterRatio: positive.max(12).nullable(),
    /** boiled in plenty and drained, or until the water is taken up */
    water: z.enum(['drain', 'absorb']),
    /** minutes of hard boil inside the simmer time */
    hardBoilMin: nonNegative.max(60),
    simmerMinLeast: nonNegative.max(600),
    simmerMinMost: nonNegative.max(600),
    restMin: nonNegative.max(60),
    /** minutes at high pressure after the soak, pressure falling by itself; null: not in a pressure cooker */
    pressureMin: nonNegative.max(120).nullable(),
    rinse: z.boolean(),
    /** what to do, where the plain steps do not say it all */
    note: z.string(),
    source: z.string().min(1),
    provenance: z.string().min(1),
  })
  .refine(m => m.soakHLeast <= m.soakHMost && m.simmerMinLeast <= m.simmerMinMost, 'least <= most')
  .refine(m => m.hardBoilMin <= m.simmerMinMost, 'the hard boil lies inside the simmer time')
export type CookingMethod = z.infer<typeof cookingMethodSchema>

export const kitchenFileSchema = z.object({
  cautions: z.array(cautionTextSchema),
  conditions: z.array(conditionTextSchema),
  yields: z.array(foodYieldSchema),
  cooking: z.array(cookingMethodSchema),
})
export type KitchenFile = z.infer<typeof kitchenFileSchema>
