import { parse } from 'csv-parse/sync'
import { stringify } from 'csv-stringify/sync'
import { plainText } from '../foods/plain-text.ts'
import { isDay, MARKS } from './marks.ts'
import type { Shelf, ShelfItem } from './shelf.ts'

/** What is wrong with a line of a shelf file: the line (from 1), what it says, and the mend. */
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

interface ReadShelf {
  shelf: Shelf
  problems: ShelfFileProblem[]
}

/**
 * Reads a shelf file: CSV with a header `food,grams[,mark][,use_by][,note]` in any order (comma, semicolon or tab;
 * a BOM, CRLF and quotes are fine, and so is a decimal comma where the separator is another), or the JSON that
 * `writeShelfJson` writes. A food is an id, or words that `resolve` understands. A food that stands twice is added up.
 * Never throws; lines that are not understood are in `problems`, the others on the shelf.
 */
export function readShelfFile(text: string, resolve: Resolve): ReadShelf {
  if (text.length > SHELF_FILE_AT_MOST_BYTES) {
    return failed(1, '', `the file is larger than ${SHELF_FILE_AT_MOST_BYTES / 1e6} MB, which no shelf is`)
  }
  const body = text.replace(/^\ufeff/, '')
  if (body.trim() === '')
    return failed(1, '', 'the file is empty; it needs the header food,grams and a line a food')
  if (body.includes('\u0000'))
    return failed(1, '', 'this is no text file; give CSV or the JSON of shelf export')
  return /^\s*[[{]/.test(body) ? readJson(body, resolve) : readCsv(body, resolve)
}

function failed(line: number, text: string, problem: string): ReadShelf {
  return { shelf: { items: [] }, problems: [{ line, text: shown(text), problem }] }
}

const shown = (text: string): string => plainText(text).slice(0, 80)

function readCsv(body: string, resolve: Resolve): ReadShelf {
  const firstLine = body.slice(0, body.search(/[\r\n]|$/))
  const delimiter = [';', '\t', ','].find(mark => firstLine.includes(mark)) ?? ','
  const header = firstLine.split(delimiter).map(cell => keyOf(cell))
  for (const column of ['food', 'grams']) {
    const times = header.filter(key => key === column).length
    if (times === 0)
      return failed(
        1,
        firstLine,
        `the header has no column "${column}"; it is food,grams[,mark][,use_by][,note]`,
      )
    if (times > 1) return failed(1, firstLine, `the header has two columns "${column}"; keep one`)
  }
  if (body.split(/\r\n|\r|\n/, LINES_AT_MOST + 1).length > LINES_AT_MOST) {
    return failed(1, '', `the file has more than ${LINES_AT_MOST} lines, which no shelf has`)
  }
  let records: { record: string[]; info: { lines: number } }[]
  try {
    records = parse(body, {
      delimiter,
      relax_column_count: true,
      relax_quotes: true,
      skip_empty_lines: true,
      record_delimiter: ['\r\n', '\n', '\r'],
      info: true,
    }) as unknown as typeof records
  } catch (error) {
    const { lines = 1 } = error as { lines?: number }
    return failed(lines, '', 'a quote is opened and never closed; close it, or take it away')
  }
  const reader = new Reader(resolve)
  for (const { record, info } of records.slice(1)) {
    const cell = (column: string): string => {
      const at = header.indexOf(column)
      return at === -1 ? '' : (record[at] ?? '').trim()
    }
    if (record.every(value => value.trim() === '')) continue
    const grams = delimiter === ',' ? cell('grams') : cell('grams').replace(',', '.')
    reader.take(info.lines, record.join(delimiter), {
      food: cell('food'),
      grams,
      mark: cell('mark'),
      useBy: cell('use_by'),
      note: cell('note'),
    })
  }
  return reader.done(1, 'the file has a header but no food; add a line such as lentils-red-dry,500')
}

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
  if (file?.shortstave !== 'shelf' || file.version !== 1 || !Array.isArray(file.items))
    return failed(1, '', 'this JSON is no shelf; give what shelf export --json writes')
  const reader = new Reader(resolve)
  file.items.forEach((item: unknown, i) => {
    const text = (key: string): string => {
      const cell =
        typeof item === 'object' && item !== null ? (item as Record<string, unknown>)[key] : undefined
      return typeof cell === 'string' || typeof cell === 'number' ? String(cell) : ''
    }
    reader.take(i + 1, JSON.stringify(item) ?? '', {
      food: text('food'),
      grams: text('grams'),
      mark: text('mark'),
      useBy: text('use_by'),
      note: text('note'),
    })
  })
  return reader.done(1, 'the shelf in this file is empty')
}

interface Cells {
  food: string
  grams: string
  mark: string
  useBy: string
  note: string
}

/** Collects items and problems line by line. */
class Reader {
  private readonly items = new Map<string, ShelfItem>()
  private readonly problems: ShelfFileProblem[] = []
  private readonly resolve: Resolve

  constructor(resolve: Resolve) {
    this.resolve = resolve
  }

  take(line: number, text: string, cells: Cells): void {
    const item = this.itemOf(cells)
    if (typeof item === 'string') {
      this.problems.push({ line, text: shown(text), problem: item })
      return
    }
    const before = this.items.get(item.food)
    this.items.set(
      item.food,
      before === undefined ? item : { ...item, grams: Math.min(1_000_000, before.grams + item.grams) },
    )
  }

  /** The item, or what is wrong with it. */
  private itemOf({ food, grams, mark, useBy, note }: Cells): ShelfItem | string {
    if (food === '') return 'there is no food in this line'
    const amount = /^\d+(\.\d+)?(e\+?\d+)?$/i.test(grams) ? Number(grams) : Number.NaN
    if (!(amount > 0 && amount <= 1_000_000)) {
      return `grams are "${shown(grams)}"; give a number above 0 and at most 1000000`
    }
    const spelled = keyOf(mark).replace(/_/g, '-')
    const marked = MARKS.find(known => known === spelled)
    if (marked === undefined) return `mark is "${shown(mark)}"; leave it empty, or give use-up or hold-back`
    if (useBy !== '' && !isDay(useBy)) return `use_by is "${shown(useBy)}"; give a day such as 2026-12-31`
    const found = this.resolve(food)
    if (!found.ok) return found.problem
    return {
      food: found.food.id,
      grams: amount,
      mark: marked,
      useBy: useBy === '' ? null : useBy,
      note: plainText(note).slice(0, 500),
    }
  }

  done(line: number, whenEmpty: string): ReadShelf {
    if (this.items.size === 0 && this.problems.length === 0) return failed(line, '', whenEmpty)
    return { shelf: { items: [...this.items.values()] }, problems: this.problems }
  }
}

/** The shelf as CSV; `readShelfFile` gives the same shelf back. */
export function writeShelfCsv({ items }: Shelf): string {
  return stringify(
    items.map(({ food, grams, mark, useBy, note }) => [food, grams, mark, useBy ?? '', note]),
    { header: true, columns: ['food', 'grams', 'mark', 'use_by', 'note'], quoted_match: /^\s|\s$/ },
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
