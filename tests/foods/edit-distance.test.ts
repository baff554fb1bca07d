import fc from 'fast-check'
import { expect, test } from 'vitest'
import { editDistance } from '../../src/foods/edit-distance.ts'

test.each([
  ['chikpea', 'chickpea', 1],
  ['tofoo', 'tofu', 2],
  ['lentile', 'lentil', 1],
  ['qiunoa', 'quinoa', 1],
  ['', 'oat', 3],
  ['oat', '', 3],
  ['oat', 'oat', 0],
  ['barley', 'quinoa', 4],
])('%s is %s with %i letters put wrong, or more than three', (typed, text, distance) => {
  expect(editDistance(typed, text, 3)).toBe(distance)
})

test('a beginning is compared with as much of the word as fits best', () => {
  expect(editDistance('chikp', 'chickpea', 2, true)).toBe(1)
  expect(editDistance('quin', 'quinoa', 2, true)).toBe(0)
})

test('it is a distance: none to itself, the same both ways, no more than the longer word', () => {
  const word = fc.string({ maxLength: 8, unit: fc.constantFrom('a', 'b', 'c') })
  fc.assert(
    fc.property(word, word, (a, b) => {
      expect(editDistance(a, a, 9)).toBe(0)
      expect(editDistance(a, b, 9)).toBe(editDistance(b, a, 9))
      expect(editDistance(a, b, 9)).toBeLessThanOrEqual(Math.max(a.length, b.length))
      expect(editDistance(a, b, 9) === 0).toBe(a === b)
      expect(editDistance(a, b, 9, true)).toBeLessThanOrEqual(editDistance(a, b, 9))
    }),
  )
})
