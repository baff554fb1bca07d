import { STAVES } from '../nutrition/amino-acids.ts'
import type { Candidate } from './candidate.ts'
import type { Prices } from './price-bound.ts'
import { borrowedTableau, optimise, pivot } from './simplex.ts'

/** What the grams of a serving must keep to; null: no ceiling. */
export interface Window {
  leastProteinG: number
  mostProteinG: number
  energyAtMostKcal: number | null
  massAtMostG: number | null
}

/** The best grams of a set, and the DIAAS that they reach, as a fraction. */
export interface BestGrams {
  quality: number
  grams: Float64Array
}

/** What weighing a set came to: its best grams, if they are wanted, and the prices that show why not, or why no better. */
export interface Weighed {
  best: BestGrams | null
  prices: Prices | null
}

/**
 * The exact inner step: the grams of a chosen set that make its least stave greatest, within the protein window and
 * each food's least and most grams. `null` where no grams keep to the window, or none reach `wanted` (a fraction).
 */
export function bestGrams(set: readonly Candidate[], window: Window, wanted = 0): BestGrams | null {
  return weighed(set, window, wanted).best
}

/**
 * The exact inner step with its prices. The bound only falls on the way to the optimum, so that a set which can't reach
 * what is wanted is given up early; the prices at that point prove it.
 *
 * max min_i (sum_j g_j b_ij) / (sum_j g_j c_j) is a linear-fractional programme. Charnes and Cooper's substitution
 * y = t g with sum_j c_j y_j = 1 makes it linear (Naval Research Logistics Quarterly 1962;9:181,
 * doi:10.1002/nav.3800090303); with y_j = t m_j + x_j its lower bounds are gone too. What is solved is the dual of that
 * programme: it has as few rows as there are foods, plus two, and a feasible basis that needs no search (one stave's
 * price 1, the score's bound high enough for every food). The grams are the prices of its rows.
 */
export function weighed(set: readonly Candidate[], window: Window, wanted: number): Weighed {
  const k = set.length
  const S = STAVES.length
  const ceilings = (window.energyAtMostKcal === null ? 0 : 1) + (window.massAtMostG === null ? 0 : 1)
  // Columns: a price a stave, one a food's upper bound, two of the window, the ceilings, the score's bound, slacks.
  const atUpper = S
  const atWindow = S + k
  const atCeilings = atWindow + 2
  const atBound = atCeilings + ceilings
  const atSlack = atBound + 1
  const columns = atSlack + k + 1
  const tableau = borrowedTableau(k + 2, columns)
  const { cells, basis } = tableau
  const width = columns + 1
  const rowT = k
  const rowSum = k + 1

  let crudeLeast = 0
  let proteinLeast = 0
  let kcalLeast = 0
  let gramsLeast = 0
  for (const { leastG, crude, protein, kcal } of set) {
    crudeLeast += leastG * crude
    proteinLeast += leastG * protein
    kcalLeast += leastG * kcal
    gramsLeast += leastG
  }
  // Rows in the form  slack = (bound) - (prices) >= 0,  hence  -bound*c + prices + slack = 0.
  for (let j = 0; j < k; j++) {
    const { staves, crude, protein, kcal, leastG, mostG } = set[j]!
    const at = j * width
    for (let i = 0; i < S; i++) {
      cells[at + i] = staves[i]!
      cells[rowT * width + i]! += leastG * staves[i]!
    }
    cells[at + atUpper + j] = -1
    cells[rowT * width + atUpper + j] = mostG - leastG
    cells[at + atWindow] = protein
    cells[at + atWindow + 1] = -protein
    let ceiling = atCeilings
    if (window.energyAtMostKcal !== null) cells[at + ceiling++] = -kcal
    if (window.massAtMostG !== null) cells[at + ceiling] = -1
    cells[at + atBound] = -crude
    cells[at + atSlack + j] = 1
    basis[j] = atSlack + j
  }
  const at = rowT * width
  cells[at + atWindow] = proteinLeast - window.leastProteinG
  cells[at + atWindow + 1] = window.mostProteinG - proteinLeast
  let ceiling = atCeilings
  if (window.energyAtMostKcal !== null) cells[at + ceiling++] = window.energyAtMostKcal - kcalLeast
  if (window.massAtMostG !== null) cells[at + ceiling] = window.massAtMostG - gramsLeast
  cells[at + atBound] = -crudeLeast
  cells[at + atSlack + k] = 1
  basis[rowT] = atSlack + k
  for (let i = 0; i < S; i++) cells[rowSum * width + i] = 1
  cells[rowSum * width + columns] = 1
  // Minimise the bound: maximise its negative.
  cells[(k + 2) * width + atBound] = 1

  pivot(tableau, rowSum, 0)
  let row = -1
  let highest = Number.NEGATIVE_INFINITY
  for (let i = 0; i <= k; i++) {
    const crude = -cells[i * width + atBound]!
    if (crude <= 0) {
      // A food without protein, where its amino acids are nil too: its row holds for every bound.
      continue
    }
    const bound = -cells[i * width + columns]! / crude
    if (bound > highest) {
      highest = bound
      row = i
    }
  }
  if (row === -1) return { best: null, prices: null }
  pivot(tableau, row, atBound)
  const solved = optimise(tableau, -wanted)

  const values = new Float64Array(atBound)
  for (let i = 0; i < k + 2; i++) if (basis[i]! < atBound) values[basis[i]!] = cells[i * width + columns]!
  const prices = named(values, atWindow, window)
  const costs = (k + 2) * width
  const t = cells[costs + atSlack + k]!
  if (!solved || !(t > 1e-12)) return { best: null, prices }
  const grams = new Float64Array(k)
  for (let j = 0; j < k; j++) {
    const { leastG, mostG } = set[j]!
    grams[j] = Math.min(mostG, Math.max(leastG, leastG + cells[costs + atSlack + j]! / t))
  }
  return { best: { quality: -cells[costs + columns]!, grams }, prices }
}

/** The prices of staves, window and ceilings, out of a programme's values. */
function named(values: Float64Array, atWindow: number, window: Window): Prices {
  const { leastProteinG, mostProteinG, energyAtMostKcal, massAtMostG } = window
  const low = values[atWindow]!
  const high = values[atWindow + 1]!
  let at = atWindow + 2
  const energy = energyAtMostKcal === null ? 0 : values[at++]!
  const mass = massAtMostG === null ? 0 : values[at]!
  return {
    staves: values.subarray(0, STAVES.length),
    protein: low - high,
    energy,
    mass,
    allowance:
      high * mostProteinG -
      low * leastProteinG +
      energy * (energyAtMostKcal ?? 0) +
      mass * (massAtMostG ?? 0),
  }
}
