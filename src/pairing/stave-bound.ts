import type { Candidate } from './candidate.ts'

/** Each stave of a food alone, as a fraction of the pattern; 0 without protein. */
export const ownStaves = ({ staves, crude }: Candidate): Float64Array =>
  staves.map(stave => (crude > 0 ? stave / crude : 0))

/** Raises a bound by one more food: whatever the grams, no stave of a mixture is longer than its food's longest. */
export function raise(bound: Float64Array, own: Float64Array): void {
  for (let i = 0; i < bound.length; i++) if (own[i]! > bound[i]!) bound[i] = own[i]!
}

/** The shortest stave of a bound that one more food raises: what the DIAAS of the mixture could be at the most. */
export function leastOf(bound: Float64Array, own: Float64Array): number {
  let least = Number.POSITIVE_INFINITY
  for (let i = 0; i < bound.length; i++) {
    const stave = Math.max(bound[i]!, own[i]!)
    if (stave < least) least = stave
  }
  return least
}
