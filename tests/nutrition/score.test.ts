import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { scoreBasis } from '../../src/foods/score.ts'
import { AMINO_ACIDS, profileOf, STAVES } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { pdcaasOf } from '../../src/nutrition/pdcaas.ts'
import { scorePlate } from '../../src/nutrition/plate-score.ts'
import type { Portion, ProteinSource } from '../../src/nutrition/protein-source.ts'
import { qualityClass } from '../../src/nutrition/quality-class.ts'
import { normalQuantile } from '../../src/nutrition/random.ts'
import { stavesOfPlate } from '../../src/nutrition/staves.ts'
import { mealTargetG } from '../../src/nutrition/targets.ts'
import { bandOf } from '../../src/nutrition/uncertainty.ts'

const table = loadTable()
const basis = scoreBasis(table)
const { pattern, pdcaasPattern, coefficients } = basis

const proteins = table.foods.filter(food => food.per100g.crudeProteinG > 0)
const portion = fc
  .tuple(fc.nat(proteins.length - 1), fc.double({ min: 0.5, max: 500, noNaN: true }))
  .map(([i, grams]): Portion => ({ food: proteins[i]!, grams }))
const plate = fc.array(portion, { minLength: 1, maxLength: 5 })

const near = (a: number, b: number) => expect(Math.abs(a - b)).toBeLessThan(1e-9 * Math.max(1, Math.abs(a)))

describe('the score of any plate', () => {
  it('does not depend on how large the plate is', () => {
    fc.assert(
      fc.property(plate, fc.double({ min: 0.01, max: 100, noNaN: true }), (portions, scale) => {
        const larger = portions.map(({ food, grams }) => ({ food, grams: grams * scale }))
        near(diaasOf(portions, pattern).diaas!, diaasOf(larger, pattern).diaas!)
        near(pdcaasOf(portions, pdcaasPattern)!, pdcaasOf(larger, pdcaasPattern)!)
      }),
    )
  })

  it('is not changed by splitting or reordering portions, and nor is its band', () => {
    fc.assert(
      fc.property(plate, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (portions, share) => {
        const split = portions.flatMap(({ food, grams }) => [
          { food, grams: grams * share },
          { food, grams: grams - grams * share },
        ])
        const [a, b] = [scorePlate(portions, basis), scorePlate(split.reverse(), basis)]
        near(a.diaas!, b.diaas!)
        near(a.proteinG, b.proteinG)
        expect(a.band!.low).toBeCloseTo(b.band!.low, 9)
        expect(a.band!.high).toBeCloseTo(b.band!.high, 9)
        expect(bandOf([...portions].reverse(), pattern, coefficients)!.low).toBeCloseTo(a.band!.low, 9)
      }),
    )
  })

  it('has each stave between the shortest and the longest of its foods, so none is above what they attain', () => {
    fc.assert(
      fc.property(plate, portions => {
        const mixture = stavesOfPlate(portions, pattern)!
        const own = portions.map(({ food }) => stavesOfPlate([{ food, grams: 1 }], pattern)!)
        for (const stave of STAVES) {
          expect(mixture[stave]).toBeLessThanOrEqual(Math.max(...own.map(s => s[stave])) + 1e-9)
          expect(mixture[stave]).toBeGreaterThanOrEqual(Math.min(...own.map(s => s[stave])) - 1e-9)
        }
        const attainable = Math.min(...STAVES.map(stave => Math.max(...own.map(s => s[stave]))))
        expect(diaasOf(portions, pattern).diaas!).toBeLessThanOrEqual(attainable + 1e-9)
      }),
    )
  })

  it('never falls when a food holds more of an amino acid, or more of it is digested', () => {
    fc.assert(
      fc.property(
        plate,
        fc.constantFrom(...AMINO_ACIDS),
        fc.double({ min: 1, max: 2, noNaN: true }),
        (portions, acid, more) => {
          const before = diaasOf(portions, pattern).diaas!
          const [first, ...rest] = portions
          const richer: ProteinSource = {
            ...first!.food,
            aminoMgPerG: { ...first!.food.aminoMgPerG, [acid]: first!.food.aminoMgPerG[acid] * more },
          }
          const digested: ProteinSource = {
            ...first!.food,
            digestibility: { ...first!.food.digestibility, [acid]: first!.food.digestibility[acid] * more },
          }
          for (const food of [richer, digested]) {
            expect(diaasOf([{ food, grams: first!.grams }, ...rest], pattern).diaas!).toBeGreaterThanOrEqual(
              before - 1e-9,
            )
          }
        },
      ),
    )
  })

  it('gains by mixing, never loses: DIAAS is at least the protein-weighted mean of the foods` own', () => {
    // The least of sums is not below the sum of the least.
    fc.assert(
      fc.property(plate, portions => {
        expect(scorePlate(portions, basis).gain!).toBeGreaterThan(-1e-9)
      }),
    )
  })

  it('has neither gain nor lift for one food, whatever its grams', () => {
    fc.assert(
      fc.property(portion, one => {
        const score = scorePlate([one, one], basis)
        near(score.gain!, 0)
        near(score.lift!, 0)
      }),
    )
  })

  it('takes no notice of what brings no protein, or is not on the plate', () => {
    const oil = table.foods.find(({ per100g }) => per100g.crudeProteinG === 0)!
    fc.assert(
      fc.property(plate, portion, (portions, absent) => {
        const plain = scorePlate(portions, basis)
        const dressed = scorePlate(
          [{ food: oil, grams: 15 }, ...portions, { food: absent.food, grams: 0 }],
          basis,
        )
        for (const key of ['diaas', 'pdcaas', 'gain', 'lift', 'adjustedProteinG'] as const)
          near(plain[key]!, dressed[key]!)
        expect(dressed.limiting).toBe(plain.limiting)
        expect(dressed.band).toEqual(plain.band)
      }),
    )
  })

  it('has a PDCAAS that never falls when a food is digested better or holds more of an amino acid', () => {
    fc.assert(
      fc.property(
        plate,
        fc.constantFrom(...AMINO_ACIDS),
        fc.double({ min: 1, max: 1.5, noNaN: true }),
        ([first, ...rest], acid, more) => {
          const { food, grams } = first!
          const before = pdcaasOf([first!, ...rest], pdcaasPattern)!
          const { digestibility, aminoMgPerG } = food
          const digested = { ...digestibility, proteinFaecal: digestibility.proteinFaecal * more }
          const richer = { ...aminoMgPerG, [acid]: aminoMgPerG[acid] * more }
          for (const better of [
            { ...food, digestibility: digested },
            { ...food, aminoMgPerG: richer },
          ])
            expect(pdcaasOf([{ food: better, grams }, ...rest], pdcaasPattern)!).toBeGreaterThanOrEqual(
              before - 1e-9,
            )
        },
      ),
    )
  })

  it('has the same band each time, whatever was scored in between', () => {
    fc.assert(
      fc.property(plate, plate, (portions, others) => {
        const first = bandOf(portions, pattern, coefficients)
        bandOf(others, pattern, coefficients)
        expect(bandOf(portions, pattern, coefficients)).toEqual(first)
      }),
    )
  })

  it('keeps its own definitions: truncation, adjusted protein, gain, lift, band', () => {
    fc.assert(
      fc.property(plate, portions => {
        const score = scorePlate(portions, basis)
        expect(score.pdcaas!).toBeLessThanOrEqual(100)
        near(score.adjustedProteinG, score.crudeProteinG * Math.min(1, score.diaas! / 100))
        const own = portions.map(({ food }) => diaasOf([{ food, grams: 1 }], pattern).diaas!)
        const crude = portions.map(({ food, grams }) => food.per100g.crudeProteinG * grams)
        const mean =
          own.reduce((sum, diaas, i) => sum + diaas * crude[i]!, 0) / crude.reduce((a, b) => a + b, 0)
        near(score.gain!, score.diaas! - mean)
        near(score.lift!, score.diaas! - Math.max(...own))
        expect(score.diaas).toBe(Math.min(...STAVES.map(stave => score.staves![stave])))
        expect(score.staves![score.limiting!]).toBe(score.diaas)
        expect(score.band!.low).toBeLessThan(score.band!.high)
        expect(STAVES.reduce((sum, stave) => sum + score.band!.limitingShare[stave], 0)).toBeCloseTo(1, 9)
      }),
    )
  })
})

/** A food whose every figure is known, for sums that can be done by hand. */
function plain(id: string, crudeProteinG: number, mgPerG: number, digestibility = 1): ProteinSource {
  return {
    id,
    per100g: { proteinG: crudeProteinG, crudeProteinG, kcal: 100, fibreG: null },
    aminoMgPerG: profileOf(() => mgPerG),
    digestibility: { ...profileOf(() => digestibility), proteinFaecal: digestibility },
    profileTier: 'measured',
    digestibilityTier: 'ileal, this food',
    doubts: [],
  }
}

describe('sums that can be done by hand', () => {
  it('scores a plate without protein as nothing to score', () => {
    const water = plain('water', 0, 0)
    const score = scorePlate([{ food: water, grams: 200 }], basis)
    expect([
      score.diaas,
      score.limiting,
      score.staves,
      score.band,
      score.pdcaas,
      score.gain,
      score.lift,
    ]).toEqual(Array(7).fill(null))
    expect(score.adjustedProteinG).toBe(0)
    expect(scorePlate([], basis).diaas).toBeNull()
  })

  it('adds methionine and cysteine after each is made digestible with its own coefficient', () => {
    const food = plain('sulphur', 10, 100)
    food.aminoMgPerG.met = 20
    food.aminoMgPerG.cys = 10
    food.digestibility.met = 0.9
    food.digestibility.cys = 0.5
    expect(stavesOfPlate([{ food, grams: 50 }], pattern)!.saa).toBeCloseTo(
      (100 * (20 * 0.9 + 10 * 0.5)) / 23,
      9,
    )
  })

  it('weighs a mixture by crude protein, not by grams or by the protein of the label', () => {
    const rich = plain('rich', 30, 60)
    const poor = {
      ...plain('poor', 10, 30),
      per100g: { proteinG: 99, crudeProteinG: 10, kcal: 0, fibreG: null },
    }
    const lysine = stavesOfPlate(
      [
        { food: rich, grams: 100 },
        { food: poor, grams: 300 },
      ],
      pattern,
    )!.lys
    expect(lysine).toBeCloseTo((100 * (30 * 60 + 30 * 30)) / 60 / 48, 9)
  })

  it('adds up grams, energy, protein, leucine and fibre; fibre of foods where it is known', () => {
    const first: ProteinSource = {
      ...plain('first', 20, 80),
      per100g: { proteinG: 18, crudeProteinG: 20, kcal: 150, fibreG: 6 },
    }
    const second = plain('second', 10, 60)
    const score = scorePlate(
      [
        { food: first, grams: 150 },
        { food: second, grams: 50 },
      ],
      basis,
    )
    near(score.grams, 200)
    near(score.kcal, 1.5 * 150 + 0.5 * 100)
    near(score.proteinG, 1.5 * 18 + 0.5 * 10)
    near(score.crudeProteinG, 1.5 * 20 + 0.5 * 10)
    // 80 and 60 mg leucine in each g of crude protein, digested or not.
    near(score.leucineG, (30 * 80 + 5 * 60) / 1000)
    near(score.fibreG, 9)
  })

  it('has a wider band for each doubt, at the staves that the doubt names', () => {
    const width = (food: ProteinSource) => {
      const band = bandOf([{ food, grams: 100 }], pattern, coefficients)!
      return band.high - band.low
    }
    const byLysine = plain('doubted', 10, 1000)
    byLysine.aminoMgPerG.lys = 20
    const byThreonine = plain('doubted', 10, 1000)
    byThreonine.aminoMgPerG.thr = 10
    for (const doubt of ['non-protein-nitrogen', 'related-species', 'own-food', 'heat-damaged'] as const)
      expect(width({ ...byLysine, doubts: [doubt] })).toBeGreaterThan(1.2 * width(byLysine))
    // Dry heat takes lysine; threonine it leaves.
    near(width({ ...byThreonine, doubts: ['heat-damaged'] }), width(byThreonine))
  })

  it('takes the spread of protein content into a mixture`s band, where it shifts the weights, and not into one food`s', () => {
    const [low, high] = [plain('low', 10, 1000), plain('high', 10, 1000)]
    low.aminoMgPerG.lys = 10
    high.aminoMgPerG.lys = 90
    const width = (protein: number, ...foods: ProteinSource[]) => {
      const portions = foods.map(food => ({ food, grams: 100 }))
      const band = bandOf(portions, pattern, { ...coefficients, protein })!
      return band.high - band.low
    }
    expect(width(0.3, low, high)).toBeGreaterThan(1.15 * width(0, low, high))
    near(width(0.3, low), width(0, low))
  })

  it('has a narrower band where the figures are firmer', () => {
    const firm = plain('same', 10, 40)
    const soft: ProteinSource = { ...firm, profileTier: 'estimated', digestibilityTier: 'class default' }
    const width = (food: ProteinSource) => {
      const band = bandOf([{ food, grams: 100 }], pattern, coefficients)!
      return band.high - band.low
    }
    expect(width(soft)).toBeGreaterThan(1.5 * width(firm))
  })

  it('holds about 90 % of a single stave within its band', () => {
    // One stave far below the others: its score is one log-normal factor of known spread.
    const food = plain('one', 10, 1000)
    food.aminoMgPerG.lys = 20
    const band = bandOf([{ food, grams: 100 }], pattern, coefficients)!
    const cv = Math.hypot(coefficients.profile.measured.lys, coefficients.digestibility['ileal, this food'])
    const exact = (100 * 20) / 48
    expect(band.low).toBeCloseTo(exact * Math.exp(-1.645 * cv - (cv * cv) / 2), -0.5)
    expect(band.high).toBeCloseTo(exact * Math.exp(1.645 * cv - (cv * cv) / 2), -0.5)
    expect(Math.abs(band.low / (exact * Math.exp(-1.645 * cv)) - 1)).toBeLessThan(0.03)
    expect(band.limitingShare.lys).toBe(1)
  })

  it('knows the normal distribution', () => {
    // Handbook values of the standard normal distribution.
    expect(normalQuantile(0.975)).toBeCloseTo(1.959964, 6)
    expect(normalQuantile(0.95)).toBeCloseTo(1.644854, 6)
    expect(normalQuantile(0.005)).toBeCloseTo(-2.575829, 6)
    expect(normalQuantile(0.5)).toBeCloseTo(0, 12)
  })

  it('works out a meal from body mass', () => {
    expect(mealTargetG({ bodyMassKg: 70, gPerKgPerDay: 1.6, mealsPerDay: 3 })).toBeCloseTo(37.33, 2)
  })
})

describe('quality classes (FAO Food and Nutrition Paper 92, 2013)', () => {
  it.each([
    [100, 'excellent'],
    [143, 'excellent'],
    [99.99, 'good'],
    [75, 'good'],
    [74.99, 'no claim'],
    [0, 'no claim'],
    [null, 'no claim'],
  ] as const)('%s is %s', (diaas, name) => {
    expect(qualityClass(diaas)).toBe(name)
  })
})
