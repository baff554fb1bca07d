import { describe, expect, test } from 'vitest'
import { parseMeasure, weighOne, weighUnit } from '../../src/foods/measures.ts'
import { type Unit, unitOf } from '../../src/foods/units.ts'
import { food } from './small-table.ts'

const measured = (measures: Record<string, number>, role: 'pulse' | 'nut-seed' = 'pulse') =>
  food({ id: 'x', name: 'Tortilla, corn', kin: 'x', role, state: 'product', measures })
const unit = (word: string) => unitOf(word) as Exclude<Unit, { kind: 'mass' }>

describe('a measure taken apart', () => {
  test.each([
    ['1 cup', 'cup', 100, []],
    ['1/4 block', 'block', 400, []],
    ['10 sheets', 'sheet', 10, []],
    ['1 can, drained', 'can', 100, ['drained']],
    ['1 cup, chopped', 'cup', 100, ['chopped']],
    ['1 tbsp (1/16 cup)', 'tbsp', 100, []],
    ['1 can 400 g, drained', 'can', 100, ['drained']],
    ['1 large', undefined, 100, ['large']],
    ['1 tortilla, medium (approx 6" dia)', undefined, 100, ['medium']],
  ])('%s', (name, unitName, grams, qualifiers) => {
    const measure = parseMeasure({ name, grams: 100, source: 'test' })
    expect(measure.unit?.name).toBe(unitName)
    expect(measure.grams).toBeCloseTo(grams, 9)
    expect(measure.qualifiers).toEqual(qualifiers)
  })
})

describe('volumes', () => {
  test('of one food convert among themselves: 16 tbsp, 48 tsp, 236.588 ml a cup', () => {
    const only = measured({ '1 cup': 240 })
    expect(weighUnit(only, unit('tbsp'), [], null)).toMatchObject({ grams: 15, measure: '1 cup' })
    expect(weighUnit(only, unit('tsp'), [], null)).toMatchObject({ grams: expect.closeTo(5, 9) })
    const millilitre = weighUnit(only, unit('ml'), [], null)
    expect(millilitre !== null && 'grams' in millilitre && millilitre.grams * 236.5882365).toBeCloseTo(240, 9)
  })

  test("the food's own spoon goes before what its cup would give", () => {
    expect(weighUnit(measured({ '1 cup': 240, '1 tbsp': 16 }), unit('tbsp'), [], null)).toMatchObject({
      grams: 16,
    })
  })

  test('without a volume measure there is no volume', () => {
    expect(weighUnit(measured({ '1 slice': 30 }), unit('cup'), [], null)).toBeNull()
    expect(weighUnit(measured({}), unit('ml'), [], null)).toBeNull()
  })

  test('words choose among measures of one unit; without them they must agree', () => {
    const two = measured({ '1 cup, chopped': 120, '1 cup, ground': 80 })
    expect(weighUnit(two, unit('cup'), ['ground'], null)).toMatchObject({ grams: 80 })
    expect(weighUnit(two, unit('cup'), [], null)).toHaveProperty('several')
    expect(
      weighUnit(measured({ '1 cup, halves': 100, '1 cup, pieces': 104 }), unit('cup'), [], null),
    ).toMatchObject({
      grams: 100,
    })
  })
})

test('a handful is 30 g of nuts, and nothing of beans', () => {
  expect(weighUnit(measured({}, 'nut-seed'), unit('handful'), [], null)).toMatchObject({ grams: 30 })
  expect(weighUnit(measured({}), unit('handful'), [], null)).toBeNull()
  expect(weighUnit(measured({ '1 handful': 40 }), unit('handful'), [], null)).toMatchObject({ grams: 40 })
})

test('one of a food is a measure named after it or its size', () => {
  const sizes = measured({ '1 tortilla, small': 20, '1 tortilla, large': 60, '1 cup': 100 })
  expect(weighOne(sizes, ['small'])).toMatchObject({ grams: 20 })
  expect(weighOne(sizes, ['large'])).toMatchObject({ grams: 60 })
  expect(weighOne(measured({ '1 large': 50 }), [])).toMatchObject({ grams: 50 })
  expect(weighOne(measured({ '1 slice': 30, '1 cup': 100 }), [])).toBeNull()
})
