import type { Knowledge, State } from './state.ts'
import { STYLE } from './style.ts'
import { clip, wrapLines } from './text/lines.ts'
import { widthOf, withoutStyles } from './text/width.ts'
import { PAGE_FRAME } from './updates/page-keys.ts'
import { benchView } from './views/bench-view.ts'
import { bodyRows, fitted, footLines, keyLines, LEAST, PROMPT_KEYS, rule } from './views/frame.ts'
import { plateView } from './views/plate-view.ts'
import { shelfView } from './views/shelf-view.ts'
import { spokenLines } from './views/spoken.ts'

const SPOKEN_COLUMNS = 120

/** The screen as lines: drawn from the state alone. */
export function view(state: State, knowledge: Knowledge): string[] {
  if (!state.spoken) return screenOf(state, knowledge)
  // Nothing need be cut to fit columns where lines are listened to.
  return spokenLines(
    state,
    screenOf({ ...state, columns: Math.max(state.columns, SPOKEN_COLUMNS) }, knowledge),
  )
}

function screenOf(state: State, knowledge: Knowledge): string[] {
  if (state.columns < LEAST.columns || state.rows < LEAST.rows) return tooSmall(state)
  if (state.page !== null) return pageView(state)
  if (state.pasted !== null) return pastedView(state)
  switch (state.screen) {
    case 'shelf':
      return shelfView(state, knowledge)
    case 'bench':
      return benchView(state, knowledge.colour)
    case 'plate':
      return plateView(state, knowledge)
  }
}

function tooSmall({ columns, rows }: State): string[] {
  const text = `This window is ${columns} by ${rows}; shortstave needs ${LEAST.columns} by ${LEAST.rows}. Make it larger, please, or press Ctrl+C.`
  return wrapLines(text, Math.max(10, columns - 1)).slice(0, Math.max(1, rows - 1))
}

function pageView(state: State): string[] {
  const page = state.page!
  const room = Math.max(1, state.rows - PAGE_FRAME)
  const shown = page.lines.slice(page.scroll, page.scroll + room)
  const more = page.lines.length > room ? `  ${page.scroll + shown.length} of ${page.lines.length} lines` : ''
  const keys: [string, string][] =
    page.lines.length > room
      ? [
          ['↑↓ Space', 'scroll'],
          ['Esc', 'back'],
        ]
      : [['Esc', 'back']]
  return fitted(
    state,
    [` ${STYLE.bold(clip(page.title, state.columns - 30))}${STYLE.dim(more)}`],
    shown.map(line => ` ${narrowed(line, state.columns - 2)}`),
    ['', ...keyLines(state, keys)],
  )
}

/** A line of a page made for a wider window: cut, without its styles where it has any. */
const narrowed = (line: string, width: number): string =>
  widthOf(line) <= width ? line : clip(withoutStyles(line), width)

/** A pasted list: what was understood, and what is to be mended. */
function pastedView(state: State): string[] {
  const lines = state.pasted!
  const good = lines.filter(({ reading }) => reading.ok).length
  const under = (at: number, text: string) =>
    state.pasteCursor === at ? ` ▸ ${STYLE.bold(text)}` : `   ${text}`
  const put =
    good === 0 ? 'No line is understood yet' : `Put ${good} ${good === 1 ? 'food' : 'foods'} on the shelf`
  const blocks = lines.map(({ text, reading }, i) =>
    reading.ok
      ? [under(i + 1, clip(`✓ ${reading.echo}`, state.columns - 5))]
      : [
          under(i + 1, clip(`✗ ${text}`, state.columns - 5)),
          ...wrapLines(`     ${reading.problem}`, state.columns - 2, 5)
            .slice(0, 2)
            .map(STYLE.dim),
        ],
  )
  const keys: [string, string][] = [
    ['Enter', state.pasteCursor === 0 ? 'put them there' : 'mend the line'],
    ['#', 'drop the line'],
    ['Esc', 'leave the list'],
  ]
  const foot = [...footLines(state, ''), ...keyLines(state, state.prompt === null ? keys : PROMPT_KEYS)]
  const top = [rule(`pasted: ${lines.length} lines, ${good} understood`, state.columns), under(0, put), '']
  const room = bodyRows(state, top, foot)
  let first = 0
  while (first < state.pasteCursor - 1 && blocks.slice(first, state.pasteCursor).flat().length > room) first++
  return fitted(state, top, blocks.slice(first).flat(), foot)
}
