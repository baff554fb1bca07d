import type { Window } from './grams.ts'
import { lean } from './lean.ts'
import { practicalGrams } from './practical.ts'
import { better, type Proposal } from './search.ts'
import { thriftyGrams } from './thrift.ts'

/** A proposal in grams that a cook weighs. */
export interface Finished extends Proposal {
  /** do they keep to the window? (steps of 5 g sometimes cannot) */
  keeps: boolean
}

/**
 * A proposal as it is served: without foods that add next to nothing, in the thriftiest grams that keep the score, then
 * in steps that a cook can weigh, around the thrifty and the exact ones.
 */
export function finished(proposal: Proposal, window: Window): Finished {
  const served = lean(proposal, window)
  const { set, quality } = served
  const thrifty = thriftyGrams(set, window, Math.min(1, quality) - 1e-9)
  const exact = thrifty === null ? [served.grams] : [thrifty, served.grams]
  const rounded = practicalGrams(set, exact, window)
  const grams = Float64Array.from(rounded.grams)
  const kcal = set.reduce((sum, food, j) => sum + food.kcal * grams[j]!, 0)
  return { ...served, grams, quality: rounded.quality, kcal, keeps: rounded.keeps }
}

/** Orders finished proposals, the best first; those that miss the window stand last. */
export function byServing(a: Finished, b: Finished): number {
  if (a.keeps !== b.keeps) return a.keeps ? -1 : 1
  return better(a, b) ? -1 : better(b, a) ? 1 : 0
}
