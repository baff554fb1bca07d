import { render } from 'ink'
import type { Table } from '../foods/table.ts'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import type { Shelf } from '../shelf/shelf.ts'
import type { Edge, Opened } from './edge.ts'
import { Frame } from './frame.tsx'
import { type Key, readKeys } from './keys.ts'
import { firstState, type Knowledge } from './state.ts'
import { shelfView } from './views/shelf-view.ts'

export interface ScreensOptions extends Opened {
  table: Table
  /** the shelf that is shown while the cook has kept none */
  sampleShelf: Shelf
  colour: boolean
  /** words instead of drawings, for screen readers */
  spoken: boolean
  now(): Date
}

const ENTER = '\u001b[?1049h\u001b[?2004h\u001b[?25l'
const LEAVE = '\u001b[?2004l\u001b[?1049l\u001b[?25h'
/** Drawn at most so often, ms: as fast as a screen shows, and never slower than keys come. */
const FRAME_MS = 8

/**
 * The terminal screens, until the cook leaves. The terminal is left as it was found, also when the program is told to
 * end or fails: another screen, pastes told from typing, raw keys, all are taken back.
 */
export async function runScreens(options: ScreensOptions): Promise<number> {
  const { stdin, stdout } = process
  const size = () => ({ columns: stdout.columns || 80, rows: stdout.rows || 24 })
  let left = false
  const leave = () => {
    if (left) return
    left = true
    if (stdin.isTTY) stdin.setRawMode(false)
    if (!options.spoken) stdout.write(LEAVE)
  }
  let ended: () => void = () => undefined
  const end = new Promise<void>(resolve => {
    ended = resolve
  })
  const state = firstState({
    ...size(),
    shelf: options.sampleShelf,
    sample: true,
    settings: DEFAULT_SETTINGS,
    spoken: options.spoken,
    message: '',
  })

  process.on('exit', leave)
  for (const signal of ['SIGTERM', 'SIGHUP'] as const) process.on(signal, () => ended())
  if (!options.spoken) stdout.write(ENTER)
  stdin.setRawMode(true)
  // The first frame is the shelf as it stands: it needs neither the search nor what carries keys out, and those are
  // loaded while it is looked at. Keys that are typed meanwhile wait in the input.
  const bare = { table: options.table, today: dayOf(options.now()), colour: options.colour } as Knowledge
  const screen = render(<Frame lines={shelfView(state, bare)} />, {
    exitOnCtrlC: false,
    patchConsole: false,
    maxFps: 120,
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
      if (!left) screen.rerender(<Frame lines={view(edge.state, edge.knowledge)} />)
    }, wait)
  }
  const edge: Edge = new Machine({
    state: { ...state, ...size() },
    table: options.table,
    today: bare.today,
    colour: options.colour,
    opened: options,
    draw,
    quit: () => ended(),
  })
  let rest = ''
  stdin.setEncoding('utf8')
  stdin.on('data', (chunk: string) => {
    const read = readKeys(rest + chunk)
    rest = read.rest
    edge.send(...read.keys.map((key: Key) => ({ event: 'key', key }) as const))
  })
  stdin.resume()
  stdout.on('resize', () => {
    screen.clear()
    edge.send({ event: 'resize', ...size() })
  })
  edge.start()
  await end
  await edge.settled()
  screen.unmount()
  leave()
  return 0
}

/** The day where the cook is, YYYY-MM-DD. */
function dayOf(now: Date): string {
  const two = (value: number) => String(value).padStart(2, '0')
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`
}
