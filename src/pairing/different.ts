import type { Proposal } from './search.ts'

/** Kin that two proposals share. */
function shared(a: Proposal, b: Proposal): number {
  return a.kins.filter(kin => b.kins.includes(kin)).length
}

/**
 * The first `count` proposals that are different meals: no two share more than half of the foods of the smaller one.
 * Where the shelf has not enough of those, proposals that differ in at least one foodstuff follow. Foods that must be
 * in (`forcedKins`) are in every proposal and don't count. `proposals` come best first.
 */
export function differentProposals(
  proposals: readonly Proposal[],
  count: number,
  forcedKins: ReadonlySet<string>,
): Proposal[] {
  const free = (proposal: Proposal): Proposal => ({
    ...proposal,
    kins: proposal.kins.filter(kin => !forcedKins.has(kin)),
  })
  const chosen: Proposal[] = []
  for (const strict of [true, false]) {
    for (const proposal of proposals) {
      if (chosen.length >= count) return chosen
      if (chosen.includes(proposal)) continue
      const differs = chosen.every(other => {
        const [a, b] = [free(proposal), free(other)]
        const smaller = Math.min(a.kins.length, b.kins.length)
        const both = shared(a, b)
        return strict
          ? both <= smaller / 2 && both < Math.max(1, smaller)
          : both < Math.max(a.kins.length, b.kins.length)
      })
      if (differs) chosen.push(proposal)
    }
  }
  return chosen
}
