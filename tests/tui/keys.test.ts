import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { keysOfRest, readKeys } from '../../src/tui/keys.ts'

const names = (input: string) =>
  readKeys(input).keys.map(key => ('text' in key ? `${key.key}:${key.text}` : key.key))

describe('readKeys', () => {
  it('reads keys that come in one chunk', () => {
    expect(names('le\u001b[A\u001b[B\r\t\u007f\u001b[Z')).toEqual([
      'text:l',
      'text:e',
      'up',
      'down',
      'enter',
      'tab',
      'backspace',
      'back-tab',
    ])
    expect(names('\u0003')).toEqual(['interrupt'])
    expect(names('\u001b[3~\u001bOH\u001b[6~')).toEqual(['delete', 'home', 'page-down'])
  })

  it('waits for the rest of a sequence that is cut', () => {
    expect(readKeys('a\u001b[')).toEqual({ keys: [{ key: 'text', text: 'a' }], rest: '\u001b[' })
    expect(names('\u001b[' + 'A')).toEqual(['up'])
  })

  it('tells a paste from typing, marked or not, also when it comes in parts', () => {
    expect(names('\u001b[200~1 can chickpeas\n2 cups rice\u001b[201~x')).toEqual([
      'paste:1 can chickpeas\n2 cups rice',
      'text:x',
    ])
    const part = readKeys('\u001b[200~1 can')
    expect(part.keys).toEqual([])
    expect(names(`${part.rest} beans\u001b[201~`)).toEqual(['paste:1 can beans'])
    expect(names('1 can chickpeas\n2 cups rice')).toEqual(['paste:1 can chickpeas\n2 cups rice'])
    expect(names('1 can chickpeas\r\n2 cups rice')).toEqual(['paste:1 can chickpeas\r\n2 cups rice'])
  })

  it('takes fast typing with Return in it for keys, not for a paste', () => {
    expect(names('oats\r500\r')).toEqual([
      ...[...'oats'].map(letter => `text:${letter}`),
      'enter',
      ...[...'500'].map(letter => `text:${letter}`),
      'enter',
    ])
  })

  it('waits to see whether Escape begins a sequence, and takes it for the key where nothing follows', () => {
    expect(readKeys('\u001b')).toEqual({ keys: [], rest: '\u001b' })
    expect(names(`${readKeys('\u001b').rest}[A`)).toEqual(['up'])
    expect(names('\u001b\u001b[B')).toEqual(['escape', 'down'])
    expect(keysOfRest('\u001b')).toEqual([{ key: 'escape' }])
    expect(keysOfRest('')).toEqual([])
    expect(keysOfRest('\u001b[200~1 can beans')).toEqual([{ key: 'paste', text: '1 can beans' }])
  })

  it('takes letters of every script whole, and no unknown sequence for text', () => {
    expect(names('é豆🥣')).toEqual(['text:é', 'text:豆', 'text:🥣'])
    expect(names('\u001b[1;5C\u001b[?62c')).toEqual([])
  })

  it('never throws and loses no letter, however the input is cut', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: fc.constantFrom('a', 'b', 'é', '豆'), maxLength: 30 }),
        fc.nat(30),
        (text, at) => {
          const first = readKeys(text.slice(0, at))
          const second = readKeys(first.rest + text.slice(at))
          const letters = [...first.keys, ...second.keys].map(key => (key.key === 'text' ? key.text : ''))
          expect(letters.join('')).toBe(text)
        },
      ),
    )
    fc.assert(fc.property(fc.string({ unit: 'binary' }), input => void readKeys(input)))
  })
})
