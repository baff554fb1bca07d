import { plainText } from '../foods/plain-text.ts'
import { answer, type Command, type Outcome, Refusal, type World } from './command.ts'
import { COMMANDS, commandNames } from './commands.ts'

declare const PROGRAM_VERSION: string | undefined

/** What `shortstave --version` says. */
export const VERSION = typeof PROGRAM_VERSION === 'string' ? PROGRAM_VERSION : 'from source'

/**
 * Runs one command line (without node and the program's own name). Each command stands in a file of its own and is
 * loaded only when called, so that a one-shot command starts fast and the screens cost the others nothing.
 */
export async function runCommand(argv: string[], world: World): Promise<Outcome> {
  const [name, ...rest] = argv
  if (name === undefined) return (await COMMANDS.screens!()).run([], world)
  if (name === '--version' || name === '-V') return answer(`shortstave ${VERSION}\n`)
  if (name === '--help' || name === '-h' || name === 'help') {
    return rest[0] === undefined ? answer(await overview()) : answer(helpOf(await commandNamed(rest[0])))
  }
  const command = await commandNamed(name)
  const end = rest.indexOf('--')
  const before = end === -1 ? rest : rest.slice(0, end)
  if (before.includes('--help') || before.includes('-h')) return answer(helpOf(command))
  return command.run(rest, world)
}

async function commandNamed(name: string): Promise<Command> {
  const load = Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined
  if (load === undefined) {
    const said = plainText(name).slice(0, 40)
    throw new Refusal(`there is no command "${said}"; there are: ${commandNames.join(', ')}`)
  }
  return load()
}

function helpOf(command: Command): string {
  return `${command.summary}\n\nusage: shortstave ${command.help.trim()}\n`
}

async function overview(): Promise<string> {
  const commands = await Promise.all(commandNames.map(async name => (await COMMANDS[name]!()).summary))
  const width = Math.max(...commandNames.map(name => name.length))
  const rows = commandNames.map((name, i) => `  shortstave ${name.padEnd(width)}  ${commands[i]}`)
  return [
    'shortstave: from the foods on hand to a plant-based plate with its protein and the best protein quality',
    '',
    `  shortstave ${''.padEnd(width)}  the terminal screens: shelf, bench, plate`,
    ...rows,
    '',
    'Every command has --help and --json. Data goes to stdout, words to stderr.',
    'Exit codes: 0 done, 1 no answer possible (with the reason), 2 bad use (with the mend).',
    'Information for healthy people over three; not medical advice.',
    '',
  ].join('\n')
}
