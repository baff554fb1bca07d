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

  const ratio = bestRatio(a, b, least, most)
  const g = Math.max(a.leastG, b.leastG / ratio, low / (a.protein + ratio * b.protein))
  return {
    quality: staveAt(a, b, lowestStave(a, b, ratio), ratio) / (a.crude + ratio * b.crude),
    grams: Float64Array.of(g, g * ratio),
  }
}

/**
 * The ratio of b to a whose shortest stave is longest. With the ratio a stave only grows or only falls. Where the
 * shortest at the least ratio falls, or the shortest at the most grows, that end is the best; else it stands between,
 * and where the two cross either they are the shortest or a third one takes the place of one of them.
 */
function bestRatio(a: Candidate, b: Candidate, least: number, most: number): number {
  const grows = (i: number) => b.staves[i]! * a.crude > a.staves[i]! * b.crude
  let growing = lowestStave(a, b, least)
  if (!grows(growing)) return least
  let falling = lowestStave(a, b, most)
  if (grows(falling)) return most
  for (;;) {
    const ratio = (a.staves[growing]! - a.staves[falling]!) / (b.staves[falling]! - b.staves[growing]!)
    const lowest = lowestStave(a, b, ratio)
    const here = staveAt(a, b, growing, ratio)
    // Where two cross falls with each step, so that none comes back.
    if (staveAt(a, b, lowest, ratio) >= here - 1e-12 * Math.abs(here)) return ratio
    if (grows(lowest)) growing = lowest
    else falling = lowest
  }
}

/** The shortest stave at a ratio; all stand over the same crude protein. */
function lowestStave(a: Candidate, b: Candidate, ratio: number): number {
  let lowest = 0
  let least = Number.POSITIVE_INFINITY
  for (let i = 0; i < STAVES.length; i++) {
    const stave = staveAt(a, b, i, ratio)
    if (stave < least) {
      least = stave
      lowest = i
    }
  }
  return lowest
}

const staveAt = (a: Candidate, b: Candidate, i: number, ratio: number): number =>
  a.staves[i]! + ratio * b.staves[i]!
