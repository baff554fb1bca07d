import { loadTable } from '../../src/foods/load.ts'
import { createFinder } from '../../src/foods/search.ts'
import { findPairings } from '../../src/pairing/find-pairings.ts'
import { DEFAULT_SETTINGS } from '../../src/shelf/default-settings.ts'
import type { Shelf, ShelfItem } from '../../src/shelf/shelf.ts'
import type { Key } from '../../src/tui/keys.ts'
import { problemOf } from '../../src/tui/problem-of.ts'
import { type Effect, firstState, type Knowledge, type State } from '../../src/tui/state.ts'
import { update } from '../../src/tui/update.ts'

const table = loadTable()

export const knowledge: Knowledge = {
  table,
  finder: createFinder(table.foods),
  today: '2026-06-01',
  colour: false,
}

export const item = (food: string, grams: number, more: Partial<ShelfItem> = {}): ShelfItem => ({
  food,
  grams,
  mark: '',
  useBy: null,
  note: '',
  ...more,
})

export const GALLEY: Shelf = {
  items: [
    item('lentils-red-dry', 900),
    item('rice-brown-dry', 1500),
    item('tofu-firm', 600, { mark: 'use-up', useBy: '2026-06-03' }),
    item('oats-rolled', 1000),
    item('sesame-seeds', 250),
  ],
}

export function opened(shelf: Shelf = GALLEY, more: Partial<State> = {}): State {
  const state = firstState({
    columns: 80,
    rows: 24,
    shelf,
    sample: false,
    settings: DEFAULT_SETTINGS,
    spoken: false,
    message: '',
  })
  return { ...state, ...more }
}

/** Feeds keys through the update: names of keys, or text that is typed letter by letter. */
export function typed(state: State, ...keys: (string | Key)[]): { state: State; effects: Effect[] } {
  const named = new Set([
    'enter',
    'escape',
    'tab',
    'back-tab',
    'backspace',
    'delete',
    'up',
    'down',
    'left',
    'right',
    'home',
    'end',
    'page-up',
    'page-down',
    'clear-line',
    'interrupt',
  ])
  const effects: Effect[] = []
  let now = state
  const press = (key: Key) => {
    const updated = update(now, { event: 'key', key }, knowledge)
    now = updated.state
    effects.push(...updated.effects)
  }
  for (const key of keys) {
    if (typeof key !== 'string') press(key)
    else if (named.has(key)) press({ key } as Key)
    else for (const letter of key) press({ key: 'text', text: letter })
  }
  return { state: now, effects }
}

/** The state with its pairings worked out, as the edge would. */
export function answered(state: State): State {
  const answer = findPairings(problemOf(state, knowledge))
  return update(state, { event: 'paired', question: state.question, answer }, knowledge).state
}

// biome-ignore lint/suspicious/noControlCharactersInRegex: the program's own styles begin with an escape
export const plain = (lines: readonly string[]): string => lines.join('\n').replace(/\u001b\[[0-9;]*m/g, '')
