import { describe, expect, it } from 'vitest'
import { ChangedLines } from '../../src/tui/changed-lines.ts'

function terminal(columns = 80, rows = 24) {
  const written: string[] = []
  const of = { columns, rows, write: (text: string) => written.push(text) }
  return { of, written, last: () => written.at(-1) ?? '' }
}

describe('ChangedLines', () => {
  it('writes the first frame whole, on a cleared screen', () => {
    const { of, last } = terminal()
    new ChangedLines(of).write('one\n\nthree')
    expect(last()).toBe('\u001b[?2026h\u001b[2J\u001b[1;1H\u001b[2Kone\u001b[3;1H\u001b[2Kthree\u001b[?2026l')
  })

  it('then writes only the lines that changed, each at its place', () => {
    const { of, last } = terminal()
    const lines = new ChangedLines(of)
    lines.write('one\ntwo\nthree')
    lines.write('one\n2\nthree')
    expect(last()).toBe('\u001b[?2026h\u001b[2;1H\u001b[2K2\u001b[?2026l')
  })

  it('clears lines that are no more, and writes nothing where nothing changed', () => {
    const { of, written, last } = terminal()
    const lines = new ChangedLines(of)
    lines.write('one\ntwo')
    lines.write('one')
    expect(last()).toBe('\u001b[?2026h\u001b[2;1H\u001b[2K\u001b[?2026l')
    lines.write('one')
    expect(written.at(-1)).toBe('')
  })

  it('writes all anew after the terminal was resized, and never below its last row', () => {
    const { of, last } = terminal(80, 3)
    const lines = new ChangedLines(of)
    lines.write('1\n2\n3\n4\n5')
    expect(last()).not.toContain('4')
    of.rows = 5
    lines.forget()
    lines.write('1\n2\n3\n4\n5')
    expect(last()).toContain('\u001b[2J')
    expect(last()).toContain('\u001b[5;1H\u001b[2K5')
    expect([lines.columns, lines.rows]).toEqual([80, 5])
  })
})
