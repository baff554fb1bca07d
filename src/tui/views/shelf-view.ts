import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { STAVE_LABELS, STAVES, type Staves } from '../../nutrition/amino-acids.ts'
import { shortestStave, stavesOfPlate } from '../../nutrition/staves.ts'
import { matchedAlias } from '../matched-alias.ts'
import { type ShelfRow, shelfRows } from '../rows.ts'
import type { Knowledge, State } from '../state.ts'
import { stavesSketch } from '../staves/draw-staves.ts'
import { wholePercent } from '../staves/figures.ts'
import { showsNumbers } from '../stepping-back.ts'
import { STYLE } from '../style.ts'
import { grams } from '../text/figures.ts'
import { clip, padEnd, padStart } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'
import { foodPanel } from './food-panel.ts'
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
  rule,
  topLine,
  windowOf,
} from './frame.ts'

/** Columns of the food under the cursor, beside a wide list, with the gap before it. */
const PANEL = 60

/** What is on hand; typing finds, and offers foods of the table after it. */
export function shelfView(state: State, knowledge: Knowledge): string[] {
  const rows = state.opening ? [] : shelfRows(state, knowledge)
  const cursor = Math.max(0, Math.min(state.cursor, rows.length - 1))
  const count = `${state.shelf.items.length} ${state.shelf.items.length === 1 ? 'food' : 'foods'}`
  const top = [
    topLine(state, state.opening ? 'your shelf' : `${shelfName(state)} · ${count}`),
    ` > ${state.find}${state.prompt === null ? STYLE.reverse(' ') : ''}${state.find === '' ? STYLE.dim(' type to find a food, or to add one') : ''}`,
  ]
  const foot = [...footLines(state, standing(state)), ...keyLines(state, keysOf(state, rows[cursor]))]
  const room = bodyRows(state, top, foot)
  const panelOf =
    isWide(state) && !state.spoken && showsNumbers(state.settings) ? (rows[cursor]?.food ?? null) : null
  const columns = panelOf === null ? state.columns : state.columns - PANEL
  const list = listLines(state, knowledge, rows, cursor, room, columns)
  const body =
    panelOf === null
      ? list
      : beside(list, ['', ...foodPanel(panelOf, state, knowledge, PANEL - 4)], columns + 2)
  return fitted(state, top, body, foot)
}

function listLines(
  state: State,
  knowledge: Knowledge,
  rows: readonly ShelfRow[],
  cursor: number,
  room: number,
  columns: number,
): string[] {
  if (rows.length === 0) return ['', ...emptyLines(state).map(line => clip(line, columns - 1))]
  // Days take a column only where some food has one.
  const dated = state.shelf.items.some(({ useBy }) => useBy !== null)
  const titles = new Set(rows.map(({ kind }) => kind)).size
  const { shown, first } = windowOf(rows, cursor, Math.max(1, room - titles))
  const lines: string[] = []
  let section = ''
  shown.forEach((row, i) => {
    const title =
      row.kind === 'here' ? hereTitle(state, rows, first + i) : 'in the table: Enter puts it on the shelf'
    if (row.kind !== section) lines.push(rule(title, columns))
    section = row.kind
    lines.push(rowLine(row, first + i === cursor, { columns, dated }, state, knowledge))
  })
  return lines
}

function hereTitle(state: State, rows: readonly ShelfRow[], at: number): string {
  const here = rows.filter(({ kind }) => kind === 'here').length
  const order = state.find === '' && state.order !== 'as put' ? `, by ${state.order}` : ''
  return at === 0 ? `on the shelf${order}` : `on the shelf${order}: ${at + 1} of ${here}`
}

function emptyLines(state: State): string[] {
  if (state.opening) return ['   Opening your shelf ...']
  if (state.find !== '')
    return [
      `   No food is called "${clip(state.find, 40)}" or nearly so.`,
      '   A shorter or plainer word may do; + takes what the label of a packet says.',
    ]
  return [
    '   The shelf is empty.',
    '',
    '   Type a food that you have, such as: lentils',
    '   or paste a whole list, one food a line.',
  ]
}

function shelfName({ sample, columns }: State): string {
  if (!sample) return 'your shelf'
  return columns < 72 ? 'sample' : 'the sample shelf'
}

/** Said while nothing else is: what the sample is, or how much has been served of today. */
function standing({ sample, opening, columns }: State): string {
  if (!sample || opening) return ''
  const long =
    'A sample: the galley of a river survey boat. It is kept with your first change; 0 starts an empty shelf.'
  return columns > long.length + 2 ? long : 'A sample, kept with your first change; 0 starts an empty shelf.'
}

function keysOf(state: State, row: ShelfRow | undefined): readonly KeyName[] {
  if (state.prompt !== null) return PROMPT_KEYS
  if (state.opening) return [LEAVE_KEY]
  const sample: KeyName[] = state.sample && state.find === '' ? [['0', 'start empty']] : []
  const clear: KeyName[] = state.find === '' ? [] : [['Esc', 'clear']]
  const rest: KeyName[] = [...clear, ['<', 'undo'], ['/', 'order'], ['+', 'packet'], LEAVE_KEY]
  if (row === undefined) return [['Tab', 'bench'], ...sample, ...rest]
  if (row.kind === 'table') return [['Enter', 'add it'], ['=', 'look'], ...clear, ['Tab', 'bench'], LEAVE_KEY]
  return [
    ['Tab', 'bench'],
    ['Enter', 'amount'],
    ['!', 'use up'],
    ['.', 'hold back'],
    ['#', 'take off'],
    ['@', 'use by'],
    ['=', 'look'],
    ...sample,
    ...rest,
  ]
}

const MARKS = { 'use-up': 'use up', 'hold-back': 'hold back', '': '' } as const

/** What all rows of a list share. */
interface RowFrame {
  columns: number
  /** is there a column for use-by days? */
  dated: boolean
}

function rowLine(
  row: ShelfRow,
  under: boolean,
  { columns, dated }: RowFrame,
  state: State,
  knowledge: Knowledge,
): string {
  const food = row.food
  const sketch = food === null ? '' : sketchOf(food, state, knowledge)
  const amount = row.kind === 'here' ? grams(row.item.grams) : ''
  const avoided = food === null ? [] : food.allergens.filter(id => state.settings.without.includes(id))
  // What the cook leaves out is never proposed, and is marked wherever it is found.
  const mark =
    avoided.length > 0 ? `× ${avoided[0]}`.slice(0, 9) : row.kind === 'here' ? MARKS[row.item.mark] : ''
  const left = row.kind === 'here' ? daysText(row.item.useBy, knowledge.today) : ''
  const days = state.spoken && left !== '' ? `  use by: ${left}` : left
  const protein =
    food === null
      ? ''
      : row.kind === 'here'
        ? `${Math.round((row.item.grams / 100) * food.per100g.proteinG)} g protein`
        : `${food.per100g.proteinG.toFixed(1)} g / 100 g`
  const right = [
    padEnd(mark, 9),
    padStart(amount, 7),
    ...(dated ? [padEnd(days, 5)] : []),
    ...(columns < 72 || !showsNumbers(state.settings) ? [] : [padStart(protein, 14)]),
    sketch,
  ].join(' ')
  const name = food?.name ?? (row.kind === 'here' ? `${row.item.food} (not in the table)` : '')
  const room = Math.max(8, columns - widthOf(right) - 5)
  const clipped = clip(name, room)
  const matched = withMarks(clipped, row.matched)
  const filled = padEnd(
    (under ? STYLE.bold(matched) : matched) + aliasOf(row, state, room - widthOf(name)),
    room,
  )
  return `${under ? ' ▸ ' : '   '}${filled} ${right}`
}

/** Columns in which an alias is still known, with the gap before it. */
const ALIAS_AT_LEAST = 7

/** Behind the name, the alias that the find line met, where the name itself has nothing of it. */
function aliasOf({ food, matched }: ShelfRow, { find }: State, room: number): string {
  if (food === null || matched.length > 0 || find.trim() === '') return ''
  const alias = matchedAlias(food, find)
  return alias === null || room < ALIAS_AT_LEAST ? '' : STYLE.dim(clip(`  ${alias}`, room))
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

function sketchOf(food: Food, { settings, spoken }: State, { table }: Knowledge): string {
  let byPattern = sketches.get(food)
  if (byPattern === undefined) {
    byPattern = new Map()
    sketches.set(food, byPattern)
  }
  const key = `${settings.pattern} ${spoken}`
  let sketch = byPattern.get(key)
  if (sketch === undefined) {
    const staves = stavesOfPlate([{ food, grams: 100 }], scoreBasis(table, settings.pattern).pattern)
    sketch = staves === null ? ' '.repeat(STAVES.length) : spoken ? inWords(staves) : stavesSketch(staves)
    byPattern.set(key, sketch)
  }
  return sketch
}

/** The shortest stave alone, for a list that is listened to. */
function inWords(staves: Staves): string {
  const shortest = shortestStave(staves)
  return `  shortest ${STAVE_LABELS[shortest]} ${wholePercent(staves[shortest])}`
}
