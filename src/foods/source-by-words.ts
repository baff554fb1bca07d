import type { Food } from './food.ts'
import type { ResolveFood } from './protein-parts.ts'
import { type Finder, nearestKinds, resolve, whyNoFood } from './search.ts'

/** Forms whose protein is the food's own, the plainest first: a profile is borrowed from these before any other. */
const PLAINEST: readonly Food['state'][] = ['powder', 'flour', 'dry', 'raw', 'boiled']

/**
 * Words on a packet to a food whose protein they stand for. Where they may be several foods (`wheat`, `pea`), the
 * plainest of those is taken and marked `assumed`, because their proteins are near alike; what was taken is to be
 * shown. Words that no food answers are refused as elsewhere.
 */
export function sourceByWords(finder: Finder): ResolveFood {
  return words => {
    const found = resolve(words, finder)
    if (found.kind === 'food') return { ok: true, food: found.food, assumed: false }
    if (found.kind === 'several') {
      const plainest = found.candidates
        .map(({ food }) => food)
        .filter(food => food.per100g.crudeProteinG > 0 && food.place === 'protein')
        .sort((a, b) => rank(a) - rank(b) || a.name.length - b.name.length || (a.id < b.id ? -1 : 1))[0]
      if (plainest !== undefined) return { ok: true, food: plainest, assumed: true }
    }
    const known = found.kind !== 'unknown'
    const nearest = known ? nearestKinds(found, 3) : []
    const near = nearest.length === 0 ? '' : `; nearest: ${nearest.map(({ id }) => id).join(', ')}`
    return { ok: false, problem: whyNoFood(words, found) + near, unknown: !known }
  }
}

function rank(food: Food): number {
  const at = PLAINEST.indexOf(food.state)
  return at === -1 ? PLAINEST.length : at
}
