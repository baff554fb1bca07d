import { eastAsianWidth } from 'get-east-asian-width'

/** Texts of these letters alone take a column a letter; nearly all texts do. */
const SIMPLE = /^[\u0020-\u007e\u00a0-\u02ff\u2010-\u2027\u2190-\u21ff\u2212\u2248\u2500-\u259f]*$/
const COMBINING = /\p{M}|\p{Cf}/u
// biome-ignore lint/suspicious/noControlCharactersInRegex: the program's own colours begin with an escape
const STYLES = /\u001b\[[0-9;]*m/g

/** A text without the program's own styles. */
export const withoutStyles = (text: string): string =>
  text.includes('\u001b') ? text.replace(STYLES, '') : text

/**
 * The columns that a text takes in a terminal: styles and combining marks none, wide letters (Chinese, Japanese,
 * emoji) two. Without the tables of emoji sequences, whose loading would cost each one-shot command its start.
 */
export function widthOf(text: string): number {
  const plain = withoutStyles(text)
  if (SIMPLE.test(plain)) return plain.length
  let width = 0
  for (const letter of plain) {
    if (!COMBINING.test(letter)) width += eastAsianWidth(letter.codePointAt(0)!)
  }
  return width
}
