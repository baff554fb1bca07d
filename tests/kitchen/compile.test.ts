import { describe, expect, test } from 'vitest'
import { withCare } from '../../src/build/compile/care.ts'
import { compileKitchen, kitchenJson, readCurationRows } from '../../src/build/compile/kitchen.ts'
import { Problems } from '../../src/build/compile/problems.ts'
import { loadTable } from '../../src/foods/load.ts'
import { kitchenFileSchema } from '../../src/kitchen/kitchen-file.ts'
import { loadKitchen } from '../../src/kitchen/load.ts'
import { aFood } from './a-food.ts'

type Row = Record<string, string>

/** The curation as it is, with one cell of the first row that has the id changed. */
const changed = (file: string, key: string, value: string, cells: Row) => (name: string) =>
  readCurationRows(name).map(row => (name === file && row[key] === value ? { ...row, ...cells } : row))

describe('compiling the kitchen', () => {
  const { foods } = loadTable()

  test('writes the same bytes every time, and what is bundled', () => {
    const first = kitchenJson(compileKitchen(foods))
    expect(kitchenJson(compileKitchen([...foods].reverse()))).toBe(first)
    expect(JSON.parse(first)).toEqual(loadKitchen())
    expect(kitchenFileSchema.safeParse(JSON.parse(first)).error).toBeUndefined()
  })

  test.each([
    ['cautions', 'id', 'favism', { text: '' }, /cautions\.csv, row \d+ \(favism\): text/],
    ['cautions', 'id', 'favism', { weight: 'heavy' }, /cautions\.csv, row \d+ \(favism\): weight/],
    ['cautions', 'id', 'favism', { id: 'poppy' }, /\(poppy\): the id stands twice/],
    ['cautions', 'id', 'favism', { id: 'favism-2' }, /food .*: caution "favism" is not in/],
    ['conditions', 'id', 'gout', { source: '' }, /conditions\.csv, row \d+ \(gout\): source/],
    ['cooking', 'id', 'quinoa', { cook_min_least: '90' }, /cooking\.csv \(quinoa\)/],
    ['cooking', 'id', 'quinoa', { cook_min_most: '-5' }, /cooking\.csv \(quinoa\)/],
    ['cooking', 'id', 'quinoa', { heat: 'microwave' }, /cooking\.csv \(quinoa\): heat/],
    ['cooking', 'id', 'quinoa', { hard_boil_min: '30' }, /the hard boil lies inside/],
    ['yields', 'foods', 'quinoa', { factor: '0' }, /yields\.csv \(quinoa\): factor/],
    ['yields', 'foods', 'quinoa', { low: '3.2' }, /low <= factor <= high/],
    ['yields', 'foods', 'quinoa', { high: 'much' }, /yields\.csv \(quinoa\): high/],
    ['storage', 'id', 'reheat', { provenance: '' }, /storage\.csv, row \d+ \(reheat\): provenance/],
  ] as [string, string, string, Row, RegExp][])(
    '%s: %s %s with %j is refused, and where is said',
    (file, key, value, cells, reason) => {
      expect(() => compileKitchen(foods, changed(file, key, value, cells))).toThrow(reason)
    },
  )
})

describe('care that goes by the plant', () => {
  const bean = aFood({
    id: 'beans-raw',
    kin: 'beans',
    state: 'raw',
    cautions: ['bean-raw'],
    aliases: ['grass pea dal', 'bean'],
  })
  const boiled = aFood({ id: 'beans-boiled', kin: 'beans', state: 'boiled' })
  const rule = {
    kin: 'beans',
    states: '',
    cautions: '',
    instead_of: '',
    allergens: '',
    no_alias: '',
    why: 'w',
    source: 's',
  }
  const cared = (cells: Row) => {
    const problems = new Problems()
    const foods = withCare(
      [bean, boiled],
      [{ where: 'care.csv, row 2', text: { ...rule, ...cells } }],
      problems,
    )
    return { foods, problems: problems.lines }
  }

  test('adds to every state, or to those named', () => {
    expect(cared({ cautions: 'favism' }).foods.map(({ cautions }) => cautions)).toEqual([
      ['bean-raw', 'favism'],
      ['favism'],
    ])
    expect(cared({ cautions: 'favism', states: 'boiled' }).foods.map(({ cautions }) => cautions)).toEqual([
      ['bean-raw'],
      ['favism'],
    ])
    expect(cared({ allergens: 'soy|lupin' }).foods[1]!.allergens).toEqual(['soy', 'lupin'])
  })

  test('replaces a caution that does not fit, and drops a name that misleads', () => {
    expect(
      cared({ cautions: 'green-bean-raw', instead_of: 'bean-raw', states: 'raw' }).foods[0]!.cautions,
    ).toEqual(['green-bean-raw'])
    expect(cared({ no_alias: 'grass pea' }).foods[0]!.aliases).toEqual(['bean'])
  })

  test.each([
    [{ kin: 'no-such-kin' }, /no food of kin "no-such-kin"/],
    [{ states: 'pickled' }, /care\.csv, row 2: states/],
    [{ allergens: 'kryptonite' }, /care\.csv, row 2: allergens/],
    [{ why: '' }, /care\.csv, row 2: why/],
  ])('%j is a problem, and where is said', (cells, reason) => {
    expect(cared(cells as Row).problems.join('\n')).toMatch(reason)
  })
})
