/** A key as the screens know it. `text` is what a printing key types; a paste is a text of its own. */
export type Key =
  | { key: 'text'; text: string }
  | { key: 'paste'; text: string }
  | {
      key:
        | 'enter'
        | 'escape'
        | 'tab'
        | 'back-tab'
        | 'backspace'
        | 'delete'
        | 'up'
        | 'down'
        | 'left'
        | 'right'
        | 'page-up'
        | 'page-down'
        | 'home'
        | 'end'
        | 'clear-line'
        | 'interrupt'
    }
type Named = Exclude<Key['key'], 'text' | 'paste'>

const PASTE_START = '\u001b[200~'
const PASTE_END = '\u001b[201~'

/** Terminals' sequences for keys that print nothing (ECMA-48 and xterm's control sequences). */
const SEQUENCES: Record<string, Named> = {
  '[A': 'up',
  '[B': 'down',
  '[C': 'right',
  '[D': 'left',
  OA: 'up',
  OB: 'down',
  OC: 'right',
  OD: 'left',
  '[H': 'home',
  '[F': 'end',
  OH: 'home',
  OF: 'end',
  '[1~': 'home',
  '[4~': 'end',
  '[3~': 'delete',
  '[5~': 'page-up',
  '[6~': 'page-down',
  '[Z': 'back-tab',
}
const CONTROLS: Record<string, Named> = {
  '\r': 'enter',
  '\n': 'enter',
  '\t': 'tab',
  '\u007f': 'backspace',
  '\b': 'backspace',
  '\u0003': 'interrupt',
  '\u0015': 'clear-line',
}

/** What is read of the input, and what waits for the rest of a sequence or paste. */
export interface KeysRead {
  keys: Key[]
  rest: string
}

/**
 * The keys in a chunk of terminal input. Chunks may hold many keys (fast typing) or end within a sequence: `rest` is
 * to be put before the next chunk. Return is never taken for a line of a paste, since fast typing may come in one chunk
 * too; a line feed within text is (terminals send Return for the key), so that a paste without marks is still read.
 */
export function readKeys(input: string): KeysRead {
  const keys: Key[] = []
  let at = 0
  const unmarked = !input.includes('\u001b') && /[^\r\n]\r?\n[^\r\n]/.test(input)
  if (unmarked) return { keys: [{ key: 'paste', text: input }], rest: '' }
  while (at < input.length) {
    const letter = input[at]!
    if (input.startsWith(PASTE_START, at)) {
      const end = input.indexOf(PASTE_END, at)
      if (end === -1) return { keys, rest: input.slice(at) }
      keys.push({ key: 'paste', text: input.slice(at + PASTE_START.length, end) })
      at = end + PASTE_END.length
    } else if (letter === '\u001b') {
      // biome-ignore lint/suspicious/noControlCharactersInRegex: terminals speak in control characters
      const sequence = /^\u001b(\[[0-9;?]*[ -/]*[@-~]|O[A-Z])/.exec(input.slice(at, at + 24))
      if (sequence !== null) {
        const named = SEQUENCES[sequence[1]!]
        if (named !== undefined) keys.push({ key: named })
        at += sequence[0].length
      } else if (/^(\[[0-9;?]*|O)?$/.test(input.slice(at + 1))) {
        return { keys, rest: input.slice(at) }
      } else {
        keys.push({ key: 'escape' })
        at += 1
      }
    } else if (CONTROLS[letter] !== undefined) {
      keys.push({ key: CONTROLS[letter] })
      at += 1
    } else if (letter < ' ') {
      at += 1
    } else {
      const point = String.fromCodePoint(input.codePointAt(at)!)
      keys.push({ key: 'text', text: point })
      at += point.length
    }
  }
  return { keys, rest: '' }
}

/** The keys in what waited for its rest when none came: Escape alone, a paste whose end was lost. */
export function keysOfRest(rest: string): Key[] {
  if (rest.startsWith(PASTE_START)) return [{ key: 'paste', text: rest.slice(PASTE_START.length) }]
  return rest === '' ? [] : [{ key: 'escape' }]
}
