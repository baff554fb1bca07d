import * as z from 'zod/mini'
import {
  daySchema,
  GRAMS_AT_MOST,
  gramsSchema,
  markSchema,
  noteSchema,
  type Shelf,
  type ShelfItem,
  shelfItemSchema,
} from './shelf.ts'

const food = shelfItemSchema.shape.food
const extras = {
  mark: z.optional(markSchema),
  useBy: z.optional(z.nullable(daySchema)),
  note: z.optional(noteSchema),
}

/**
 * One thing done to a shelf. `add` puts grams to what is there; `set` replaces what it names and leaves the rest (a
 * food that is not there yet needs grams). Both keep what they don't name.
 */
export const shelfChangeSchema = z.discriminatedUnion('do', [
  z.object({ do: z.literal('add'), food, grams: gramsSchema, ...extras }),
  z.object({ do: z.literal('set'), food, grams: z.optional(gramsSchema), ...extras }),
  z.object({ do: z.literal('take'), food, grams: gramsSchema }),
  z.object({ do: z.literal('remove'), food }),
  z.object({ do: z.literal('mark'), food, mark: markSchema }),
  z.object({ do: z.literal('clear') }),
])
export type ShelfChange = z.infer<typeof shelfChangeSchema>

export type Changed = { ok: true; shelf: Shelf } | { ok: false; problem: string }

/** Taken grams leave at least this; what is less is gone, so that no crumbs of rounding stay on the shelf. */
const CRUMB_G = 0.05

/**
 * A shelf after a change; the shelf given is left as it is. Refused, in one line, where the change is malformed (it
 * may come from anywhere), where the food that it names is not there, or where more than a tonne would lie there.
 * Taking more than there is takes all of it off.
 *
 * @example applyChange(EMPTY_SHELF, { do: 'add', food: 'tahini', grams: 450 })
 */
export function applyChange(shelf: Shelf, given: ShelfChange): Changed {
  const parsed = shelfChangeSchema.safeParse(given)
  if (!parsed.success) return { ok: false, problem: problemOf(parsed.error) }
  const change = parsed.data
  if (change.do === 'clear') return { ok: true, shelf: { items: [] } }

  const at = shelf.items.findIndex(({ food }) => food === change.food)
  const item = shelf.items[at]
  const fresh: ShelfItem = { food: change.food, grams: 0, mark: '', useBy: null, note: '' }
  const absent: Changed = { ok: false, problem: `${change.food} is not on the shelf` }
  switch (change.do) {
    case 'add':
      return changed(shelf, at, { ...(item ?? fresh), ...extrasOf(change) }, change.grams)
    case 'set':
      if (item === undefined) {
        return change.grams === undefined
          ? absent
          : changed(shelf, at, { ...fresh, ...extrasOf(change) }, change.grams)
      }
      return changed(shelf, at, { ...item, ...extrasOf(change), grams: change.grams ?? item.grams })
    case 'take': {
      if (item === undefined) return absent
      return item.grams - change.grams < CRUMB_G
        ? without(shelf, at)
        : changed(shelf, at, item, -change.grams)
    }
    case 'remove':
      return item === undefined ? absent : without(shelf, at)
    case 'mark':
      return item === undefined ? absent : changed(shelf, at, { ...item, mark: change.mark })
  }
}

/** What a change names besides grams; an undefined key must not wipe what is there. */
function extrasOf({ mark, useBy, note }: Partial<Pick<ShelfItem, 'mark' | 'useBy' | 'note'>>) {
  return {
    ...(mark === undefined ? {} : { mark }),
    ...(useBy === undefined ? {} : { useBy }),
    ...(note === undefined ? {} : { note }),
  }
}

function changed(shelf: Shelf, at: number, item: ShelfItem, moreG = 0): Changed {
  // Twelve digits of a sum: 0.1 + 0.2 is 0.3 on a shelf.
  const grams =
    item.grams === 0 || moreG === 0 ? item.grams + moreG : Number((item.grams + moreG).toPrecision(12))
  if (grams > GRAMS_AT_MOST) {
    return { ok: false, problem: `${item.food}: more than ${GRAMS_AT_MOST} grams of one food cannot be kept` }
  }
  const after = { ...item, grams }
  const items =
    at === -1 ? [...shelf.items, after] : shelf.items.map((other, i) => (i === at ? after : other))
  return { ok: true, shelf: { items } }
}

const without = (shelf: Shelf, at: number): Changed => ({
  ok: true,
  shelf: { items: shelf.items.filter((_, i) => i !== at) },
})

function problemOf(error: z.core.$ZodError): string {
  const [issue] = error.issues
  return `this change cannot be: ${issue?.path.join('.') || 'it'}: ${issue?.message ?? 'malformed'}`
}

/** All of some changes, or none: the first that is refused refuses them all. */
export function applyChanges(shelf: Shelf, changes: readonly ShelfChange[]): Changed {
  let result: Changed = { ok: true, shelf }
  for (const change of changes) {
    if (!result.ok) return result
    result = applyChange(result.shelf, change)
  }
  return result
}

/**
 * The changes that put the items of a file to what is on hand. What the file leaves empty (mark, use-by date, note)
 * stays as it is on the shelf.
 */
export function additionsOf({ items }: Shelf): ShelfChange[] {
  return items.map(({ food, grams, mark, useBy, note }) => ({
    do: 'add',
    food,
    grams,
    ...(mark === '' ? {} : { mark }),
    ...(useBy === null ? {} : { useBy }),
    ...(note === '' ? {} : { note }),
  }))
}
