import { STAVES } from '../nutrition/amino-acids.ts'
import type { Candidate } from './candidate.ts'
import type { BestGrams, Window } from './grams.ts'

/**
 * The exact best grams of one or two foods, without a linear programme. With two foods the score depends on their
 * ratio r alone: each stave is (a + r b) / (c + r d) over one and the same denominator, so that the least of them is
 * greatest where two numerators cross, or at an end of the ratios that the window allows. Each constraint bounds r
 * from one side. `null` where no grams keep to the window; the foods must bring protein.
 */
export function bestGramsOfFew(set: readonly Candidate[], window: Window): BestGrams | null {
  const [a, b] = set
  return b === undefined ? ofOne(a!, window) : ofTwo(a!, b, window)
}

function ofOne(
  food: Candidate,
  { leastProteinG, mostProteinG, energyAtMostKcal, massAtMostG }: Window,
): BestGrams | null {
  const g = Math.max(food.leastG, leastProteinG / food.protein)
  const most = Math.min(
    food.mostG,
    mostProteinG / food.protein,
    energyAtMostKcal === null ? Number.POSITIVE_INFINITY : energyAtMostKcal / food.kcal,
    massAtMostG ?? Number.POSITIVE_INFINITY,
  )
  if (g > most + 1e-9) return null
  let least = Number.POSITIVE_INFINITY
  for (const stave of food.staves) if (stave < least) least = stave
  return { quality: least / food.crude, grams: Float64Array.of(Math.min(g, most)) }
}

function ofTwo(a: Candidate, b: Candidate, window: Window): BestGrams | null {
  const { leastProteinG: low, mostProteinG: high } = window
  let least = b.leastG / a.mostG
  let most = b.mostG / a.leastG
  /** k r >= c */
  const atLeast = (k: number, c: number) => {
    if (k > 0) least = Math.max(least, c / k)
    else if (k < 0) most = Math.min(most, c / k)
    else if (c > 0) most = Number.NEGATIVE_INFINITY
  }
  // Enough protein although either food is at its most, and not too much although either is at its least.
  atLeast(a.mostG * b.protein, low - a.mostG * a.protein)
  atLeast(b.mostG * b.protein - low, -b.mostG * a.protein)
  atLeast(-a.leastG * b.protein, a.leastG * a.protein - high)
  atLeast(high - b.leastG * b.protein, b.leastG * a.protein)
  const ceiling = (ofA: number, ofB: number, limit: number) => {
    atLeast(-a.leastG * ofB, a.leastG * ofA - limit)
    atLeast(limit - b.leastG * ofB, b.leastG * ofA)
    // The least protein must come within the ceiling too.
    atLeast(limit * b.protein - low * ofB, low * ofA - limit * a.protein)
  }
  if (window.energyAtMostKcal !== null) ceiling(a.kcal, b.kcal, window.energyAtMostKcal)
  if (window.massAtMostG !== null) ceiling(1, 1, window.massAtMostG)
  if (!(least <= most * (1 + 1e-12))) return null

  let ratio = least
  let quality = qualityAt(a, b, least)
  const tryRatio = (r: number) => {
    const here = qualityAt(a, b, r)
    if (here > quality) {
      quality = here
      ratio = r
    }
  }
  tryRatio(most)
  for (let i = 1; i < STAVES.length; i++) {
    for (let j = 0; j < i; j++) {
      const r = (a.staves[i]! - a.staves[j]!) / (b.staves[j]! - b.staves[i]!)
      if (r > least && r < most) tryRatio(r)
    }
  }
  const g = Math.max(a.leastG, b.leastG / ratio, low / (a.protein + ratio * b.protein))
  return { quality, grams: Float64Array.of(g, g * ratio) }
}

function qualityAt(a: Candidate, b: Candidate, ratio: number): number {
  let least = Number.POSITIVE_INFINITY
  for (let i = 0; i < STAVES.length; i++) {
    const stave = a.staves[i]! + ratio * b.staves[i]!
    if (stave < least) least = stave
  }
  return least / (a.crude + ratio * b.crude)
}
