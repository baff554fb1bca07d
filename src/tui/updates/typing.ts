import type { Key } from '../keys.ts'

/** A line that is being typed. `caret` counts letters before it; `fresh`: the text is a proposal, which typing replaces. */
export interface Typed {
  text: string
  caret: number
  fresh: boolean
}

const LONGEST = 160

/** A line with all of a text typed, the caret at its end. */
export const typedLine = (text: string): Typed => ({
  text,
  caret: [...text].length,
  fresh: text !== '',
})

/** What a key makes of a line, or null where the key is not one for typing. */
export function typedInto({ text, caret, fresh }: Typed, key: Key): Typed | null {
  const letters = [...text]
  const at = (next: number): Typed => ({
    text,
    caret: Math.max(0, Math.min(letters.length, next)),
    fresh: false,
  })
  const put = (added: string): Typed => {
    const [before, after] = fresh ? [[], []] : [letters.slice(0, caret), letters.slice(caret)]
    const all = [...before, ...added, ...after].slice(0, LONGEST)
    return {
      text: all.join(''),
      caret: Math.min(all.length, before.length + [...added].length),
      fresh: false,
    }
  }
  const without = (from: number): Typed => ({
    text: letters.filter((_, i) => i !== from).join(''),
    caret: Math.max(0, Math.min(from, letters.length - 1)),
    fresh: false,
  })
  switch (key.key) {
    case 'text':
      return put(key.text)
    case 'paste':
      return put(key.text.replace(/[\r\n\t]+/g, ' ').replace(/\p{Cc}/gu, ''))
    case 'backspace':
      return caret === 0 ? at(0) : without(caret - 1)
    case 'delete':
      return caret >= letters.length ? at(caret) : without(caret)
    case 'left':
      return at(caret - 1)
    case 'right':
      return at(caret + 1)
    case 'home':
      return at(0)
    case 'end':
      return at(letters.length)
    case 'clear-line':
      return { text: '', caret: 0, fresh: false }
    default:
      return null
  }
}
