import { STAVE_NAMES, STAVES, type Staves } from '../../nutrition/amino-acids.ts'
import type { Pattern } from '../../nutrition/pattern.ts'
import type { Portion } from '../../nutrition/protein-source.ts'
import { shortestStave } from '../../nutrition/staves.ts'
import { wholePercent } from './figures.ts'
import { lyingStaves } from './lying.ts'
import { stacksOf } from './stacks.ts'
import { verticalStaves } from './vertical.ts'

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

/** Narrower than this the staves are laid down: a line a stave. */
const UPRIGHT_FROM_COLUMNS = 56
/** Never a full block: sketches that stand under one another in a list would run together. */
const LEVELS = ['▁', '▂', '▃', '▄', '▅', '▆', '▇']
/** The highest level, % of the pattern. */
const SKETCH_REACH = 120

/**
 * The staves: nine upright bars, each stacked by food, the pattern's 100 line and the water line at the shortest
 * stave. A food has a letter and a fill of its own; the tops are exact to an eighth of a row. Returns the lines; none
 * where there is no protein.
 */
export function drawStaves(options: DrawOptions): string[] {
  const stacks = stacksOf(options.portions, options.pattern)
  if (stacks.length === 0) return []
  return options.width < UPRIGHT_FROM_COLUMNS ? lyingStaves(stacks, options) : verticalStaves(stacks, options)
}

/** The nine staves in words, for screen readers and pipes. */
export function stavesAsText(staves: Staves): string {
  const shortest = shortestStave(staves)
  const list = STAVES.map(stave => `${STAVE_NAMES[stave]} ${wholePercent(staves[stave])}`).join(', ')
  return `In % of the pattern: ${list}. Shortest: ${STAVE_NAMES[shortest]}.`
}

/** A sketch of the staves in nine characters, in their order; the highest is 120 % of the pattern or more. */
export function stavesSketch(staves: Staves, ascii = false): string {
  return STAVES.map(stave => {
    const share = Math.min(1, staves[stave] / SKETCH_REACH)
    const level = Math.max(1, Math.round(share * LEVELS.length))
    return ascii ? String(level) : LEVELS[level - 1]!
  }).join('')
}
