import { DEFAULT_PATTERN, type PatternId } from '../nutrition/pattern.ts'
import type { ScoreBasis } from '../nutrition/plate-score.ts'
import type { Table } from './table.ts'

/** What plates are scored against, taken from the table: the chosen pattern, and that of 1991 for the PDCAAS. */
export function scoreBasis(table: Table, pattern: PatternId = DEFAULT_PATTERN): ScoreBasis {
  return {
    pattern: table.patternById.get(pattern)!,
    pdcaasPattern: table.patternById.get('fao-who-1991')!,
    coefficients: table.coefficients,
  }
}
