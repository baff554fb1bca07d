import { STAVE_LABELS, STAVE_NAMES, STAVES, type Staves } from '../../nutrition/amino-acids.ts'
import type { Pattern } from '../../nutrition/pattern.ts'
import type { Portion } from '../../nutrition/protein-source.ts'
import { shortestStave } from '../../nutrition/staves.ts'
import { fillOf, inFoodColour, letterOf } from './palette.ts'
import { type Stack, stacksOf } from './stacks.ts'

export interface DrawOptions {
  portions: readonly Portion[]
  pattern: Pattern
  /** columns to draw in */
  width: number
  /** rows of the staves, without the two lines of labels (10) */
  height?: number
  colour?: boolean
  /** only letters of ASCII, for terminals without block elements */
  ascii?: boolean
}

/** Narrower than this the compact drawing is used: a line a stave. */
const FULL_FROM_COLUMNS = 58
const AXIS = 5
/** The scale ends here at the latest; what is longer ends in an arrow. % of the pattern. */
const SCALE_AT_MOST = 180
const EIGHTHS = [' ', '▁', '▂', '▃', '▄', '▅', '▆', '▇', '█']

/**
 * The staves: nine vertical bars, each stacked by food, the pattern's 100 line and the water line at the shortest
 * stave. A food has a letter and a fill of its own; the tops are exact to an eighth of a row. Returns the lines; none
 * where there is no protein.
 */
export function drawStaves(options: DrawOptions): string[] {
  const stacks = stacksOf(options.portions, options.pattern)
  if (stacks.length === 0) return []
  return options.width < FULL_FROM_COLUMNS ? compact(stacks, options) : full(stacks, options)
}

function full(stacks: readonly Stack[], options: DrawOptions): string[] {
  const { height = 10, colour = false, ascii = false } = options
  const pitch = Math.min(8, Math.floor((options.width - AXIS - 3) / stacks.length))
  const gap = pitch >= 7 ? 3 : 2
  const barWidth = pitch - gap
  const water = Math.min(...stacks.map(({ total }) => total))
  const highest = Math.min(SCALE_AT_MOST, Math.max(110, ...stacks.map(({ total }) => total)))
  const rowValue = highest / height
  const rowOf = (value: number) => Math.min(height - 1, Math.max(0, Math.ceil(value / rowValue) - 1))
  const pattern100 = rowOf(100)
  const waterRow = rowOf(water)
  const paint = (food: number, text: string) => (colour ? inFoodColour(food, text) : text)
  const dim = (text: string) => (colour ? `\u001b[2m${text}\u001b[22m` : text)
  const lines: string[] = []
  for (let row = height - 1; row >= 0; row--) {
    const between = row === waterRow ? (ascii ? '~' : '≈') : row === pattern100 ? (ascii ? '-' : '─') : ' '
    const value = row === waterRow ? String(Math.floor(water)) : row === pattern100 ? '100' : ''
    const label = `${value.padStart(4)}${between}`
    const cells = stacks.map(stack => {
      const space = dim(between.repeat(gap))
      return space + bar(stack, row, { rowValue, height, barWidth, between, ascii, paint, dim })
    })
    lines.push((label + cells.join('') + dim(between.repeat(gap))).trimEnd())
  }
  const shortest = shortestOf(stacks)
  const centred = (text: string) =>
    ' '.repeat(gap) + centre(text, barWidth + (text.length > barWidth ? 1 : 0)).slice(0, pitch - gap + 2)
  const under = (text: (stack: Stack) => string) =>
    `${' '.repeat(AXIS)}${stacks.map(stack => fit(centred(text(stack)), pitch)).join('')}`.trimEnd()
  const name = (stack: Stack) => STAVE_LABELS[stack.stave] + (stack.stave === shortest ? '*' : '')
  lines.push(
    under(name),
    under(({ total }) => wholePercent(total)),
  )
  return lines
}

interface BarRow {
  rowValue: number
  height: number
  barWidth: number
  between: string
  ascii: boolean
  paint: (food: number, text: string) => string
  dim: (text: string) => string
}

/** One row of one bar: the food that fills most of it, its letter in the middle of its part, an exact top. */
function bar({ parts, total }: Stack, row: number, at: BarRow): string {
  const low = row * at.rowValue
  const high = low + at.rowValue
  const background = at.dim(at.between.repeat(at.barWidth))
  if (total <= low) return background
  const over = total > high + 1e-9 && row === at.height - 1
  const food = mostOf(parts, low, Math.min(high, total))
  if (over) return at.paint(food, (at.ascii ? '^' : '↑').repeat(at.barWidth))
  const share = Math.min(1, (total - low) / at.rowValue)
  if (share < 1) {
    const eighths = Math.max(1, Math.round(share * 8))
    if (at.ascii) return share >= 0.5 ? at.paint(food, fillOf(food, true).repeat(at.barWidth)) : background
    if (eighths < 8) return at.paint(food, EIGHTHS[eighths]!.repeat(at.barWidth))
  }
  const fill = fillOf(food, at.ascii).repeat(at.barWidth)
  if (!isMiddleRow(parts, food, row, at)) return at.paint(food, fill)
  const middle = Math.floor((at.barWidth - 1) / 2)
  return at.paint(food, fill.slice(0, middle) + letterOf(food) + fill.slice(middle + 1))
}

/** Which part fills most of a span of the stack. */
function mostOf(parts: readonly number[], low: number, high: number): number {
  let bottom = 0
  let best = 0
  let most = -1
  parts.forEach((part, food) => {
    const overlap = Math.min(high, bottom + part) - Math.max(low, bottom)
    if (part > 0 && overlap > most) {
      most = overlap
      best = food
    }
    bottom += part
  })
  return best
}

/** Is a row the one in the middle of a food's part of the stack? There its letter stands. */
function isMiddleRow(parts: readonly number[], food: number, row: number, at: BarRow): boolean {
  const bottom = parts.slice(0, food).reduce((sum, part) => sum + part, 0)
  const top = bottom + parts[food]!
  const rows: number[] = []
  for (let r = 0; r < at.height; r++) {
    const low = r * at.rowValue
    const high = Math.min(low + at.rowValue, top)
    if (
      high > low &&
      high - low >= at.rowValue * 0.99 &&
      mostOf(parts, low, high) === food &&
      low + at.rowValue > bottom
    )
      rows.push(r)
  }
  return rows[Math.floor((rows.length - 1) / 2)] === row
}

function compact(stacks: readonly Stack[], options: DrawOptions): string[] {
  const { width, colour = false, ascii = false } = options
  const shortest = shortestOf(stacks)
  const highest = Math.min(SCALE_AT_MOST, Math.max(110, ...stacks.map(({ total }) => total)))
  const room = Math.max(8, width - 10)
  return stacks.map(({ stave, parts, total }) => {
    let drawn = ''
    let length = 0
    let sum = 0
    parts.forEach((part, food) => {
      sum += part
      const end = Math.min(room, Math.round((sum / highest) * room))
      const cells = Math.max(0, end - length)
      const letter =
        cells > 1 ? fillOf(food, ascii).repeat(cells - 1) + letterOf(food) : fillOf(food, ascii).repeat(cells)
      drawn += colour ? inFoodColour(food, letter) : letter
      length += cells
    })
    const mark = stave === shortest ? '*' : ' '
    return `${STAVE_LABELS[stave]}${mark}${wholePercent(total).padStart(4)} ${drawn}`
  })
}

const shortestOf = (stacks: readonly Stack[]) =>
  stacks.reduce((least, stack) => (stack.total < least.total ? stack : least)).stave

const wholePercent = (value: number): string => String(Math.floor(value + 1e-9))

const centre = (text: string, width: number): string => {
  const left = Math.max(0, Math.floor((width - text.length) / 2))
  return ' '.repeat(left) + text
}

const fit = (text: string, width: number): string => text.slice(0, width).padEnd(width)

/** The nine staves in words, for screen readers and pipes. */
export function stavesAsText(staves: Staves): string {
  const shortest = shortestStave(staves)
  const list = STAVES.map(stave => `${STAVE_NAMES[stave]} ${wholePercent(staves[stave])}`).join(', ')
  return `In % of the pattern: ${list}. Shortest: ${STAVE_NAMES[shortest]}.`
}

/** A sketch of the staves in nine characters, in their order; a full block is 120 % of the pattern or more. */
export function stavesSketch(staves: Staves, ascii = false): string {
  return STAVES.map(stave => {
    const eighths = Math.min(8, Math.max(1, Math.round((staves[stave] / 120) * 8)))
    return ascii ? String(eighths) : EIGHTHS[eighths]!
  }).join('')
}
