import type { AllergenId } from '../foods/allergens.ts'
import type { PatternId } from '../nutrition/pattern.ts'

/** What holds until the cook sets anything. Plain data beside the schema, so that one-shot commands need no schema. */
export const DEFAULT_SETTINGS = {
  targetG: 35 as number | null,
  bodyMassKg: null as number | null,
  gPerKgPerDay: 1.6,
  mealsPerDay: 3,
  servings: 1,
  foodsAtMost: 3,
  pattern: 'fao-2013-over-3y' as PatternId,
  without: [] as AllergenId[],
  eggs: false,
  dairy: false,
  energyAtMostKcal: null as number | null,
  massAtMostG: null as number | null,
  units: 'metric' as 'metric' | 'us',
  conditions: [],
  lastB12Day: null as string | null,
}
