import { parse } from 'csv-parse/sync'
import type { Problems } from './problems.ts'

/** A row of a curation file: text by column, and where it stands, for messages. */
export interface Row {
  where: string
  text: Record<string, string>
}

/** The rows of a CSV text whose first line is the header. `file` names it in messages. Throws where it is no CSV. */
export function rowsOf(csv: string, file: string): Row[] {
  let records: Record<string, string>[]
  try {
    records = parse(csv, { columns: true, skip_empty_lines: true, bom: true, trim: true })
  } catch (error) {
    throw new Error(`${file}: ${(error as Error).message}; mend the commas and quotes of that line`)
  }
  return records.map((text, i) => ({ where: `${file}, row ${i + 2}`, text }))
}

/** A number, or null for an empty cell; anything else is a problem. */
export function numberOf(row: Row, column: string, problems: Problems): number | null {
  const cell = row.text[column] ?? ''
  if (cell === '') return null
  const value = Number(cell)
  if (Number.isFinite(value)) return value
  problems.add(row.where, `${column} is "${cell}"; give a number`)
  return null
}

/** The items of a cell, separated by a bar. */
export function listOf(row: Row, column: string): string[] {
  return (row.text[column] ?? '')
    .split('|')
    .map(item => item.trim())
    .filter(item => item !== '')
}

/** Rows by a column's value; a value that stands twice is a problem. */
export function indexRows(rows: readonly Row[], column: string, problems: Problems): Map<string, Row> {
  const index = new Map<string, Row>()
  for (const row of rows) {
    const key = row.text[column] ?? ''
    const earlier = index.get(key)
    if (earlier !== undefined)
      problems.add(row.where, `${column} "${key}" stands already in ${earlier.where}; remove one`)
    else index.set(key, row)
  }
  return index
}
