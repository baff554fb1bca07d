import { SCREENS, type State } from '../state.ts'
import { STYLE } from '../style.ts'
import { clip, padEnd, wrapLines } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'
import type { Typed } from '../updates/typing.ts'

/** The least terminal that the screens fit into. */
export const LEAST = { columns: 60, rows: 16 }
/** From so many columns on, what is under the cursor stands beside the list. */
const BESIDE_FROM = 124
/** From so many rows on, the keys may take two lines. */
const TWO_KEY_LINES_FROM = 22

/** A key, what it does, and that in fewer letters, where there are many keys and little room. */
export type KeyName = readonly [key: string, what: string, short?: string]
/** How the program is left, told on every screen where there is room. */
export const LEAVE_KEY: KeyName = ['Ctrl+C', 'leave']
/** What works while a line is being typed. */
export const PROMPT_KEYS: readonly KeyName[] = [
  ['Enter', 'take it'],
  ['Esc', 'leave it'],
]

/** Is the window wide enough for two columns? */
export const isWide = ({ columns }: State): boolean => columns >= BESIDE_FROM

/** The line at the top: where one is (also without styles), and what this shelf or plate is. */
export function topLine(state: State, right: string): string {
  const trail = SCREENS.map(name => (name === state.screen ? STYLE.bold(`▸ ${name}`) : STYLE.dim(name))).join(
    STYLE.dim(' ····· '),
  )
  const room = state.columns - widthOf(trail) - 4
  return ` ${trail} ${padEnd('', Math.max(0, room - widthOf(right)))} ${clip(right, Math.max(0, room))}`
}

/**
 * The lines at the bottom: what works here, the most used first. Two lines where the window is high enough; keys that
 * don't fit all the same go, the last first, but never `?`, where it works.
 */
export function keyLines(state: State, keys: readonly KeyName[]): string[] {
  const most = state.rows >= TWO_KEY_LINES_FROM && state.page === null ? 2 : 1
  const always: KeyName[] = helpWorks(state) ? [['?', 'all keys']] : []
  const short = keys.map(([key, what, fewer]): KeyName => [key, fewer ?? what])
  // All of them with room between, else closer, else in fewer letters.
  const [, lines, gap] = [[keys, 3] as const, [keys, 2] as const, [short, 2] as const].reduce<
    readonly [number, KeyName[][], number]
  >(
    (best, [names, between]) => {
      if (best[0] === keys.length) return best
      const filled = fill(state.columns, most, names, always, between)
      const count = filled.flat().length - always.length
      return count > best[0] ? [count, filled, between] : best
    },
    [-1, [], 3],
  )
  return lines.map(
    line => ` ${line.map(([key, what]) => `${STYLE.bold(key)} ${STYLE.dim(what)}`).join(' '.repeat(gap))}`,
  )
}

const helpWorks = ({ prompt, page, pasted, asksServe }: State): boolean =>
  prompt === null && page === null && pasted === null && !asksServe

function fill(
  columns: number,
  most: number,
  keys: readonly KeyName[],
  always: readonly KeyName[],
  gap: number,
): KeyName[][] {
  const widthOfKey = ([key, what]: KeyName) => widthOf(key) + 1 + widthOf(what) + gap
  const room = columns - 2 + gap
  const kept = always.reduce((sum, entry) => sum + widthOfKey(entry), 0)
  const lines: KeyName[][] = [[]]
  let width = 0
  for (const entry of keys) {
    const last = lines.length === most
    if (width + widthOfKey(entry) > room - (last ? kept : 0)) {
      if (last) break
      lines.push([])
      width = 0
    }
    lines.at(-1)!.push(entry)
    width += widthOfKey(entry)
  }
  if (width + kept > room) lines.push([])
  lines.at(-1)!.push(...always)
  return lines
}

/** The line that is being typed into, with its label and what is wrong with it. */
export function promptLines(state: State): string[] {
  const { prompt, columns } = state
  if (prompt === null) return []
  const label = wrapLines(` ${prompt.label}`, columns - 1, 1).slice(0, 2)
  const lines = [...label.map(STYLE.bold), ` > ${typedText(prompt, columns - 4)}`]
  if (prompt.problem !== null) lines.push(...wrapLines(`   ${prompt.problem}`, columns - 1, 3).slice(0, 3))
  return lines
}

/** What is typed, with the caret; the part around the caret where it is longer than the line. */
function typedText({ text, caret, fresh }: Typed, room: number): string {
  const letters = [...text]
  let from = 0
  while (from < caret && widthOf(letters.slice(from, caret + 1).join('')) > room - 1) from++
  const shown = (start: number, end?: number) => letters.slice(start, end).join('')
  if (fresh) return STYLE.reverse(clip(text, room))
  const before = shown(from, caret)
  const after = clip(shown(caret + 1), Math.max(0, room - widthOf(before) - 2))
  return `${before}${STYLE.reverse(letters[caret] ?? ' ')}${after}`
}

/** What was said last is never cut short of this: the name of a file may stand at its end. */
const MESSAGE_LINES = 4

/** Above the keys: the open line, or what was said last, or else a line that always stands there. */
export function footLines(state: State, standing: string): string[] {
  if (state.prompt !== null) return promptLines(state)
  if (state.message !== '')
    return wrapLines(` ${state.message}`, state.columns - 1, 1).slice(0, MESSAGE_LINES)
  if (standing === '') return ['']
  return wrapLines(` ${standing}`, state.columns - 1, 1)
    .slice(0, MESSAGE_LINES)
    .map(STYLE.dim)
}

/** A rule across the screen with a title in it. */
export function rule(title: string, columns: number): string {
  const start = `─ ${title} `
  return STYLE.dim(` ${start}${'─'.repeat(Math.max(0, columns - widthOf(start) - 2))}`)
}

/** A window of rows that keeps the cursor in sight, with how many there are above and below. */
export function windowOf<T>(rows: readonly T[], cursor: number, room: number): { shown: T[]; first: number } {
  const first = Math.max(0, Math.min(cursor - Math.floor(room / 2), rows.length - room))
  return { shown: rows.slice(first, first + room), first }
}

/** Two columns of lines side by side. */
export function beside(left: readonly string[], right: readonly string[], leftColumns: number): string[] {
  const count = Math.max(left.length, right.length)
  return Array.from({ length: count }, (_, i) => `${padEnd(left[i] ?? '', leftColumns)}${right[i] ?? ''}`)
}

/** The lines fitted to the screen: the body cut or filled, the foot at the bottom. One row stays free for the terminal. */
export function fitted(
  state: State,
  top: readonly string[],
  body: readonly string[],
  foot: readonly string[],
): string[] {
  const room = bodyRows(state, top, foot)
  const filled = [...body.slice(0, room), ...Array<string>(Math.max(0, room - body.length)).fill('')]
  return [...top, ...filled, ...foot]
}

/** The rows that are left between top and foot. */
export const bodyRows = ({ rows }: State, top: readonly string[], foot: readonly string[]): number =>
  Math.max(0, rows - 1 - top.length - foot.length)
