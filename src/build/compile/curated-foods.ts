import { type Food, STATES } from '../../foods/food.ts'

/** A food id without its state: `lentils-red-dry` is `lentils-red`. */
export function stemOf(id: string): string {
  const at = id.lastIndexOf('-')
  return at > 0 && (STATES as readonly string[]).includes(id.slice(at + 1)) ? id.slice(0, at) : id
}

/** How well a token of a `foods` column names a food: its id, its stem, its `role/state`; 0: not at all. */
export function namesFood(token: string, food: Pick<Food, 'id' | 'role' | 'state'>): number {
  if (token === food.id) return 3
  if (token === stemOf(food.id)) return 2
  return token === `${food.role}/${food.state}` ? 1 : 0
}

/** The row whose `foods` names a food best (the first of equals), with how well; null where none does. */
export function rowFor<R extends { foods?: string }>(
  food: Pick<Food, 'id' | 'role' | 'state'>,
  rows: readonly R[],
): { row: R; fit: number } | null {
  let best: { row: R; fit: number } | null = null
  for (const row of rows) {
    for (const token of (row.foods ?? '').split(' ')) {
      const fit = namesFood(token, food)
      if (fit > (best?.fit ?? 0)) best = { row, fit }
    }
  }
  return best
}
