import type { AllergenId } from '../foods/allergens.ts'
import { plainText } from '../foods/plain-text.ts'
import type { Table } from '../foods/table.ts'
import { readAllergens } from '../kitchen/allergen-names.ts'
import { NOT_FOR_INFANTS, planningRefusal } from '../kitchen/conditions.ts'
import { DEFAULT_PATTERN, PATTERN_IDS, type Pattern, type PatternId } from '../nutrition/pattern.ts'
import { NO_ANSWER, Refusal } from './command.ts'

/** The pattern that an option names, or the default. */
export function readPattern(table: Table, text: string | undefined): Pattern {
  const id = (text ?? DEFAULT_PATTERN).trim().toLowerCase()
  const pattern = table.patternById.get(id as PatternId)
  if (pattern === undefined) {
    throw new Refusal(
      `there is no pattern "${plainText(text ?? '').slice(0, 40)}"; there are ${PATTERN_IDS.join(', ')}`,
    )
  }
  return pattern
}

/** As `readPattern`, for planning for somebody of an age: refused where nothing may be planned, with the reason. */
export function readPlanningPattern(
  table: Table,
  text: string | undefined,
  age: number | undefined,
): Pattern {
  if (/infant|baby/i.test(text ?? '')) throw new Refusal(NOT_FOR_INFANTS, NO_ANSWER)
  const pattern = readPattern(table, text)
  const refusal = planningRefusal({ age, pattern })
  if (refusal !== null) throw new Refusal(refusal, NO_ANSWER)
  return pattern
}

/** The allergens that `--without` names, comma-separated or given again. */
export function readWithout(texts: string[]): AllergenId[] {
  const ids = new Set<AllergenId>()
  for (const text of texts.flatMap(given => given.split(','))) {
    const reading = readAllergens(text)
    if (!reading.ok) throw new Refusal(`--without ${plainText(text).slice(0, 40)}: ${reading.problem}`)
    for (const id of reading.allergens) ids.add(id)
  }
  return [...ids]
}
