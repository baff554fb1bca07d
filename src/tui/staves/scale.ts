/** How a chart of staves is scaled: the same for every plate at a height, so that only the staves move. */
export interface Scale {
  /** rows of the chart */
  height: number
  /** per cent of the pattern that a row stands for */
  rowValue: number
  /** the row of the 100 line, 0 at the bottom; 100 is in its middle, where a terminal draws a line */
  row100: number
}

/** The scale reaches at least this, % of the pattern; longer staves end in an arrow, with their figure below. */
const REACH = 138

/**
 * The scale of a chart of so many rows. 100 % always falls on the middle of a row.
 *
 * @example scaleOf(9) has rows of 18.2 % and its 100 line in row 5
 */
export function scaleOf(height: number): Scale {
  const row100 = Math.max(0, Math.floor((height * 100) / REACH - 0.5))
  return { height, rowValue: 100 / (row100 + 0.5), row100 }
}

/** The row in which a value lies, within the chart. A value on the border of two rows is in the lower one. */
export function rowOf(value: number, { height, rowValue }: Scale): number {
  return Math.min(height - 1, Math.max(0, Math.ceil(value / rowValue - 1e-9) - 1))
}
