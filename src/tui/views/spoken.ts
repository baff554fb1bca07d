import type { State } from '../state.ts'
import { wrapLines } from '../text/lines.ts'
import { withoutStyles } from '../text/width.ts'

/**
 * A screen for a screen reader: the same lines without drawn rules, dots and columns, the row under the cursor said in
 * words, and no empty lines to listen to.
 */
export function spokenLines({ columns, rows }: State, lines: readonly string[]): string[] {
  return lines
    .map(line =>
      withoutStyles(line)
        .replace(/[─│·█▇▆▅▄▃▂▁▒▓░▚▞▤▥≈]+/g, ' ')
        .replace(/←→/g, 'Left, Right')
        .replace(/↑↓/g, 'Up, Down')
        .replace(/▸ ?(?=shelf|bench|plate)/, 'Now on: ')
        .replace(/^ > ?/, 'Typed: ')
        .replace(/▸ */, 'Here: ')
        .replace(/✓ /, 'Understood: ')
        .replace(/✗ /, 'Not understood: ')
        .replace(/× /, 'left out: ')
        .trim()
        .replace(/ {2,}/g, ', '),
    )
    .filter(line => line !== '')
    .flatMap(line => wrapLines(line, columns - 1))
    .slice(0, rows - 1)
}
