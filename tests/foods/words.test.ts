import { expect, test } from 'vitest'
import { placedWords, singular, wordsOf } from '../../src/foods/words.ts'

test.each([
  ['potatoes', 'potato'],
  ['berries', 'berry'],
  ['radishes', 'radish'],
  ['peas', 'pea'],
  ['leaves', 'leaf'],
  ['olives', 'olive'],
  ['hummus', 'hummus'],
  ['couscous', 'couscous'],
  ['asparagus', 'asparagus'],
  ['swiss', 'swiss'],
  ['avocados', 'avocado'],
  ['oats', 'oat'],
])('one of %s is %s', (plural, one) => {
  expect(singular(plural)).toBe(one)
})

test.each([
  ['Soya-beans, tinned', ['soy', 'bean', 'canned']],
  ["Baker's yeast", ['baker', 'yeast']],
  ['Baker’s yeast', ['baker', 'yeast']],
  ['Wholemeal flour', ['whole', 'wheat', 'flour']],
  ['CRÈME brûlée', ['creme', 'brulee']],
  ['豆腐 (tofu)', ['豆腐', 'tofu']],
  ['మినప పప్పు', ['మినప', 'పప్పు']],
  ['70:30 mix', ['70', '30', 'mix']],
  ['constructor', ['constructor']],
  [' ,;! ', []],
])('%j has the words %j', (text, words) => {
  expect(wordsOf(text)).toEqual(words)
})

test('placed words are the same words, and lie where they are written', () => {
  for (const text of ['Hen’s egg, raw', 'Soya-beans, tinned', 'Wholemeal flour', 'Käse', 'a']) {
    const placed = placedWords(text)
    expect(placed.map(word => word.stem)).toEqual(wordsOf(text))
    for (const { start, end } of placed) expect(text.slice(start, end)).toMatch(/^[\p{L}\p{N}’]+$/u)
  }
})
