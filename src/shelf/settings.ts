import { z } from 'zod'
import { ALLERGEN_IDS } from '../foods/allergens.ts'
import { PATTERN_IDS } from '../nutrition/pattern.ts'
import { DEFAULT_SETTINGS } from './default-settings.ts'

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
  targetG: z.number().min(1).max(200).nullable().default(DEFAULT_SETTINGS.targetG),
  bodyMassKg: z.number().min(15).max(300).nullable().default(DEFAULT_SETTINGS.bodyMassKg),
  gPerKgPerDay: z.number().min(0.3).max(3.5).default(DEFAULT_SETTINGS.gPerKgPerDay),
  mealsPerDay: z.number().int().min(1).max(10).default(DEFAULT_SETTINGS.mealsPerDay),
  servings: z.number().int().min(1).max(100).default(DEFAULT_SETTINGS.servings),
  foodsAtMost: z.number().int().min(1).max(6).default(DEFAULT_SETTINGS.foodsAtMost),
  pattern: z.enum(PATTERN_IDS).default(DEFAULT_SETTINGS.pattern),
  without: z.array(z.enum(ALLERGEN_IDS)).default(DEFAULT_SETTINGS.without),
  eggs: z.boolean().default(DEFAULT_SETTINGS.eggs),
  dairy: z.boolean().default(DEFAULT_SETTINGS.dairy),
  energyAtMostKcal: z.number().min(50).max(5000).nullable().default(DEFAULT_SETTINGS.energyAtMostKcal),
  massAtMostG: z.number().min(20).max(5000).nullable().default(DEFAULT_SETTINGS.massAtMostG),
  units: z.enum(['metric', 'us']).default(DEFAULT_SETTINGS.units),
  conditions: z.array(z.enum(CONDITIONS)).default(DEFAULT_SETTINGS.conditions),
  /** the day on which vitamin B12 was last mentioned */
  lastB12Day: z.iso.date().nullable().default(DEFAULT_SETTINGS.lastB12Day),
})
export type Settings = z.infer<typeof settingsSchema>
