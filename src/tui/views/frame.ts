import { SCREENS, type State } from '../state.ts'
import { STYLE } from '../style.ts'
import { clip, padEnd, wrapLines } from '../text/lines.ts'
import { widthOf } from '../text/width.ts'

/** The least terminal that the screens fit into. */
export const LEAST = { columns: 60, rows: 16 }

/** The line at the top: where one is, and what this shelf is. */
export function topLine(state: State, right: string): string {
  const trail = SCREENS.map(name => (name === state.screen ? STYLE.bold(name) : STYLE.dim(name))).join(
    STYLE.dim(' ······· '),
  )
  const room = state.columns - widthOf(trail) - 4
  return ` ${trail}  ${padEnd('', Math.max(0, room - widthOf(right)))}${STYLE.dim(clip(right, Math.max(0, room)))}`
}

/** The lines at the bottom: what works here. Keys that don't fit the width go, the last first, but never `?`. */
export function keyLine(columns: number, keys: readonly [key: string, what: string][]): string {
  const help: [string, string] = ['?', 'all keys']
  const text = ([key, what]: readonly [string, string]) => `${key} ${what}`
  const shown: [string, string][] = []
  let width = 1 + widthOf(text(help))
  for (const entry of keys) {
    const more = widthOf(text(entry)) + 3
    if (width + more > columns - 1) break
    shown.push([...entry])
    width += more
  }
  return ` ${[...shown, help].map(([key, what]) => `${STYLE.bold(key)} ${STYLE.dim(what)}`).join('   ')}`
}

/** The line that is being typed into, with its label and what is wrong with it. */
export function promptLines(state: State): string[] {
  const { prompt, columns } = state
  if (prompt === null) return []
  const typed = prompt.fresh ? STYLE.reverse(prompt.text) : `${prompt.text}${STYLE.reverse(' ')}`
  const lines = [` ${STYLE.bold(clip(prompt.label, columns - 2))}`, ` > ${typed}`]
  if (prompt.problem !== null) lines.push(...wrapLines(`   ${prompt.problem}`, columns - 1, 3).slice(0, 3))
  return lines
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

/** The lines fitted to the screen: the body cut or filled, the foot at the bottom. One row stays free for the terminal. */
export function fitted(
  state: State,
  top: readonly string[],
  body: readonly string[],
  foot: readonly string[],
): string[] {
  const room = Math.max(0, state.rows - 1 - top.length - foot.length)
  const filled = [...body.slice(0, room), ...Array<string>(Math.max(0, room - body.length)).fill('')]
  return [...top, ...filled, ...foot]
}
