import { plainText } from '../../foods/plain-text.ts'
import { readPortion } from '../../foods/read-portion.ts'
import type { ShelfChange } from '../../shelf/changes.ts'
import type { Key } from '../keys.ts'
import { type Knowledge, only, type PastedLine, type State, type Updated } from '../state.ts'
import { changeShelf } from './changes.ts'
import { openPrompt } from './open-prompt.ts'

const LINES_AT_MOST = 300

/** One line of a pasted list, read as a portion: nothing is guessed. */
export function pastedLine(text: string, { finder }: Knowledge): PastedLine {
  const plain = plainText(text).trim().slice(0, 200)
  const reading = readPortion(plain, finder)
  if (reading.ok) {
    const { food, grams, echo } = reading
    return { text: plain, reading: { ok: true, food: food.id, grams, echo } }
  }
  const near = reading.nearest.map(({ text: nearest }) => nearest).join(', ')
  return {
    text: plain,
    reading: { ok: false, problem: near === '' ? reading.problem : `${reading.problem}; nearest: ${near}` },
  }
}

/** The lines of a pasted text that say something, without list marks. */
function saidLines(text: string): string[] {
  return text
    .split(/\r\n|\r|\n/)
    .map(line => line.replace(/^\s*(?:[-*•]|\d+[.)])\s+/, '').trim())
    .filter(line => line !== '')
}

/** The lines of a pasted text, read. */
export const pastedLines = (text: string, knowledge: Knowledge): PastedLine[] =>
  saidLines(text)
    .slice(0, LINES_AT_MOST)
    .map(line => pastedLine(line, knowledge))

/** What is to be said of a paste: that it was too long, where it was. */
export function pastedMessage(text: string, read: number): string {
  const more = saidLines(text).length - read
  return more > 0 ? `The first ${read} lines were read; paste the other ${more} after them.` : ''
}

/** The list of a paste: row 0 puts what was understood on the shelf, the others are its lines. */
export function pastedKeys(state: State, key: Key, knowledge: Knowledge): Updated {
  const lines = state.pasted!
  const at = state.pasteCursor
  switch (key.key) {
    case 'escape':
      return only({ ...state, pasted: null, message: 'The list was left out.' })
    case 'up':
      return only({ ...state, pasteCursor: Math.max(0, at - 1) })
    case 'down':
      return only({ ...state, pasteCursor: Math.min(lines.length, at + 1) })
    case 'delete':
      return at === 0 ? only(state) : only(without(state, at - 1))
    case 'text':
      return key.text === '#' && at > 0 ? only(without(state, at - 1)) : only(state)
    case 'enter': {
      if (at === 0) return put(state, knowledge)
      const line = lines[at - 1]!
      return only(
        openPrompt(state, {
          for: { what: 'mend', line: at - 1 },
          label: 'How should this line read?',
          text: line.text,
        }),
      )
    }
    default:
      return only(state)
  }
}

function without(state: State, line: number): State {
  const pasted = state.pasted!.filter((_, i) => i !== line)
  return {
    ...state,
    pasted: pasted.length === 0 ? null : pasted,
    pasteCursor: Math.min(state.pasteCursor, pasted.length),
  }
}

/** Puts the lines that were understood on the shelf; the others stay to be mended. */
function put(state: State, knowledge: Knowledge): Updated {
  const understood = state.pasted!.flatMap(({ reading }) => (reading.ok ? [reading] : []))
  if (understood.length === 0)
    return only({ ...state, message: 'No line was understood yet; mend one, or Esc.' })
  const rest = state.pasted!.filter(({ reading }) => !reading.ok)
  const changes = understood.map(({ food, grams }): ShelfChange => ({ do: 'add', food, grams }))
  const foods = `${understood.length} ${understood.length === 1 ? 'food' : 'foods'}`
  const message =
    rest.length === 0
      ? `${foods} put on the shelf.`
      : `${foods} put on the shelf; ${rest.length} to be mended.`
  const next = {
    ...state,
    pasted: rest.length === 0 ? null : rest,
    pasteCursor: rest.length === 0 ? 0 : 1,
    find: '',
    cursor: 0,
  }
  return changeShelf(next, changes, `put a list of ${foods}`, message, knowledge)
}
