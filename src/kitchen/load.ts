import { readFileSync } from 'node:fs'
import { dataFile } from '../foods/data-file.ts'
import type { KitchenFile } from './kitchen-file.ts'

let kitchen: KitchenFile | undefined

/**
 * The kitchen's data, read once, when a command first needs it: beside the bundle, or in data/ when run from source.
 * The build has checked every row.
 */
export function loadKitchen(): KitchenFile {
  kitchen ??= JSON.parse(readFileSync(dataFile('kitchen.json'), 'utf8')) as KitchenFile
  return kitchen
}
