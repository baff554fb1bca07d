import { z } from 'zod'
import { type Shelf, shelfItemSchema } from './shelf.ts'

/** How many changes can be undone. */
export const REMEMBERED_CHANGES = 50

const placeSchema = z.object({
  food: z.string(),
  at: z.number().int().nonnegative(),
  item: shelfItemSchema.nullable(),
})

/** What a change did, as the items that it touched before and after: enough to go either way, and small. */
export const stepSchema = z.object({
  label: z.string(),
  before: z.array(placeSchema),
  after: z.array(placeSchema),
})
export type Step = z.infer<typeof stepSchema>

export const historySchema = z.object({ undo: z.array(stepSchema), redo: z.array(stepSchema) })
export type History = z.infer<typeof historySchema>

export const NO_HISTORY: History = { undo: [], redo: [] }

/** The history after a change from one shelf to another; what was undone before can no longer be redone. */
export function remember(history: History, label: string, from: Shelf, to: Shelf): History {
  return { undo: [...history.undo, stepOf(label, from, to)].slice(-REMEMBERED_CHANGES), redo: [] }
}

/** The shelf and history after the last change is taken back; null where there is none. */
export function undo(
  history: History,
  shelf: Shelf,
): { history: History; shelf: Shelf; label: string } | null {
  const step = history.undo.at(-1)
  if (step === undefined) return null
  return {
    history: { undo: history.undo.slice(0, -1), redo: [...history.redo, step] },
    shelf: replaced(shelf, step.after, step.before),
    label: step.label,
  }
}

/** The shelf and history after the last undone change is done again; null where there is none. */
export function redo(
  history: History,
  shelf: Shelf,
): { history: History; shelf: Shelf; label: string } | null {
  const step = history.redo.at(-1)
  if (step === undefined) return null
  return {
    history: { undo: [...history.undo, step], redo: history.redo.slice(0, -1) },
    shelf: replaced(shelf, step.before, step.after),
    label: step.label,
  }
}

type Place = z.infer<typeof placeSchema>

function stepOf(label: string, from: Shelf, to: Shelf): Step {
  const foods = new Set([...from.items, ...to.items].map(({ food }) => food))
  const touched = [...foods].filter(food => {
    const [a, b] = [placeOf(from, food), placeOf(to, food)]
    return a.item === null || b.item === null || JSON.stringify(a.item) !== JSON.stringify(b.item)
  })
  return {
    label,
    before: touched.map(food => placeOf(from, food)),
    after: touched.map(food => placeOf(to, food)),
  }
}

function placeOf(shelf: Shelf, food: string): Place {
  const at = shelf.items.findIndex(item => item.food === food)
  return at === -1 ? { food, at: 0, item: null } : { food, at, item: shelf.items[at]! }
}

/** A shelf with the foods of `gone` taken out and those of `back` put in where they stood. */
function replaced({ items }: Shelf, gone: readonly Place[], back: readonly Place[]): Shelf {
  const foods = new Set([...gone, ...back].map(({ food }) => food))
  const result = items.filter(({ food }) => !foods.has(food))
  for (const { at, item } of [...back].sort((a, b) => a.at - b.at)) {
    if (item !== null) result.splice(Math.min(at, result.length), 0, item)
  }
  return { items: result }
}
