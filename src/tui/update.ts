import type { Key } from './keys.ts'
import { helpPage } from './pages.ts'
import { type Event, type Knowledge, only, SCREENS, type State, type Updated } from './state.ts'
import { benchKeys } from './updates/bench-keys.ts'
import { asked } from './updates/changes.ts'
import { pageKeys } from './updates/page-keys.ts'
import { pastedKeys } from './updates/pasted-keys.ts'
import { plateKeys } from './updates/plate-keys.ts'
import { promptKeys } from './updates/prompt-keys.ts'
import { shelfKeys } from './updates/shelf-keys.ts'

/** What follows from an event: the next state, and what the edge has to do. Pure; views only draw the state. */
export function update(state: State, event: Event, knowledge: Knowledge): Updated {
  switch (event.event) {
    case 'resize':
      return only({ ...state, columns: event.columns, rows: event.rows })
    case 'kept':
      return kept(state, event, knowledge)
    case 'opened':
      return asked({ ...state, opening: false }, knowledge)
    case 'paired':
      if (event.question !== state.question) return only(state)
      return only({
        ...state,
        answer: event.answer,
        stale: false,
        slow: false,
        chosen: Math.min(state.chosen, Math.max(0, event.answer.pairings.length - 1)),
      })
    case 'slow':
      return only(event.question === state.question && state.stale ? { ...state, slow: true } : state)
    case 'tick':
      return only(state.slow ? { ...state, spin: state.spin + 1 } : state)
    case 'said':
      return only({ ...state, message: event.message })
    case 'key':
      return keyed(state, event.key, knowledge)
  }
}

function keyed(state: State, key: Key, knowledge: Knowledge): Updated {
  if (key.key === 'interrupt') return only(state, { effect: 'quit' })
  if (state.page !== null) return pageKeys(state, key)
  if (state.prompt !== null) return promptKeys(state, key, knowledge)
  if (state.pasted !== null) return pastedKeys(state, key, knowledge)
  if (key.key === 'text' && key.text === '?') return only({ ...state, page: helpPage(state) })
  if (state.screen !== 'shelf' && !state.asksServe && key.key === 'text') {
    if (key.text === '<') return only({ ...state, message: 'Undoing ...' }, { effect: 'undo' })
    if (key.text === '>') return only({ ...state, message: 'Doing it again ...' }, { effect: 'redo' })
  }
  // A list belongs to the shelf, wherever it is pasted.
  if (key.key === 'paste' && !state.asksServe) return shelfKeys({ ...state, screen: 'shelf' }, key, knowledge)
  if (!state.asksServe && (key.key === 'tab' || key.key === 'back-tab')) {
    const step = key.key === 'tab' ? 1 : SCREENS.length - 1
    const screen = SCREENS[(SCREENS.indexOf(state.screen) + step) % SCREENS.length]!
    return only({ ...state, screen, message: '' })
  }
  return { shelf: shelfKeys, bench: benchKeys, plate: plateKeys }[state.screen](state, key, knowledge)
}

/** The store's answer: what it holds now is what is shown; what it had to say is said. */
function kept(state: State, event: Extract<Event, { event: 'kept' }>, knowledge: Knowledge): Updated {
  const message =
    event.problem ??
    (event.label === null ? state.message : `${event.restored ? 'Undone' : 'Done again'}: ${event.label}.`)
  const next = { ...state, sample: state.sample && !event.begun, served: event.served, message }
  const same = JSON.stringify(event.shelf) === JSON.stringify(state.shelf)
  if (same || !event.begun) return only(next)
  return asked({ ...next, shelf: event.shelf, sample: false }, knowledge)
}
