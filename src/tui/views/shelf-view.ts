import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { stavesOfPlate } from '../../nutrition/staves.ts'
import { type ShelfRow, shelfRows } from '../rows.ts'
import type { Knowledge, State } from '../state.ts'
import { stavesSketch } from '../staves/draw-staves.ts'
import { STYLE } from '../style.ts'
import { grams } from '../text/figures.ts'
import { clip, padEnd, padStart } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'
import { fitted, keyLine, promptLines, rule, topLine, windowOf } from './frame.ts'

/** What is on hand; typing finds, and offers foods of the table after it. */
export function shelfView(state: State, knowledge: Knowledge): string[] {
  const rows = shelfRows(state, knowledge)
  const cursor = Math.max(0, Math.min(state.cursor, rows.length - 1))
  const count = `${state.shelf.items.length} ${state.shelf.items.length === 1 ? 'food' : 'foods'}`
  const top = [
    topLine(
      state,
      `${state.sample ? 'the sample shelf: a river survey boat’s galley' : 'your shelf'} · ${count}`,
    ),
    ` > ${state.find}${state.prompt === null ? STYLE.reverse(' ') : ''}${state.find === '' ? STYLE.dim(' type to find a food, or to add one') : ''}`,
  ]
  const foot = [...footOf(state), keyLine(state.columns, keysOf(state, rows[cursor]))]
  const room = Math.max(1, state.rows - 1 - top.length - foot.length - 2)
  const { shown, first } = windowOf(rows, cursor, room)
  const body: string[] = []
  let section = ''
  shown.forEach((row, i) => {
    const title =
      row.kind === 'here' ? hereTitle(state, rows, first + i) : 'in the table: Enter puts it on the shelf'
    if (row.kind !== section) body.push(rule(title, state.columns))
    section = row.kind
    body.push(rowLine(row, first + i === cursor, state, knowledge))
  })
  if (rows.length === 0) body.push('', ...emptyLines(state).map(line => clip(line, state.columns - 1)))
  return fitted(state, top, body, foot)
}

function hereTitle(state: State, rows: readonly ShelfRow[], at: number): string {
  const here = rows.filter(({ kind }) => kind === 'here').length
  const order = state.find === '' && state.order !== 'as put' ? `, by ${state.order}` : ''
  return at === 0 ? `on the shelf${order}` : `on the shelf${order}: ${at + 1} of ${here}`
}

function emptyLines(state: State): string[] {
  if (state.find !== '')
    return [
      `   No food is called "${clip(state.find, 40)}" or nearly so.`,
      '   A shorter or plainer word may do.',
    ]
  return [
    '   The shelf is empty.',
    '',
    '   Type a food that you have, such as: lentils',
    '   or paste a whole list, one food a line.',
  ]
}

/** The message and the open line stand just above the keys. */
function footOf(state: State): string[] {
  if (state.prompt !== null) return promptLines(state)
  if (state.message !== '') return [` ${clip(state.message, state.columns - 2)}`]
  return state.sample
    ? [
        STYLE.dim(
          clip(' This is a sample, kept with your first change. 0 starts an empty shelf.', state.columns - 1),
        ),
      ]
    : ['']
}

function keysOf(state: State, row: ShelfRow | undefined): [string, string][] {
  if (state.prompt !== null)
    return [
      ['Enter', 'take it'],
      ['Esc', 'leave it'],
    ]
  const here: [string, string][] =
    row?.kind === 'table'
      ? [
          ['Enter', 'add'],
          ['=', 'look'],
          ['Esc', 'clear'],
        ]
      : row === undefined
        ? []
        : [
            ['Enter', 'amount'],
            ['!', 'use up'],
            ['.', 'hold back'],
            ['#', 'take off'],
            ['=', 'look'],
            ['/', 'order'],
            ['<', 'undo'],
            ['@', 'use by'],
          ]
  const sample: [string, string][] = state.sample && state.find === '' ? [['0', 'empty']] : []
  return [['Tab', 'bench'], ...sample, ...here]
}

const MARKS = { 'use-up': 'use up', 'hold-back': 'hold back', '': '' } as const

function rowLine(row: ShelfRow, under: boolean, state: State, knowledge: Knowledge): string {
  const { columns } = state
  const wide = columns >= 84
  const food = row.food
  const sketch = food === null || state.spoken ? '' : sketchOf(food, state, knowledge)
  const amount = row.kind === 'here' ? grams(row.item.grams) : ''
  const avoided = food === null ? [] : food.allergens.filter(id => state.settings.without.includes(id))
  // What the cook leaves out is never proposed, and is marked wherever it is found.
  const mark =
    avoided.length > 0 ? `× ${avoided[0]}`.slice(0, 9) : row.kind === 'here' ? MARKS[row.item.mark] : ''
  const days = row.kind === 'here' ? daysText(row.item.useBy, knowledge.today) : ''
  const protein =
    food === null
      ? ''
      : row.kind === 'here'
        ? `${Math.round((row.item.grams / 100) * food.per100g.proteinG)} g protein`
        : `${food.per100g.proteinG.toFixed(1)} g / 100 g`
  const right = [
    padEnd(mark, 9),
    padStart(amount, 7),
    padEnd(days, wide ? 10 : 5),
    ...(columns < 72 ? [] : [padStart(protein, 14)]),
    sketch,
  ].join(' ')
  const name = food?.name ?? (row.kind === 'here' ? `${row.item.food} (not in the table)` : '')
  const room = Math.max(8, columns - widthOf(right) - 5)
  const clipped = clip(name, room)
  const filled = padEnd(under ? STYLE.bold(clipped) : withMarks(clipped, row.matched), room)
  return `${under ? ' ▸ ' : '   '}${filled} ${right}`
}

/** The letters that the find line met, underlined. */
function withMarks(name: string, matched: ShelfRow['matched']): string {
  let text = ''
  let at = 0
  for (const [start, end] of matched) {
    if (start < at || end > name.length) continue
    text += name.slice(at, start) + STYLE.underline(name.slice(start, end))
    at = end
  }
  return text + name.slice(at)
}

function daysText(useBy: string | null, today: string): string {
  if (useBy === null) return ''
  const days = Math.round((Date.parse(useBy) - Date.parse(today)) / 86_400_000)
  return days < 0 ? 'past' : days === 0 ? 'today' : `${days} d`
}

const sketches = new WeakMap<Food, Map<string, string>>()

function sketchOf(food: Food, { settings }: State, { table }: Knowledge): string {
  let byPattern = sketches.get(food)
  if (byPattern === undefined) {
    byPattern = new Map()
    sketches.set(food, byPattern)
  }
  let sketch = byPattern.get(settings.pattern)
  if (sketch === undefined) {
    const staves = stavesOfPlate([{ food, grams: 100 }], scoreBasis(table, settings.pattern).pattern)
    sketch = staves === null ? '         ' : stavesSketch(staves)
    byPattern.set(settings.pattern, sketch)
  }
  return sketch
}
