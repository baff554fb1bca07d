import { readFileSync } from 'node:fs'
import { parse } from 'csv-parse/sync'
import type { z } from 'zod'
import type { Food } from '../../foods/food.ts'
import {
  cautionTextSchema,
  conditionTextSchema,
  type KitchenFile,
  kitchenFileSchema,
  storageTextSchema,
} from '../../kitchen/kitchen-file.ts'
import { compileCooking } from './cooking.ts'
import { compileYields } from './yields.ts'

/** The rows of a CSV as the compiler takes them: text by column, and the line in the file for messages. */
type Row = Record<string, string>

const curation = new URL('../../../data/curation/', import.meta.url)

/** A curation file of the kitchen, by name without ending. */
export type ReadRows = (name: string) => Row[]

export const readCurationRows: ReadRows = name =>
  parse(readFileSync(new URL(`${name}.csv`, curation)), { columns: true, skip_empty_lines: true, bom: true })

/** What data/kitchen.json holds, from the curation files and the compiled foods. Throws with file and row on a bad row. */
export function compileKitchen(foods: readonly Food[], rows: ReadRows = readCurationRows): KitchenFile {
  const kitchen: KitchenFile = {
    cautions: each('cautions', rows, cautionTextSchema, row => ({
      id: row.id,
      weight: Number(row.weight),
      weightBoxed: numberOrNull(row.weight_boxed),
      covers: words(row.covers),
      text: row.text,
      source: row.source,
      provenance: row.provenance,
    })),
    conditions: each('conditions', rows, conditionTextSchema, row => ({
      id: row.id,
      words: row.words,
      refusesPlanning: row.refuses_planning === 'yes',
      bodyMassTargets: row.body_mass_targets === 'yes',
      numbers: row.numbers === 'yes',
      text: row.text,
      source: row.source,
      provenance: row.provenance,
    })),
    yields: compileYields(foods, rows('yields')),
    ...compileCooking(foods, rows('cooking')),
    storage: each('storage', rows, storageTextSchema, row => row),
  }
  refuseUnknownCautions(foods, kitchen)
  return kitchenFileSchema.parse(kitchen)
}

/** data/kitchen.json: one row a line, so that a change shows as the rows that changed. */
export function kitchenJson(kitchen: KitchenFile): string {
  const parts = Object.entries(kitchen).map(([name, part]) => {
    const lines: string[] = Array.isArray(part)
      ? part.map(row => JSON.stringify(row))
      : Object.entries(part).map(([key, value]) => `${JSON.stringify(key)}:${JSON.stringify(value)}`)
    const [open, close] = Array.isArray(part) ? '[]' : '{}'
    return `"${name}":${open}\n${lines.join(',\n')}\n${close}`
  })
  return `{${parts.join(',\n')}}\n`
}

function each<T>(name: string, rows: ReadRows, schema: z.ZodType<T>, shape: (row: Row) => unknown): T[] {
  const seen = new Set<string>()
  return rows(name).map((row, i) => {
    const where = `data/curation/${name}.csv, row ${i + 2} (${row.id})`
    if (seen.has(row.id ?? '')) throw new Error(`${where}: the id stands twice`)
    seen.add(row.id ?? '')
    const parsed = schema.safeParse(shape(row))
    if (parsed.success) return parsed.data
    const [issue] = parsed.error.issues
    throw new Error(`${where}: ${issue?.path.join('.')}: ${issue?.message}`)
  })
}

const words = (text = ''): string[] => text.split(' ').filter(word => word !== '')
const numberOrNull = (text = ''): number | null => (text.trim() === '' ? null : Number(text))

function refuseUnknownCautions(foods: readonly Food[], { cautions }: KitchenFile): void {
  const known = new Set(cautions.map(({ id }) => id))
  for (const food of foods) {
    for (const id of food.cautions) {
      if (!known.has(id))
        throw new Error(`food ${food.id}: caution "${id}" is not in data/curation/cautions.csv`)
    }
  }
}
