import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { allergenName } from '../../kitchen/allergen-names.ts'
import { cautionsFor, STANDING_NOTE } from '../../kitchen/cautions.ts'
import { STAVE_NAMES } from '../../nutrition/amino-acids.ts'
import { type PlateScore, scorePlate } from '../../nutrition/plate-score.ts'
import { liftsOf, targetOf } from '../problem-of.ts'
import type { Knowledge, State } from '../state.ts'
import { drawStaves, stavesAsText } from '../staves/draw-staves.ts'
import { fillOf, inFoodColour, letterOf } from '../staves/palette.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams, kcal, signed, wholeScore } from '../text/figures.ts'
import { clip, padEnd, padStart, wrapLines } from '../text/lines.ts'
import { fitted, keyLine, promptLines, topLine } from './frame.ts'

/** The chosen foods and grams, their staves, and what would lift them. */
export function plateView(state: State, knowledge: Knowledge): string[] {
  const { columns, plate, settings } = state
  const score = scorePlate(plate, scoreBasis(knowledge.table, settings.pattern))
  const servings = settings.servings === 1 ? '' : ` · ${settings.servings} servings`
  const top = [
    topLine(
      state,
      `${Math.round(targetOf(settings))} g wanted, ${score.proteinG.toFixed(0)} g here${servings}`,
    ),
  ]
  const foot = [...footOf(state), keyLine(columns, keysOf(state))]
  if (plate.length === 0) {
    const empty = [
      '',
      '   The plate is empty.',
      '',
      '   Tab to the bench and take a pairing, or press a to put a food on it.',
    ]
    return fitted(
      state,
      top,
      [...empty, ...todayLines(state, knowledge)].map(line => clip(line, columns - 1)),
      foot,
    )
  }
  const room = state.rows - 1 - top.length - foot.length
  const list = foodLines(state, score, knowledge.colour)
  const facts = factLines(score, state)
  const lifts = liftLines(state, knowledge)
  const care = careLines(score, state)
  // The list, the score and the lifts stay; the staves take the height that is left, and go first where there is none.
  const fixed = list.length + facts.length + lifts.length + 1
  const height = Math.min(12, room - fixed - 2 - (room > fixed + 12 ? care.length : 0))
  const chart = chartLines(state, score, height, knowledge.colour)
  const body = [...facts, ...chart, ...list, '', ...lifts, ...care]
  return fitted(state, top, body, foot)
}

function chartLines(state: State, score: PlateScore<Food>, height: number, colour: boolean): string[] {
  if (score.staves === null) return []
  if (state.spoken) return wrapLines(` ${stavesAsText(score.staves)}`, state.columns - 1, 1)
  if (height < 4)
    return [` ${stavesAsText(score.staves)}`]
      .flatMap(line => wrapLines(line, state.columns - 1, 1))
      .slice(0, 2)
  return drawStaves({
    portions: state.plate,
    pattern: score.pattern,
    width: Math.min(state.columns - 2, 84),
    height,
    colour,
  }).map(line => ` ${line}`)
}

function factLines(score: PlateScore<Food>, state: State): string[] {
  const parts = [
    STYLE.bold(diaasText(score)),
    ...(score.limiting === null
      ? []
      : [
          score.diaas! < 100
            ? `short of ${STAVE_NAMES[score.limiting]}`
            : `shortest ${STAVE_NAMES[score.limiting]}`,
        ]),
    ...(score.lift !== null && state.plate.length > 1 ? [`lift ${signed(score.lift)}`] : []),
    `${score.adjustedProteinG.toFixed(0)} g adjusted protein`,
    kcal(score.kcal),
    `leucine ${score.leucineG.toFixed(1)} g`,
  ]
  return wrapLines(` ${parts.join(' · ')}`, state.columns - 1, 1)
}

function foodLines(state: State, score: PlateScore<Food>, colour: boolean): string[] {
  return score.items.map(({ food, grams: g, proteinG, diaasAlone }, i) => {
    const under = i === state.plateCursor
    const sign = `${letterOf(i)} ${fillOf(i)}`
    const marked = colour ? inFoodColour(i, sign) : sign
    const right = `${padStart(grams(g), 7)}  ${padStart(`${proteinG.toFixed(1)} g protein`, 15)}  ${diaasAlone === null ? '' : `alone ${wholeScore(diaasAlone)}`}`
    const room = Math.max(10, state.columns - 46)
    const name = clip(food.name, room)
    return ` ${under ? '▸' : ' '} ${marked} ${padEnd(under ? STYLE.bold(name) : name, room)} ${right}`
  })
}

function liftLines(state: State, knowledge: Knowledge): string[] {
  const options = liftsOf(state, knowledge)
  if (options.length === 0) return []
  return options.map((option, i) => {
    const amount = option.deltaG < 0 ? `${grams(-option.deltaG)} less` : `${grams(option.deltaG)} more`
    const there = state.plate.some(({ food }) => food.id === option.food.id)
    const what = there ? `${amount} ${option.food.name}` : `${grams(option.deltaG)} ${option.food.name}`
    const label = i === 0 ? ' would lift it: ' : '                '
    return clip(
      `${label}${i + 1} to ${wholeScore(option.diaas)}: ${what}${option.onShelf ? '' : ' (not on your shelf)'}`,
      state.columns - 1,
    )
  })
}

/** Allergens, and the one caution that weighs most; the card has them all. */
function careLines(score: PlateScore<Food>, state: State): string[] {
  const foods = score.items.map(({ food }) => food)
  const allergens = [...new Set(foods.flatMap(food => food.allergens))].map(allergenName)
  const [first, ...more] = cautionsFor(foods, { conditions: state.settings.conditions })
  const lines = allergens.length === 0 ? [] : [` Allergens: ${allergens.join(', ')}.`]
  if (first !== undefined)
    lines.push(` ${first.text}${more.length === 0 ? '' : ` (${more.length} more on the card)`}`)
  return lines.flatMap(line => wrapLines(line, state.columns - 1, 1)).map(STYLE.dim)
}

function footOf(state: State): string[] {
  if (state.prompt !== null) return promptLines(state)
  if (state.asksServe) {
    const { servings } = state.settings
    return [
      STYLE.bold(
        clip(
          ` Serve: take ${servings === 1 ? 'this plate' : `${servings} of these plates`} off the shelf? Enter or y: yes, any other key: no`,
          state.columns - 1,
        ),
      ),
    ]
  }
  return [
    state.message === ''
      ? STYLE.dim(clip(` ${STANDING_NOTE}`, state.columns - 1))
      : ` ${clip(state.message, state.columns - 2)}`,
  ]
}

function keysOf(state: State): [string, string][] {
  if (state.prompt !== null)
    return [
      ['Enter', 'take it'],
      ['Esc', 'leave it'],
    ]
  if (state.asksServe)
    return [
      ['Enter', 'serve'],
      ['Esc', 'not yet'],
    ]
  if (state.plate.length === 0)
    return [
      ['Tab', 'shelf'],
      ['a', 'add a food'],
      ['Esc', 'bench'],
    ]
  return [
    ['←→', 'less, more'],
    ['Enter', 'amount'],
    ['a', 'add'],
    ['x', 'off'],
    ['1-3', 'try a lift'],
    ['z', 'back'],
    ['s', 'serve'],
    ['c', 'card'],
    ['f', 'look'],
    ['Tab', 'shelf'],
  ]
}

/** What was served today. */
function todayLines({ served }: State, { today, table }: Knowledge): string[] {
  const plates = served.filter(({ day }) => day === today)
  if (plates.length === 0) return []
  const name = (id: string) => table.foodById.get(id)?.name ?? id
  return [
    '',
    '   Served today:',
    ...plates.map(
      ({ servings, portions }) =>
        `   ${servings} x ${portions.map(({ food, grams: g }) => `${grams(g)} ${name(food)}`).join(', ')}`,
    ),
  ]
}
