import { allergenName } from '../../kitchen/allergen-names.ts'
import { STANDING_NOTE } from '../../kitchen/cautions.ts'
import { STAVE_LABELS, STAVES } from '../../nutrition/amino-acids.ts'
import type { Pairing } from '../../pairing/problem.ts'
import { targetOf } from '../problem-of.ts'
import type { State } from '../state.ts'
import { stavesAsText, stavesSketch } from '../staves/draw-staves.ts'
import { inFoodColour, letterOf } from '../staves/palette.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams, kcal, signed, wholeScore } from '../text/figures.ts'
import { clip, padEnd, wrapLines } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'
import { fitted, keyLine, promptLines, topLine } from './frame.ts'

const SPINNER = '◌'

/** Where a plate is worked out: the target and the limits, and the pairings that follow from them. */
export function benchView(state: State, colour: boolean): string[] {
  const { settings, columns } = state
  const servings = `${settings.servings} ${settings.servings === 1 ? 'serving' : 'servings'}`
  const top = [
    topLine(
      state,
      `target ${Math.round(targetOf(settings))} g · ${servings} · up to ${settings.foodsAtMost} foods`,
    ),
    STYLE.dim(clip(` ${limitsText(state)}`, columns - 1)),
    '',
  ]
  const foot = [
    ...(state.prompt === null
      ? [
          state.message === ''
            ? STYLE.dim(clip(` ${STANDING_NOTE}`, columns - 1))
            : ` ${clip(state.message, columns - 2)}`,
        ]
      : promptLines(state)),
    keyLine(
      columns,
      state.prompt === null
        ? KEYS
        : [
            ['Enter', 'take it'],
            ['Esc', 'leave it'],
          ],
    ),
  ]
  const room = Math.max(1, state.rows - 1 - top.length - foot.length)
  return fitted(state, top, bodyOf(state, colour, room), foot)
}

const KEYS: [string, string][] = [
  ['Enter', 'to the plate'],
  ['w', 'why'],
  ['c', 'compare'],
  ['t', 'target'],
  ['n', 'servings'],
  ['k', 'foods'],
  ['a', 'allergens'],
  ['e', 'eggs'],
  ['d', 'dairy'],
  ['l', 'energy'],
  ['b', 'body mass'],
]

function limitsText({ settings, slow, stale }: State): string {
  const parts = [
    settings.pattern === 'fao-2013-over-3y' ? 'pattern FAO 2013, over 3 years' : 'pattern WHO 2007, adult',
    settings.without.length === 0 ? '' : `without ${settings.without.map(allergenName).join(', ')}`,
    settings.eggs ? 'eggs' : '',
    settings.dairy ? 'dairy' : '',
    settings.energyAtMostKcal === null ? '' : `at most ${settings.energyAtMostKcal} kcal`,
    stale && slow ? `${SPINNER} working it out` : '',
  ]
  return parts.filter(part => part !== '').join(' · ')
}

function bodyOf(state: State, colour: boolean, room: number): string[] {
  const { answer, refusal, columns } = state
  if (refusal !== null) return wrapLines(` ${refusal}`, columns - 2, 1)
  if (answer === null) return [` ${SPINNER} working it out`]
  const lines: string[] = []
  if (answer.reason !== null) lines.push(...wrapLines(` ${answer.reason}`, columns - 2, 1), '')
  if (!answer.reached && answer.pairings.length > 0) lines.push(' The nearest plate:')
  const compared = state.compared === null ? undefined : answer.pairings[state.compared]
  const chosen = answer.pairings[state.chosen]
  if (compared !== undefined && chosen !== undefined && compared !== chosen) {
    lines.push(...sideBySide(compared, chosen, state))
    return lines
  }
  const blocks = answer.pairings.map((pairing, i) => pairingLines(pairing, i, state, colour))
  // The chosen one stays in sight with its reason; the list begins further down where they don't all fit.
  const before = blocks.map(block => block.length)
  let first = 0
  while (
    first < state.chosen &&
    lines.length + before.slice(first, state.chosen + 1).reduce((a, b) => a + b, 0) > room
  )
    first++
  lines.push(...blocks.slice(first).flat())
  return state.stale && state.slow ? lines.map(STYLE.dim) : lines
}

function pairingLines(pairing: Pairing, i: number, state: State, colour: boolean): string[] {
  const { columns } = state
  const under = i === state.chosen
  const foods = pairing.portions.map(({ food, grams: g }, j) => {
    const letter = colour ? inFoodColour(j, letterOf(j)) : letterOf(j)
    return `${letter} ${food.name} ${STYLE.bold(grams(g))}`
  })
  const { score } = pairing
  const lines = joinFitting(foods, columns - 7).map((line, j) =>
    j === 0 ? ` ${under ? '▸' : ' '} ${STYLE.bold(String(i + 1))}  ${line}` : `      ${line}`,
  )
  const facts = [
    `${score.proteinG.toFixed(0)} g protein`,
    diaasText(score),
    `shortest ${score.limiting === null ? '-' : STAVE_LABELS[score.limiting]}`,
    ...(pairing.portions.length > 1 && score.lift !== null ? [`lift ${signed(score.lift)}`] : []),
    kcal(score.kcal),
  ].join(' · ')
  const sketch = score.staves === null || state.spoken ? '' : `  ${stavesSketch(score.staves)}`
  const fits = widthOf(facts) + widthOf(sketch) + 6 < columns
  lines.push(...wrapLines(`      ${facts}${fits ? sketch : ''}`, columns - 1, 6))
  if (under && state.spoken && score.staves !== null)
    lines.push(...wrapLines(`      ${stavesAsText(score.staves)}`, columns - 1, 6))
  if (under && state.why) {
    lines.push(...pairing.why.flatMap(reason => wrapLines(`      ${reason}`, columns - 1, 6)).map(STYLE.dim))
    const lift = pairing.nextLift
    if (lift !== null) {
      const amount = `${lift.deltaG < 0 ? `${grams(-lift.deltaG)} less` : grams(lift.deltaG)} ${lift.food.name}`
      lines.push(
        ...wrapLines(
          `      Would lift it: ${amount}${lift.onShelf ? '' : ' (not on your shelf)'}, to DIAAS ${wholeScore(lift.diaas)}.`,
          columns - 1,
          6,
        ).map(STYLE.dim),
      )
    }
  }
  lines.push('')
  return lines
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

function sideBySide(a: Pairing, b: Pairing, state: State): string[] {
  const half = Math.floor((state.columns - 5) / 2)
  const column = (pairing: Pairing): string[] => {
    const { score } = pairing
    return [
      ...pairing.portions.map(({ food, grams: g }, j) =>
        clip(`${letterOf(j)} ${grams(g)} ${food.name}`, half),
      ),
      '',
      clip(`${score.proteinG.toFixed(1)} g protein`, half),
      clip(`${score.adjustedProteinG.toFixed(1)} g adjusted protein`, half),
      clip(diaasText(score), half),
      `PDCAAS ${Math.round(score.pdcaas ?? 0)} · ${kcal(score.kcal)}`,
      `leucine ${score.leucineG.toFixed(1)} g · fibre ${score.fibreG.toFixed(0)} g`,
      `${grams(score.grams)} on the plate`,
      '',
      ...(score.staves === null
        ? []
        : STAVES.map(
            stave =>
              `${STAVE_LABELS[stave]}${stave === score.limiting ? '*' : ' '} ${String(Math.floor(score.staves![stave])).padStart(4)} ${'▇'.repeat(Math.min(half - 12, Math.round(score.staves![stave] / 10)))}`,
          )),
    ]
  }
  const [left, right] = [column(a), column(b)]
  // Foods differ in number: what follows them stands side by side.
  const foods = Math.max(a.portions.length, b.portions.length)
  const level = (lines: string[], own: number) => [
    ...lines.slice(0, own),
    ...Array<string>(foods - own).fill(''),
    ...lines.slice(own),
  ]
  const [l, r] = [level(left, a.portions.length), level(right, b.portions.length)]
  return l.map((line, i) => ` ${padEnd(line, half)} │ ${r[i] ?? ''}`)
}
