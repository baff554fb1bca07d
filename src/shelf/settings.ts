import * as z from 'zod/mini'
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

/** A number in a range, both ends in it. */
const between = (least: number, most: number, of = 'number') => {
  const error = `give a ${of} from ${least} to ${most}`
  return z.number({ error }).check(z.minimum(least, { error }), z.maximum(most, { error }))
}

const wholeBetween = (least: number, most: number) =>
  between(least, most, 'whole number').check(
    z.multipleOf(1, { error: `give a whole number from ${least} to ${most}` }),
  )

const oneOf = <const T extends readonly string[]>(words: T) =>
  z.enum(words, { error: `give one of ${words.join(', ')}` })

const yesOrNo = z.boolean({ error: 'give yes or no' })

/** What the bench is set to. `targetG` (plain grams) wins over body mass. Null: not set. */
export const settingsSchema = z.object({
  targetG: z._default(z.nullable(between(1, 200)), DEFAULT_SETTINGS.targetG),
  bodyMassKg: z._default(z.nullable(between(15, 300)), DEFAULT_SETTINGS.bodyMassKg),
  gPerKgPerDay: z._default(between(0.3, 3.5), DEFAULT_SETTINGS.gPerKgPerDay),
  mealsPerDay: z._default(wholeBetween(1, 10), DEFAULT_SETTINGS.mealsPerDay),
  servings: z._default(wholeBetween(1, 100), DEFAULT_SETTINGS.servings),
  foodsAtMost: z._default(wholeBetween(1, 6), DEFAULT_SETTINGS.foodsAtMost),
  pattern: z._default(oneOf(PATTERN_IDS), DEFAULT_SETTINGS.pattern),
  without: z._default(z.array(oneOf(ALLERGEN_IDS)), DEFAULT_SETTINGS.without),
  eggs: z._default(yesOrNo, DEFAULT_SETTINGS.eggs),
  dairy: z._default(yesOrNo, DEFAULT_SETTINGS.dairy),
  energyAtMostKcal: z._default(z.nullable(between(50, 5000)), DEFAULT_SETTINGS.energyAtMostKcal),
  massAtMostG: z._default(z.nullable(between(20, 5000)), DEFAULT_SETTINGS.massAtMostG),
  units: z._default(oneOf(['metric', 'us']), DEFAULT_SETTINGS.units),
  conditions: z._default(z.array(oneOf(CONDITIONS)), DEFAULT_SETTINGS.conditions),
  /** the day on which vitamin B12 was last mentioned */
  lastB12Day: z._default(z.nullable(z.iso.date('a day is written 2026-12-31')), DEFAULT_SETTINGS.lastB12Day),
})
export type Settings = z.infer<typeof settingsSchema>
