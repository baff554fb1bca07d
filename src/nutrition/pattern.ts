import type { Staves } from './amino-acids.ts'

/** The ids of the scoring patterns in data/patterns.csv. */
export const PATTERN_IDS = ['fao-2013-over-3y', 'fao-2013-child', 'who-2007-adult', 'fao-who-1991'] as const
export type PatternId = (typeof PATTERN_IDS)[number]

export const DEFAULT_PATTERN: PatternId = 'fao-2013-over-3y'

/**
 * A scoring pattern: what 1 g of the ideal protein holds, in mg of each indispensable amino acid.
 * `planning` is false for patterns that the program scores with but never plans meals for.
 */
export interface Pattern {
  id: PatternId
  name: string
  mgPerG: Staves
  planning: boolean
  source: string
  provenance: string
}
