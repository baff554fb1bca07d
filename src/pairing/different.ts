import type { Proposal } from './search.ts'

/** A different meal is worth proposing while its truncated DIAAS is within this of the best (a fraction). */
const WORTH = 0.1
/** One that rests on a food of another role is taken before the rest while it is within this of the best (a fraction). */
const WORTH_FOR_ROLE = 0.02

/** What a further proposal must differ by, stricter first; the last lets through what differs at all. */
const RULES = [
  { share: 1 / 3, otherRole: true, worth: WORTH_FOR_ROLE },
  { share: 1 / 3, otherRole: false, worth: WORTH },
  { share: 1 / 2, otherRole: false, worth: WORTH },
  { share: 1, otherRole: false, worth: 1 },
]

/**
 * `count` proposals that are different meals, the best first: where the shelf allows, no two share more than a third
 * of the foods of the smaller one, and those that rest on foods of different roles are taken first; then up to a half;
 * then proposals that differ in one foodstuff at least. Foods that must be in (`forcedKins`) are in every proposal and
 * don't count. `proposals` come best first; each is taken as `finished` makes it.
 */
export function differentProposals(
  proposals: readonly Proposal[],
  count: number,
  forcedKins: ReadonlySet<string>,
  finished: (proposal: Proposal) => Proposal = proposal => proposal,
): Proposal[] {
  const best = proposals[0]
  if (best === undefined) return []
  const kinsOf = ({ kins }: Proposal) => kins.filter(kin => !forcedKins.has(kin))
  const chosen: { proposal: Proposal; place: number; kins: string[] }[] = []
  const differs = (proposal: Proposal, { share, otherRole }: (typeof RULES)[number]) => {
    const mine = kinsOf(proposal)
    return chosen.every(other => {
      const both = mine.filter(kin => other.kins.includes(kin)).length
      return (
        both <= share * Math.min(mine.length, other.kins.length) &&
        both < Math.max(mine.length, other.kins.length) &&
        !(otherRole && leadingRole(other.proposal) === leadingRole(proposal))
      )
    })
  }
  for (const rule of RULES) {
    const worth = Math.min(1, best.quality) - rule.worth
    for (const [place, proposal] of proposals.entries()) {
      if (chosen.length >= count) break
      if (proposal.quality < worth || !differs(proposal, rule)) continue
      const taken = finished(proposal)
      if (taken !== proposal && !differs(taken, rule)) continue
      chosen.push({ proposal: taken, place, kins: kinsOf(taken) })
    }
  }
  return chosen.sort((a, b) => a.place - b.place).map(({ proposal }) => proposal)
}

/** The role of the food that brings most of the protein. */
function leadingRole({ set, grams }: Proposal): string {
  let role = ''
  let most = -1
  set.forEach(({ food, protein }, j) => {
    if (protein * grams[j]! <= most) return
    most = protein * grams[j]!
    role = food.role
  })
  return role
}
