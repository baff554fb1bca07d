import { PATTERN_IDS } from '../../nutrition/pattern.ts'
import type { Key } from '../keys.ts'
import { rangesPage } from '../pages.ts'
import { targetOf } from '../problem-of.ts'
import { type Knowledge, only, type Prompt, type State, type Updated } from '../state.ts'
import { noBodyMassTarget } from '../stepping-back.ts'
import { changeSettings } from './changes.ts'
import { openPrompt } from './open-prompt.ts'
import { withPlate } from './plate-keys.ts'

/** The bench: every letter acts, nothing is typed but in a line that is opened for it. */
export function benchKeys(state: State, key: Key, knowledge: Knowledge): Updated {
  const pairings = state.answer?.pairings ?? []
  const last = Math.max(0, pairings.length - 1)
  switch (key.key) {
    case 'up':
      return only({ ...state, chosen: Math.max(0, state.chosen - 1), message: '' })
    case 'down':
      return only({ ...state, chosen: Math.min(last, state.chosen + 1), message: '' })
    case 'home':
      return only({ ...state, chosen: 0 })
    case 'end':
      return only({ ...state, chosen: last })
    case 'escape':
      return only(state.compared === null ? { ...state, screen: 'shelf' } : { ...state, compared: null })
    case 'enter': {
      const pairing = pairings[state.chosen]
      if (pairing === undefined) return only({ ...state, message: 'There is no pairing to take.' })
      return only({ ...withPlate(state, pairing.portions), before: [], plateCursor: 0, screen: 'plate' })
    }
    case 'text':
      return lettered(state, key.text, knowledge)
    default:
      return only(state)
  }
}

const PLANNED_PATTERNS = PATTERN_IDS.filter(id => id === 'fao-2013-over-3y' || id === 'who-2007-adult')

function lettered(state: State, letter: string, knowledge: Knowledge): Updated {
  const { settings } = state
  const ask = (
    setting: Extract<Prompt['for'], { what: 'setting' }>['setting'],
    label: string,
    value: unknown,
  ): Updated =>
    only(
      openPrompt(state, {
        for: { what: 'setting', setting },
        label,
        text: value === null ? '' : String(value),
      }),
    )
  if (/^[1-9]$/.test(letter)) {
    const at = Number(letter) - 1
    return only(at < (state.answer?.pairings.length ?? 0) ? { ...state, chosen: at, message: '' } : state)
  }
  const stays = noBodyMassTarget(settings)
  if (/^[bim]$/.test(letter) && stays !== null) return only({ ...state, message: stays })
  switch (letter) {
    case 't':
      return ask(
        'targetG',
        'Protein a serving, g (none: from body mass)',
        settings.targetG ?? Math.round(targetOf(settings)),
      )
    case 'b':
      return ask(
        'bodyMassKg',
        'Body mass, kg (the target is then body mass x intake / meals)',
        settings.bodyMassKg,
      )
    case 'i':
      return ask('gPerKgPerDay', 'Intake, g protein a kg and day (u: usual ranges)', settings.gPerKgPerDay)
    case 'm':
      return ask('mealsPerDay', 'Meals a day', settings.mealsPerDay)
    case 'n':
      return ask('servings', 'Servings', settings.servings)
    case 'k':
      return ask('foodsAtMost', 'Protein foods at most, 1 to 6', settings.foodsAtMost)
    case 'l':
      return ask(
        'energyAtMostKcal',
        'Energy a serving at most, kcal (none: no ceiling)',
        settings.energyAtMostKcal,
      )
    case 'a':
      return ask(
        'without',
        'Leave out which allergens (gluten, soy, peanut ...; none)?',
        settings.without.join(', '),
      )
    case 'e':
      return changeSettings(state, { eggs: !settings.eggs }, knowledge)
    case 'd':
      return changeSettings(state, { dairy: !settings.dairy }, knowledge)
    case 'p': {
      const next =
        PLANNED_PATTERNS[(PLANNED_PATTERNS.indexOf(settings.pattern as never) + 1) % PLANNED_PATTERNS.length]!
      return changeSettings(state, { pattern: next }, knowledge)
    }
    case 'u':
      return only({ ...state, page: rangesPage(state) })
    case 'w':
      return only({ ...state, why: !state.why })
    case 'c':
      return only({
        ...state,
        compared: state.compared === state.chosen ? null : state.chosen,
        message: state.compared === null ? 'Now choose another to set beside it.' : '',
      })
    default:
      return only(state)
  }
}
