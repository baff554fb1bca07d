import { allergenName } from '../../kitchen/allergen-names.ts'
import { STAVE_LABELS, STAVE_NAMES, STAVES, type Stave } from '../../nutrition/amino-acids.ts'
import type { PlateScore } from '../../nutrition/plate-score.ts'
import type { Pairing } from '../../pairing/problem.ts'
import type { Settings } from '../../shelf/settings.ts'
import { targetOf } from '../problem-of.ts'
import type { State } from '../state.ts'
import { drawStaves, stavesAsText, stavesSketch } from '../staves/draw-staves.ts'
import { wholePercent } from '../staves/figures.ts'
import { inFoodColour, letterOf } from '../staves/palette.ts'
import { noBodyMassTarget, showsNumbers } from '../stepping-back.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams, kcal, shortDiaas, signed, wholeScore } from '../text/figures.ts'
import { clip, padEnd, wrapLines } from '../text/lines.ts'
import { widthOf, withoutStyles } from '../text/width.ts'
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

/** The faces of the spinner, each shown for a moment while an answer is waited for. */
const SPINNER = ['◴', '◷', '◶', '◵']
/** Columns of the chosen pairing's staves, beside a wide list, with the gap before them. */
const PANEL = 62

const keysOf = (state: State): readonly KeyName[] => [
  ...((state.answer?.pairings.length ?? 0) === 0
    ? []
    : ([
        ['Enter', 'to the plate', 'take'],
        ['w', 'why'],
        ['c', 'compare'],
      ] as const)),
  ['t', 'target'],
  ['n', 'servings'],
  ['k', 'foods'],
  ['a', 'allergens'],
  ['e', 'eggs'],
  ['d', 'dairy'],
  ['l', 'energy'],
  ['b', 'body mass', 'body'],
  ...(fromBodyMass(state.settings) === ''
    ? []
    : ([
        ['i', 'intake'],
        ['m', 'meals'],
      ] as const)),
  ['u', 'usual ranges', 'ranges'],
  ['p', 'pattern'],
  ['Tab', 'plate'],
  LEAVE_KEY,
]

const COMPARE_KEYS: readonly KeyName[] = [
  ['↑↓', 'choose the other'],
  ['Enter', 'that one to the plate'],
  ['Esc', 'back to the list'],
]

/** Where a plate is worked out: the target and the limits, and the pairings that follow from them. */
export function benchView(state: State, colour: boolean): string[] {
  const { settings, columns } = state
  const servings = `${settings.servings} ${settings.servings === 1 ? 'serving' : 'servings'}`
  const target = showsNumbers(settings) ? `target ${Math.round(targetOf(settings))} g · ` : ''
  const top = [
    topLine(
      state,
      columns < 76 ? `${target}${servings}` : `${target}${servings} · up to ${settings.foodsAtMost} foods`,
    ),
    // What is left out must be read: it is never cut.
    ...wrapLines(` ${limitsText(state)}`, columns - 1, 1).map(STYLE.dim),
    '',
  ]
  const foot = [
    ...footLines(state, standingNote(state)),
    ...keyLines(
      state,
      state.prompt !== null ? PROMPT_KEYS : state.compared === null ? keysOf(state) : COMPARE_KEYS,
    ),
  ]
  const chosen = state.answer?.pairings[state.chosen]
  const isPlain = state.spoken || !showsNumbers(settings)
  if (!isWide(state) || isPlain || chosen === undefined || state.compared !== null)
    return fitted(state, top, bodyOf(state, columns, colour, bodyRows(state, top, foot)), foot)
  const left = bodyOf({ ...state, why: false }, columns - PANEL, colour, bodyRows(state, top, foot))
  const panel = panelOf(chosen, colour)
  const body = beside(left, isWaiting(state) ? panel.map(STYLE.dim) : panel, columns - PANEL + 2)
  return fitted(state, top, body, foot)
}

const isWaiting = ({ stale, slow }: State): boolean => stale && slow

/** The chosen pairing's staves and reason, beside the list. */
function panelOf(pairing: Pairing, colour: boolean): string[] {
  const { score, portions } = pairing
  const width = PANEL - 4
  const drawing = drawStaves({ portions, pattern: score.pattern, width, height: 12, colour })
  return [...drawing, '', ...reasonLines(pairing, width, 0)]
}

function limitsText(state: State): string {
  const { settings } = state
  const parts = [
    isWaiting(state) ? `${SPINNER[state.spin % SPINNER.length]} working it out` : '',
    settings.pattern === 'fao-2013-over-3y' ? 'pattern FAO 2013, over 3 years' : 'pattern WHO 2007, adult',
    fromBodyMass(settings),
    settings.without.length === 0 ? '' : `without ${settings.without.map(allergenName).join(', ')}`,
    settings.eggs ? 'eggs' : '',
    settings.dairy ? 'dairy' : '',
    settings.energyAtMostKcal === null ? '' : `at most ${settings.energyAtMostKcal} kcal`,
  ]
  return parts.filter(part => part !== '').join(' · ')
}

/** Where the target comes from, unless it was given in plain grams. */
function fromBodyMass({ targetG, bodyMassKg, gPerKgPerDay, mealsPerDay, conditions }: Settings): string {
  if (targetG !== null || bodyMassKg === null || noBodyMassTarget({ conditions }) !== null) return ''
  return `${bodyMassKg} kg x ${gPerKgPerDay} g/kg/day, ${mealsPerDay} meals`
}

function bodyOf(state: State, columns: number, colour: boolean, room: number): string[] {
  const { answer, refusal } = state
  if (refusal !== null) return wrapLines(` ${refusal}`, columns - 2, 1)
  if (answer === null) return [` ${SPINNER[state.spin % SPINNER.length]} working it out`]
  const lines: string[] = []
  if (answer.reason !== null) lines.push(...wrapLines(` ${answer.reason}`, columns - 2, 1), '')
  if (!answer.reached && answer.pairings.length > 0) lines.push(' The nearest plate:')
  const compared = state.compared === null ? undefined : answer.pairings[state.compared]
  const chosen = answer.pairings[state.chosen]
  if (compared !== undefined && chosen !== undefined && compared !== chosen) {
    lines.push(...sideBySide(compared, chosen, state, columns, room - lines.length))
    return lines
  }
  const blocks = answer.pairings.map((pairing, i) => pairingLines(pairing, i, state, columns, colour))
  // The chosen one stays in sight with its reason; the list begins further down where they don't all fit.
  const before = blocks.map(block => block.length)
  let first = 0
  while (
    first < state.chosen &&
    lines.length + before.slice(first, state.chosen + 1).reduce((a, b) => a + b, 0) > room
  )
    first++
  let end = first
  let rows = lines.length
  while (end < blocks.length && (end === first || rows + blocks[end]!.length - 1 <= room)) {
    rows += blocks[end]!.length
    end++
  }
  lines.push(...blocks.slice(first, end).flat())
  // The empty line after the last block says how many there are below.
  const below = blocks.length - end
  if (below > 0 && lines.length <= room) lines[lines.length - 1] = STYLE.dim(`   ↓ ${below} more`)
  return isWaiting(state) ? lines.map(line => STYLE.dim(withoutStyles(line))) : lines
}

function pairingLines(pairing: Pairing, i: number, state: State, columns: number, colour: boolean): string[] {
  const under = i === state.chosen
  const foods = pairing.portions.map(({ food, grams: g }, j) => {
    const letter = colour ? inFoodColour(j, letterOf(j)) : letterOf(j)
    return `${letter} ${food.name} ${STYLE.bold(grams(g))}`
  })
  const { score } = pairing
  const shown = showsNumbers(state.settings)
  const lines = joinFitting(foods, columns - 7).map((line, j) =>
    j === 0 ? ` ${under ? '▸' : ' '} ${STYLE.bold(String(i + 1))}  ${line}` : `      ${line}`,
  )
  const lift = pairing.portions.length > 1 && score.lift !== null ? Math.round(score.lift) : 0
  const facts = [
    `${score.proteinG.toFixed(0)} g protein`,
    STYLE.bold(shortDiaas(score)),
    `shortest ${score.limiting === null ? '-' : STAVE_LABELS[score.limiting]}`,
    ...(lift === 0 ? [] : [`lift ${signed(lift)}`]),
    kcal(score.kcal),
  ].join(' · ')
  const sketch = score.staves === null || state.spoken ? '' : `  ${stavesSketch(score.staves)}`
  const fits = widthOf(facts) + widthOf(sketch) + 6 < columns
  const told = shown ? `${facts}${fits ? sketch : ''}` : inWords(score)
  lines.push(...wrapLines(`      ${told}`, columns - 1, 6))
  if (under && shown && state.spoken && score.staves !== null)
    lines.push(...wrapLines(`      ${stavesAsText(score.staves)}`, columns - 1, 6))
  if (under && shown && state.why) lines.push(...reasonLines(pairing, columns - 1, 6))
  lines.push('')
  return lines
}

/** A score without its numbers. */
function inWords({ class: quality, limiting }: PlateScore): string {
  const words = quality === 'no claim' ? 'no quality claim' : `${quality} quality`
  return limiting === null ? words : `${words} · shortest ${STAVE_NAMES[limiting]}`
}

/** What each food brings, what is shortest now, and what would lift it. */
function reasonLines({ why, nextLift }: Pairing, width: number, indent: number): string[] {
  const start = ' '.repeat(indent)
  const reasons =
    nextLift === null
      ? why
      : [
          ...why,
          `Would lift it: ${nextLift.deltaG < 0 ? `${grams(-nextLift.deltaG)} less` : grams(nextLift.deltaG)} ${nextLift.food.name}${nextLift.onShelf ? '' : ' (not on your shelf)'}, to DIAAS ${wholeScore(nextLift.diaas)}.`,
        ]
  return reasons.flatMap(reason => wrapLines(start + reason, width, indent)).map(STYLE.dim)
}

/** Pieces on as few lines as they fit. */
function joinFitting(pieces: readonly string[], width: number): string[] {
  const lines: string[] = []
  for (const piece of pieces) {
    const last = lines.at(-1)
    if (last !== undefined && widthOf(last) + 3 + widthOf(piece) <= width)
      lines[lines.length - 1] = `${last}   ${piece}`
    else lines.push(piece)
  }
  return lines
}

/** Two pairings side by side: foods, figures, and each stave of both. */
function sideBySide(a: Pairing, b: Pairing, state: State, columns: number, room: number): string[] {
  const half = Math.floor((Math.min(columns, 120) - 5) / 2)
  const column = (pairing: Pairing): string[] => {
    const { score } = pairing
    if (!showsNumbers(state.settings)) return wrapLines(inWords(score), half)
    return [
      clip(diaasText(score), half),
      clip(`${score.proteinG.toFixed(1)} g protein, ${score.adjustedProteinG.toFixed(1)} g adjusted`, half),
      clip(`${kcal(score.kcal)} · ${grams(score.grams)} on the plate`, half),
      clip(`PDCAAS ${Math.round(score.pdcaas ?? 0)} · leucine ${score.leucineG.toFixed(1)} g`, half),
      ...(score.staves === null ? [] : STAVES.map(stave => staveLine(score, stave, half))),
    ]
  }
  const count = Math.max(a.portions.length, b.portions.length)
  const foods = (pairing: Pairing) =>
    Array.from({ length: count }, (_, j) => {
      const portion = pairing.portions[j]
      return portion === undefined
        ? ''
        : clip(`${letterOf(j)} ${grams(portion.grams)} ${portion.food.name}`, half)
    })
  const [left, right] = [
    [...foods(a), ...column(a)],
    [...foods(b), ...column(b)],
  ]
  return left.slice(0, Math.max(1, room)).map((line, i) => ` ${padEnd(line, half)} │ ${right[i] ?? ''}`)
}

/** A stave laid down: its figure, and a bar that ends at 140 %. */
function staveLine(score: PlateScore, stave: Stave, width: number): string {
  const value = score.staves![stave]
  const room = width - 10
  const bar = '▇'.repeat(Math.max(0, Math.min(room, Math.round((value / 140) * room))))
  const name = `${STAVE_LABELS[stave]}${stave === score.limiting ? '*' : ' '}`
  return `${name} ${wholePercent(value).padStart(4)} ${bar}`
}
