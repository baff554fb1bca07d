import { Refusal, type World } from '../../src/cli/command.ts'
import { runCommand } from '../../src/cli/run-command.ts'
import { loadTable } from '../../src/foods/load.ts'
import { plainText } from '../../src/foods/plain-text.ts'
import { createFinder } from '../../src/foods/search.ts'

const table = loadTable()
const finder = createFinder(table.foods)

/** A world without a process: files and standard input as given, 80 columns, no colour, a fixed day. */
export function fakeWorld(
  given: { files?: Record<string, string>; stdin?: string; colour?: boolean; home?: string } = {},
): World {
  const files = given.files ?? {}
  return {
    env: { SHORTSTAVE_HOME: given.home ?? '/nonexistent/shortstave' },
    columns: 80,
    colour: given.colour ?? false,
    interactive: false,
    now: () => new Date('2026-06-01T12:00:00Z'),
    readStdin: async () => given.stdin ?? '',
    readFile: async path => {
      const text = files[path]
      if (text === undefined) throw new Refusal(`${plainText(path)}: there is no such file`)
      return text
    },
    writeFile: async (path, text) => {
      files[path] = text
    },
    table: () => table,
    finder: () => finder,
  }
}

export interface Ran {
  code: number
  out: string
  err: string
}

/** Runs a command line in this process; a Refusal becomes what the program would print and exit with. */
export async function ran(argv: string[], given: Parameters<typeof fakeWorld>[0] = {}): Promise<Ran> {
  try {
    return await runCommand(argv, fakeWorld(given))
  } catch (error) {
    if (!(error instanceof Refusal)) throw error
    return { code: error.code, out: '', err: `shortstave: ${error.message}\n` }
  }
}
