import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { FOODS_MARK, type TableFile } from '../foods/table.ts'
import { compileTable } from './compile/foods.ts'
import { readInputs } from './compile/inputs.ts'
import { compileKitchen, kitchenJson } from './compile/kitchen.ts'

/**
 * `npm run data`: compiles data/foods.json and data/kitchen.json from the npm datasets and data/curation. With
 * `--check` it writes nothing, and fails where the files are not to the byte what it would write.
 */
const SHOWN_AT_MOST = 50

/** data/foods.json: one row a line, so that a change shows as the rows that changed. */
export function tableJson(table: TableFile): string {
  const list = (rows: readonly unknown[]) => `[\n${rows.map(row => JSON.stringify(row)).join(',\n')}\n]`
  const { patterns, coefficients, sources, foods } = table
  return `{"patterns":${list(patterns)},\n"coefficients":${JSON.stringify(coefficients)},\n"sources":${list(sources)}${FOODS_MARK}${foods.map(food => JSON.stringify(food)).join(',\n')}\n]}\n`
}

function fail(lines: readonly string[]): never {
  for (const line of lines.slice(0, SHOWN_AT_MOST)) console.error(line)
  if (lines.length > SHOWN_AT_MOST) console.error(`and ${lines.length - SHOWN_AT_MOST} more`)
  process.exit(1)
}

/** The files that the build writes, and how many foods are in them. Throws, or ends with every problem in a line. */
function compileAll(): { outputs: [path: string, text: string][]; foodCount: number } {
  const { table, problems } = compileTable(readInputs())
  if (problems.length > 0) fail([...problems, `${problems.length} problems; the table is not written`])
  return {
    outputs: [
      ['data/foods.json', tableJson(table)],
      ['data/kitchen.json', kitchenJson(compileKitchen(table.foods))],
    ],
    foodCount: table.foods.length,
  }
}

function compiledOrFail() {
  try {
    return compileAll()
  } catch (error) {
    return fail([(error as Error).message])
  }
}

const { outputs, foodCount } = compiledOrFail()
const check = process.argv.includes('--check')
for (const [path, text] of outputs) {
  const file = new URL(`../../${path}`, import.meta.url)
  const before = existsSync(file) ? readFileSync(file, 'utf8') : ''
  if (check && before !== text)
    fail([`${path} is not what the build writes; run npm run data and commit the change`])
  if (!check) writeFileSync(file, text)
}
console.log(`${foodCount} foods ${check ? 'are what the build writes' : 'compiled'}`)
