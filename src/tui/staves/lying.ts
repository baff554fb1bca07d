import { STAVE_LABELS } from '../../nutrition/amino-acids.ts'
import type { DrawOptions } from './draw-staves.ts'
import { wholePercent } from './figures.ts'
import { fillOf, inWaterColour, lettered, letterOf, woven } from './palette.ts'
import { type Stack, shortestOf } from './stacks.ts'

/** Columns of a stave's name and figure, and of the arrow behind one that goes on. */
const LEFT = 10
/** The scale ends here, % of the pattern. */
const REACH = 140

/** The staves laid down, one a line, for a narrow window: the 100 line and the water line stand upright. */
export function lyingStaves(stacks: readonly Stack[], options: DrawOptions): string[] {
  const { width, colour = false, ascii = false } = options
  const room = Math.max(8, width - LEFT)
  const columnOf = (value: number) => Math.min(room, Math.round((value / REACH) * room))
  const shortest = shortestOf(stacks)
  const line100 = columnOf(100)
  const water = columnOf(shortest.total)
  const waterSign = colour ? inWaterColour('≈') : ascii ? '~' : '≈'
  return stacks.map(stack => {
    const { cells, length } = laid(stack, columnOf, colour, ascii)
    let rest = ''
    for (let at = length; at <= Math.max(line100, water) && at < room; at++) {
      rest += at === line100 ? (ascii ? '|' : '│') : at === water && length > 0 ? waterSign : ' '
    }
    if (stack.total > REACH) rest = ascii ? '>' : '→'
    const name = `${STAVE_LABELS[stack.stave]}${stack === shortest ? '*' : ' '}`
    return `${name}${wholePercent(stack.total).padStart(4)} ${cells}${rest}`.trimEnd()
  })
}

/** One stave laid down: each food's fill, with its letter at the end of its part. */
function laid({ parts }: Stack, columnOf: (value: number) => number, colour: boolean, ascii: boolean) {
  let cells = ''
  let length = 0
  let sum = 0
  parts.forEach((part, food) => {
    sum += part
    const columns = Math.max(0, columnOf(sum) - length)
    length += columns
    if (columns === 0) return
    const named = columns > 1
    const fill = fillOf(food, ascii).repeat(named ? columns - 1 : columns)
    cells += colour ? woven(food, fill) : fill
    if (named) cells += colour ? lettered(food, letterOf(food)) : letterOf(food)
  })
  return { cells, length }
}
