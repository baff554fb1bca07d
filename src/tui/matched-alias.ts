import type { Food } from '../foods/food.ts'
import { markedRanges } from '../foods/marked-ranges.ts'

/** The alias by which a find line met a food, where its name alone does not show why it is listed; else null. */
export function matchedAlias(food: Food, find: string): string | null {
  let best: { alias: string; share: number } | null = null
  for (const alias of food.aliases) {
    const met = markedRanges(alias, find).reduce((sum, [start, end]) => sum + end - start, 0)
    const share = met / alias.length
    if (share > (best?.share ?? 0)) best = { alias, share }
  }
  return best?.alias ?? null
}
