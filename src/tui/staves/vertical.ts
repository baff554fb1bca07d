import { STAVE_LABELS } from '../../nutrition/amino-acids.ts'
import { type Cell, cellsOf } from './cells.ts'
import type { DrawOptions } from './draw-staves.ts'
import { wholePercent } from './figures.ts'
import { bordered, fillOf, inFoodColour, inWaterColour, lettered, letterOf, woven } from './palette.ts'
import { rowOf, scaleOf } from './scale.ts'
import { type Stack, shortestOf } from './stacks.ts'

/** Columns of the scale on the left, and of the line's name on the right. */
const LEFT = 5
const RIGHT = 6
const EIGHTHS = [' ', '▁', '▂', '▃', '▄', '▅', '▆', '▇', '█']

const dimmed = (text: string): string => `\u001b[2m${text}\u001b[22m`
const bold = (text: string): string => `\u001b[1m${text}\u001b[22m`

/** Nine upright staves, with the water line and the 100 line behind them. */
export function verticalStaves(stacks: readonly Stack[], options: DrawOptions): string[] {
  const { height = 10, colour = false, ascii = false } = options
  const pitch = Math.min(9, Math.floor((options.width - LEFT - RIGHT) / stacks.length))
  const gap = pitch >= 9 ? 4 : pitch >= 7 ? 3 : 2
  const size = pitch - gap
  const scale = scaleOf(height)
  const shortest = shortestOf(stacks)
  const water = rowOf(shortest.total, scale)
  const columns = stacks.map(stack => cellsOf(stack, scale, colour && !ascii))
  const painter = painterOf(colour, ascii, size)

  const lines: string[] = []
  for (let row = height - 1; row >= 0; row--) {
    const line = lineAt(row, water, scale.row100, colour, ascii)
    const label = row === water ? wholePercent(shortest.total) : ''
    const cells = columns.map(cells => {
      const cell = cells[row]!
      return line(gap) + (painter(cell) ?? line(size))
    })
    const left = `${label.padStart(LEFT - 1)}${line(1)}`
    const right = row === scale.row100 ? `${line(2)} 100` : row === water ? line(2) : ''
    const styled = row === water || !colour ? left : dimmed(left)
    lines.push((styled + cells.join('') + (colour && row !== water ? dimmed(right) : right)).trimEnd())
  }
  const under = (text: (stack: Stack) => string, style: (text: string, stack: Stack) => string) => {
    let line = ''
    let at = 0
    stacks.forEach((stack, i) => {
      const word = text(stack)
      const start = LEFT + i * pitch + gap + Math.max(0, Math.floor((size - word.length) / 2))
      line += ' '.repeat(start - at) + style(word, stack)
      at = start + word.length
    })
    return line
  }
  const strong = (text: string, stack: Stack) => (colour && stack === shortest ? bold(text) : text)
  lines.push(
    under(stack => STAVE_LABELS[stack.stave] + (stack === shortest ? '*' : ''), strong),
    under(({ total }) => wholePercent(total), strong),
  )
  return lines
}

/** What stands behind the staves in a row: water, the 100 line or nothing. */
function lineAt(row: number, water: number, row100: number, colour: boolean, ascii: boolean) {
  const sign = row === water ? (ascii ? '~' : '≈') : row === row100 ? (ascii ? '-' : '─') : ' '
  return (columns: number): string => {
    const text = sign.repeat(columns)
    if (!colour || sign === ' ') return text
    return row === water ? inWaterColour(text) : dimmed(text)
  }
}

/** Paints a cell as wide as a stave; null where what stands behind it is seen. */
function painterOf(colour: boolean, ascii: boolean, size: number) {
  const middle = Math.floor((size - 1) / 2)
  const fill = (food: number, columns: number) => {
    const text = fillOf(food, ascii).repeat(columns)
    return colour ? woven(food, text) : text
  }
  return (cell: Cell): string | null => {
    switch (cell.kind) {
      case 'empty':
        return null
      case 'whole': {
        if (!cell.letter) return fill(cell.food, size)
        const letter = letterOf(cell.food)
        const sign = colour ? lettered(cell.food, letter) : letter
        return fill(cell.food, middle) + sign + fill(cell.food, size - middle - 1)
      }
      case 'top': {
        if (ascii) return cell.eighths >= 4 ? fill(cell.food, size) : null
        const text = EIGHTHS[cell.eighths]!.repeat(size)
        return colour ? inFoodColour(cell.food, text) : text
      }
      case 'border':
        return bordered(cell.food, cell.above, EIGHTHS[cell.eighths]!.repeat(size))
      case 'beyond': {
        const text = (ascii ? '^' : '↑').repeat(size)
        return colour ? inFoodColour(cell.food, text) : text
      }
    }
  }
}
