import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Key } from '../../src/tui/keys.ts'
import { type Typed, typedInto, typedLine } from '../../src/tui/updates/typing.ts'

const press = (line: Typed, ...keys: (string | Key)[]): Typed =>
  keys.reduce<Typed>((now, key) => {
    const named = typeof key === 'string' && key.length > 1 ? ({ key } as Key) : key
    return typedInto(now, typeof named === 'string' ? { key: 'text', text: named } : named) ?? now
  }, line)

describe('typedInto', () => {
  it('replaces a proposal by what is typed first, and keeps it where the caret is moved first', () => {
    expect(press(typedLine('170 g'), '3', '5').text).toBe('35')
    expect(press(typedLine('170 g'), 'left', 'left', 'backspace', '5').text).toBe('175 g')
    expect(press(typedLine('170 g'), 'backspace').text).toBe('170 ')
  })

  it('types and deletes at the caret', () => {
    expect(press(typedLine('rice'), 'home', 'x').text).toBe('xrice')
    expect(press(typedLine('rice'), 'home', 'delete').text).toBe('ice')
    expect(press(typedLine('rice'), 'end', 'delete').text).toBe('rice')
    expect(press(typedLine('rice'), 'clear-line')).toEqual({ text: '', caret: 0, fresh: false })
    expect(press(typedLine('豆豆'), 'left', '腐').text).toBe('豆腐豆')
  })

  it('puts a paste on one line, without controls', () => {
    expect(press(typedLine(''), { key: 'paste', text: '2 cups\r\nred\u0007 lentils' }).text).toBe(
      '2 cups red lentils',
    )
  })

  it('leaves other keys to others', () => {
    expect(typedInto(typedLine('a'), { key: 'enter' })).toBeNull()
    expect(typedInto(typedLine('a'), { key: 'up' })).toBeNull()
  })

  it('never puts the caret outside the line', () => {
    const keys = fc.constantFrom(
      'left',
      'right',
      'home',
      'end',
      'delete',
      'backspace',
      'a',
      '豆',
      'clear-line',
    )
    fc.assert(
      fc.property(fc.string({ maxLength: 8 }), fc.array(keys, { maxLength: 30 }), (text, pressed) => {
        const line = press(typedLine(text), ...pressed)
        expect(line.caret).toBeGreaterThanOrEqual(0)
        expect(line.caret).toBeLessThanOrEqual([...line.text].length)
      }),
    )
  })
})
