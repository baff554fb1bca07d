import { readFileSync } from 'node:fs'
import { type Table, type TableFile, tableOf } from './table.ts'

declare const BUNDLED_TABLE: string | undefined

/**
 * Reads the composition table that ships with the program: beside the bundle, or in data/ when run from source.
 * The build has checked every row, so nothing is checked again here (it would cost each one-shot command its start).
 */
export function loadTable(): Table {
  const path = typeof BUNDLED_TABLE === 'string' ? BUNDLED_TABLE : '../../data/foods.json'
  return tableOf(JSON.parse(readFileSync(new URL(path, import.meta.url), 'utf8')) as TableFile)
}
