import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { allergenName } from '../../kitchen/allergen-names.ts'
import { type Caution, cautionsFor } from '../../kitchen/cautions.ts'
import { STAVE_LABELS, STAVE_NAMES, STAVES } from '../../nutrition/amino-acids.ts'
import { type PlateScore, scorePlate } from '../../nutrition/plate-score.ts'
import { liftsOf, targetOf } from '../problem-of.ts'
import type { Knowledge, State } from '../state.ts'
import { drawStaves, stavesAsText, stavesSketch } from '../staves/draw-staves.ts'
import { wholePercent } from '../staves/figures.ts'
import { foodSign } from '../staves/palette.ts'
import { showsNumbers } from '../stepping-back.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams, kcal, shortDiaas, signed, wholeScore } from '../text/figures.ts'
import { clip, padEnd, padStart, wrapLines } from '../text/lines.ts'
import {
  beside,
  bodyRows,
  fitted,
  footLines,
  isWide,
  type KeyName,
  keyLines,
  LEAVE_KEY,
  PROMPT_KEYS,
  topLine,
} from './frame.ts'
import { standingNote } from './standing-note.ts'

/** Rows of the staves: fewer are not drawn, more add nothing. */
const STAVES_ROWS = { least: 4, most: 18, mostWide: 28 }
/** Columns of the foods, beside wide staves, with the gap before them. */
const PANEL = 54
/** Cautions of this weight are about the food itself (raw beans, cassava), and are never cut short. */
const GRAVE = 74

/** The chosen foods and grams, their staves, and what would lift them. */
export function plateView(state: State, knowledge: Knowledge): string[] {
  const { plate, settings } = state
  const score = scorePlate(plate, scoreBasis(knowledge.table, settings.pattern))
  const servings = settings.servings === 1 ? '' : ` · ${settings.servings} servings`
  const top = [
    topLine(
      state,
      showsNumbers(settings)
        ? `${Math.round(targetOf(settings))} g wanted, ${score.proteinG.toFixed(0)} g here${servings}`
        : servings.replace(' · ', ''),
    ),
  ]
  const foot = [...footOf(state), ...keyLines(state, keysOf(state))]
  const room = bodyRows(state, top, foot)
  const body =
    plate.length === 0
      ? emptyLines(state, knowledge)
      : isWide(state) && !state.spoken
        ? wideBody(state, score, knowledge, room)
        : stackedBody(state, score, knowledge, room)
  return fitted(state, top, body, foot)
}

/** The list, the score and the lifts stay; the staves take the height that is left. */
function stackedBody(state: State, score: PlateScore<Food>, knowledge: Knowledge, room: number): string[] {
  const { columns } = state
  const facts = factLines(score, state, columns)
  const list = foodLines(state, score, columns, knowledge.colour)
  const lifts = liftLines(state, score, knowledge, columns)
  const care = careOf(score, state, columns)
  const held = facts.length + list.length + lifts.length + care.must.length
  const spare = room - held - 2
  // Cautions that are not grave give way to the staves where both don't fit.
  const more = care.may.slice(0, Math.max(0, spare - STAVES_ROWS.least - 4))
  const gap = spare - more.length > STAVES_ROWS.least + 2 ? [''] : []
  const height = Math.min(STAVES_ROWS.most, spare - more.length - gap.length)
  return [
    ...facts,
    ...chartLines(state, score, height, columns - 2, knowledge.colour),
    ...list,
    ...gap,
    ...lifts,
    ...care.must,
    ...more,
  ]
}

/** Staves on the left, as large as the window; foods, lifts and cautions on the right. */
function wideBody(state: State, score: PlateScore<Food>, knowledge: Knowledge, room: number): string[] {
  const columns = state.columns - PANEL
  const facts = factLines(score, state, state.columns)
  const height = Math.min(STAVES_ROWS.mostWide, room - facts.length - 4)
  const chart = ['', ...chartLines(state, score, height, columns - 2, knowledge.colour)]
  const width = PANEL - 2
  const { must, may } = careOf(score, state, width)
  const panel = [
    '',
    ...foodLines(state, score, width, knowledge.colour),
    '',
    ...liftLines(state, score, knowledge, width),
    '',
    ...must,
    '',
    ...may,
  ]
  return [...facts, ...beside(chart, panel, columns + 1)]
}

function chartLines(
  state: State,
  score: PlateScore<Food>,
  height: number,
  width: number,
  colour: boolean,
): string[] {
  const { staves, pattern } = score
  if (staves === null || !showsNumbers(state.settings)) return []
  if (state.spoken) return wrapLines(` ${stavesAsText(staves)}`, state.columns - 1, 1)
  if (height < STAVES_ROWS.least) {
    const figures = STAVES.map(
      stave =>
        `${STAVE_LABELS[stave]}${stave === score.limiting ? '*' : ''}\u00a0${wholePercent(staves[stave])}`,
    )
    return wrapLines(` ${stavesSketch(staves)}  ${figures.join('  ')}`, state.columns - 1, 12).slice(
      0,
      Math.max(1, height + 2),
    )
  }
  const drawing = drawStaves({ portions: state.plate, pattern, width: Math.min(width, 92), height, colour })
  return drawing.map(line => ` ${line}`)
}

function factLines(score: PlateScore<Food>, state: State, columns: number): string[] {
  const short = score.limiting === null ? '' : STAVE_NAMES[score.limiting]
  if (!showsNumbers(state.settings))
    return wrapLines(
      ` ${score.class === 'no claim' ? 'no quality claim' : `${score.class} quality`} · shortest ${short}`,
      columns - 1,
      1,
    )
  const first = [
    STYLE.bold(diaasText(score)),
    ...(score.limiting === null
      ? []
      : [score.diaas! < 100 ? `short of ${short}` : `no stave short; shortest ${short}`]),
  ]
  const lift = score.lift === null || state.plate.length < 2 ? 0 : Math.round(score.lift)
  const second = [
    ...(lift === 0 ? [] : [`lift ${signed(lift)}`]),
    `${score.adjustedProteinG.toFixed(0)} g adjusted protein`,
    kcal(score.kcal),
    `leucine ${score.leucineG.toFixed(1)} g`,
    ...(columns < 72 ? [] : [`fibre ${score.fibreG.toFixed(0)} g`]),
  ]
  const whole = ` ${[...first, ...second].join(' · ')}`
  const lines = wrapLines(whole, columns - 1, 1)
  return lines.length === 1
    ? lines
    : [first, second].flatMap(part => wrapLines(` ${part.join(' · ')}`, columns - 1, 1))
}

function foodLines(state: State, score: PlateScore<Food>, columns: number, colour: boolean): string[] {
  const wide = columns >= 76
  const shown = showsNumbers(state.settings)
  return score.items.map(({ food, grams: g, proteinG, diaasAlone }, i) => {
    const under = i === state.plateCursor
    const right = [
      padStart(grams(g), 7),
      ...(shown
        ? [
            padStart(
              wide ? `${proteinG.toFixed(1)} g protein` : `${proteinG.toFixed(0)} g prot.`,
              wide ? 15 : 10,
            ),
          ]
        : []),
      ...(wide && shown ? [padEnd(diaasAlone === null ? '' : `alone ${wholeScore(diaasAlone)}`, 9)] : []),
    ].join('  ')
    const room = Math.max(10, Math.min(columns - 12 - right.length, 60))
    const name = clip(food.name, room)
    return ` ${under ? '▸ ' : '  '}${foodSign(i, colour)} ${padEnd(under ? STYLE.bold(name) : name, room)} ${right}`.trimEnd()
  })
}

/** What would lift the plate, by the keys that try it; or that nothing need or would. */
function liftLines(state: State, score: PlateScore<Food>, knowledge: Knowledge, columns: number): string[] {
  const options = liftsOf(state, knowledge)
  if (options.length === 0) {
    const enough = score.diaas !== null && score.diaas >= 100
    const words = enough
      ? 'No stave is short: nothing need be lifted.'
      : 'No small change would lift it by a point.'
    return [STYLE.dim(clip(` ${words}`, columns - 1))]
  }
  return options.map((option, i) => {
    const there = state.plate.some(({ food }) => food.id === option.food.id)
    const size = grams(Math.abs(option.deltaG))
    const amount = option.deltaG < 0 ? `${size} less` : there ? `${size} more` : `add ${size}`
    const where = option.onShelf ? '' : ' (to buy)'
    const label = i === 0 ? 'lifts it ' : '         '
    const start = ` ${STYLE.dim(label)}${STYLE.bold(String(i + 1))}  ${showsNumbers(state.settings) ? `to ${wholeScore(option.diaas).padStart(3)}  ` : ''}`
    return start + clip(`${amount} ${option.food.name}${where}`, Math.max(10, columns - 22))
  })
}

/** What must be read: allergens, and grave cautions in full; and what may be cut, where the window is small. */
function careOf(score: PlateScore<Food>, state: State, columns: number): { must: string[]; may: string[] } {
  const foods = score.items.map(({ food }) => food)
  const allergens = [...new Set(foods.flatMap(food => food.allergens))].map(allergenName)
  const cautions = cautionsFor(foods, { conditions: state.settings.conditions, portions: state.plate })
  const grave = cautions.filter(({ weight }) => weight >= GRAVE)
  const others = cautions.filter(({ weight }) => weight < GRAVE)
  const lines = (text: string) => wrapLines(` ${text}`, columns - 1, 1)
  return {
    must: [
      ...lines(`Allergens: ${allergens.length === 0 ? 'none of the listed ones' : allergens.join(', ')}.`),
      ...grave.slice(0, 1).flatMap(({ text }) => lines(text)),
    ],
    may: [...grave.slice(1), ...others].flatMap(({ text }: Caution) => lines(text)).map(STYLE.dim),
  }
}

function footOf(state: State): string[] {
  if (!state.asksServe) return footLines(state, standingNote(state))
  const { servings } = state.settings
  const what = servings === 1 ? 'this plate' : `${servings} of these plates`
  const short = shortOf(state)
  const question = ` Serve: take ${what} off the shelf? Enter or y: yes; any other key: no`
  return [
    ...(short === '' ? [] : wrapLines(` The shelf has ${short}.`, state.columns - 1, 1)),
    STYLE.bold(clip(question, state.columns - 1)),
  ]
}

/** Of which foods serving takes more than the shelf has. */
function shortOf({ plate, shelf, settings }: State): string {
  const onHand = new Map(shelf.items.map(({ food, grams: g }) => [food, g]))
  return plate
    .flatMap(({ food, grams: g }) => {
      const here = onHand.get(food.id)
      if (here === undefined) return [`no ${food.name}`]
      return here < g * settings.servings ? [`only ${grams(here)} of ${food.name}`] : []
    })
    .join(', ')
}

function keysOf(state: State): readonly KeyName[] {
  if (state.prompt !== null) return PROMPT_KEYS
  if (state.asksServe)
    return [
      ['Enter', 'serve'],
      ['Esc', 'not yet'],
    ]
  if (state.plate.length === 0)
    return [
      ['a', 'add a food'],
      ...(state.before.length === 0 ? [] : [['z', 'the plate before'] as const]),
      ['Esc', 'bench'],
      ['Tab', 'shelf'],
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
    ['n', 'servings'],
    ['Tab', 'shelf'],
    LEAVE_KEY,
  ]
}

function emptyLines(state: State, knowledge: Knowledge): string[] {
  return [
    '',
    '   The plate is empty.',
    '',
    '   Take a pairing from the bench (Esc), or press a to put a food on it.',
    ...todayLines(state, knowledge),
  ].flatMap(line => wrapLines(line, state.columns - 1, 7))
}

/** What was served today, each plate with its protein and score. */
function todayLines({ served, settings }: State, { today, table }: Knowledge): string[] {
  const plates = served.filter(({ day }) => day === today)
  if (plates.length === 0) return []
  const basis = scoreBasis(table, settings.pattern)
  return [
    '',
    '   Served today:',
    ...plates.flatMap(({ servings, portions }) => {
      const known = portions.flatMap(({ food: id, grams: g }) => {
        const food = table.foodById.get(id)
        return food === undefined ? [] : [{ food, grams: g }]
      })
      const score = scorePlate(known, basis)
      const foods = known.map(({ food, grams: g }) => `${grams(g)} ${food.name}`).join(', ')
      return [
        `   ${servings} x ${foods}`,
        STYLE.dim(
          `     a serving: ${score.proteinG.toFixed(0)} g protein · ${shortDiaas(score)} · ${kcal(score.kcal)}`,
        ),
      ]
    }),
  ]
}
