import { emptyTableau, optimise } from './simplex.ts'

/**
 * The best mix of rows where the worst column counts: max over u >= 0, sum u = 1, of the least over j of
 * sum_i u_i payoff[i][j]. Exact up to rounding, by the simplex method on the game's dual, whose start is feasible.
 * Source: Linear Programming and Extensions (Princeton University Press, 1963), on games.
 *
 * @param payoff rows that may be mixed, columns of which the least counts; finite numbers, any sign
 */
export function gameValue(payoff: readonly (readonly number[])[]): { value: number; mix: number[] } {
  const rows = payoff.length
  const columns = payoff[0]?.length ?? 0
  // Shifted so that every payoff is positive, and scaled, which change the value by as much and the mix not at all.
  const least = Math.min(...payoff.flat())
  const scale = Math.max(1, ...payoff.flat().map(value => value - least))
  const shifted = payoff.map(row => row.map(value => (value - least) / scale + 1))
  // max sum y, with shifted y <= 1, y >= 0: one constraint a row, one variable a column, one slack a row.
  const width = columns + rows + 1
  const tableau = emptyTableau(rows, columns + rows)
  shifted.forEach((row, i) => {
    tableau.cells.set(row, i * width)
    tableau.cells[i * width + columns + i] = 1
    tableau.cells[(i + 1) * width - 1] = 1
    tableau.basis[i] = columns + i
  })
  const costs = rows * width
  tableau.cells.fill(-1, costs, costs + columns)
  optimise(tableau)
  // The dual's prices are the reduced costs of its slacks.
  const prices = Array.from({ length: rows }, (_, i) => Math.max(0, tableau.cells[costs + columns + i]!))
  const sum = prices.reduce((a, b) => a + b, 0)
  return { value: (1 / sum - 1) * scale + least, mix: prices.map(price => price / sum) }
}
