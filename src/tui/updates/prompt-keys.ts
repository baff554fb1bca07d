import type { AllergenId } from '../../foods/allergens.ts'
import type { Food } from '../../foods/food.ts'
import { readPortion } from '../../foods/read-portion.ts'
import { readAllergens } from '../../kitchen/allergen-names.ts'
import { settingsSchema } from '../../shelf/settings.ts'
import type { Key } from '../keys.ts'
import { cardPage } from '../pages.ts'
import { type Knowledge, only, type Prompt, type State, type Updated } from '../state.ts'
import { dayByWords } from '../text/day-words.ts'
import { grams } from '../text/figures.ts'
import { changeSettings, changeShelf } from './changes.ts'
import { ownAnswered } from './own-food-keys.ts'
import { pastedLine } from './pasted-keys.ts'
import { withPlate } from './plate-keys.ts'
import { typedInto } from './typing.ts'

/** Typing into the open line, and taking or leaving it. */
export function promptKeys(state: State, key: Key, knowledge: Knowledge): Updated {
  const prompt = state.prompt!
  if (key.key === 'escape') return only({ ...state, prompt: null })
  if (key.key === 'enter') return taken(state, prompt, knowledge)
  const typed = typedInto(prompt, key)
  return only(typed === null ? state : { ...state, prompt: { ...prompt, ...typed, problem: null } })
}

const refused = (state: State, problem: string): Updated =>
  only({ ...state, prompt: { ...state.prompt!, problem } })

function taken(state: State, prompt: Prompt, knowledge: Knowledge): Updated {
  const { for: goal } = prompt
  const text = prompt.text.trim()
  const closed = { ...state, prompt: null }
  switch (goal.what) {
    case 'amount': {
      const food = knowledge.table.foodById.get(goal.food)!
      const read = amountOf(text, food, knowledge)
      if (typeof read === 'string') return refused(state, read)
      const message = `${food.name}: ${grams(read)} ${goal.adds ? 'put on the shelf' : 'on the shelf now'}.`
      const change = goal.adds
        ? ({ do: 'add', food: food.id, grams: read } as const)
        : ({ do: 'set', food: food.id, grams: read } as const)
      const next = goal.adds ? { ...closed, find: '', cursor: 0 } : closed
      return changeShelf(next, [change], `${goal.adds ? 'add' : 'set'} ${food.name}`, message, knowledge)
    }
    case 'use-by': {
      const none = text === '' || text === 'none'
      const useBy = none ? null : dayByWords(text, knowledge.today)
      if (!none && useBy === null)
        return refused(state, 'Give a day that there is: 3 days, friday, 31 dec, 2026-12-31; or none.')
      return changeShelf(
        closed,
        [{ do: 'set', food: goal.food, useBy }],
        'set use by',
        useBy === null ? 'No use-by day.' : `Use by ${useBy}.`,
        knowledge,
      )
    }
    case 'own':
      return ownAnswered(state, goal.step, goal.draft, text, knowledge)
    case 'mend': {
      const line = pastedLine(text, knowledge)
      const pasted = state.pasted!.map((other, i) => (i === goal.line ? line : other))
      return line.reading.ok
        ? only({ ...closed, pasted })
        : refused({ ...state, pasted }, line.reading.problem)
    }
    case 'plate-amount': {
      const food = knowledge.table.foodById.get(goal.food)!
      const read = amountOf(text, food, knowledge)
      if (typeof read === 'string') return refused(state, read)
      return only(
        withPlate(
          closed,
          state.plate.map(portion => (portion.food.id === food.id ? { food, grams: read } : portion)),
        ),
      )
    }
    case 'plate-add': {
      const reading = readPortion(text, knowledge.finder, { missingAmount: 'usual portion' })
      if (!reading.ok) {
        const near = reading.nearest.map(nearest => nearest.text).join(', ')
        return refused(state, near === '' ? reading.problem : `${reading.problem}; nearest: ${near}`)
      }
      const { food } = reading
      const there = state.plate.some(portion => portion.food.id === food.id)
      const plate = there
        ? state.plate.map(portion =>
            portion.food.id === food.id ? { food, grams: portion.grams + reading.grams } : portion,
          )
        : [...state.plate, { food, grams: reading.grams }]
      return only({
        ...withPlate(closed, plate),
        plateCursor: plate.findIndex(portion => portion.food.id === food.id),
        message: reading.echo,
      })
    }
    case 'eat-at': {
      const page = cardPage({ ...closed }, text === '' ? null : text, knowledge)
      return typeof page === 'string' ? refused(state, page) : only({ ...closed, page })
    }
    case 'setting':
      return settingTaken(state, goal.setting, text, knowledge)
  }
}

/** Grams of a food, from an amount as people write it; or what is wrong with it. A bare number is grams. */
function amountOf(text: string, food: Food, { finder }: Knowledge): number | string {
  const written = /^[\d.,\s]+$/.test(text) ? `${text} g` : text
  const reading = readPortion(`${written} ${food.id}`, finder)
  if (reading.ok) return reading.grams
  const again = readPortion(text, finder)
  if (again.ok && again.food.id === food.id) return again.grams
  return reading.problem.replace(` ${food.id}`, '')
}

type SettingName = Extract<Prompt['for'], { what: 'setting' }>['setting']

function settingTaken(state: State, setting: SettingName, text: string, knowledge: Knowledge): Updated {
  const closed = { ...state, prompt: null }
  if (setting === 'without') {
    const ids = new Set<AllergenId>()
    for (const word of text.split(',').filter(part => part.trim() !== '' && part.trim() !== 'none')) {
      const reading = readAllergens(word)
      if (!reading.ok) return refused(state, `${word.trim()}: ${reading.problem}`)
      for (const id of reading.allergens) ids.add(id)
    }
    return changeSettings(closed, { without: [...ids] }, knowledge)
  }
  const none = text === '' || text === 'none'
  const value = none ? null : Number(text.replace(',', '.').replace(/\s*[a-z/]+$/i, ''))
  const parsed = settingsSchema.safeParse({ ...state.settings, [setting]: value })
  if (!parsed.success) return refused(state, `Give ${BOUNDS[setting]}.`)
  const more = setting === 'bodyMassKg' && value !== null ? { targetG: null } : {}
  return changeSettings(closed, { [setting]: parsed.data[setting], ...more }, knowledge)
}

const BOUNDS: Record<Exclude<SettingName, 'without'>, string> = {
  targetG: 'grams of protein from 1 to 200, or none to take them from body mass',
  bodyMassKg: 'kg from 15 to 300, or none',
  gPerKgPerDay: 'g a kg and day from 0.3 to 3.5',
  mealsPerDay: 'a whole number of meals from 1 to 10',
  servings: 'a whole number of servings from 1 to 100',
  foodsAtMost: 'a whole number of foods from 1 to 6',
  energyAtMostKcal: 'kcal from 50 to 5000, or none',
}
