import { STAVES, type Stave, type Staves, stavesOf } from './amino-acids.ts'
import type { Pattern } from './pattern.ts'
import type { DigestibilityTier, Doubt, Portion, ProfileTier, ProteinSource } from './protein-source.ts'
import { normalQuantile, seededUniform, seedOf } from './random.ts'
import { digestibleMgPerG } from './staves.ts'

/**
 * Coefficients of variation (fractions, one standard deviation). Parts are added in quadrature. The values and
 * their reasons stand in data/curation/uncertainty.csv.
 */
export interface Coefficients {
  /** of mg amino acid per g protein, by how the profile is known */
  profile: Record<ProfileTier, Staves>
  /** added to the profile's for each doubt */
  doubt: Record<Doubt, Staves>
  /** of the digestibility, common to all amino acids of a food */
  digestibility: Record<DigestibilityTier, number>
  /** of a food's protein content, hence of its weight in the mixture */
  protein: number
}

/** A 90 % band of the DIAAS, and the share of draws in which each stave is the limiting one. */
export interface Band {
  low: number
  high: number
  limitingShare: Staves
}

const DRAWS = 256
/** What a draw needs of a food: a value a stave, one for the digestibility, one for the protein content. */
const WIDTH = STAVES.length + 2
const AT_DIGESTIBILITY = STAVES.length
const AT_PROTEIN = STAVES.length + 1

/** The middle of each stratum of a standard normal distribution. */
const strata = Float64Array.from({ length: DRAWS }, (_, d) => normalQuantile((d + 0.5) / DRAWS))

/** By food id: for each column, in which order the draws go through the values of its distribution. */
const ordersByFood = new Map<string, Uint16Array>()
/** By coefficient of variation: the values of its distribution, one a stratum. */
const factorsByCv = new Map<number, Float64Array>()

/**
 * Latin hypercube sampling (Technometrics 1979;21:239, doi:10.1080/00401706.1979.10489755): each column goes through
 * every stratum of its distribution once, in an order of its own. The orders depend on the food's id alone, so that a
 * split or reordered portion gives the same band.
 */
function ordersOf(foodId: string): Uint16Array {
  let orders = ordersByFood.get(foodId)
  if (orders === undefined) {
    const uniform = seededUniform(seedOf(foodId))
    orders = new Uint16Array(DRAWS * WIDTH)
    for (let column = 0; column < WIDTH; column++) {
      const start = column * DRAWS
      for (let d = 0; d < DRAWS; d++) {
        const other = Math.floor(uniform() * (d + 1))
        orders[start + d] = orders[start + other]!
        orders[start + other] = d
      }
    }
    ordersByFood.set(foodId, orders)
  }
  return orders
}

/** Positive factors with mean 1 and coefficient of variation `cv` (log-normal), one for each of DRAWS strata. */
function factorsOf(cv: number): Float64Array {
  let factors = factorsByCv.get(cv)
  if (factors === undefined) {
    const variance = Math.log1p(cv * cv)
    const sigma = Math.sqrt(variance)
    factors = new Float64Array(DRAWS)
    for (let d = 0; d < DRAWS; d++) factors[d] = Math.exp(sigma * strata[d]! - variance / 2)
    factorsByCv.set(cv, factors)
  }
  return factors
}

function profileCv(food: ProteinSource, stave: Stave, coefficients: Coefficients): number {
  let squares = coefficients.profile[food.profileTier][stave] ** 2
  for (const doubt of food.doubts) squares += coefficients.doubt[doubt][stave] ** 2
  return Math.sqrt(squares)
}

/**
 * The band of a plate's DIAAS: the stated coefficients of variation propagated through the score by seeded draws.
 * Each food's profile is drawn per stave, its digestibility and its protein content once each. The band holds the
 * middle 90 % of draws. `null` without protein.
 */
export function bandOf(
  portions: readonly Portion[],
  pattern: Pattern,
  coefficients: Coefficients,
): Band | null {
  const merged = new Map<string, Portion>()
  for (const { food, grams } of portions) {
    if (!(grams > 0 && food.per100g.crudeProteinG > 0)) continue
    merged.set(food.id, { food, grams: grams + (merged.get(food.id)?.grams ?? 0) })
  }
  if (merged.size === 0) return null
  // In a fixed order, so that sums round alike however the plate was put together.
  const parts = [...merged.values()].sort((a, b) => (a.food.id < b.food.id ? -1 : 1))
  const protein = new Float64Array(DRAWS)
  const mg = STAVES.map(() => new Float64Array(DRAWS))
  const absorbed = new Float64Array(DRAWS)
  for (const { food, grams } of parts) {
    const orders = ordersOf(food.id)
    const crudeG = (grams / 100) * food.per100g.crudeProteinG
    const contents = factorsOf(coefficients.protein)
    const digestibilities = factorsOf(coefficients.digestibility[food.digestibilityTier])
    for (let d = 0; d < DRAWS; d++) {
      const partG = crudeG * contents[orders[AT_PROTEIN * DRAWS + d]!]!
      protein[d]! += partG
      absorbed[d] = partG * digestibilities[orders[AT_DIGESTIBILITY * DRAWS + d]!]!
    }
    for (let s = 0; s < STAVES.length; s++) {
      const stave = STAVES[s]!
      const mgPerG = digestibleMgPerG(food, stave)
      const factors = factorsOf(profileCv(food, stave, coefficients))
      const sums = mg[s]!
      const start = s * DRAWS
      for (let d = 0; d < DRAWS; d++) sums[d]! += absorbed[d]! * mgPerG * factors[orders[start + d]!]!
    }
  }
  const scores = new Float64Array(DRAWS).fill(Number.POSITIVE_INFINITY)
  const shortest = new Uint8Array(DRAWS)
  for (let s = 0; s < STAVES.length; s++) {
    const scale = 100 / pattern.mgPerG[STAVES[s]!]
    for (let d = 0; d < DRAWS; d++) {
      const stave = (scale * mg[s]![d]!) / protein[d]!
      if (stave < scores[d]!) {
        scores[d] = stave
        shortest[d] = s
      }
    }
  }
  const limitedBy = new Array<number>(STAVES.length).fill(0)
  for (const s of shortest) limitedBy[s]!++
  scores.sort()
  return {
    low: quantile(scores, 0.05),
    high: quantile(scores, 0.95),
    limitingShare: stavesOf(stave => limitedBy[STAVES.indexOf(stave)]! / DRAWS),
  }
}

/** Linear interpolation between order statistics of sorted values. */
function quantile(sorted: Float64Array, p: number): number {
  const at = p * (sorted.length - 1)
  const below = Math.floor(at)
  const above = Math.min(below + 1, sorted.length - 1)
  return sorted[below]! + (at - below) * (sorted[above]! - sorted[below]!)
}
