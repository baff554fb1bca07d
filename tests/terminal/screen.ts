import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type IPty, spawn } from '@lydell/node-pty'
import xterm from '@xterm/headless'

const program = new URL('../../dist/shortstave.js', import.meta.url).pathname

/** The bundled program in a real pseudo-terminal, with an emulator that reads its screen as a person would. */
export class Screen {
  readonly home: string
  private readonly pty: IPty
  private readonly terminal: InstanceType<typeof xterm.Terminal>
  /** all that was written to the terminal */
  written = ''
  private exitCode: number | null = null

  constructor(
    options: {
      columns?: number
      rows?: number
      env?: Record<string, string>
      home?: string
      args?: string[]
    } = {},
  ) {
    const { columns = 80, rows = 24 } = options
    this.home = options.home ?? mkdtempSync(join(tmpdir(), 'shortstave-terminal-'))
    this.terminal = new xterm.Terminal({ cols: columns, rows, allowProposedApi: true })
    this.pty = spawn(process.execPath, [program, ...(options.args ?? [])], {
      cols: columns,
      rows,
      name: 'xterm-256color',
      env: {
        PATH: process.env.PATH ?? '',
        HOME: this.home,
        LANG: 'C.UTF-8',
        TERM: 'xterm-256color',
        SHORTSTAVE_HOME: join(this.home, 'kept'),
        ...options.env,
      },
    })
    this.pty.onData(data => {
      this.written += data
      this.terminal.write(data)
    })
    this.pty.onExit(({ exitCode }) => {
      this.exitCode = exitCode
    })
  }

  /** What stands on the screen, line by line. */
  lines(): string[] {
    const { active } = this.terminal.buffer
    return Array.from(
      { length: this.terminal.rows },
      (_, y) => active.getLine(active.viewportY + y)?.translateToString(true) ?? '',
    )
  }

  text(): string {
    return this.lines().join('\n')
  }

  /** Is the program's own screen up, or the one that it was started from? */
  isAlternate(): boolean {
    return this.terminal.buffer.active.type === 'alternate'
  }

  type(keys: string): void {
    this.pty.write(keys)
  }

  paste(text: string): void {
    this.pty.write(`\u001b[200~${text}\u001b[201~`)
  }

  resize(columns: number, rows: number): void {
    this.terminal.resize(columns, rows)
    this.pty.resize(columns, rows)
  }

  /** Waits until the screen shows something; says what it shows where it never comes. */
  async shows(wanted: string | RegExp, withinMs = 15_000): Promise<string> {
    return this.until(
      () => (typeof wanted === 'string' ? this.text().includes(wanted) : wanted.test(this.text())),
      String(wanted),
      withinMs,
    )
  }

  async hides(gone: string, withinMs = 15_000): Promise<string> {
    return this.until(() => !this.text().includes(gone), `no ${gone}`, withinMs)
  }

  /** Waits until no line is longer than the window is wide: the emulator keeps what stood beyond its new edge. */
  async fits(columns: number, withinMs = 15_000): Promise<string> {
    return this.until(
      () => this.lines().every(line => line.length <= columns),
      `lines of at most ${columns} columns`,
      withinMs,
    )
  }

  async ends(withinMs = 15_000): Promise<number> {
    await this.until(() => this.exitCode !== null, 'the end of the program', withinMs)
    return this.exitCode!
  }

  private async until(holds: () => boolean, what: string, withinMs: number): Promise<string> {
    const deadline = Date.now() + withinMs
    while (!holds()) {
      if (Date.now() > deadline) throw new Error(`waited for ${what}; the screen shows:\n${this.text()}`)
      await new Promise(resolve => setTimeout(resolve, 20))
    }
    return this.text()
  }

  kill(signal: 'SIGINT' | 'SIGTERM' | 'SIGHUP'): void {
    process.kill(this.pty.pid, signal)
  }

  /** Waits until the screen that the program was started from is back. */
  async leaves(withinMs = 15_000): Promise<string> {
    return this.until(() => !this.isAlternate(), 'the screen before', withinMs)
  }

  close({ keepHome = false } = {}): void {
    if (this.exitCode === null) this.pty.kill('SIGKILL')
    if (!keepHome) rmSync(this.home, { recursive: true, force: true })
  }
}

export const KEYS = {
  enter: '\r',
  escape: '\u001b',
  tab: '\t',
  up: '\u001b[A',
  down: '\u001b[B',
  right: '\u001b[C',
  left: '\u001b[D',
  backspace: '\u007f',
  ctrlC: '\u0003',
  ctrlU: '\u0015',
} as const
