import { Writable } from 'node:stream'

/** What a terminal is to the screens: where it is written to, and how large it is. */
export interface Terminal {
  columns: number
  rows: number
  write(text: string): unknown
}

/** Shown as one (ECMA-48 private mode 2026); terminals that don't know it pass it over. */
const TOGETHER = '\u001b[?2026h'
const DONE = '\u001b[?2026l'
const ERASE_ALL = '\u001b[2J'

/**
 * The stream that ink draws whole frames into. Only the lines that changed go to the terminal, each at its own place:
 * little to send over a slow line, nothing to flicker, and a screen reader hears what is new and no more.
 */
export class ChangedLines extends Writable {
  readonly isTTY = true
  private shown: string[] | null = null
  private readonly terminal: Terminal

  constructor(terminal: Terminal) {
    super({ decodeStrings: false })
    this.terminal = terminal
  }

  get columns(): number {
    return this.terminal.columns || 80
  }

  get rows(): number {
    return this.terminal.rows || 24
  }

  /** The next frame is written whole: the terminal was resized, or had by another program. */
  forget(): void {
    this.shown = null
  }

  override _write(frame: unknown, _: unknown, done: () => void): void {
    if (typeof frame === 'string' && frame !== '') this.terminal.write(this.changesTo(frame.split('\n')))
    done()
  }

  private changesTo(frame: readonly string[]): string {
    const lines = frame.slice(0, this.rows)
    const shown = this.shown ?? []
    let changes = ''
    for (let row = 0; row < Math.max(lines.length, shown.length); row++) {
      const line = lines[row] ?? ''
      if (this.shown === null ? line === '' : line === (shown[row] ?? '')) continue
      changes += `\u001b[${row + 1};1H\u001b[2K${line}`
    }
    const whole = this.shown === null ? ERASE_ALL : ''
    this.shown = lines
    return changes === '' && whole === '' ? '' : TOGETHER + whole + changes + DONE
  }
}
