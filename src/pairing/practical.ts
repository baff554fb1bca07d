import { type Candidate, qualityOf, totalOf } from './candidate.ts'
import type { Window } from './grams.ts'

/** Steps to either side of the exact grams that are tried for each food, fewest first. */
const REACHES = [1, 2, 4]
/** The plates that are tried at most for one reach. */
const TRIED_AT_MOST = 8000
/** Practical grams that lose no more than this of what the exact ones reach (a fraction) need no wider look. */
const LOST = 0.0005

/** Grams that a cook weighs: multiples of the food's step, or all that there is. */
export interface PracticalGrams {
  grams: number[]
  quality: number
  /** are protein and ceilings kept to? */
  keeps: boolean
}

/**
 * The practical grams around exact ones (one choice of them or several) that keep to the window with the best truncated
 * DIAAS, then more of what is to be used up, then less energy; the fewer steps away the sooner they are taken. Where
 * none keep to the window, those whose protein misses it by least.
 */
export function practicalGrams(
  set: readonly Candidate[],
  exact: readonly ArrayLike<number>[],
  window: Window,
): PracticalGrams {
  const enough = Math.max(...exact.map(grams => Math.min(1, qualityOf(set, grams)))) - LOST
  let best: Ranked | null = null
  for (const reach of REACHES) {
    for (const grams of exact) {
      const choices = set.map((food, j) => stepsAround(food, grams[j]!, reach))
      const plates = choices.reduce((product, steps) => product * steps.length, 1)
      if (best === null || plates <= TRIED_AT_MOST) best = bestOf(set, choices, window, best)
      if (best.keeps && Math.min(1, best.quality) >= enough) return best
    }
  }
  return best!
}

/** Multiples of the food's step around the exact grams, within its least and most; and the most itself. */
function stepsAround({ food, leastG, mostG }: Candidate, exact: number, reach: number): number[] {
  const { stepG } = food
  const steps = new Set<number>()
  const below = Math.floor(exact / stepG)
  for (let step = below - reach + 1; step <= below + reach; step++) {
    const grams = step * stepG
    if (grams >= leastG && grams <= mostG) steps.add(grams)
  }
  // The last of what is there need not be a whole step.
  const last = Math.floor(mostG)
  if (steps.size === 0 || mostG - exact < stepG) steps.add(last > 0 ? last : mostG)
  const first = Math.ceil(leastG)
  if (exact - leastG < stepG && first <= mostG) steps.add(first)
  return [...steps].sort((a, b) => a - b)
}

/** Practical grams with what they are ranked by, the first figure first, more is better. */
interface Ranked extends PracticalGrams {
  rank: number[]
}

/** The best of all plates that the choices make, and of the best one known. */
function bestOf(
  set: readonly Candidate[],
  choices: readonly number[][],
  window: Window,
  known: Ranked | null,
): Ranked {
  let best = known
  const grams = new Array<number>(set.length).fill(0)
  const visit = (j: number): void => {
    if (j < set.length) {
      for (const g of choices[j]!) {
        grams[j] = g
        visit(j + 1)
      }
      return
    }
    const protein = totalOf(set, grams, 'protein')
    const kcal = totalOf(set, grams, 'kcal')
    const { leastProteinG, mostProteinG, energyAtMostKcal, massAtMostG } = window
    const miss = aboveRounding(Math.max(leastProteinG - protein, protein - mostProteinG))
    const over =
      aboveRounding(energyAtMostKcal === null ? 0 : kcal - energyAtMostKcal) +
      aboveRounding(massAtMostG === null ? 0 : grams.reduce((sum, g) => sum + g, 0) - massAtMostG)
    if (best?.keeps && miss + over > 0) return
    const quality = qualityOf(set, grams)
    const usedUp = set.reduce((sum, food, i) => sum + (food.useUp ? grams[i]! : 0), 0)
    const rank = [-over, -miss, Math.min(1, quality), usedUp, -kcal]
    if (best === null || isHigher(rank, best.rank)) {
      best = { grams: [...grams], quality, keeps: over + miss === 0, rank }
    }
  }
  visit(0)
  return best!
}

const aboveRounding = (excess: number): number => (excess > 1e-9 ? excess : 0)

function isHigher(a: readonly number[], b: readonly number[]): boolean {
  for (let i = 0; i < a.length; i++) {
    if (Math.abs(a[i]! - b[i]!) > 1e-9) return a[i]! > b[i]!
  }
  return false
}
