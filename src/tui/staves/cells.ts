import { rowOf, type Scale } from './scale.ts'
import type { Stack } from './stacks.ts'

/** One cell of a stave, before it is painted. `eighths` are filled from the bottom. */
export type Cell =
  | { kind: 'empty' }
  /** one food from bottom to top; `letter` where the food's letter stands */
  | { kind: 'whole'; food: number; letter: boolean }
  /** the top of the stave */
  | { kind: 'top'; food: number; eighths: number }
  /** the border of two foods */
  | { kind: 'border'; food: number; above: number; eighths: number }
  /** the stave goes on above the chart */
  | { kind: 'beyond'; food: number }

interface Piece {
  food: number
  from: number
  to: number
}

/**
 * The cells of one stave, from the bottom up. Tops are exact to an eighth of a row; with `borders` those between two
 * foods are too (they need two colours in a cell), else a cell belongs to the food that fills most of it.
 */
export function cellsOf(stack: Stack, scale: Scale, borders: boolean): Cell[] {
  const pieces = piecesOf(stack)
  const top = rowOf(stack.total, scale)
  const cells = Array.from({ length: scale.height }, (_, row): Cell => {
    if (row > top || stack.total <= 0) return { kind: 'empty' }
    const low = row * scale.rowValue
    const high = low + scale.rowValue
    const inside = pieces
      .map(({ food, from, to }) => ({ food, from: Math.max(from, low), to: Math.min(to, high) }))
      .filter(({ from, to }) => to - from > 1e-9)
    const most = inside.reduce((a, b) => (b.to - b.from > a.to - a.from ? b : a), inside[0]!)
    if (row === scale.height - 1 && stack.total > high + 1e-9) return { kind: 'beyond', food: most.food }
    const filled = Math.round((8 * (Math.min(stack.total, high) - low)) / scale.rowValue)
    if (filled < 8) {
      // The least sliver is drawn at the foot, so that a stave of next to nothing is still seen to stand there.
      const eighths = row === 0 ? Math.max(1, filled) : filled
      return eighths === 0 ? { kind: 'empty' } : { kind: 'top', food: most.food, eighths }
    }
    return (borders ? borderIn(inside, most, low, scale) : null) ?? whole(most.food)
  })
  letterEach(cells)
  return cells
}

const whole = (food: number): Cell => ({ kind: 'whole', food, letter: false })

/** Where each food's part of a stave begins and ends, % of the pattern. */
function piecesOf({ parts }: Stack): Piece[] {
  let bottom = 0
  return parts.map((part, food) => {
    const piece = { food, from: bottom, to: bottom + part }
    bottom += part
    return piece
  })
}

/** The border that a full cell shows: the one between the food that fills most of it and its greater neighbour. */
function borderIn(inside: readonly Piece[], most: Piece, low: number, { rowValue }: Scale): Cell | null {
  const at = inside.indexOf(most)
  const size = (piece: Piece | undefined) => (piece === undefined ? 0 : piece.to - piece.from)
  const [below, above] =
    size(inside[at - 1]) > size(inside[at + 1]) ? [inside[at - 1]!, most] : [most, inside[at + 1]]
  if (above === undefined) return null
  const eighths = Math.round((8 * (below.to - low)) / rowValue)
  if (eighths <= 0) return whole(above.food)
  if (eighths >= 8) return whole(below.food)
  return { kind: 'border', food: below.food, above: above.food, eighths }
}

/** Puts each food's letter into the middle one of its whole cells. */
function letterEach(cells: Cell[]): void {
  const rowsOf = new Map<number, number[]>()
  cells.forEach((cell, row) => {
    if (cell.kind === 'whole') rowsOf.set(cell.food, [...(rowsOf.get(cell.food) ?? []), row])
  })
  for (const [food, rows] of rowsOf) {
    cells[rows[Math.floor((rows.length - 1) / 2)]!] = { kind: 'whole', food, letter: true }
  }
}
