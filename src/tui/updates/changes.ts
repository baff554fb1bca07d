import { applyChanges, type ShelfChange } from '../../shelf/changes.ts'
import type { Settings } from '../../shelf/settings.ts'
import { refusalOf } from '../problem-of.ts'
import { type Effect, type Knowledge, only, type State, type Updated } from '../state.ts'

/** The state with its pairings asked for anew; the last answer stays until the new one comes. */
export function asked(state: State, knowledge: Knowledge, ...effects: Effect[]): Updated {
  const refusal = refusalOf(state.settings, knowledge)
  const question = state.question + 1
  if (refusal !== null) {
    return only({ ...state, question, refusal, answer: null, stale: false, slow: false }, ...effects)
  }
  return only({ ...state, question, refusal, stale: true, slow: false }, ...effects, {
    effect: 'pair',
    question,
  })
}

/** The shelf changed at once on the screen, and to be kept. The first change keeps the sample with it. */
export function changeShelf(
  state: State,
  changes: ShelfChange[],
  label: string,
  message: string,
  knowledge: Knowledge,
): Updated {
  const result = applyChanges(state.shelf, changes)
  if (!result.ok) return only({ ...state, message: result.problem })
  const sample = state.sample ? state.shelf : null
  const next = { ...state, shelf: result.shelf, sample: false, message }
  return asked(next, knowledge, { effect: 'change', changes, label, sample })
}

/** A setting changed, to be kept, with what follows from it. */
export function changeSettings(state: State, changed: Partial<Settings>, knowledge: Knowledge): Updated {
  const settings = { ...state.settings, ...changed }
  return asked({ ...state, settings, chosen: 0, compared: null }, knowledge, { effect: 'settings', settings })
}
