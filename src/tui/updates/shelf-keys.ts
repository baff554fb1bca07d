import type { Food } from '../../foods/food.ts'
import { partPortion } from '../../foods/part-portion.ts'
import { readPortion } from '../../foods/read-portion.ts'
import { EMPTY_SHELF, type ShelfItem } from '../../shelf/shelf.ts'
import type { Key } from '../keys.ts'
import { foodPage } from '../pages.ts'
import { rowUnder, shelfRows } from '../rows.ts'
import { type Knowledge, ORDERS, only, type State, type Updated } from '../state.ts'
import { asked, changeShelf } from './changes.ts'
import { openPrompt } from './open-prompt.ts'
import { askOwn } from './own-food-keys.ts'
import { pastedLines, pastedMessage } from './pasted-keys.ts'

/**
 * The shelf screen: letters find, signs act. So nobody has to know in which mode a key is typed.
 */
export function shelfKeys(state: State, key: Key, knowledge: Knowledge): Updated {
  switch (key.key) {
    case 'up':
    case 'down':
    case 'page-up':
    case 'page-down':
    case 'home':
    case 'end':
      return only(moved(state, key.key, knowledge))
    case 'backspace':
      return only({ ...state, find: [...state.find].slice(0, -1).join(''), cursor: 0, message: '' })
    case 'clear-line':
    case 'escape':
      return only({ ...state, find: '', cursor: 0, message: '' })
    case 'enter':
      return entered(state, knowledge)
    case 'delete':
      return signed(state, '#', knowledge)
    case 'paste': {
      const lines = pastedLines(key.text, knowledge)
      if (lines.length === 0) return only({ ...state, message: 'Nothing was pasted that can be read.' })
      if (lines.length === 1)
        return only({ ...state, find: (state.find + lines[0]!.text).slice(0, FIND_AT_MOST), cursor: 0 })
      return only({ ...state, pasted: lines, pasteCursor: 0, message: pastedMessage(key.text, lines.length) })
    }
    case 'text':
      if (isSign(key.text, state)) return signed(state, key.text, knowledge)
      return only({ ...state, find: (state.find + key.text).slice(0, FIND_AT_MOST), cursor: 0, message: '' })
    default:
      return only(state)
  }
}

/** The longest find line. */
const FIND_AT_MOST = 80

/**
 * Signs that act. The hyphen and the comma stand in names of foods; digits only begin a find line after letters. A
 * point or a slash after a digit belongs to an amount: 1.5 cups, 1/2 cup.
 */
const SIGNS = new Set(['!', '.', '#', '=', '/', '<', '>', '@', '+'])
const isSign = (text: string, { find, sample }: State): boolean =>
  SIGNS.has(text) ? !(/[./]/.test(text) && /\d$/.test(find)) : text === '0' && sample && find === ''

function moved(state: State, key: string, knowledge: Knowledge): State {
  const last = shelfRows(state, knowledge).length - 1
  const page = Math.max(1, state.rows - 8)
  const steps: Record<string, number> = {
    up: -1,
    down: 1,
    'page-up': -page,
    'page-down': page,
    home: -1e6,
    end: 1e6,
  }
  const cursor = Math.max(0, Math.min(last, Math.min(state.cursor, last) + steps[key]!))
  return { ...state, cursor, message: '' }
}

function entered(state: State, knowledge: Knowledge): Updated {
  const row = rowUnder(state, knowledge)
  if (row === null) {
    const message =
      state.find === ''
        ? 'Type a food that you have, such as: lentils'
        : `No food is called "${state.find}" or nearly so.`
    return only({ ...state, message })
  }
  if (row.kind === 'here' && row.food === null)
    return only({ ...state, message: 'This food is not in the table; # takes it off.' })
  const food = row.food!
  const said = amountSaid(state.find, food, knowledge)
  const adds = row.kind === 'table' || said !== null
  const there = row.kind === 'here' ? `${Number(row.item.grams.toFixed(1))} g` : `${food.portionG.usual} g`
  return only(
    openPrompt(state, {
      for: { what: 'amount', food: food.id, adds },
      label: adds ? `${food.name}: how much do you put there?` : `${food.name}: how much is there now?`,
      text: said ?? there,
    }),
  )
}

/** The amount that stands in the find line with the food ("2 cups red lentils"), or null. */
function amountSaid(find: string, food: Food, { finder }: Knowledge): string | null {
  const { amount, amountText } = partPortion(find)
  if (amount === null) return null
  const reading = readPortion(`${amountText} ${food.id}`, finder)
  if (!reading.ok) return null
  // A bare count (3 eggs) is told in grams, because a bare number in the line for amounts is grams.
  return amount.terms[0]?.unit === null ? `${Number(reading.grams.toFixed(1))} g` : amountText
}

function signed(state: State, sign: string, knowledge: Knowledge): Updated {
  if (sign === '/') {
    const order = ORDERS[(ORDERS.indexOf(state.order) + 1) % ORDERS.length]!
    return only({ ...state, order, cursor: 0, message: `In order: ${order}.` })
  }
  if (sign === '+') return only(askOwn(state, 'name', state.find === '' ? {} : { name: state.find }))
  if (sign === '<') return only({ ...state, message: 'Undoing ...' }, { effect: 'undo' })
  if (sign === '>') return only({ ...state, message: 'Doing it again ...' }, { effect: 'redo' })
  if (sign === '0') {
    const empty = {
      ...state,
      shelf: EMPTY_SHELF,
      sample: false,
      cursor: 0,
      message: 'An empty shelf. Type a food that you have; < brings the sample back.',
    }
    return asked(empty, knowledge, {
      effect: 'replace',
      shelf: EMPTY_SHELF,
      label: 'start an empty shelf',
      sample: state.shelf,
    })
  }
  const row = rowUnder(state, knowledge)
  if (row === null) return only({ ...state, message: 'There is no food under the cursor.' })
  if (sign === '=')
    return row.food === null ? only(state) : only({ ...state, page: foodPage(row.food, state, knowledge) })
  if (row.kind === 'table')
    return only({ ...state, message: `${row.food.name} is not on the shelf; Enter puts it there.` })
  const name = row.food?.name ?? row.item.food
  switch (sign) {
    case '!':
      return marked(state, row.item, 'use-up', name, knowledge)
    case '.':
      return marked(state, row.item, 'hold-back', name, knowledge)
    case '@':
      return only(
        openPrompt(state, {
          for: { what: 'use-by', food: row.item.food },
          label: `${name}: use by when (3 days, friday, 31 dec, 2026-12-31; none)?`,
          text: row.item.useBy ?? '',
        }),
      )
    default:
      return changeShelf(
        state,
        [{ do: 'remove', food: row.item.food }],
        `take off ${name}`,
        `${name} is off the shelf; < brings it back.`,
        knowledge,
      )
  }
}

/** A mark is set, or taken off where it stands already. */
function marked(
  state: State,
  item: ShelfItem,
  mark: 'use-up' | 'hold-back',
  name: string,
  knowledge: Knowledge,
): Updated {
  const next = item.mark === mark ? '' : mark
  const words = next === '' ? 'no mark' : next === 'use-up' ? 'to be used up' : 'held back'
  return changeShelf(
    state,
    [{ do: 'mark', food: item.food, mark: next }],
    `mark ${name}`,
    `${name}: ${words}.`,
    knowledge,
  )
}
