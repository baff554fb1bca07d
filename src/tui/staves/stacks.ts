import { STAVES, type Stave } from '../../nutrition/amino-acids.ts'
import type { Pattern } from '../../nutrition/pattern.ts'
import type { Portion } from '../../nutrition/protein-source.ts'
import { crudeProteinOf, digestibleMgPerG } from '../../nutrition/staves.ts'

/** One stave, as it is stacked: what each portion brings to it, % of the pattern, in the portions' order. */
export interface Stack {
  stave: Stave
  parts: number[]
  total: number
}

/** The nine staves of a plate, each stacked by portion; empty without protein. */
export function stacksOf(portions: readonly Portion[], pattern: Pattern): Stack[] {
  const crudeG = crudeProteinOf(portions)
  if (!(crudeG > 0)) return []
  return STAVES.map(stave => {
    const parts = portions.map(
      ({ food, grams }) =>
        (grams * food.per100g.crudeProteinG * digestibleMgPerG(food, stave)) /
        (crudeG * pattern.mgPerG[stave]),
    )
    return { stave, parts, total: parts.reduce((sum, part) => sum + part, 0) }
  })
}

/** The shortest of some stacks; of two that tie, the first. */
export const shortestOf = (stacks: readonly Stack[]): Stack =>
  stacks.reduce((least, stack) => (stack.total < least.total ? stack : least))
