import type { Pattern } from '../nutrition/pattern.ts'
import type { ConditionText } from './kitchen-file.ts'
import { loadKitchen } from './load.ts'

/**
 * What the tool cannot judge for a person, from what the settings tell of them (nothing unless told).
 *
 *     planningRefusal({ conditions: ['phenylketonuria'] })   // a reason, or null: then plan
 *     stepBack(['kidney-disease']).bodyMassTargets           // false: set no target from body mass
 */
export interface PersonAsked {
  conditions?: readonly string[]
  /** years */
  age?: number | undefined
  pattern?: Pick<Pattern, 'planning'>
}

export const NOT_FOR_INFANTS =
  'shortstave plans no meals for infants and children under three: their needs are for a doctor or a registered dietitian'

/** Under this age (years) nothing is planned. */
const PLANNED_FROM_YEARS = 3

/**
 * Why no pairing at all may be proposed, or null where one may: for a child under three, against a pattern of
 * infants and young children, and with phenylketonuria.
 */
export function planningRefusal(
  { conditions = [], age, pattern }: PersonAsked,
  texts?: readonly ConditionText[],
): string | null {
  if (age !== undefined && age < PLANNED_FROM_YEARS) return NOT_FOR_INFANTS
  if (pattern !== undefined && !pattern.planning) return NOT_FOR_INFANTS
  if (conditions.length === 0) return null
  return told(conditions, texts).find(condition => condition.refusesPlanning)?.text ?? null
}

/** How far the tool steps back, and what it says. */
export interface StepBack {
  /** may a target be worked out from body mass (and the ranges of people who train be offered)? */
  bodyMassTargets: boolean
  /** false: hide grams, scores and targets unless the person asks for them */
  numbers: boolean
  /** one note a condition, with its source */
  notes: { id: string; text: string; source: string }[]
}

/** Nothing told: nothing is held back, and the kitchen's data is not read. Age under 18 counts as `under-18`. */
export function stepBack(
  conditions: readonly string[],
  age?: number,
  texts?: readonly ConditionText[],
): StepBack {
  const asked =
    age !== undefined && age < 18 && !conditions.includes('under-18')
      ? [...conditions, 'under-18']
      : conditions
  if (asked.length === 0) return { bodyMassTargets: true, numbers: true, notes: [] }
  const known = told(asked, texts)
  return {
    bodyMassTargets: known.every(condition => condition.bodyMassTargets),
    numbers: known.every(condition => condition.numbers),
    notes: known.map(({ id, text, source }) => ({ id, text, source })),
  }
}

function told(
  ids: readonly string[],
  texts: readonly ConditionText[] = loadKitchen().conditions,
): ConditionText[] {
  return texts.filter(({ id }) => ids.includes(id))
}
