import fc from 'fast-check'
import highsLoader, { type LegacyHighs } from 'highs'
import { describe, expect, test } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { profileOf, STAVES } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { Pattern } from '../../src/nutrition/pattern.ts'
import { digestibleMgPerG } from '../../src/nutrition/staves.ts'
import { labelRange } from '../../src/pairing/label-range.ts'
import { gameValue } from '../../src/pairing/matrix-game.ts'
import { aFood } from './a-food.ts'

/** FAO Food and Nutrition Paper 92 (2013), over 3 years. */
const pattern = {
  id: 'fao-2013-over-3y',
  mgPerG: { his: 16, ile: 30, leu: 61, lys: 48, saa: 23, aaa: 41, thr: 25, trp: 6.6, val: 40 },
} as Pattern

const diaas = (foods: Food[], masses: number[]) =>
  diaasOf(
    foods.map((food, i) => ({ food, grams: masses[i]! * 1000 })),
    pattern,
  ).diaas!

const anyFood = fc
  .record({
    amino: fc.array(fc.double({ min: 2, max: 110, noNaN: true }), { minLength: 11, maxLength: 11 }),
    digestible: fc.double({ min: 0.5, max: 1, noNaN: true }),
    protein: fc.oneof(fc.constant(0), fc.double({ min: 0.5, max: 90, noNaN: true })),
  })
  .map(({ amino, digestible, protein }) => {
    let i = 0
    return aFood({
      aminoMgPerG: profileOf(() => amino[i++]!),
      digestibility: { ...profileOf(() => digestible), proteinFaecal: digestible },
      per100g: { proteinG: protein, crudeProteinG: protein },
    })
  })
const anyLabel = fc.array(anyFood, { minLength: 1, maxLength: 8 })

describe('the range of a label', () => {
  test('one ingredient: no range', () => {
    const food = aFood({})
    const range = labelRange([food], pattern)!
    expect(range.low).toBeCloseTo(diaas([food], [1]), 9)
    expect(range.high).toBeCloseTo(range.low, 9)
    expect(range.atLow).toEqual([1])
    expect(range.atHigh).toEqual([1])
  })

  test('no protein at all: none', () => {
    expect(labelRange([], pattern)).toBeNull()
    expect(labelRange([aFood({ per100g: { crudeProteinG: 0 } })], pattern)).toBeNull()
  })

  test('wheat before soy: worst without the soy, best half and half', () => {
    const wheat = aFood({ aminoMgPerG: { ...profileOf(() => 90), lys: 22 }, per100g: { crudeProteinG: 12 } })
    const soy = aFood({ aminoMgPerG: { ...profileOf(() => 90), lys: 62 }, per100g: { crudeProteinG: 50 } })
    const range = labelRange([wheat, soy], pattern)!
    expect(range.atLow).toEqual([1, 0])
    expect(range.limitingAtLow).toBe('lys')
    expect(range.atHigh[0]).toBeCloseTo(0.5, 9)
  })

  test('the compositions at both ends keep the order and give the scores', () => {
    fc.assert(
      fc.property(anyLabel, foods => {
        const range = labelRange(foods, pattern)
        if (range === null) return
        for (const [masses, score] of [
          [range.atLow, range.low],
          [range.atHigh, range.high],
        ] as const) {
          expect(masses.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 9)
          masses.forEach((mass, i) => {
            expect(mass).toBeLessThanOrEqual((masses[i - 1] ?? 1) + 1e-9)
            expect(mass).toBeGreaterThanOrEqual(-1e-12)
          })
          expect(diaas(foods, masses)).toBeCloseTo(score, 6)
        }
      }),
      { numRuns: 300 },
    )
  })

  test('no composition in that order lies outside', () => {
    fc.assert(
      fc.property(
        anyLabel,
        fc.array(fc.double({ min: 0.001, max: 1, noNaN: true }), { minLength: 8, maxLength: 8 }),
        (foods, numbers) => {
          const range = labelRange(foods, pattern)
          const masses = numbers.slice(0, foods.length).sort((a, b) => b - a)
          const score = diaasOf(
            foods.map((food, i) => ({ food, grams: masses[i]! * 100 })),
            pattern,
          ).diaas
          if (range === null || score === null) return
          expect(score).toBeGreaterThanOrEqual(range.low - 1e-7)
          expect(score).toBeLessThanOrEqual(range.high + 1e-7)
        },
      ),
      { numRuns: 500 },
    )
  })

  test('the best is that of a general solver on the substituted programme', async () => {
    const highs = await (highsLoader as unknown as () => Promise<LegacyHighs>)()
    const labels = fc.sample(anyLabel, { numRuns: 60, seed: 20261201 })
    let compared = 0
    for (const foods of labels) {
      const range = labelRange(foods, pattern)
      if (range === null) continue
      // y = x / protein, in descending order; protein of y is 1; t is the least stave
      const term = (value: number, name: string) => `${value < 0 ? '-' : '+'} ${Math.abs(value)} ${name}`
      const rows = STAVES.map((stave, s) => {
        const parts = foods.map((food, i) =>
          term((food.per100g.crudeProteinG * digestibleMgPerG(food, stave)) / pattern.mgPerG[stave], `y${i}`),
        )
        return ` s${s}: ${parts.join(' ')} - t >= 0`
      })
      const order = foods.slice(1).map((_, i) => ` o${i}: y${i} - y${i + 1} >= 0`)
      const protein = ` p: ${foods.map((food, i) => term(food.per100g.crudeProteinG / 100, `y${i}`)).join(' ')} = 1`
      const bounds = foods.map((_, i) => ` 0 <= y${i} <= 1000000`)
      const problem = [
        'Maximize',
        ' obj: t',
        'Subject To',
        ...rows,
        ...order,
        protein,
        'Bounds',
        ...bounds,
        'End',
      ].join('\n')
      const solution = highs.solve(problem)
      expect(solution.Status).toBe('Optimal')
      expect(range.high).toBeCloseTo(solution.ObjectiveValue, 4)
      compared++
    }
    expect(compared).toBeGreaterThan(40)
  })
})

describe('the value of a matrix game', () => {
  test('matching pennies: even, and half and half', () => {
    const { value, mix } = gameValue([
      [1, -1],
      [-1, 1],
    ])
    expect(value).toBeCloseTo(0, 12)
    expect(mix[0]).toBeCloseTo(0.5, 12)
  })

  test('a saddle point: the row that is best at its worst', () => {
    const { value, mix } = gameValue([
      [3, 5],
      [1, 9],
      [2, 2],
    ])
    expect(value).toBeCloseTo(3, 12)
    expect(mix).toEqual([1, 0, 0])
  })

  test('equal rows, equal columns and zeros end', () => {
    expect(
      gameValue([
        [0, 0],
        [0, 0],
      ]).value,
    ).toBeCloseTo(0, 12)
    expect(gameValue(Array.from({ length: 20 }, () => Array(9).fill(97))).value).toBeCloseTo(97, 9)
  })
})
