import { parseArgs } from 'node:util'
import { plainText } from '../foods/plain-text.ts'
import { Refusal } from './command.ts'

/** The options of a command: `text` takes a value, `texts` a value each time it is given, `flag` none. */
export type OptionKinds = Record<string, 'text' | 'texts' | 'flag'>

export type OptionValues<K extends OptionKinds> = {
  [name in keyof K]: K[name] extends 'flag'
    ? boolean
    : K[name] extends 'texts'
      ? string[]
      : string | undefined
}

export interface Arguments<K extends OptionKinds> {
  options: OptionValues<K>
  words: string[]
}

/**
 * Reads a command's arguments. Every command also has `--json` and `--help`; unknown options, missing and
 * superfluous values are refused in one line that names the nearest option.
 */
export function readArguments<K extends OptionKinds>(
  command: string,
  kinds: K,
  argv: string[],
): Arguments<K> {
  const { tokens } = parseArgs({
    args: argv,
    options: Object.fromEntries(
      Object.entries(kinds).map(
        ([name, kind]) => [name, { type: kind === 'flag' ? 'boolean' : 'string' }] as const,
      ),
    ),
    strict: false,
    allowPositionals: true,
    tokens: true,
  })
  const options: Record<string, boolean | string | string[] | undefined> = {}
  for (const [name, kind] of Object.entries(kinds)) {
    options[name] = kind === 'flag' ? false : kind === 'texts' ? [] : undefined
  }
  const words: string[] = []
  for (const token of tokens) {
    if (token.kind === 'positional') words.push(token.value)
    if (token.kind !== 'option') continue
    const kind = Object.hasOwn(kinds, token.name) ? kinds[token.name] : undefined
    const said = plainText(token.rawName)
    if (kind === undefined)
      throw new Refusal(`unknown option ${said}; ${suggestion(command, token.name, kinds)}`)
    if (kind === 'flag') {
      if (token.value !== undefined)
        throw new Refusal(`${said} takes no value; leave out "=${plainText(token.value)}"`)
      options[token.name] = true
      continue
    }
    if (token.value === undefined || token.value === '') {
      throw new Refusal(`${said} needs a value; see shortstave ${command} --help`)
    }
    const missing = !token.inlineValue && /^--[a-z]/.test(token.value)
    if (missing) throw new Refusal(`${said} needs a value, but the next word is ${plainText(token.value)}`)
    if (kind === 'texts') (options[token.name] as string[]).push(token.value)
    else if (options[token.name] === undefined) options[token.name] = token.value
    else throw new Refusal(`${said} is given twice; give it once`)
  }
  return { options: options as OptionValues<K>, words }
}

function suggestion(command: string, name: string, kinds: OptionKinds): string {
  const near = Object.keys(kinds).find(
    known =>
      name.length > 1 && (known.startsWith(name) || name.startsWith(known) || oneEditApart(known, name)),
  )
  return near === undefined ? `see shortstave ${command} --help` : `did you mean --${near}?`
}

/** Do two words differ by at most one letter put in, left out, changed, or two neighbours swapped? */
function oneEditApart(a: string, b: string): boolean {
  if (Math.abs(a.length - b.length) > 1) return false
  let start = 0
  while (start < a.length && a[start] === b[start]) start++
  let end = 0
  while (end < Math.min(a.length, b.length) - start && a[a.length - 1 - end] === b[b.length - 1 - end]) end++
  const restA = a.slice(start, a.length - end)
  const restB = b.slice(start, b.length - end)
  return (
    (restA.length <= 1 && restB.length <= 1) ||
    (restA.length === 2 && restA === [...restB].reverse().join(''))
  )
}

/** A number option: finite and within bounds, or refused in one line with the unit. */
export function readNumber(
  option: string,
  text: string | undefined,
  bounds: { least: number; most: number; unit: string; whole?: boolean },
): number | undefined {
  if (text === undefined) return undefined
  const decimal = text.trim().replace(',', '.')
  const value = /^[+-]?(\d+\.?\d*|\.\d+)$/.test(decimal) ? Number(decimal) : Number.NaN
  const { least, most, unit, whole } = bounds
  const kind = whole ? 'a whole number' : 'a number'
  if (!(value >= least && value <= most) || (whole && !Number.isInteger(value))) {
    throw new Refusal(
      `${option} ${plainText(text).slice(0, 40)}: give ${kind} from ${least} to ${most}${unit && ` ${unit}`}`,
    )
  }
  return value
}
