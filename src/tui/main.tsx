import { render } from 'ink'
import type { Table } from '../foods/table.ts'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import type { Shelf } from '../shelf/shelf.ts'
import { ChangedLines } from './changed-lines.ts'
import type { Edge, Opened } from './edge.ts'
import { Frame } from './frame.tsx'
import { type Key, keysOfRest, readKeys } from './keys.ts'
import { firstState, type Knowledge } from './state.ts'
import { shelfView } from './views/shelf-view.ts'
import { spokenLines } from './views/spoken.ts'

export interface ScreensOptions extends Opened {
  table: Table
  /** the shelf that is shown while the cook has kept none */
  sampleShelf: Shelf
  /** does the cook keep a shelf? then the sample is not shown while it is read */
  kept: boolean
  colour: boolean
  /** words instead of drawings, for screen readers */
  spoken: boolean
  now(): Date
}

const ENTER = '\u001b[?1049h\u001b[?2004h\u001b[?25l'
const LEAVE = '\u001b[?2004l\u001b[?1049l\u001b[?25h'
/** Drawn at most so often, ms: as fast as a screen shows, and never slower than keys come. */
const FRAME_MS = 8
/** Escape that nothing follows for so long is the key, not the beginning of a sequence, ms: also over a slow line. */
const ESCAPE_MS = 60
/** A paste whose end does not come within this is taken as it is, ms. */
const PASTE_MS = 2000

/**
 * The terminal screens, until the cook leaves. The terminal is left as it was found, also when the program is told to
 * end or fails: another screen, pastes told from typing, raw keys, all are taken back. What failed is thrown after that.
 */
export async function runScreens(options: ScreensOptions): Promise<number> {
  const { stdin, stdout } = process
  const size = () => ({ columns: stdout.columns || 80, rows: stdout.rows || 24 })
  let left = false
  const leave = () => {
    if (left) return
    left = true
    if (stdin.isTTY) stdin.setRawMode(false)
    stdout.write(LEAVE)
  }
  const enter = () => {
    stdout.write(ENTER)
    stdin.setRawMode(true)
  }
  let ended: () => void = () => undefined
  const end = new Promise<void>(resolve => {
    ended = resolve
  })
  let failure: unknown = null
  const fail = (error: unknown) => {
    failure ??= error
    ended()
  }
  /** Whatever happens in a key, a timer or a drawing ends in a terminal that is as it was. */
  const guarded = (act: () => void) => {
    try {
      act()
    } catch (error) {
      fail(error)
    }
  }
  const state = firstState({
    ...size(),
    shelf: options.sampleShelf,
    sample: true,
    opening: options.kept,
    settings: DEFAULT_SETTINGS,
    spoken: options.spoken,
    message: '',
  })

  process.on('exit', leave)
  process.on('uncaughtException', fail)
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => ended())
  stdin.on('end', () => ended())
  enter()
  // The first frame is the shelf as it stands: it needs neither the search nor what carries keys out, and those are
  // loaded while it is looked at. Keys that are typed meanwhile wait in the input.
  const bare = { table: options.table, today: dayOf(options.now()), colour: options.colour } as Knowledge
  const frame = (lines: readonly string[]) => <Frame lines={lines} />
  const firstLines = shelfView(state, bare)
  const lines = new ChangedLines(stdout)
  const screen = render(frame(options.spoken ? spokenLines(state, firstLines) : firstLines), {
    // In this mode ink hands over each frame whole, and at once: `lines` sends what changed, `draw` says how often.
    debug: true,
    stdout: lines as unknown as NodeJS.WriteStream,
    exitOnCtrlC: false,
    patchConsole: false,
  })
  await new Promise(resolve => setImmediate(resolve))
  const [{ Edge: Machine }, { view }] = await Promise.all([import('./edge.ts'), import('./view.ts')])

  let timer: NodeJS.Timeout | undefined
  let drawnAt = 0
  const draw = () => {
    if (timer !== undefined || left) return
    const wait = Math.max(0, FRAME_MS - (performance.now() - drawnAt))
    timer = setTimeout(() => {
      timer = undefined
      drawnAt = performance.now()
      guarded(() => {
        if (!left) screen.rerender(frame(view(edge.state, edge.knowledge)))
      })
    }, wait)
  }
  const edge: Edge = new Machine({
    state: { ...state, ...size() },
    table: options.table,
    // Asked anew each time: the screens may stand open past midnight.
    today: () => dayOf(options.now()),
    colour: options.colour,
    opened: options,
    draw,
    quit: () => ended(),
  })
  const press = (keys: readonly Key[]) =>
    guarded(() => edge.send(...keys.map(key => ({ event: 'key', key }) as const)))
  let rest = ''
  let resting: NodeJS.Timeout | undefined
  stdin.setEncoding('utf8')
  stdin.on('data', (chunk: string) => {
    clearTimeout(resting)
    const read = readKeys(rest + chunk)
    rest = read.rest
    if (rest !== '') {
      const alone = () => {
        const keys = keysOfRest(rest)
        rest = ''
        press(keys)
      }
      resting = setTimeout(alone, rest.length > ESCAPE_SEQUENCE ? PASTE_MS : ESCAPE_MS)
    }
    press(read.keys)
  })
  stdin.resume()
  const redraw = () =>
    guarded(() => {
      lines.forget()
      edge.send({ event: 'resize', ...size() })
    })
  stdout.on('resize', redraw)
  // Back from being stopped in the background: the shell has had the terminal meanwhile.
  process.on('SIGCONT', () => {
    enter()
    redraw()
  })
  edge.start()
  await end
  await edge.settled()
  screen.unmount()
  leave()
  process.off('uncaughtException', fail)
  if (failure !== null) throw failure
  return 0
}

/** The longest that waits for the rest of a key; what is longer is a paste. */
const ESCAPE_SEQUENCE = 5

/** The day where the cook is, YYYY-MM-DD. */
function dayOf(now: Date): string {
  const two = (value: number) => String(value).padStart(2, '0')
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`
}
