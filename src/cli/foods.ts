import { stringify } from 'csv-stringify/sync'
import { wholeScore } from '../tui/text/figures.ts'
import { inColumns } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { answer, type Command, jsonText, Refusal } from './command.ts'
import { foodJson } from './json/food-json.ts'
import { readPattern } from './options.ts'

export const foods: Command = {
  name: 'foods',
  summary: 'the whole table: a list, or all of it as JSON or CSV',
  help: `
foods [--json | --csv] [--pattern ID]

  shortstave foods --csv > foods.csv

Without an option: one line a food. --json and --csv give every figure of every food.`,
  async run(argv, world) {
    const { options, words } = readArguments('foods', { json: 'flag', csv: 'flag', pattern: 'text' }, argv)
    if (words.length > 0)
      throw new Refusal('foods lists them all and takes no words; to look one up: shortstave find WORDS')
    if (options.json && options.csv) throw new Refusal('choose one of --json and --csv')
    const table = world.table()
    const pattern = readPattern(table, options.pattern)
    const rows = table.foods.map(food => foodJson(food, pattern))
    if (options.json) return answer(jsonText(rows))
    if (options.csv) return answer(stringify(rows.map(flat), { header: true }))
    const lines = rows.map(row => [
      row.id,
      row.name,
      `${row.per_100g.protein_g!.toFixed(1)} g / 100 g`,
      row.diaas === null ? '' : `DIAAS ${wholeScore(row.diaas)}`,
      row.limiting ?? '',
    ])
    return answer(`${inColumns(lines, [2]).join('\n')}\n`)
  },
}

/** One level of columns: `per_100g.protein_g`; lists joined with a bar. */
function flat(row: ReturnType<typeof foodJson>): Record<string, string | number | null> {
  const cells: Record<string, string | number | null> = {}
  for (const [key, value] of Object.entries(row)) {
    if (Array.isArray(value)) {
      cells[key] = value
        .map(item => (typeof item === 'string' ? item : `${item.name} = ${item.grams} g`))
        .join(' | ')
    } else if (value !== null && typeof value === 'object') {
      for (const [inner, figure] of Object.entries(value)) cells[`${key}.${inner}`] = figure
    } else {
      cells[key] = value
    }
  }
  return cells
}
