const TINY = 1e-12

/**
 * The best mix of rows where the worst column counts: max over u >= 0, sum u = 1, of the least over j of
 * sum_i u_i payoff[i][j]. Exact up to rounding, by the simplex method on the game's dual, whose start is feasible;
 * Bland's rule keeps it from circling (Mathematics of Operations Research 1977;2:103-107,
 * doi:10.1287/moor.2.2.103).
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
  const tableau = shifted.map((row, i) => {
    const line = new Float64Array(width)
    line.set(row)
    line[columns + i] = 1
    line[width - 1] = 1
    return line
  })
  const costs = new Float64Array(width)
  costs.fill(-1, 0, columns)
  const basis = Array.from({ length: rows }, (_, i) => columns + i)
  for (;;) {
    const entering = costs.subarray(0, width - 1).findIndex(cost => cost < -TINY)
    if (entering === -1) break
    let leaving = -1
    let ratio = Number.POSITIVE_INFINITY
    for (let i = 0; i < rows; i++) {
      const coefficient = tableau[i]![entering]!
      if (coefficient <= TINY) continue
      const at = tableau[i]![width - 1]! / coefficient
      if (at < ratio - TINY || (at <= ratio + TINY && leaving !== -1 && basis[i]! < basis[leaving]!)) {
        ratio = Math.min(at, ratio)
        leaving = i
      }
    }
    if (leaving === -1) break
    pivot(tableau, costs, leaving, entering)
    basis[leaving] = entering
  }
  // The dual's prices are the reduced costs of its slacks.
  const prices = Array.from({ length: rows }, (_, i) => Math.max(0, costs[columns + i]!))
  const sum = prices.reduce((a, b) => a + b, 0)
  return { value: (1 / sum - 1) * scale + least, mix: prices.map(price => price / sum) }
}

function pivot(tableau: Float64Array[], costs: Float64Array, leaving: number, entering: number): void {
  const line = tableau[leaving]!
  const by = line[entering]!
  for (let j = 0; j < line.length; j++) line[j]! /= by
  for (const other of [...tableau, costs]) {
    if (other === line) continue
    const times = other[entering]!
    if (times === 0) continue
    for (let j = 0; j < line.length; j++) other[j]! -= times * line[j]!
  }
}
