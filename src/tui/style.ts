/** The styles that the screens use; without colour only those that every terminal can show in one. */
export interface Style {
  bold(text: string): string
  dim(text: string): string
  /** the row under the cursor, and text that is proposed */
  reverse(text: string): string
  underline(text: string): string
}

const wrapIn = (open: number, close: number) => (text: string) =>
  text === '' ? '' : `\u001b[${open}m${text}\u001b[${close}m`

/** NO_COLOR asks for no colour; bold, dim and reverse are none and stay. */
export const STYLE: Style = {
  bold: wrapIn(1, 22),
  dim: wrapIn(2, 22),
  reverse: wrapIn(7, 27),
  underline: wrapIn(4, 24),
}
