import type { Food } from '../foods/food.ts'
import type { Hit } from '../foods/search.ts'
import type { ShelfItem } from '../shelf/shelf.ts'
import type { Knowledge, State } from './state.ts'

/** A row of the shelf screen: a food that is there, or one of the table that could be put there. */
export type ShelfRow =
  | { kind: 'here'; item: ShelfItem; food: Food | null; matched: Hit['matched'] }
  | { kind: 'table'; food: Food; matched: Hit['matched'] }

const OFFERED = 12
const FOUND_AT_MOST = 200

/** What the shelf screen lists: what is there and answers the find line, then foods of the table that do. */
export function shelfRows(state: State, knowledge: Knowledge): ShelfRow[] {
  const { table } = knowledge
  const foodOf = (item: ShelfItem): Food | null => table.foodById.get(item.food) ?? null
  if (state.find.trim() === '') {
    return ordered(state, foodOf).map(item => ({ kind: 'here', item, food: foodOf(item), matched: [] }))
  }
  const hits = knowledge.finder.find(state.find, { limit: FOUND_AT_MOST })
  const itemByFood = new Map(state.shelf.items.map(item => [item.food, item]))
  const here = hits.flatMap(({ food, matched }): ShelfRow[] => {
    const item = itemByFood.get(food.id)
    return item === undefined ? [] : [{ kind: 'here', item, food, matched }]
  })
  const others = hits
    .filter(({ food }) => !itemByFood.has(food.id))
    .slice(0, OFFERED)
    .map(({ food, matched }): ShelfRow => ({ kind: 'table', food, matched }))
  return [...here, ...others]
}

function ordered({ shelf, order }: State, foodOf: (item: ShelfItem) => Food | null): ShelfItem[] {
  const items = [...shelf.items]
  const name = (item: ShelfItem) => foodOf(item)?.name ?? item.food
  const protein = (item: ShelfItem) => ((foodOf(item)?.per100g.proteinG ?? 0) * item.grams) / 100
  switch (order) {
    case 'as put':
      return items
    case 'use-by':
      return items.sort((a, b) => (a.useBy ?? '9999').localeCompare(b.useBy ?? '9999'))
    case 'protein':
      return items.sort((a, b) => protein(b) - protein(a))
    case 'name':
      return items.sort((a, b) => name(a).localeCompare(name(b)))
  }
}

/** The row under the cursor, if there is one. */
export function rowUnder(state: State, knowledge: Knowledge): ShelfRow | null {
  const rows = shelfRows(state, knowledge)
  return rows[Math.min(state.cursor, rows.length - 1)] ?? null
}
