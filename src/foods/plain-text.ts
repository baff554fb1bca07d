/** One part of a terminal escape sequence a line; the sequences are those of ECMA-48 (5th edition, 1991). */
const ESCAPE_SEQUENCES = new RegExp(
  [
    // CSI ... final byte: colours, cursor movement
    '(?:\\u001B\\[|\\u009B)[0-?]*[ -/]*[@-~]',
    // OSC, DCS, SOS, PM, APC: a string up to its terminator; unterminated, up to the end of the line
    '(?:\\u001B[\\]PX^_]|[\\u009D\\u0090\\u0098\\u009E\\u009F])[^\\u0007\\u001B\\u009C\\r\\n]*(?:\\u0007|\\u001B\\\\|\\u009C)?',
    // other two- and three-byte escapes
    '\\u001B[ -/]*[0-~]?',
  ].join('|'),
  'g',
)

/** White space that may not reach a single line: tabs, line and paragraph breaks. */
const BREAKS = /[\t\n\v\f\r\u0085\u2028\u2029]+/g

/** Controls, marks that reverse or hide text (bidi overrides, zero widths, byte order mark), lone surrogates. */
const INVISIBLE =
  /[\p{Cc}\u00AD\u061C\u180E\u200B-\u200F\u202A-\u202E\u2060-\u206F\uFEFF\uFFF9-\uFFFB]|\p{Cs}/gu

/**
 * Text from a file, an argument or a key made safe for one line of a terminal: without escape sequences, control
 * characters, invisible or direction-changing marks; breaks and tabs become a space. Letters of every script stay.
 *
 * @example plainText('\u001b[31mlentils\u001b[0m\r\nred') // 'lentils red'
 */
export function plainText(text: string): string {
  return text.replace(ESCAPE_SEQUENCES, '').replace(BREAKS, ' ').replace(INVISIBLE, '')
}
