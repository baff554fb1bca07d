/** The few styles that plain output uses. Without colour every style is the text itself. */
export interface Style {
  bold(text: string): string
  dim(text: string): string
}

const wrapIn = (open: number, close: number) => (text: string) => `\u001b[${open}m${text}\u001b[${close}m`

export function styleOf(colour: boolean): Style {
  return colour ? { bold: wrapIn(1, 22), dim: wrapIn(2, 22) } : { bold: text => text, dim: text => text }
}
