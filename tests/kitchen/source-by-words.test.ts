import { describe, expect, test } from 'vitest'
import { readLabel } from '../../src/foods/ingredient-list.ts'
import { createFinder } from '../../src/foods/search.ts'
import { sourceByWords } from '../../src/foods/source-by-words.ts'
import { aFood } from './a-food.ts'

const foods = [
  aFood({
    id: 'wheat-flour-white',
    name: 'Wheat flour, white',
    kin: 'wheat-flour-white',
    state: 'flour',
    role: 'grain',
  }),
  aFood({
    id: 'wheat-flour-whole',
    name: 'Wheat flour, wholemeal',
    kin: 'wheat-flour-whole',
    state: 'flour',
    role: 'grain',
  }),
  aFood({ id: 'wheat-bran-raw', name: 'Wheat bran, raw', kin: 'wheat-bran', state: 'raw', role: 'grain' }),
  aFood({ id: 'oats-rolled-dry', name: 'Oats, rolled, dry', kin: 'oats', state: 'dry', role: 'grain' }),
  aFood({
    id: 'oats-porridge',
    name: 'Oats, cooked with water',
    kin: 'oats-porridge',
    state: 'boiled',
    role: 'grain',
  }),
]
const resolve = sourceByWords(createFinder(foods))

describe('words on a packet', () => {
  test('an id or a plain name is taken as it stands', () => {
    expect(resolve('wheat-bran-raw')).toMatchObject({
      ok: true,
      food: { id: 'wheat-bran-raw' },
      assumed: false,
    })
    expect(resolve('wheat bran')).toMatchObject({ ok: true, food: { id: 'wheat-bran-raw' } })
  })

  test('words for several foods take the plainest, and it is marked', () => {
    expect(resolve('wheat flour')).toMatchObject({
      ok: true,
      food: { id: 'wheat-flour-white' },
      assumed: true,
    })
  })

  test('what no food is called is refused as unknown', () => {
    expect(resolve('unobtainium')).toMatchObject({ ok: false, unknown: true })
  })

  test('a label: what was taken is told, water is never porridge', () => {
    expect(readLabel('wheat flour, water, rolled oats, salt, unobtainium', resolve)).toMatchObject({
      ok: true,
      foods: [{ id: 'wheat-flour-white' }, { id: 'oats-rolled-dry' }],
      leftOut: ['water', 'salt', 'unobtainium'],
      assumed: [{ id: 'wheat-flour-white' }],
    })
  })
})
