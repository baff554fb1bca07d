import { STAVES, type Stave } from '../nutrition/amino-acids.ts'
import type { Pattern } from '../nutrition/pattern.ts'
import type { ProteinSource } from '../nutrition/protein-source.ts'
import { digestibleMgPerG } from '../nutrition/staves.ts'
import { gameValue } from './matrix-game.ts'

/** The DIAAS of all compositions that an ingredient order allows, with a composition at each end. */
export interface LabelRange {
  /** per cent, not truncated */
  low: number
  high: number
  /** mass fractions of the ingredients, in the label's order, that give it */
  atLow: number[]
  atHigh: number[]
  limitingAtLow: Stave
  limitingAtHigh: Stave
}

/**
 * The lowest and the highest DIAAS of a food of which only the order of ingredients is known: over all mass fractions
 * x1 >= x2 >= ... >= xn >= 0 that add up to 1. Null where none of them brings protein.
 *
 * DIAAS is the least of nine ratios of linear functions of x, so it is quasi-concave. Its minimum over a polytope
 * therefore lies at a corner, and the corners of this one are the equal mixtures of the first k ingredients. Its
 * maximum is a linear programme after Charnes and Cooper's substitution (Naval Research Logistics Quarterly
 * 1962;9:181-186, doi:10.1002/nav.3800090303): with u_k the protein that the k-th corner brings, the u_k are not
 * negative and add up to 1, and the least stave of their mixture is to be greatest: the value of a matrix game.
 *
 * @param ingredients in descending order of mass, each in the state in which it is weighed into the food
 */
export function labelRange(ingredients: readonly ProteinSource[], pattern: Pattern): LabelRange | null {
  const corners: { k: number; proteinG: number; staves: number[] }[] = []
  let proteinG = 0
  const mg = STAVES.map(() => 0)
  ingredients.forEach((food, i) => {
    proteinG += food.per100g.crudeProteinG / 100
    STAVES.forEach((stave, s) => {
      mg[s]! += (food.per100g.crudeProteinG / 100) * digestibleMgPerG(food, stave)
    })
    if (proteinG > 0) {
      const staves = STAVES.map((stave, s) => (100 * mg[s]!) / (proteinG * pattern.mgPerG[stave]))
      corners.push({ k: i + 1, proteinG, staves })
    }
  })
  if (corners.length === 0) return null
  const lowest = corners.reduce((a, b) => (Math.min(...b.staves) < Math.min(...a.staves) ? b : a))
  const best = gameValue(corners.map(({ staves }) => staves))
  // Back from protein to mass: a corner's protein comes from its k equal parts.
  const masses = ingredients.map((_, i) =>
    corners.reduce((sum, corner, c) => sum + (i < corner.k ? best.mix[c]! / corner.proteinG : 0), 0),
  )
  const total = masses.reduce((a, b) => a + b, 0)
  const highStaves = STAVES.map((_, s) =>
    corners.reduce((sum, { staves }, c) => sum + best.mix[c]! * staves[s]!, 0),
  )
  return {
    low: Math.min(...lowest.staves),
    high: Math.min(...highStaves),
    atLow: ingredients.map((_, i) => (i < lowest.k ? 1 / lowest.k : 0)),
    atHigh: masses.map(mass => mass / total),
    limitingAtLow: shortest(lowest.staves),
    limitingAtHigh: shortest(highStaves),
  }
}

const shortest = (staves: readonly number[]): Stave => STAVES[staves.indexOf(Math.min(...staves))]!
