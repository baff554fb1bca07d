import { widthOf } from './width.ts'

/** Breaks a text into lines of at most `width` columns; lines after the first start with `indent` more blanks. */
export function wrapLines(text: string, width: number, indent = 0): string[] {
  const start = /^ */.exec(text)![0]
  const lines: string[] = []
  let line = start
  const room = Math.max(1, width - Math.max(indent, start.length))
  for (const word of text
    .trimStart()
    .split(' ')
    .flatMap(whole => broken(whole, room))) {
    const candidate = line.trim() === '' ? line + word : `${line} ${word}`
    if (line.trim() !== '' && widthOf(candidate) > width) {
      lines.push(line)
      line = ' '.repeat(indent) + word
    } else {
      line = candidate
    }
  }
  lines.push(line)
  return lines
}

/** A word that is longer than a line (a path) in pieces that are not. */
function broken(word: string, room: number): string[] {
  if (widthOf(word) <= room || word.includes('\u001b')) return [word]
  const pieces: string[] = []
  let piece = ''
  for (const letter of word) {
    if (piece !== '' && widthOf(piece + letter) > room) {
      pieces.push(piece)
      piece = ''
    }
    piece += letter
  }
  return [...pieces, piece]
}

/** Pads on the right to `width` columns, counting wide characters as the terminal does. */
export function padEnd(text: string, width: number): string {
  return text + ' '.repeat(Math.max(0, width - widthOf(text)))
}

export function padStart(text: string, width: number): string {
  return ' '.repeat(Math.max(0, width - widthOf(text))) + text
}

/** Cuts a text to `width` columns, with an ellipsis where something was cut. */
export function clip(text: string, width: number): string {
  if (widthOf(text) <= width) return text
  let cut = ''
  for (const character of text) {
    if (widthOf(cut + character) > width - 1) break
    cut += character
  }
  return `${cut}…`
}

/** Rows of cells in columns; `right` names the columns that are set flush right. */
export function inColumns(rows: string[][], right: readonly number[] = [], gap = 2): string[] {
  const widths: number[] = []
  for (const row of rows) {
    row.forEach((cell, i) => {
      widths[i] = Math.max(widths[i] ?? 0, widthOf(cell))
    })
  }
  return rows.map(row =>
    row
      .map((cell, i) => (right.includes(i) ? padStart(cell, widths[i]!) : padEnd(cell, widths[i]!)))
      .join(' '.repeat(gap))
      .trimEnd(),
  )
}
