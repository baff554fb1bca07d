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
    /** food weighed before, and the food that it becomes; null where the table has no such row (never both) */
    from: id.nullable(),
    to: id.nullable(),
    /** what it is before and after, as a cook says it: `dry`, `boiled` */
    before: z.string().min(1),
    after: z.string().min(1),
    /** g after / g before */
    factor: positive.max(15),
    low: positive.max(15),
    high: positive.max(15),
    basis: z.enum(YIELD_BASES),
    source: z.string().min(1),
    provenance: z.string().min(1),
  })
  .refine(({ factor, low, high }) => low <= factor && factor <= high, 'low <= factor <= high')
  .refine(({ from, to }) => from !== null || to !== null, 'a yield is of some food')
export type FoodYield = z.infer<typeof foodYieldSchema>

export const cookingMethodSchema = z
  .object({
    id,
    /** how the heat is applied: `simmer` in water, `soak` in boiling water off the heat, `warm` through, `bake`, `fry`, or none */
    heat: z.enum(['simmer', 'soak', 'warm', 'bake', 'fry', 'none']),
    /** hours; both 0: no soak needed; least 0: may be soaked */
    soakHLeast: nonNegative.max(48),
    soakHMost: nonNegative.max(48),
    /** parts water to one part food by volume; null: no set amount */
    waterRatio: positive.max(12).nullable(),
    /** boiled in plenty and drained, or until the water is taken up; null: no cooking water */
    water: z.enum(['drain', 'absorb']).nullable(),
    /** minutes of hard boil inside the simmer time */
    hardBoilMin: nonNegative.max(60),
    /** minutes on the heat */
    cookMinLeast: nonNegative.max(600),
    cookMinMost: nonNegative.max(600),
    restMin: nonNegative.max(60),
    /** minutes at high pressure after the soak, pressure falling by itself; null: not in a pressure cooker */
    pressureMin: positive.max(120).nullable(),
    rinse: z.boolean(),
    /** what to do, where the plain steps do not say it all */
    note: z.string(),
    source: z.string().min(1),
    provenance: z.string().min(1),
  })
  .refine(m => m.soakHLeast <= m.soakHMost && m.cookMinLeast <= m.cookMinMost, 'least <= most')
  .refine(m => m.hardBoilMin <= m.cookMinLeast, 'the hard boil lies inside the time on the heat')
export type CookingMethod = z.infer<typeof cookingMethodSchema>

export const storageTextSchema = z.object({
  id,
  text: z.string().min(20).max(320),
  source: z.string().min(1),
  provenance: z.string().min(1),
})
export type StorageText = z.infer<typeof storageTextSchema>

export const kitchenFileSchema = z.object({
  cautions: z.array(cautionTextSchema),
  conditions: z.array(conditionTextSchema),
  yields: z.array(foodYieldSchema),
  cooking: z.array(cookingMethodSchema),
  /** food id to the id of its cooking method; a food that is not here is eaten as it is */
  cookingOf: z.record(id, id),
  storage: z.array(storageTextSchema),
})
export type KitchenFile = z.infer<typeof kitchenFileSchema>
