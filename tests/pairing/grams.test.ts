import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { STAVES } from '../../src/nutrition/amino-acids.ts'
import { type Candidate, candidateOf, qualityOf, totalOf } from '../../src/pairing/candidate.ts'
import { bestGrams, type Window } from '../../src/pairing/grams.ts'
import { bestGramsOfFew } from '../../src/pairing/pair-grams.ts'
import { practicalGrams } from '../../src/pairing/practical.ts'
import { thriftyGrams } from '../../src/pairing/thrift.ts'
import { highs } from '../bench/optimum.ts'
import { basis, table } from './problems.ts'

const foods = table.foods.filter(({ place, per100g }) => place === 'protein' && per100g.proteinG > 1)

const candidate = fc.nat(foods.length - 1).map((i): Candidate => {
  const { least, most } = foods[i]!.portionG
  return candidateOf(foods[i]!, basis.pattern, { leastG: least, mostG: most })
})
const setOf = (minLength: number, maxLength: number) =>
  fc.uniqueArray(candidate, { minLength, maxLength, selector: ({ food }) => food.id })
const window = fc
  .record({
    low: fc.double({ min: 5, max: 60, noNaN: true }),
    energy: fc.option(fc.integer({ min: 200, max: 1500 })),
    mass: fc.option(fc.integer({ min: 100, max: 900 })),
  })
  .map(
    ({ low, energy, mass }): Window => ({
      leastProteinG: low,
      mostProteinG: 1.05 * low,
      energyAtMostKcal: energy,
      massAtMostG: mass,
    }),
  )

const keeps = (
  set: readonly Candidate[],
  grams: ArrayLike<number>,
  { leastProteinG, mostProteinG, energyAtMostKcal, massAtMostG }: Window,
): boolean => {
  const protein = totalOf(set, grams, 'protein')
  const mass = Array.from(grams).reduce((sum, g) => sum + g, 0)
  return (
    protein >= leastProteinG - 1e-6 &&
    protein <= mostProteinG + 1e-6 &&
    (energyAtMostKcal === null || totalOf(set, grams, 'kcal') <= energyAtMostKcal + 1e-6) &&
    (massAtMostG === null || mass <= massAtMostG + 1e-6) &&
    set.every(({ leastG, mostG }, j) => grams[j]! >= leastG - 1e-9 && grams[j]! <= mostG + 1e-9)
  )
}

/** The exact inner step as a linear programme for the solver: y = t g, the crude protein of the plate scaled to 1. */
function gramsProgramme(set: readonly Candidate[], of: Window): string {
  const sum = (parts: readonly (readonly [number, string])[]) =>
    parts
      .filter(([value]) => value !== 0)
      .map(([value, name]) => `${value < 0 ? '-' : '+'} ${Math.abs(value).toPrecision(15)} ${name}`)
      .join(' ')
  const total = (figure: (food: Candidate) => number) =>
    set.map((food, j) => [figure(food), `y${j}`] as const)
  const limit = (figure: (food: Candidate) => number, at: number | null, sign: '<=' | '>=') =>
    at === null ? [] : [`${sum([...total(figure), [-at, 't']])} ${sign} 0`]
  const rows = [
    `${sum(total(({ crude }) => crude))} = 1`,
    ...STAVES.map((_, i) => `${sum([...total(({ staves }) => staves[i]!), [-1, 'q']])} >= 0`),
    ...limit(({ protein }) => protein, of.leastProteinG, '>='),
    ...limit(({ protein }) => protein, of.mostProteinG, '<='),
    ...limit(({ kcal }) => kcal, of.energyAtMostKcal, '<='),
    ...limit(() => 1, of.massAtMostG, '<='),
    ...set.flatMap(({ leastG, mostG }, j) => [
      `y${j} - ${leastG.toPrecision(15)} t >= 0`,
      `y${j} - ${mostG.toPrecision(15)} t <= 0`,
    ]),
  ]
  return ['Maximize', ' obj: q', 'Subject To', ...rows.map((row, i) => ` r${i}: ${row}`), 'End'].join('\n')
}

describe('the exact inner step', () => {
  it('keeps to the window, reaches what it says, and no random grams do better', () => {
    fc.assert(
      fc.property(
        setOf(1, 5),
        window,
        fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 200, maxLength: 200 }),
        (set, of, shares) => {
          const best = bestGrams(set, of)
          let at = 0
          const random = () =>
            set.map(({ leastG, mostG }) => leastG + shares[at++ % shares.length]! * (mostG - leastG))
          for (let i = 0; i < 60; i++) {
            // Scaled towards the window, so that some of them keep to it.
            const grams = random()
            const scale = of.leastProteinG / totalOf(set, grams, 'protein')
            const tried = grams.map((g, j) =>
              Math.min(set[j]!.mostG, Math.max(set[j]!.leastG, g * scale * 1.01)),
            )
            if (!keeps(set, tried, of)) continue
            expect(best).not.toBeNull()
            expect(qualityOf(set, tried)).toBeLessThanOrEqual(best!.quality + 1e-7)
          }
          if (best === null) return
          expect(keeps(set, best.grams, of)).toBe(true)
          expect(qualityOf(set, best.grams)).toBeCloseTo(best.quality, 6)
        },
      ),
      { numRuns: 300 },
    )
  })

  it('is what a general-purpose solver (npm highs) finds, feasible or not', async () => {
    const solver = await highs()
    fc.assert(
      fc.property(setOf(1, 5), window, (set, of) => {
        const result = solver.solve(gramsProgramme(set, of), { output_flag: false } as never)
        const best = bestGrams(set, of)
        if (result.Status === 'Infeasible') expect(best).toBeNull()
        else {
          expect(result.Status).toBe('Optimal')
          expect(best!.quality).toBeCloseTo(result.ObjectiveValue, 5)
        }
      }),
      { numRuns: 150 },
    )
  })

  it('one and two foods in closed form are what the linear programme finds', () => {
    fc.assert(
      fc.property(setOf(1, 2), window, (set, of) => {
        const [programme, closed] = [bestGrams(set, of), bestGramsOfFew(set, of)]
        if (programme === null || closed === null) {
          // At the very edge of what is feasible the two may differ by rounding.
          const other = programme ?? closed
          if (other !== null) {
            const wider = {
              ...of,
              leastProteinG: of.leastProteinG * (1 - 1e-6),
              mostProteinG: of.mostProteinG * (1 + 1e-6),
            }
            expect(bestGrams(set, wider)).not.toBeNull()
          }
          return
        }
        expect(closed.quality).toBeCloseTo(programme.quality, 7)
        expect(keeps(set, closed.grams, of)).toBe(true)
      }),
      { numRuns: 600 },
    )
  })

  it('gives a set up early only where it cannot reach what is wanted', () => {
    fc.assert(
      fc.property(setOf(3, 5), window, fc.double({ min: 0.3, max: 1.3, noNaN: true }), (set, of, wanted) => {
        const whole = bestGrams(set, of)
        const early = bestGrams(set, of, wanted)
        if (early !== null) expect(early.quality).toBeCloseTo(whole!.quality, 9)
        else if (whole !== null) expect(whole.quality).toBeLessThanOrEqual(wanted + 1e-9)
      }),
    )
  })
})

describe('thrifty and practical grams', () => {
  it('thrift keeps the score and the window and never costs energy', () => {
    fc.assert(
      fc.property(setOf(1, 4), window, (set, of) => {
        const best = bestGrams(set, of)
        if (best === null) return
        const kept = Math.min(1, best.quality) - 1e-9
        const thrifty = thriftyGrams(set, of, kept)
        if (thrifty === null) return
        expect(keeps(set, thrifty, of)).toBe(true)
        expect(Math.min(1, qualityOf(set, thrifty))).toBeGreaterThanOrEqual(kept - 1e-6)
        expect(totalOf(set, thrifty, 'kcal')).toBeLessThanOrEqual(totalOf(set, best.grams, 'kcal') + 1e-4)
      }),
    )
  })

  it('practical grams are whole steps, or all that there is, and keep to the window where they say so', () => {
    fc.assert(
      fc.property(setOf(1, 4), window, (set, of) => {
        const best = bestGrams(set, of)
        if (best === null) return
        const { grams, quality, keeps: said } = practicalGrams(set, [best.grams], of)
        grams.forEach((g, j) => {
          const { food, leastG, mostG } = set[j]!
          const whole = Math.abs(g / food.stepG - Math.round(g / food.stepG)) < 1e-9
          expect(whole || g === Math.floor(mostG) || g === Math.ceil(leastG) || g === mostG).toBe(true)
        })
        expect(quality).toBeCloseTo(qualityOf(set, grams), 9)
        if (said) expect(keeps(set, grams, of)).toBe(true)
      }),
    )
  })
})
