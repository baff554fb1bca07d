import { readFileSync } from 'node:fs'
import { dataFile } from './data-file.ts'
import { type Table, type TableFile, tableOf } from './table.ts'

/**
 * Reads the composition table that ships with the program: beside the bundle, or in data/ when run from source.
 * The build has checked every row, so nothing is checked again here (it would cost each one-shot command its start).
 */
export function loadTable(): Table {
  return tableOf(JSON.parse(readFileSync(dataFile('foods.json'), 'utf8')) as TableFile)
}
