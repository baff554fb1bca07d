import type { Candidate } from './candidate.ts'
import type { Window } from './grams.ts'
import { type Proposal, proposalOf } from './search.ts'

/** How finely the reachable protein is looked for, g. */
const PRECISION_G = 0.05

/** What stops a plate from reaching its protein. */
export interface Reach {
  /** the nearest plate, or null where nothing can be put on one */
  proposal: Proposal | null
  proteinG: number
  /** false: the plate has too much protein rather than too little */
  tooLittle: boolean
  /** what the least portions of the foods that must be in come to, where that alone is over a ceiling */
  over?: { massG: number; energyKcal: number }
}

/**
 * The plate whose protein comes nearest to the target where none reaches it: of the foods that bring most protein in
 * a serving, with the forced foods in, at most two of a role, and one of a kin.
 */
export function nearestPlate(
  forced: readonly Candidate[],
  open: readonly Candidate[],
  foodsAtMost: number,
  window: Window,
): Reach {
  const over = leastOver(forced, window)
  if (over !== null) {
    const proteinG = forced.reduce((sum, { protein, leastG }) => sum + protein * leastG, 0)
    const open = { ...window, energyAtMostKcal: null, massAtMostG: null }
    return { proposal: atProtein(forced, open, proteinG, 0), proteinG, tooLittle: true, over }
  }
  const set = [...forced]
  const byProtein = [...open].sort(
    (a, b) => b.protein * b.mostG - a.protein * a.mostG || (a.food.id < b.food.id ? -1 : 1),
  )
  for (const food of byProtein) {
    const places = set.filter(({ takesPlace }) => takesPlace)
    if (places.length >= foodsAtMost) break
    if (set.some(other => other.food.kin === food.food.kin)) continue
    if (places.filter(other => other.food.role === food.food.role).length >= 2) continue
    const grown = [...set, food]
    if (grown.reduce((sum, { protein, leastG }) => sum + protein * leastG, 0) > window.mostProteinG) continue
    set.push(food)
  }
  if (set.length === 0) return { proposal: null, proteinG: 0, tooLittle: true }
  const least = set.reduce((sum, { protein, leastG }) => sum + protein * leastG, 0)
  if (least > window.mostProteinG) {
    return { proposal: atProtein(set, window, least, 1), proteinG: least, tooLittle: false }
  }
  return mostProtein(set, forced.length, window)
}

/** What the least portions come to, where they are over a ceiling; null where they are not. */
function leastOver(
  foods: readonly Candidate[],
  { energyAtMostKcal, massAtMostG }: Window,
): { massG: number; energyKcal: number } | null {
  const massG = foods.reduce((sum, { leastG }) => sum + leastG, 0)
  const energyKcal = foods.reduce((sum, { kcal, leastG }) => sum + kcal * leastG, 0)
  const fits = massG <= (massAtMostG ?? massG) && energyKcal <= (energyAtMostKcal ?? energyKcal)
  return fits ? null : { massG, energyKcal }
}

/** The most protein that a set reaches within the ceilings, by bisection over the exact inner step. */
function mostProtein(set: readonly Candidate[], forced: number, window: Window): Reach {
  let low = 0
  let high = Math.min(
    window.leastProteinG,
    set.reduce((sum, { protein, mostG }) => sum + protein * mostG, 0),
  )
  let best = atProtein(set, window, high, 0)
  if (best !== null) return { proposal: best, proteinG: high, tooLittle: true }
  while (high - low > PRECISION_G) {
    const middle = (low + high) / 2
    const proposal = atProtein(set, window, middle, 0)
    if (proposal === null) high = middle
    else {
      best = proposal
      low = middle
    }
  }
  if (best !== null || set.length <= Math.max(1, forced))
    return { proposal: best, proteinG: low, tooLittle: true }
  // The least portions alone break a ceiling: try with one food fewer.
  return mostProtein(set.slice(0, -1), forced, window)
}

function atProtein(
  set: readonly Candidate[],
  window: Window,
  proteinG: number,
  slackG: number,
): Proposal | null {
  return proposalOf(set, {
    ...window,
    leastProteinG: proteinG - 1e-6,
    mostProteinG: Math.max(window.mostProteinG, proteinG + slackG),
  })
}
