import type { Proposal } from './search.ts'

/** A different meal is worth proposing while its truncated DIAAS is within this of the best (a fraction). */
const WORTH = 0.1
/** What two proposals may share of the smaller one's foods, stricter first; the last lets through what differs at all. */
const SHARES = [1 / 3, 1 / 2, 1]

/**
 * `count` proposals that are different meals, the best first: where the shelf allows, no two share more than a third
 * of the foods of the smaller one; then up to a half; then proposals that differ in one foodstuff at least. Foods that
 * must be in (`forcedKins`) are in every proposal and don't count. `proposals` come best first.
 */
export function differentProposals(
  proposals: readonly Proposal[],
  count: number,
  forcedKins: ReadonlySet<string>,
): Proposal[] {
  const best = proposals[0]
  if (best === undefined) return []
  const freeKins = new Map(
    proposals.map(proposal => [proposal, proposal.kins.filter(kin => !forcedKins.has(kin))]),
  )
  const worth = Math.min(1, best.quality) - WORTH
  const chosen: Proposal[] = []
  for (const share of SHARES) {
    for (const proposal of proposals) {
      if (chosen.length >= count) break
      if (chosen.includes(proposal) || (share < 1 && proposal.quality < worth)) continue
      const mine = freeKins.get(proposal)!
      const differs = chosen.every(other => {
        const theirs = freeKins.get(other)!
        const both = mine.filter(kin => theirs.includes(kin)).length
        return (
          both <= share * Math.min(mine.length, theirs.length) && both < Math.max(mine.length, theirs.length)
        )
      })
      if (differs) chosen.push(proposal)
    }
  }
  return chosen.sort((a, b) => proposals.indexOf(a) - proposals.indexOf(b))
}
