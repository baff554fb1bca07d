import { z } from 'zod'
import { ALLERGEN_IDS } from '../foods/allergens.ts'
import { DEFAULT_PATTERN, PATTERN_IDS } from '../nutrition/pattern.ts'

/** Conditions of the eater that the cook may tell of; nothing is assumed. */
export const CONDITIONS = [
  'phenylketonuria',
  'kidney-disease',
  'pregnancy',
  'under-18',
  'blood-thinners',
  'gout',
  'eating-disorder-history',
] as const

/** What the bench is set to. `targetG` (plain grams) wins over body mass. Null: not set. */
export const settingsSchema = z.object({
  targetG: z.number().min(1).max(200).nullable().default(35),
  bodyMassKg: z.number().min(15).max(300).nullable().default(null),
  gPerKgPerDay: z.number().min(0.3).max(3.5).default(1.6),
  mealsPerDay: z.number().int().min(1).max(10).default(3),
  servings: z.number().int().min(1).max(100).default(1),
  foodsAtMost: z.number().int().min(1).max(6).default(3),
  pattern: z.enum(PATTERN_IDS).default(DEFAULT_PATTERN),
  without: z.array(z.enum(ALLERGEN_IDS)).default([]),
  eggs: z.boolean().default(false),
  dairy: z.boolean().default(false),
  energyAtMostKcal: z.number().min(50).max(5000).nullable().default(null),
  massAtMostG: z.number().min(20).max(5000).nullable().default(null),
  units: z.enum(['metric', 'us']).default('metric'),
  conditions: z.array(z.enum(CONDITIONS)).default([]),
  /** the day on which vitamin B12 was last mentioned */
  lastB12Day: z.iso.date().nullable().default(null),
})
export type Settings = z.infer<typeof settingsSchema>

export const DEFAULT_SETTINGS: Settings = settingsSchema.parse({})
