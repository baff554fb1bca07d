import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { loadTable } from '../../src/foods/load.ts'
import { findBench } from './find-bench.ts'
import { pairBench } from './pair-bench.ts'
import { screensBench } from './screens-bench.ts'
import { startBench } from './start-bench.ts'

/**
 * `npm run bench`: every figure that the design asks for, in one run, as medians and ratios. `--quick` runs fewer
 * shelves and repetitions, to look at while working.
 */
const quick = process.argv.includes('--quick')
const program = new URL('../../dist/shortstave.js', import.meta.url).pathname
const home = mkdtempSync(join(tmpdir(), 'shortstave-bench-'))
const table = loadTable()

async function section(title: string, run: () => string[] | Promise<string[]>): Promise<void> {
  console.log(title)
  for (const line of await run()) console.log(`  ${line}`)
  console.log()
}

try {
  await section('find: a keystroke, over every typed prefix of the test queries', () => findBench(table))
  await section('pair: against the true optimum of the same problem (highs)', () =>
    pairBench(table, { quick }),
  )
  await section('one-shot commands: the whole process', () => startBench(program, home, quick ? 5 : 15))
  await section('screens: the first frame, keys and memory', () => screensBench(program, table, { quick }))
} finally {
  rmSync(home, { recursive: true, force: true })
}
