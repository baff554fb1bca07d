import { readFileSync } from 'node:fs'
import { dataFile } from './data-file.ts'
import type { Food } from './food.ts'
import { LazyFoods } from './lazy-foods.ts'
import { FOODS_MARK, type Table, type TableFile, tableOf } from './table.ts'

/**
 * Reads the composition table that ships with the program: beside the bundle, or in data/ when run from source.
 * The build has checked every row, so nothing is checked again here (it would cost each one-shot command its start);
 * the foods stand a line each at the end of the file and are read when they are needed.
 */
export function loadTable(): Table {
  const text = readFileSync(dataFile('foods.json'), 'utf8')
  const at = text.indexOf(FOODS_MARK)
  const head = JSON.parse(`${text.slice(0, at)}}`) as Omit<TableFile, 'foods'>
  const lines = text.slice(at + FOODS_MARK.length, text.lastIndexOf('\n]')).split(',\n')
  const foodById = new LazyFoods(lines)
  let foods: readonly Food[] | undefined
  return {
    ...tableOf({ ...head, foods: [] }),
    foodById,
    get foods() {
      foods ??= [...foodById.values()].sort((a, b) => (a.id < b.id ? -1 : 1))
      return foods
    },
  }
}
