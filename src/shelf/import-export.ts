import { parse } from 'csv-parse/sync'
import { stringify } from 'csv-stringify/sync'
import { plainText } from '../foods/plain-text.ts'
import { readGramsCell } from './grams-cell.ts'
import { isDay, MARKS } from './marks.ts'
import type { Shelf, ShelfItem } from './shelf.ts'

/** What is to be said of a line of a shelf file: the line (from 1), its text, and what is wrong with the mend. */
export interface ShelfFileProblem {
  line: number
  text: string
  problem: string
}

/** What a food's words were taken for, or why they were not. */
export type Resolve = (words: string) => { ok: true; food: { id: string } } | { ok: false; problem: string }

/** The largest file that is read: far more than any shelf. */
export const SHELF_FILE_AT_MOST_BYTES = 5_000_000
const LINES_AT_MOST = 10_000
/** Looking up words takes time; a file with more lines that are not understood is no shelf. */
const PROBLEMS_AT_MOST = 100
const FOOD_WORDS_AT_MOST = 200
/** As the schema of a shelf has them, which this file does without so that one-shot commands start at once. */
const GRAMS_AT_MOST = 1_000_000
const NOTE_AT_MOST = 500

const COLUMNS = ['food', 'grams', 'mark', 'use_by', 'note'] as const
const HEADER = 'food,grams[,mark][,use_by][,note]'

export interface ReadShelf {
  shelf: Shelf
  /** lines that are not on the shelf, and why */
  problems: ShelfFileProblem[]
  /** what was understood in a way that the cook should know of: a food that stood twice, a column passed over */
  told: ShelfFileProblem[]
}

/**
 * Reads a shelf file: CSV with a header `food,grams[,mark][,use_by][,note]` in any order (comma, semicolon or tab;
 * a BOM, CRLF, quotes and blank lines are fine, and so is a decimal comma where the separator is another), or the JSON
 * that `writeShelfJson` writes. A food is an id, or words that `resolve` understands. A food that stands twice is
 * added up. Never throws; lines that are not understood are in `problems`, the others on the shelf.
 */
export function readShelfFile(text: string, resolve: Resolve): ReadShelf {
  if (text.length > SHELF_FILE_AT_MOST_BYTES) {
    return failed(1, '', `the file is larger than ${SHELF_FILE_AT_MOST_BYTES / 1e6} MB, which no shelf is`)
  }
  const body = text.replace(/^\ufeff/, '')
  if (body.trim() === '')
    return failed(1, '', 'the file is empty; it needs the header food,grams and a line a food')
  if (body.includes('\u0000')) {
    return failed(1, '', 'this is no text in UTF-8; give CSV or the JSON of shelf export')
  }
  return /^\s*[[{]/.test(body) ? readJson(body, resolve) : readCsv(body, resolve)
}

function failed(line: number, text: string, problem: string): ReadShelf {
  return { shelf: { items: [] }, problems: [{ line, text: shown(text), problem }], told: [] }
}

const shown = (text: string): string => plainText(text.slice(0, 500)).replace(/\s+/g, ' ').trim().slice(0, 80)

function readCsv(body: string, resolve: Resolve): ReadShelf {
  const { above, table } = fromHeader(body)
  const firstLine = table.slice(0, table.search(/[\r\n]|$/))
  const delimiter = [';', '\t', ','].find(mark => firstLine.includes(mark)) ?? ','
  const header = firstLine.split(delimiter, 1000).map(cell => keyOf(cell))
  for (const column of COLUMNS) {
    const times = header.filter(key => key === column).length
    if (times === 0 && (column === 'food' || column === 'grams')) {
      return failed(above + 1, firstLine, `the header has no column "${column}"; it is ${HEADER}`)
    }
    if (times > 1) return failed(above + 1, firstLine, `the header has two columns "${column}"; keep one`)
  }
  if (linesOf(table, LINES_AT_MOST + 1).length > LINES_AT_MOST) {
    return failed(1, '', `the file has more than ${LINES_AT_MOST} lines, which no shelf has`)
  }
  let records: { record: string[]; info: { lines: number } }[]
  try {
    records = parse(table, {
      delimiter,
      relax_column_count: true,
      relax_quotes: true,
      skip_empty_lines: true,
      record_delimiter: ['\r\n', '\n', '\r'],
      info: true,
    }) as unknown as typeof records
  } catch (error) {
    const { lines = 1 } = error as { lines?: number }
    return failed(above + lines, '', 'a quote is opened and never closed; close it, or take it away')
  }
  const reader = new Reader(resolve)
  const unknown = header.filter(key => key !== '' && !COLUMNS.some(column => column === key))
  if (unknown.length > 0) {
    reader.tell(
      above + 1,
      firstLine,
      `passed over, because it is no column of a shelf: ${shown(unknown.join(', '))}; the header is ${HEADER}`,
    )
  }
  for (const { record, info } of records.slice(1)) {
    if (record.every(value => value.trim() === '')) continue
    const cell = (column: (typeof COLUMNS)[number]): string => {
      const at = header.indexOf(column)
      return at === -1 ? '' : (record[at] ?? '').trim()
    }
    const more = record.slice(header.length).some(value => value.trim() !== '')
    reader.take(
      above + info.lines,
      record.join(delimiter),
      more
        ? 'there are more cells than the header has; put quotes around a cell that has a comma in it'
        : {
            food: cell('food'),
            grams: cell('grams'),
            decimalComma: delimiter !== ',',
            mark: cell('mark'),
            useBy: cell('use_by'),
            note: cell('note'),
          },
    )
    if (reader.full) break
  }
  return reader.done('the file has a header but no food; add a line such as lentils-red-dry,500')
}

/** The table from its header on; above it there may be blank lines, and the one by which a spreadsheet names its separator. */
function fromHeader(body: string): { above: number; table: string } {
  let above = 0
  let from = 0
  for (const { 0: line, index } of body.matchAll(/[^\r\n]*(?:\r\n|\r|\n)/gy)) {
    if (line.trim() !== '' && !/^sep=.\s*$/i.test(line.slice(0, 10))) break
    above++
    from = index + line.length
  }
  return { above, table: body.slice(from) }
}

const linesOf = (text: string, atMost?: number): string[] => text.split(/\r\n|\r|\n/, atMost)

/** ` Use by ` and `use-by` are use_by; quotes around a heading don't count. */
const keyOf = (heading: string): string =>
  heading
    .trim()
    .replace(/^"|"$/g, '')
    .trim()
    .toLowerCase()
    .replace(/[\s-]+/g, '_')

function readJson(body: string, resolve: Resolve): ReadShelf {
  let value: unknown
  try {
    value = JSON.parse(body)
  } catch {
    return failed(1, '', 'the JSON is broken; export the shelf again')
  }
  const file = (typeof value === 'object' ? value : null) as Record<string, unknown> | null
  if (file?.shortstave === 'shelf' && typeof file.version === 'number' && file.version > 1) {
    return failed(1, '', 'this shelf was written by a newer shortstave; import it with that one')
  }
  if (file?.shortstave !== 'shelf' || file.version !== 1 || !Array.isArray(file.items)) {
    return failed(1, '', 'this JSON is no shelf; give what shelf export --json writes')
  }
  if (file.items.length > LINES_AT_MOST) {
    return failed(1, '', `the file has more than ${LINES_AT_MOST} foods, which no shelf has`)
  }
  const reader = new Reader(resolve)
  for (const [i, item] of (file.items as unknown[]).entries()) {
    const text = (key: string): string => {
      const cell =
        typeof item === 'object' && item !== null ? (item as Record<string, unknown>)[key] : undefined
      return typeof cell === 'string' || typeof cell === 'number' ? String(cell).trim() : ''
    }
    reader.take(i + 1, JSON.stringify(item), {
      food: text('food'),
      grams: text('grams'),
      decimalComma: false,
      mark: text('mark'),
      useBy: text('use_by'),
      note: text('note'),
    })
    if (reader.full) break
  }
  return reader.done('the shelf in this file is empty')
}

interface Cells {
  food: string
  grams: string
  decimalComma: boolean
  mark: string
  useBy: string
  note: string
}

/** Collects items and problems line by line. */
class Reader {
  private readonly items = new Map<string, { item: ShelfItem; line: number }>()
  private readonly problems: ShelfFileProblem[] = []
  private readonly told: ShelfFileProblem[] = []
  private readonly resolve: Resolve

  constructor(resolve: Resolve) {
    this.resolve = resolve
  }

  get full(): boolean {
    return this.problems.length >= PROBLEMS_AT_MOST
  }

  tell(line: number, text: string, problem: string): void {
    this.told.push({ line, text: shown(text), problem })
  }

  /** Takes a line's cells, or what is wrong with the line. */
  take(line: number, text: string, cells: Cells | string): void {
    const item = typeof cells === 'string' ? cells : this.itemOf(cells)
    if (typeof item === 'string') {
      this.problems.push({ line, text: shown(text), problem: item })
      return
    }
    const before = this.items.get(item.food)
    if (before === undefined) {
      this.items.set(item.food, { item, line })
      return
    }
    const sum = addedUp(before.item, item)
    if (typeof sum === 'string') {
      this.problems.push({ line, text: shown(text), problem: sum })
      return
    }
    this.items.set(item.food, { item: sum, line: before.line })
    this.tell(line, text, `${item.food} stands in line ${before.line} too; together they are ${sum.grams} g`)
  }

  /** The item, or what is wrong with it. */
  private itemOf({ food, grams, decimalComma, mark, useBy, note }: Cells): ShelfItem | string {
    if (food === '') return 'there is no food in this line'
    if (food.length > FOOD_WORDS_AT_MOST) return 'this is too long for the name of a food'
    if (grams === '') return 'there are no grams in this line'
    const amount = readGramsCell(grams, decimalComma)
    if (amount === null || !(amount > 0 && amount <= GRAMS_AT_MOST)) {
      return `grams are "${shown(grams)}"; give a number above 0 and at most ${GRAMS_AT_MOST}, such as 1500 or 12.5`
    }
    const spelled = keyOf(mark).replace(/_/g, '-')
    const marked = MARKS.find(known => known === spelled)
    if (marked === undefined) return `mark is "${shown(mark)}"; leave it empty, or give use-up or hold-back`
    if (useBy !== '' && !isDay(useBy)) return `use_by is "${shown(useBy)}"; give a day such as 2026-12-31`
    const plainNote = plainText(note).trim()
    if (plainNote.length > NOTE_AT_MOST)
      return `the note is longer than ${NOTE_AT_MOST} characters; shorten it`
    const found = this.resolve(food)
    if (!found.ok) return found.problem
    return {
      food: found.food.id,
      grams: amount,
      mark: marked,
      useBy: useBy === '' ? null : useBy,
      note: plainNote,
    }
  }

  done(whenEmpty: string): ReadShelf {
    if (this.items.size === 0 && this.problems.length === 0) return failed(1, '', whenEmpty)
    return {
      shelf: { items: [...this.items.values()].map(({ item }) => item) },
      problems: this.full
        ? [
            ...this.problems,
            { line: this.problems.at(-1)!.line, text: '', problem: 'the rest of the file is not read' },
          ]
        : this.problems,
      told: this.told,
    }
  }
}

/** One food from two lines: grams added, nothing of either lost; or why that cannot be. */
function addedUp(a: ShelfItem, b: ShelfItem): ShelfItem | string {
  const grams = Number((a.grams + b.grams).toPrecision(12))
  if (grams > GRAMS_AT_MOST) return `with another line this is more than ${GRAMS_AT_MOST} g; check the grams`
  if (a.mark !== '' && b.mark !== '' && a.mark !== b.mark) {
    return `another line marks this food ${a.mark}, this one ${b.mark}; keep one of them`
  }
  const note = [...new Set([a.note, b.note])].filter(line => line !== '').join('; ')
  if (note.length > NOTE_AT_MOST)
    return `with another line's the note is longer than ${NOTE_AT_MOST} characters`
  const [useBy = null] = [a.useBy, b.useBy].filter(day => day !== null).sort()
  return { food: a.food, grams, mark: a.mark || b.mark, useBy, note }
}

/**
 * The shelf as CSV; `readShelfFile` gives the same shelf back. Cells are written as they are, also where a spreadsheet
 * would take them for a formula: the file is for this program first, and nothing may be lost in it.
 */
export function writeShelfCsv({ items }: Shelf): string {
  return stringify(
    items.map(({ food, grams, mark, useBy, note }) => [food, grams, mark, useBy ?? '', note]),
    { header: true, columns: [...COLUMNS] },
  )
}

/**
 * The shelf as JSON; `readShelfFile` gives the same shelf back. Foods from packets go along under `own_foods`, for
 * whoever imports them to check.
 */
export function writeShelfJson({ items }: Shelf, ownFoods: readonly unknown[] = []): string {
  const rows = items.map(({ food, grams, mark, useBy, note }) => ({
    food,
    grams,
    mark,
    use_by: useBy ?? '',
    note,
  }))
  const own = ownFoods.length === 0 ? {} : { own_foods: ownFoods }
  return `${JSON.stringify({ shortstave: 'shelf', version: 1, items: rows, ...own }, null, 2)}\n`
}
