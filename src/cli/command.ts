import type { Finder } from '../foods/search.ts'
import type { Table } from '../foods/table.ts'

/** Exit codes: done; no answer possible (the reason is said); bad use (one line: what is wrong, and the mend). */
export const DONE = 0
export const NO_ANSWER = 1
export const BAD_USE = 2
export type ExitCode = typeof DONE | typeof NO_ANSWER | typeof BAD_USE

/** What a command answers: data for stdout, words for stderr, and the exit code. Texts end with a newline or are empty. */
export interface Outcome {
  code: ExitCode
  out: string
  err: string
}

/** What a command may ask of the world around it; everything else that it does is pure. */
export interface World {
  env: Readonly<Record<string, string | undefined>>
  /** columns to write for, also when stdout is no terminal */
  columns: number
  colour: boolean
  /** stdin and stdout are both a terminal */
  interactive: boolean
  now(): Date
  /** whole of standard input as text */
  readStdin(): Promise<string>
  /** a file's text; throws a Refusal in plain words */
  readFile(path: string): Promise<string>
  writeFile(path: string, text: string): Promise<void>
  table(): Table
  finder(): Finder
}

/** One command of the program. */
export interface Command {
  name: string
  /** one line for the list of commands */
  summary: string
  /** the whole help text, after `usage: shortstave ` */
  help: string
  run(argv: string[], world: World): Promise<Outcome>
}

/** A refusal in one plain line, thrown by commands and caught where the program starts. */
export class Refusal extends Error {
  readonly code: ExitCode
  constructor(message: string, code: ExitCode = BAD_USE) {
    super(message)
    this.code = code
  }
}

/** An answer on stdout. */
export function answer(out: string, err = ''): Outcome {
  return { code: DONE, out, err }
}

/** A value as JSON, indented, one trailing newline. */
export function jsonText(value: unknown): string {
  return `${JSON.stringify(value, null, 2)}\n`
}
