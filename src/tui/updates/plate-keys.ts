import type { Food } from '../../foods/food.ts'
import type { Portion } from '../../nutrition/protein-source.ts'
import type { ShelfChange } from '../../shelf/changes.ts'
import { applyChanges } from '../../shelf/changes.ts'
import type { Key } from '../keys.ts'
import { foodPage } from '../pages.ts'
import { liftsOf } from '../problem-of.ts'
import { type Knowledge, only, type State, type Updated } from '../state.ts'
import { asked } from './changes.ts'
import { openPrompt } from './open-prompt.ts'

/** A plate put in place of the last, which can be gone back to. */
export function withPlate(state: State, plate: readonly Portion<Food>[]): State {
  return {
    ...state,
    plate: [...plate],
    before: [...state.before, state.plate].slice(-30),
    plateCursor: Math.max(0, Math.min(state.plateCursor, plate.length - 1)),
    asksServe: false,
    message: '',
  }
}

/** The plate: every letter acts; amounts are changed by steps or typed in a line that is opened for it. */
export function plateKeys(state: State, key: Key, knowledge: Knowledge): Updated {
  if (state.asksServe) return serveAnswered(state, key, knowledge)
  const under = state.plate[state.plateCursor]
  switch (key.key) {
    case 'up':
      return only({ ...state, plateCursor: Math.max(0, state.plateCursor - 1) })
    case 'down':
      return only({
        ...state,
        plateCursor: Math.max(0, Math.min(state.plate.length - 1, state.plateCursor + 1)),
      })
    case 'left':
      return stepped(state, -1)
    case 'right':
      return stepped(state, 1)
    case 'escape':
      return only({ ...state, screen: 'bench' })
    case 'delete':
      return lettered(state, 'x', knowledge)
    case 'backspace':
      return lettered(state, 'z', knowledge)
    case 'enter':
      if (under === undefined) return lettered(state, 'a', knowledge)
      return only(
        openPrompt(state, {
          for: { what: 'plate-amount', food: under.food.id },
          label: `${under.food.name}: how much a serving?`,
          text: `${under.grams} g`,
        }),
      )
    case 'text':
      return lettered(state, key.text, knowledge)
    default:
      return only(state)
  }
}

/** One practical step more or less of the food under the cursor: its own step, two of them from 100 g on. */
function stepped(state: State, direction: 1 | -1): Updated {
  const under = state.plate[state.plateCursor]
  if (under === undefined) return only(state)
  const { food } = under
  const step = food.stepG * (under.grams > 100 || (under.grams === 100 && direction > 0) ? 2 : 1)
  const next = Math.max(0, Math.round((under.grams + direction * step) / food.stepG) * food.stepG)
  if (next === 0) return only({ ...state, message: `x takes ${food.name} off the plate.` })
  if (next > 10_000) return only(state)
  return only(
    withPlate(
      state,
      state.plate.map(portion => (portion === under ? { food, grams: next } : portion)),
    ),
  )
}

function lettered(state: State, letter: string, knowledge: Knowledge): Updated {
  const under = state.plate[state.plateCursor]
  switch (letter) {
    case '+':
    case '=':
      return stepped(state, 1)
    case '-':
    case '_':
      return stepped(state, -1)
    case 'a':
      return only(
        openPrompt(state, {
          for: { what: 'plate-add' },
          label: 'Add what (such as: 20 g tahini, or 1 cup boiled rice)?',
          text: '',
        }),
      )
    case 'x':
      return under === undefined
        ? only(state)
        : only(
            withPlate(
              state,
              state.plate.filter(portion => portion !== under),
            ),
          )
    case 'f':
      return under === undefined
        ? only(state)
        : only({ ...state, page: foodPage(under.food, state, knowledge) })
    case 'z': {
      const before = state.before.at(-1)
      if (before === undefined) return only({ ...state, message: 'There is nothing to go back to.' })
      return only({
        ...state,
        plate: before,
        before: state.before.slice(0, -1),
        plateCursor: Math.max(0, Math.min(state.plateCursor, before.length - 1)),
        message: 'Back.',
      })
    }
    case '1':
    case '2':
    case '3': {
      const option = liftsOf(state, knowledge)[Number(letter) - 1]
      if (option === undefined) return only({ ...state, message: 'There is no such lift.' })
      const there = state.plate.find(portion => portion.food.id === option.food.id)
      const plate =
        there === undefined
          ? [...state.plate, { food: option.food, grams: option.deltaG }]
          : state.plate.map(portion =>
              portion === there ? { food: portion.food, grams: portion.grams + option.deltaG } : portion,
            )
      return only({ ...withPlate(state, plate), message: 'Tried; z goes back.' })
    }
    case 'n':
      return only(
        openPrompt(state, {
          for: { what: 'setting', setting: 'servings' },
          label: 'Servings',
          text: String(state.settings.servings),
        }),
      )
    case 'c':
      if (state.plate.length === 0)
        return only({ ...state, message: 'The plate is empty; take a pairing from the bench.' })
      return only(
        openPrompt(state, {
          for: { what: 'eat-at' },
          label: 'Eat at (19:00; empty: times are counted back from the meal)',
          text: '',
        }),
      )
    case 's':
      if (state.plate.length === 0)
        return only({ ...state, message: 'The plate is empty; take a pairing from the bench.' })
      return only({ ...state, asksServe: true, message: '' })
    default:
      return only(state)
  }
}

/** What serving takes off the shelf: what is there of each food, for all servings. */
function takesOf(state: State): ShelfChange[] {
  const here = new Set(state.shelf.items.map(({ food }) => food))
  return state.plate
    .filter(({ food, grams }) => here.has(food.id) && grams > 0)
    .map(({ food, grams }) => ({ do: 'take', food: food.id, grams: grams * state.settings.servings }))
}

function serveAnswered(state: State, key: Key, knowledge: Knowledge): Updated {
  const yes = key.key === 'enter' || (key.key === 'text' && /^[ys]$/i.test(key.text))
  if (!yes) return only({ ...state, asksServe: false, message: 'Not served.' })
  const takes = takesOf(state)
  const result = applyChanges(state.shelf, takes)
  if (!result.ok) return only({ ...state, asksServe: false, message: result.problem })
  const { servings } = state.settings
  const plate = {
    day: knowledge.today,
    servings,
    portions: state.plate
      .filter(({ grams }) => grams > 0)
      .map(({ food, grams }) => ({ food: food.id, grams })),
  }
  const sample = state.sample ? state.shelf : null
  const next = {
    ...state,
    asksServe: false,
    shelf: result.shelf,
    sample: false,
    served: [...state.served, plate],
    plate: [],
    plateCursor: 0,
    before: [...state.before, state.plate],
    message: `Served: ${servings} ${servings === 1 ? 'serving' : 'servings'} off the shelf, kept under today; < undoes it.`,
  }
  return asked(next, knowledge, { effect: 'serve', plate, takes, sample })
}
