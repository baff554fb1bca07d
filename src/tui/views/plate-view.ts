import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { allergenName } from '../../kitchen/allergen-names.ts'
import { type Caution, cautionsFor } from '../../kitchen/cautions.ts'
import { STAVE_LABELS, STAVE_NAMES, STAVES } from '../../nutrition/amino-acids.ts'
import { type PlateScore, scorePlate } from '../../nutrition/plate-score.ts'
import type { LiftOption } from '../../pairing/problem.ts'
import { liftsOf, targetOf } from '../problem-of.ts'
import type { Knowledge, State } from '../state.ts'
import { drawStaves, stavesAsText, stavesSketch } from '../staves/draw-staves.ts'
import { wholePercent } from '../staves/figures.ts'
import { foodSign } from '../staves/palette.ts'
import { showsNumbers } from '../stepping-back.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams, kcal, shortDiaas, signed, wholeScore } from '../text/figures.ts'
import { clip, padEnd, padStart, wrapLines } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'
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
  windowOf,
} from './frame.ts'
import { standingNote } from './standing-note.ts'

/** Rows of the staves: fewer are not drawn, more add nothing. */
const STAVES_ROWS = { least: 4, most: 18, mostWide: 28 }
/** Columns of the foods, beside wide staves, with the gap before them. */
const panelColumns = (columns: number) => Math.max(54, Math.min(70, Math.round(columns * 0.45)))
/** Foods that stay in sight, however small the window. */
const FOODS_AT_LEAST = 3
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
  const lifts = plate.length === 0 ? [] : liftsOf(state, knowledge)
  const foot = [...footOf(state), ...keyLines(state, keysOf(state, lifts.length))]
  const room = bodyRows(state, top, foot)
  const body =
    plate.length === 0
      ? emptyLines(state, knowledge)
      : isWide(state) && !state.spoken
        ? wideBody(state, score, lifts, knowledge, room)
        : stackedBody(state, score, lifts, knowledge, room)
  return fitted(state, top, body, foot)
}

/**
 * Score, allergens and grave cautions always stand there whole. Then come the foods around the cursor, what would lift
 * them, and the staves with the height that is left.
 */
function stackedBody(
  state: State,
  score: PlateScore<Food>,
  options: readonly LiftOption[],
  knowledge: Knowledge,
  room: number,
): string[] {
  const { columns } = state
  const facts = factLines(score, state, columns)
  const list = foodLines(state, score, columns, knowledge.colour)
  const lifts = liftLines(state, score, options, columns)
  const care = careOf(score, state, columns)
  let left = Math.max(0, room - facts.length - care.must.length)
  const taken = (wanted: number) => {
    const rows = Math.max(0, Math.min(wanted, left))
    left -= rows
    return rows
  }
  let listed = taken(Math.min(FOODS_AT_LEAST, list.length))
  let lifting = taken(Math.min(1, lifts.length))
  listed += taken(list.length - listed)
  lifting += taken(lifts.length - lifting)
  const spare = left - 2
  // Cautions that are not grave give way to the staves where both don't fit.
  const more = care.may.slice(0, Math.max(0, spare - STAVES_ROWS.least - 4))
  const gap = spare - more.length > STAVES_ROWS.least + 2 ? [''] : []
  const height = Math.min(STAVES_ROWS.most, spare - more.length - gap.length)
  return [
    ...facts,
    ...chartLines(state, score, height, columns - 2, knowledge.colour),
    ...windowOf(list, state.plateCursor, listed).shown,
    ...gap,
    ...lifts.slice(0, lifting),
    ...care.must,
    ...more,
  ]
}

/** Staves on the left, as large as the window; foods, lifts and cautions on the right. */
function wideBody(
  state: State,
  score: PlateScore<Food>,
  options: readonly LiftOption[],
  knowledge: Knowledge,
  room: number,
): string[] {
  const panelled = panelColumns(state.columns)
  const columns = state.columns - panelled
  const facts = factLines(score, state, state.columns)
  const height = Math.min(STAVES_ROWS.mostWide, room - facts.length - 4)
  const chart = ['', ...chartLines(state, score, height, columns - 2, knowledge.colour)]
  const width = panelled - 2
  const { must, may } = careOf(score, state, width)
  const panel = [
    '',
    ...foodLines(state, score, width, knowledge.colour),
    '',
    ...liftLines(state, score, options, width),
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
      Math.max(0, height + 2),
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
function liftLines(
  state: State,
  score: PlateScore<Food>,
  options: readonly LiftOption[],
  columns: number,
): string[] {
  if (options.length === 0) {
    const enough = score.diaas !== null && score.diaas >= 100
    const words = enough
      ? 'No stave is short: nothing need be lifted.'
      : 'No small change would lift it by a point.'
    return [STYLE.dim(clip(` ${words}`, columns - 1))]
  }
  return options.flatMap((option, i) => {
    const there = state.plate.some(({ food }) => food.id === option.food.id)
    const size = grams(Math.abs(option.deltaG))
    const amount = option.deltaG < 0 ? `${size} less` : there ? `${size} more` : `add ${size}`
    const where = option.onShelf ? '' : ' (to buy)'
    const label = i === 0 ? 'lifts it ' : '         '
    const gain = showsNumbers(state.settings) ? `${gainText(score, option).padEnd(11)}` : ''
    const start = ` ${STYLE.dim(label)}${STYLE.bold(String(i + 1))}  ${gain}${amount} `
    // Beside the staves there are lines enough; elsewhere a long name gives way to what must be known of it.
    if (isWide(state)) return wrapLines(start + option.food.name + where, columns - 1, 11)
    return start + clip(option.food.name, Math.max(10, columns - 1 - widthOf(start + where))) + where
  })
}

/** `+3 to 95`: what a lift gains, and the score that it leads to. The figures are those that are shown. */
function gainText({ diaas }: PlateScore<Food>, option: LiftOption): string {
  const after = wholeScore(option.diaas)
  return diaas === null ? `to ${after}` : `${signed(Number(after) - Number(wholeScore(diaas)))} to ${after}`
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

function keysOf(state: State, lifts: number): readonly KeyName[] {
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
    ...(lifts === 0 ? [] : [[lifts === 1 ? '1' : `1-${lifts}`, 'try a lift', 'lift'] as const]),
    ...(state.before.length === 0 ? [] : [['z', 'go back', 'back'] as const]),
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
