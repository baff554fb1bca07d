import * as z from 'zod/mini'
import { type ServedPlate, servedPlateSchema } from './served-plate.ts'
import { type Shelf, shelfItemSchema } from './shelf.ts'

/** How many changes can be undone. */
export const REMEMBERED_CHANGES = 50

const placeSchema = z.object({
  food: z.string(),
  at: z.int().check(z.nonnegative()),
  item: z.nullable(shelfItemSchema),
})
type Place = z.infer<typeof placeSchema>

/** What a change did, as the items that it touched before and after: enough to go either way, and small. */
export const stepSchema = z.object({
  label: z.string(),
  before: z.array(placeSchema),
  after: z.array(placeSchema),
  /** the plate that was served with this step: it comes and goes with it */
  plate: z.optional(servedPlateSchema),
})
export type Step = z.infer<typeof stepSchema>

export const historySchema = z.object({ undo: z.array(stepSchema), redo: z.array(stepSchema) })
export type History = z.infer<typeof historySchema>

export const NO_HISTORY: History = { undo: [], redo: [] }

/** The shelf and history after a step back or forth, and the step that was gone. */
export interface Moved {
  history: History
  shelf: Shelf
  step: Step
}

/** The history after a change from one shelf to another; what was undone before can no longer be redone. */
export function remember(
  history: History,
  label: string,
  from: Shelf,
  to: Shelf,
  plate?: ServedPlate,
): History {
  const step = { ...stepOf(label, from, to), ...(plate === undefined ? {} : { plate }) }
  return { undo: [...history.undo, step].slice(-REMEMBERED_CHANGES), redo: [] }
}

/** The shelf and history after the last change is taken back; null where there is none. */
export function undo(history: History, shelf: Shelf): Moved | null {
  const step = history.undo.at(-1)
  if (step === undefined) return null
  return {
    history: { undo: history.undo.slice(0, -1), redo: [...history.redo, step] },
    shelf: replaced(shelf, step.after, step.before),
    step,
  }
}

/** The shelf and history after the last undone change is done again; null where there is none. */
export function redo(history: History, shelf: Shelf): Moved | null {
  const step = history.redo.at(-1)
  if (step === undefined) return null
  return {
    history: { undo: [...history.undo, step], redo: history.redo.slice(0, -1) },
    shelf: replaced(shelf, step.before, step.after),
    step,
  }
}

function stepOf(label: string, from: Shelf, to: Shelf): Step {
  const foods = [...new Set([...from.items, ...to.items].map(({ food }) => food))]
  const touched = foods.filter(food => !same(placeOf(from, food).item, placeOf(to, food).item))
  const small = stepOfFoods(label, from, to, touched)
  // Where untouched foods change their order too (an import), only a step that holds all of them goes back exactly.
  const exact =
    same(replaced(from, small.before, small.after), to) && same(replaced(to, small.after, small.before), from)
  return exact ? small : stepOfFoods(label, from, to, foods)
}

const stepOfFoods = (label: string, from: Shelf, to: Shelf, foods: readonly string[]): Step => ({
  label,
  before: foods.map(food => placeOf(from, food)),
  after: foods.map(food => placeOf(to, food)),
})

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b)

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
