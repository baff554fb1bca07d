import type { Food } from '../foods/food.ts'
import type { OwnFood } from '../foods/own-food.ts'
import type { Finder } from '../foods/search.ts'
import type { Table } from '../foods/table.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import type { PairingAnswer } from '../pairing/problem.ts'
import type { ShelfChange } from '../shelf/changes.ts'
import type { ServedPlate } from '../shelf/document.ts'
import type { Settings } from '../shelf/settings.ts'
import type { Shelf } from '../shelf/shelf.ts'
import type { Key } from './keys.ts'
import type { Typed } from './updates/typing.ts'

export const SCREENS = ['shelf', 'bench', 'plate'] as const
export type ScreenName = (typeof SCREENS)[number]

export const ORDERS = ['as put', 'use-by', 'protein', 'name'] as const
export type Order = (typeof ORDERS)[number]

/** What is asked of a food from a packet, in this order. */
export const OWN_STEPS = ['name', 'protein', 'energy', 'made-of', 'contains'] as const
export type OwnStep = (typeof OWN_STEPS)[number]

/** What was said of a food from a packet so far, as it was typed. */
export type OwnDraft = Partial<Record<OwnStep, string>>

/** A line that is being typed, and what it is for. */
export interface Prompt extends Typed {
  for:
    | { what: 'amount'; food: string; adds: boolean }
    | { what: 'use-by'; food: string }
    | { what: 'mend'; line: number }
    | { what: 'own'; step: OwnStep; draft: OwnDraft }
    | {
        what: 'setting'
        setting:
          | 'targetG'
          | 'bodyMassKg'
          | 'gPerKgPerDay'
          | 'mealsPerDay'
          | 'servings'
          | 'foodsAtMost'
          | 'energyAtMostKcal'
          | 'without'
      }
    | { what: 'plate-amount'; food: string }
    | { what: 'plate-add' }
    | { what: 'eat-at' }
  label: string
  /** why what was typed could not be taken, with the mend */
  problem: string | null
}

/** A pasted line: what it was taken for, or why it was not. */
export interface PastedLine {
  text: string
  reading: { ok: true; food: string; grams: number; echo: string } | { ok: false; problem: string }
}

/** A page of text over the screen: help, a food, a card, the sources of the usual ranges. */
export interface Page {
  title: string
  lines: string[]
  scroll: number
  /** the key that opens a card asks for the time of the meal with it */
  isCard: boolean
}

/** All that the screens show: plain data, so that a key can be tried without a terminal. */
export interface State {
  screen: ScreenName
  columns: number
  rows: number
  /** for screen readers: words instead of drawings */
  spoken: boolean
  shelf: Shelf
  /** the shelf is the sample: nothing is kept yet */
  sample: boolean
  /** what the cook keeps is being read: until then no shelf is shown, and keys wait */
  opening: boolean
  find: string
  cursor: number
  order: Order
  settings: Settings
  /** the last answer; `stale` while a newer one is worked out, `slow` once that takes long enough to be seen */
  answer: PairingAnswer | null
  stale: boolean
  slow: boolean
  /** counts the moments for which an answer has been waited for in sight */
  spin: number
  /** counts what pairings depend on, so that a late answer to an old question is dropped */
  question: number
  refusal: string | null
  chosen: number
  compared: number | null
  why: boolean
  plate: Portion<Food>[]
  plateCursor: number
  /** the plates before lifts were tried, the last first */
  before: Portion<Food>[][]
  served: ServedPlate[]
  asksServe: boolean
  prompt: Prompt | null
  pasted: PastedLine[] | null
  pasteCursor: number
  page: Page | null
  message: string
}

/** What the update needs to know but never changes. */
export interface Knowledge {
  table: Table
  finder: Finder
  /** today, YYYY-MM-DD; it may change while the screens are open */
  today: string
  colour: boolean
}

export type Event =
  | { event: 'key'; key: Key }
  | { event: 'resize'; columns: number; rows: number }
  | {
      event: 'kept'
      shelf: Shelf
      begun: boolean
      served: ServedPlate[]
      problem: string | null
      label: string | null
      restored: boolean
    }
  /** what is kept has been read, or could not be: from here on keys act */
  | { event: 'opened' }
  | { event: 'paired'; question: number; answer: PairingAnswer }
  | { event: 'slow'; question: number }
  | { event: 'said'; message: string }
  /** time passes while an answer is waited for in sight */
  | { event: 'tick' }

/** What the edge carries out. */
export type Effect =
  | { effect: 'change'; changes: ShelfChange[]; label: string; sample: Shelf | null }
  | { effect: 'replace'; shelf: Shelf; label: string; sample: Shelf | null }
  | { effect: 'undo' | 'redo' }
  | { effect: 'serve'; plate: ServedPlate; takes: ShelfChange[]; sample: Shelf | null }
  | { effect: 'settings'; settings: Settings }
  | { effect: 'own-food'; own: OwnFood; sample: Shelf | null }
  | { effect: 'pair'; question: number }
  | { effect: 'quit' }

export interface Updated {
  state: State
  effects: Effect[]
}

export const only = (state: State, ...effects: Effect[]): Updated => ({ state, effects })

export function firstState(of: {
  columns: number
  rows: number
  shelf: Shelf
  sample: boolean
  settings: Settings
  spoken: boolean
  message: string
  opening?: boolean
}): State {
  return {
    screen: 'shelf',
    opening: false,
    find: '',
    cursor: 0,
    order: 'as put',
    answer: null,
    stale: true,
    slow: false,
    spin: 0,
    question: 1,
    refusal: null,
    chosen: 0,
    compared: null,
    why: false,
    plate: [],
    plateCursor: 0,
    before: [],
    served: [],
    asksServe: false,
    prompt: null,
    pasted: null,
    pasteCursor: 0,
    page: null,
    ...of,
  }
}
