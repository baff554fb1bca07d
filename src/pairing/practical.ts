import { type Candidate, qualityOf, totalOf } from './candidate.ts'
import type { Window } from './grams.ts'

/** Steps to either side of the exact grams that are tried for each food, fewest first. */
const REACHES = [1, 2, 4]
/** The plates that are tried at most for one reach. */
const TRIED_AT_MOST = 20_000

/** Grams that a cook weighs: multiples of the food's step, or all that there is. */
export interface PracticalGrams {
  grams: number[]
  quality: number
  /** are protein and ceilings kept to? */
  keeps: boolean
}

/**
 * The practical grams nearest to the exact ones that keep to the window with the best truncated DIAAS (then more of
 * what is to be used up, then less energy). Where none keep to it, those whose protein misses the window by least.
 */
export function practicalGrams(
  set: readonly Candidate[],
  exact: ArrayLike<number>,
  window: Window,
): PracticalGrams {
  let best: PracticalGrams | null = null
  for (const reach of REACHES) {
    const choices = set.map((food, j) => stepsAround(food, exact[j]!, reach))
    const plates = choices.reduce((product, steps) => product * steps.length, 1)
    if (plates > TRIED_AT_MOST) break
    best = bestOf(set, choices, window)
    if (best.keeps) return best
  }
  return (
    best ??
    bestOf(
      set,
      set.map((food, j) => stepsAround(food, exact[j]!, 1)),
      window,
    )
  )
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

function bestOf(set: readonly Candidate[], choices: readonly number[][], window: Window): PracticalGrams {
  let best: PracticalGrams | null = null
  let bestRank: number[] = []
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
    const quality = qualityOf(set, grams)
    const miss = Math.max(0, window.leastProteinG - protein, protein - window.mostProteinG)
    const over = Math.max(
      0,
      window.energyAtMostKcal === null ? 0 : kcal - window.energyAtMostKcal,
      window.massAtMostG === null ? 0 : grams.reduce((sum, g) => sum + g, 0) - window.massAtMostG,
    )
    const usedUp = set.reduce((sum, food, i) => sum + (food.useUp ? grams[i]! : 0), 0)
    const rank = [over > 1e-9 ? -over : 0, miss > 1e-9 ? -miss : 0, Math.min(1, quality), usedUp, -kcal]
    if (best === null || isHigher(rank, bestRank)) {
      best = { grams: [...grams], quality, keeps: over <= 1e-9 && miss <= 1e-9 }
      bestRank = rank
    }
  }
  visit(0)
  return best!
}

function isHigher(a: readonly number[], b: readonly number[]): boolean {
  for (let i = 0; i < a.length; i++) {
    if (Math.abs(a[i]! - b[i]!) > 1e-9) return a[i]! > b[i]!
  }
  return false
}
