/**
 * The simplex method on a small dense tableau, for linear programmes of a dozen rows: max c.x with A x <= b, x >= 0
 * and b >= 0, so that x = 0 is a vertex to start from.
 * Source: Linear Programming and Extensions (Princeton University Press, 1963); Bland's rule against cycling:
 * Mathematics of Operations Research 1977;2:103, doi:10.1287/moor.2.2.103.
 */
const EPSILON = 1e-11
const MOST_PIVOTS = 300
/** after so many pivots the rule that can't cycle takes over from the one that is fast */
const PATIENCE = 60

/** A tableau of `rows` constraints over `columns` variables and slacks; the last column is the right-hand side, the last row the costs. */
export interface Tableau {
  rows: number
  columns: number
  cells: Float64Array
  basis: Int32Array
}

export function emptyTableau(rows: number, columns: number): Tableau {
  return { rows, columns, cells: new Float64Array((rows + 1) * (columns + 1)), basis: new Int32Array(rows) }
}

const spare = new Map<number, Tableau>()

/** An empty tableau that is used again for each programme of its size: hold on to none of it. */
export function borrowedTableau(rows: number, columns: number): Tableau {
  const key = rows * 4096 + columns
  let tableau = spare.get(key)
  if (tableau === undefined) {
    tableau = emptyTableau(rows, columns)
    spare.set(key, tableau)
  } else {
    tableau.cells.fill(0)
  }
  return tableau
}

/** Brings a column into the basis of a row. */
export function pivot({ rows, columns, cells, basis }: Tableau, row: number, column: number): void {
  const width = columns + 1
  const start = row * width
  const scale = 1 / cells[start + column]!
  for (let j = 0; j < width; j++) cells[start + j]! *= scale
  cells[start + column] = 1
  for (let i = 0; i <= rows; i++) {
    if (i === row) continue
    const at = i * width
    const factor = cells[at + column]!
    if (factor === 0) continue
    for (let j = 0; j < width; j++) cells[at + j]! -= factor * cells[start + j]!
    cells[at + column] = 0
  }
  basis[row] = column
}

/**
 * Pivots from a feasible basis until no cost is negative. The cost row holds -c, so that its last cell becomes the
 * optimum. False where the optimum is unbounded, or once the last cell is past `worthPast`: it only grows.
 */
export function optimise(tableau: Tableau, worthPast = Number.POSITIVE_INFINITY): boolean {
  const { rows, columns, cells, basis } = tableau
  const width = columns + 1
  const costs = rows * width
  for (let pivots = 0; pivots < MOST_PIVOTS; pivots++) {
    let column = -1
    let least = -EPSILON
    for (let j = 0; j < columns; j++) {
      const cost = cells[costs + j]!
      if (cost < least) {
        column = j
        if (pivots > PATIENCE) break
        least = cost
      }
    }
    if (column === -1) return true
    if (cells[costs + columns]! > worthPast) return false
    let row = -1
    let ratio = Number.POSITIVE_INFINITY
    for (let i = 0; i < rows; i++) {
      const cell = cells[i * width + column]!
      if (cell <= EPSILON) continue
      const here = cells[i * width + columns]! / cell
      if (here < ratio - EPSILON || (here < ratio + EPSILON && row !== -1 && basis[i]! < basis[row]!)) {
        ratio = here
        row = i
      }
    }
    if (row === -1) return false
    pivot(tableau, row, column)
  }
  return true
}
