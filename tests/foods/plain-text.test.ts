import { stripVTControlCharacters } from 'node:util'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { plainText } from '../../src/foods/plain-text.ts'

test.each([
  ['\u001b[31mlentils\u001b[0m', 'lentils'],
  ['\u009b1;2Hlentils', 'lentils'],
  ['\u001b]8;;http://example.org\u0007lentils\u001b]8;;\u0007', 'lentils'],
  ['\u001b]0;a title\u001b\\lentils', 'lentils'],
  ['lentils\u001b]0;never ended', 'lentils'],
  ['\u001bclentils', 'lentils'],
  ['\u001b(Blentils', 'lentils'],
  ['len\u0000ti\u0008ls\u007f', 'lentils'],
  ['lentils\r\nred\tsplit', 'lentils red split'],
  ['\ufefflentils', 'lentils'],
  ['len\u202etils', 'lentils'],
  ['len\u200btils', 'lentils'],
  ['lentils \ud800', 'lentils '],
  ['½ cup Käse मसूर दाल', '½ cup Käse मसूर दाल'],
  ['', ''],
])('%j becomes %j', (text, plain) => {
  expect(plainText(text)).toBe(plain)
})

test('nothing that a terminal would act on is left of any text', () => {
  const piece = fc.oneof(
    fc.string({ unit: 'binary' }),
    fc.constantFrom(
      '\u001b',
      '\u009b',
      '[',
      ']',
      '0;',
      'm',
      '\u0007',
      '\u001b\\',
      '\u009d',
      '\r',
      '\n',
      '\ud800',
    ),
  )
  fc.assert(
    fc.property(fc.array(piece), pieces => {
      const plain = plainText(pieces.join(''))
      expect(plain).not.toMatch(/\p{Cc}/u)
      expect(stripVTControlCharacters(plain)).toBe(plain)
      expect(plainText(plain)).toBe(plain)
    }),
    { numRuns: 1000 },
  )
})

test('10 MB of escapes is done in linear time', () => {
  expect(plainText('\u001b[3'.repeat(2_500_000)).length).toBeLessThan(10_000_000)
  expect(plainText('\u001b]'.repeat(2_500_000))).toBe('')
})
