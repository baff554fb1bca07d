import { STAVES } from '../nutrition/amino-acids.ts'
import type { Candidate } from './candidate.ts'
import type { Window } from './grams.ts'
import { emptyTableau, optimise } from './simplex.ts'

/** Grams of a food to be used up weigh this much more than a kcal saved. */
const USE_UP_WEIGHT = 1000

/**
 * Among the grams of a set that keep every stave at `quality` (a fraction) or above, those that use up most of what is
 * to be used up and then have the least energy. `null` where none reach it.
 *
 * A linear programme with costs that are never negative: x_j counts from the least grams up or, for a food to be used
 * up, from the most grams down. Its dual then starts from a feasible vertex at 0.
 */
export function thriftyGrams(
  set: readonly Candidate[],
  window: Window,
  quality: number,
): Float64Array | null {
  const k = set.length
  const S = STAVES.length
  /** a constraint on grams: sum_j figure_j g_j >= bound */
  const constraints: { figures: number[]; bound: number }[] = STAVES.map((_, i) => ({
    figures: set.map(({ staves, crude }) => staves[i]! - quality * crude),
    bound: 0,
  }))
  const proteins = set.map(({ protein }) => protein)
  constraints.push({ figures: proteins, bound: window.leastProteinG })
  constraints.push({ figures: proteins.map(g => -g), bound: -window.mostProteinG })
  if (window.energyAtMostKcal !== null) {
    constraints.push({ figures: set.map(({ kcal }) => -kcal), bound: -window.energyAtMostKcal })
  }
  if (window.massAtMostG !== null)
    constraints.push({ figures: set.map(() => -1), bound: -window.massAtMostG })
  for (let j = 0; j < k; j++) {
    const { leastG, mostG } = set[j]!
    constraints.push({ figures: set.map((_, i) => (i === j ? -1 : 0)), bound: -mostG })
    constraints.push({ figures: set.map((_, i) => (i === j ? 1 : 0)), bound: leastG })
  }
  const sign = set.map(({ useUp }) => (useUp ? -1 : 1))
  const origin = set.map(({ useUp, leastG, mostG }) => (useUp ? mostG : leastG))
  const m = constraints.length
  // Dual: max h.u with (figures_j sign_j).u <= cost_j, u >= 0.
  const tableau = emptyTableau(k, m + k)
  const width = m + k + 1
  for (let j = 0; j < k; j++) {
    for (let c = 0; c < m; c++) tableau.cells[j * width + c] = constraints[c]!.figures[j]! * sign[j]!
    tableau.cells[j * width + m + j] = 1
    tableau.cells[j * width + m + k] = set[j]!.useUp ? USE_UP_WEIGHT : Math.max(1e-3, set[j]!.kcal)
    tableau.basis[j] = m + j
  }
  for (let c = 0; c < m; c++) {
    const { figures, bound } = constraints[c]!
    const atOrigin = figures.reduce((sum, figure, j) => sum + figure * origin[j]!, 0)
    tableau.cells[k * width + c] = -(bound - atOrigin)
  }
  if (!optimise(tableau)) return null
  const grams = new Float64Array(k)
  for (let j = 0; j < k; j++) {
    const { leastG, mostG } = set[j]!
    const x = tableau.cells[k * width + m + j]!
    grams[j] = Math.min(mostG, Math.max(leastG, origin[j]! + sign[j]! * x))
  }
  return constraints.slice(0, S + 2).every(({ figures, bound }) => {
    const reached = figures.reduce((sum, figure, j) => sum + figure * grams[j]!, 0)
    return reached >= bound - 1e-6
  })
    ? grams
    : null
}
