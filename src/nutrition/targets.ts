/** A usual range of intake, with its source. */
export interface IntakeRange {
  id: string
  label: string
  low: number
  high: number
  unit: 'g/kg/day' | 'g/kg/meal'
  source: string
}

/** Usual ranges of protein intake for healthy adults; shown for information, never prescribed. */
export const INTAKE_RANGES: readonly IntakeRange[] = [
  {
    id: 'adult-safe-level',
    label: 'adult safe level',
    low: 0.83,
    high: 0.83,
    unit: 'g/kg/day',
    source: 'WHO Technical Report Series 935 (2007)',
  },
  {
    id: 'training',
    label: 'people who train',
    low: 1.4,
    high: 2.0,
    unit: 'g/kg/day',
    source: 'J Int Soc Sports Nutr 2017;14:20, doi:10.1186/s12970-017-0177-8',
  },
  {
    id: 'per-meal',
    label: 'one meal, people who train',
    low: 0.25,
    high: 0.4,
    unit: 'g/kg/meal',
    source:
      'J Int Soc Sports Nutr 2017;14:20, doi:10.1186/s12970-017-0177-8; 2018;15:10, doi:10.1186/s12970-018-0215-1',
  },
]

/**
 * Protein for one meal in g: body mass (kg) x intake (g per kg and day) / meals a day.
 *
 * @example mealTargetG({ bodyMassKg: 70, gPerKgPerDay: 1.6, mealsPerDay: 3 }) is 37.3
 */
export function mealTargetG(of: { bodyMassKg: number; gPerKgPerDay: number; mealsPerDay: number }): number {
  return (of.bodyMassKg * of.gPerKgPerDay) / of.mealsPerDay
}
