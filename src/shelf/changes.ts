import { z } from 'zod'
import { daySchema, MARKS, type Shelf, type ShelfItem, shelfItemSchema } from './shelf.ts'

const food = shelfItemSchema.shape.food
const grams = z.number().positive().max(1_000_000)

/** One thing done to a shelf. `add` puts grams to what is there; `set` replaces what it names and leaves the rest. */
export const shelfChangeSchema = z.discriminatedUnion('do', [
  z.object({
    do: z.literal('add'),
    food,
    grams,
    mark: z.enum(MARKS).optional(),
    useBy: daySchema.nullable().optional(),
    note: z.string().max(500).optional(),
  }),
  z.object({
    do: z.literal('set'),
    food,
    grams: grams.optional(),
    mark: z.enum(MARKS).optional(),
    useBy: daySchema.nullable().optional(),
    note: z.string().max(500).optional(),
  }),
  z.object({ do: z.literal('take'), food, grams }),
  z.object({ do: z.literal('remove'), food }),
  z.object({ do: z.literal('mark'), food, mark: z.enum(MARKS) }),
  z.object({ do: z.literal('clear') }),
])
export type ShelfChange = z.infer<typeof shelfChangeSchema>

export type Changed = { ok: true; shelf: Shelf } | { ok: false; problem: string }

/** Taken grams leave at least this; what is less is gone, so that no crumbs of rounding stay on the shelf. */
const CRUMB_G = 0.05

/**
 * A shelf after a change; the shelf given is left as it is. Refused, in one line, where the food that a change names
 * is not there. Taking more than there is takes all of it off.
 */
export function applyChange(shelf: Shelf, change: ShelfChange): Changed {
  if (change.do === 'clear') return { ok: true, shelf: { items: [] } }
  const at = shelf.items.findIndex(item => item.food === change.food)
  const item = shelf.items[at]
  if (change.do === 'add') {
    const { do: _, grams, ...rest } = change
    const given = Object.fromEntries(Object.entries(rest).filter(([, value]) => value !== undefined))
    const before = item ?? { food: change.food, grams: 0, mark: '', useBy: null, note: '' }
    return changed(shelf, at, {
      ...before,
      ...given,
      grams: Math.min(1_000_000, before.grams + grams),
    } as ShelfItem)
  }
  if (item === undefined) return { ok: false, problem: `${change.food} is not on the shelf` }
  switch (change.do) {
    case 'set':
      return changed(shelf, at, {
        ...item,
        grams: change.grams ?? item.grams,
        mark: change.mark ?? item.mark,
        useBy: change.useBy === undefined ? item.useBy : change.useBy,
        note: change.note ?? item.note,
      })
    case 'take': {
      const left = item.grams - change.grams
      return left < CRUMB_G ? without(shelf, at) : changed(shelf, at, { ...item, grams: left })
    }
    case 'remove':
      return without(shelf, at)
    case 'mark':
      return changed(shelf, at, { ...item, mark: change.mark })
  }
}

function changed(shelf: Shelf, at: number, item: ShelfItem): Changed {
  const items = at === -1 ? [...shelf.items, item] : shelf.items.map((other, i) => (i === at ? item : other))
  return { ok: true, shelf: { items } }
}

const without = (shelf: Shelf, at: number): Changed => ({
  ok: true,
  shelf: { items: shelf.items.filter((_, i) => i !== at) },
})

/** All of some changes, or none: the first that is refused refuses them all. */
export function applyChanges(shelf: Shelf, changes: readonly ShelfChange[]): Changed {
  let result: Changed = { ok: true, shelf }
  for (const change of changes) {
    if (!result.ok) return result
    result = applyChange(result.shelf, change)
  }
  return result
}
