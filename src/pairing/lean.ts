import { qualityClass } from '../nutrition/quality-class.ts'
import type { Window } from './grams.ts'
import { better, type Proposal, proposalOf } from './search.ts'

/**
 * A food is spent on a pairing only where it raises the truncated DIAAS by this (a fraction), or into a higher class:
 * half a point is far inside the band of any score, and nothing to cook one dish more for.
 */
const WORTH_A_FOOD = 0.005

/** A proposal without the foods that add next to nothing; those to be used up stay. */
export function lean(proposal: Proposal, window: Window): Proposal {
  const kept = Math.min(1, proposal.quality) - WORTH_A_FOOD
  const sameClass = ({ quality }: Proposal) =>
    qualityClass(100 * Math.min(1, quality + 1e-9)) ===
    qualityClass(100 * Math.min(1, proposal.quality + 1e-9))
  let best = proposal
  for (;;) {
    let leaner: Proposal | null = null
    for (const food of best.set) {
      if (food.useUp || best.set.length === 1) continue
      const rest = proposalOf(
        best.set.filter(other => other !== food),
        window,
        kept,
      )
      if (rest === null || !sameClass(rest)) continue
      if (leaner === null || better(rest, leaner)) leaner = rest
    }
    if (leaner === null) return best
    best = leaner
  }
}
