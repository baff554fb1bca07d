import { STAVES, type Stave, type Staves, stavesOf } from './amino-acids.ts'
import type { Pattern } from './pattern.ts'
import type { DigestibilityTier, Doubt, Portion, ProfileTier, ProteinSource } from './protein-source.ts'
import { seededNormals, seedOf } from './random.ts'
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

const DRAWS = 500
/** normals a draw needs: one a stave, one for the digestibility, one for the protein content */
const WIDTH = STAVES.length + 2

const drawsByFood = new Map<string, Float64Array>()

/** The draws of a food depend on its id alone, so that a split or reordered portion gives the same band. */
function drawsOf(foodId: string): Float64Array {
  let draws = drawsByFood.get(foodId)
  if (draws === undefined) {
    draws = seededNormals(seedOf(foodId), DRAWS * WIDTH)
    drawsByFood.set(foodId, draws)
  }
  return draws
}

function profileCv(food: ProteinSource, stave: Stave, coefficients: Coefficients): number {
  const parts = [
    coefficients.profile[food.profileTier][stave],
    ...food.doubts.map(d => coefficients.doubt[d][stave]),
  ]
  return Math.hypot(...parts)
}

/** A positive factor with mean 1 and coefficient of variation `cv`, from a standard normal (log-normal). */
function factor(cv: number, normal: number): number {
  const sigma2 = Math.log1p(cv * cv)
  return Math.exp(Math.sqrt(sigma2) * normal - sigma2 / 2)
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
  const mg = Array.from({ length: DRAWS }, () => new Float64Array(STAVES.length))
  const protein = new Float64Array(DRAWS)
  for (const { food, grams } of parts) {
    const draws = drawsOf(food.id)
    const crudeG = (grams / 100) * food.per100g.crudeProteinG
    const sigmas = STAVES.map(stave => profileCv(food, stave, coefficients))
    const digestible = STAVES.map(stave => digestibleMgPerG(food, stave))
    const digestibilityCv = coefficients.digestibility[food.digestibilityTier]
    for (let d = 0; d < DRAWS; d++) {
      const at = d * WIDTH
      const partG = crudeG * factor(coefficients.protein, draws[at + STAVES.length + 1]!)
      const digestibility = factor(digestibilityCv, draws[at + STAVES.length]!)
      protein[d]! += partG
      const row = mg[d]!
      for (let s = 0; s < STAVES.length; s++) {
        row[s]! += partG * digestible[s]! * digestibility * factor(sigmas[s]!, draws[at + s]!)
      }
    }
  }
  const scores = new Float64Array(DRAWS)
  const limitedBy = new Array<number>(STAVES.length).fill(0)
  for (let d = 0; d < DRAWS; d++) {
    let least = Number.POSITIVE_INFINITY
    let at = 0
    for (let s = 0; s < STAVES.length; s++) {
      const stave = (100 * mg[d]![s]!) / (protein[d]! * pattern.mgPerG[STAVES[s]!])
      if (stave < least) {
        least = stave
        at = s
      }
    }
    scores[d] = least
    limitedBy[at]!++
  }
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
