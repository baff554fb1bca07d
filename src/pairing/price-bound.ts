import type { Candidate } from './candidate.ts'

/**
 * A price on each stave (together 1), on protein, energy and mass: the dual values of the exact inner step of some set.
 * Whatever set they come from, they bound what any other set could reach.
 */
export interface Prices {
  staves: Float64Array
  /** per g protein: what the least protein costs, less what the most of it does */
  protein: number
  /** per kcal of the energy ceiling */
  energy: number
  /** per g of the mass ceiling */
  mass: number
  /** what the window and the ceilings allow, at these prices */
  allowance: number
}

/** What a gram of a food is worth at some prices, before its crude protein is paid for at the score's rate. */
export function worthOf(
  { staves, protein, kcal }: Candidate,
  { staves: stavePrices, protein: proteinPrice, energy, mass }: Prices,
): number {
  let worth = proteinPrice * protein - energy * kcal - mass
  for (let i = 0; i < stavePrices.length; i++) worth += stavePrices[i]! * staves[i]!
  return worth
}

/** A food's worth a gram with what bounds its grams: what a bound is reckoned from. */
export interface PricedFood {
  worth: number
  crude: number
  leastG: number
  mostG: number
}

/**
 * The greatest DIAAS (a fraction) that a set could reach whatever its grams, at some prices, if that is `wanted` or
 * more; else -Infinity. Grams g that keep to the window and reach the score q have
 * sum_j g_j (worth_j - q crude_j) + allowance >= 0, which is greatest with each food at its least or its most; it falls
 * with q and is convex, so that Newton's steps from the left end at its root. This is Lagrangian relaxation:
 * Management Science 1981;27:1, doi:10.1287/mnsc.27.1.1.
 */
export function priceBound(foods: readonly PricedFood[], allowance: number, wanted: number): number {
  let bound = wanted
  for (let step = 0; step < 30; step++) {
    let left = allowance
    let slope = 0
    for (let j = 0; j < foods.length; j++) {
      const { worth, crude, leastG, mostG } = foods[j]!
      const margin = worth - bound * crude
      const grams = margin > 0 ? mostG : leastG
      left += grams * margin
      slope += grams * crude
    }
    if (step === 0 && left < -1e-9) return Number.NEGATIVE_INFINITY
    if (!(left > 1e-9 * slope)) return bound
    bound += left / slope
  }
  return Number.POSITIVE_INFINITY
}
