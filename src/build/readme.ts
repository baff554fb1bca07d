import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { loadTable } from '../foods/load.ts'
import { createFinder, foodByWords } from '../foods/search.ts'
import { findPairings } from '../pairing/find-pairings.ts'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import { readShelfFile } from '../shelf/import-export.ts'
import { problemOf } from '../tui/problem-of.ts'
import { firstState, type Knowledge, type State } from '../tui/state.ts'
import { withoutStyles } from '../tui/text/width.ts'
import { update } from '../tui/update.ts'
import { view } from '../tui/view.ts'

/**
 * `npm run readme`: puts what the program really prints into README.md, so that its examples and screens cannot
 * drift. A block follows a mark: `<!-- run: ARGUMENTS -->` for a command, `<!-- screen: NAME -->` for a screen; an
 * optional `| head N` keeps the first lines. With `--check` nothing is written, and a README that has drifted fails.
 */
const root = new URL('../../', import.meta.url)
const at = (path: string) => new URL(path, root).pathname

/** The words of a command line, with double quotes as a shell has them. */
const wordsOf = (line: string): string[] =>
  [...line.matchAll(/"([^"]*)"|(\S+)/g)].map(match => match[1] ?? match[2]!)

function runOf(line: string): string {
  const home = mkdtempSync(join(tmpdir(), 'shortstave-readme-'))
  try {
    const { stdout } = spawnSync(process.execPath, [at('dist/shortstave.js'), ...wordsOf(line)], {
      env: { PATH: process.env.PATH, HOME: home, SHORTSTAVE_HOME: home, COLUMNS: '80' },
      encoding: 'utf8',
    })
    return stdout.trimEnd()
  } finally {
    rmSync(home, { recursive: true, force: true })
  }
}

/** A screen of the program on the sample shelf at 80 by 24, after some keys. */
function screenOf(name: string): string {
  const table = loadTable()
  const finder = createFinder(table.foods)
  const knowledge: Knowledge = { table, finder, today: '2026-06-01', colour: false }
  const { shelf } = readShelfFile(readFileSync(at('data/sample-shelf.csv'), 'utf8'), words =>
    foodByWords(words, finder),
  )
  let state: State = firstState({
    columns: 80,
    rows: 24,
    shelf,
    sample: true,
    settings: DEFAULT_SETTINGS,
    spoken: false,
    message: '',
  })
  const answer = findPairings(problemOf(state, knowledge))
  state = update(state, { event: 'paired', question: state.question, answer }, knowledge).state
  const threeFoods = Math.max(
    0,
    answer.pairings.findIndex(({ portions }) => portions.length === 3),
  )
  const keys: Record<string, string[]> = {
    shelf: [],
    bench: ['tab', 'w'],
    plate: ['tab', ...Array<string>(threeFoods).fill('down'), 'enter'],
  }
  for (const key of keys[name] ?? []) {
    const event = key.length === 1 ? ({ key: 'text', text: key } as const) : ({ key: key as 'tab' } as const)
    state = update(state, { event: 'key', key: event }, knowledge).state
  }
  const lines = view(state, knowledge)
  return lines
    .map(line => withoutStyles(line).trimEnd())
    .join('\n')
    .trimEnd()
}

const headOf = (text: string, count: string | undefined): string =>
  count === undefined ? text : `${text.split('\n').slice(0, Number(count)).join('\n').trimEnd()}\n...`

const before = readFileSync(at('README.md'), 'utf8')
const after = before.replace(
  /(<!-- (run|screen): (.*?)(?: \| head (\d+))? -->\n)```text\n[\s\S]*?```/g,
  (_, mark: string, kind: string, what: string, count: string | undefined) => {
    const shown = kind === 'run' ? `$ shortstave ${what}\n${runOf(what)}` : screenOf(what)
    return `${mark}\`\`\`text\n${headOf(shown, count)}\n\`\`\``
  },
)
if (process.argv.includes('--check')) {
  if (before !== after) {
    console.error(
      'README.md shows what the program no longer prints; run npm run readme and commit the change',
    )
    process.exit(1)
  }
  console.log('README.md shows what the program prints')
} else {
  writeFileSync(at('README.md'), after)
}
