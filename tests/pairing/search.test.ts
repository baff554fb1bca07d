import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Candidate, candidateOf, qualityOf } from '../../src/pairing/candidate.ts'
import { differentProposals } from '../../src/pairing/different.ts'
import { bestGrams, type Window, weighed } from '../../src/pairing/grams.ts'
import { lean } from '../../src/pairing/lean.ts'
import { priceBound, worthOf } from '../../src/pairing/price-bound.ts'
import { better, proposalOf, Search } from '../../src/pairing/search.ts'
import { leastOf, ownStaves, raise } from '../../src/pairing/stave-bound.ts'
import { basis, GALLEY, table } from './problems.ts'

const foods = table.foods.filter(({ place, per100g }) => place === 'protein' && per100g.proteinG > 1)
const candidate = fc.nat(foods.length - 1).map((i): Candidate => {
  const { least, most } = foods[i]!.portionG
  return candidateOf(foods[i]!, basis.pattern, { leastG: least, mostG: most })
})
const shelf = (minLength: number, maxLength: number) =>
  fc.uniqueArray(candidate, { minLength, maxLength, selector: ({ food }) => food.id })
const window = fc
  .record({
    low: fc.double({ min: 8, max: 50, noNaN: true }),
    energy: fc.option(fc.integer({ min: 200, max: 1200 })),
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

/** All sets of at most `free` of the foods, with the forced ones in, that roles and kin allow. */
function allSets(forced: readonly Candidate[], open: readonly Candidate[], free: number): Candidate[][] {
  const sets: Candidate[][] = []
  const visit = (start: number, chosen: Candidate[]): void => {
    const set = [...forced, ...chosen]
    if (set.length > 0) sets.push(set)
    if (chosen.length === free) return
    for (let i = start; i < open.length; i++) {
      const food = open[i]!.food
      if (set.some(other => other.food.kin === food.kin)) continue
      if (set.filter(other => other.food.role === food.role).length >= 2) continue
      visit(i + 1, [...chosen, open[i]!])
    }
  }
  visit(0, [])
  return sets
}

describe('the search', () => {
  it('finds what trying every set finds, with forced foods and ceilings too', () => {
    fc.assert(
      fc.property(
        shelf(1, 9),
        window,
        fc.integer({ min: 1, max: 3 }),
        fc.nat(1),
        fc.boolean(),
        (all, of, k, marked, several) => {
          const forced = all.slice(0, Math.min(marked, k)).map(food => ({ ...food, useUp: true }))
          const open = all.slice(forced.length).filter(({ food }) => food.kin !== forced[0]?.food.kin)
          const tried = allSets(forced, open, k - forced.length).flatMap(set => bestGrams(set, of) ?? [])
          const best = Math.max(-1, ...tried.map(({ quality }) => Math.min(1, quality)))
          const aim = several
            ? { enough: 15, slack: 0.12, growth: 0.12, seeds: 16 }
            : { enough: 1, slack: 0, growth: 0.02, seeds: 4 }
          const [found] = new Search({ forced, open, foodsAtMost: k, window: of }, aim).run()
          expect(found === undefined ? -1 : Math.min(1, found.quality)).toBeCloseTo(best, 5)
        },
      ),
      { numRuns: 150 },
    )
  })
})

describe('bounds', () => {
  it('prices of any set bound what any other set reaches, and prove what its own reaches', () => {
    fc.assert(
      fc.property(shelf(2, 5), shelf(1, 5), window, (priced, other, of) => {
        const { best, prices } = weighed(priced, of, 0)
        if (best === null || prices === null) return
        const bound = (set: readonly Candidate[]) =>
          priceBound(
            set.map(food => ({ ...food, worth: worthOf(food, prices) })),
            prices.allowance,
            0,
          )
        expect(prices.staves.reduce((sum, price) => sum + price, 0)).toBeCloseTo(1, 9)
        expect(bound(priced)).toBeCloseTo(best.quality, 6)
        const reached = bestGrams(other, of)
        if (reached !== null) expect(bound(other)).toBeGreaterThanOrEqual(reached.quality - 1e-7)
      }),
      { numRuns: 400 },
    )
  })

  it('no mixture has a longer shortest stave than the longest of its foods allow', () => {
    fc.assert(
      fc.property(
        shelf(2, 5),
        fc.array(fc.double({ min: 1, max: 300, noNaN: true }), { minLength: 5 }),
        (set, grams) => {
          const bound = ownStaves(set[0]!)
          for (const food of set.slice(1, -1)) raise(bound, ownStaves(food))
          expect(qualityOf(set, grams.slice(0, set.length))).toBeLessThanOrEqual(
            leastOf(bound, ownStaves(set.at(-1)!)) + 1e-9,
          )
        },
      ),
    )
  })
})

describe('a lean proposal', () => {
  it('loses less than half a point and no class, and keeps what is to be used up', () => {
    let fewer = 0
    fc.assert(
      fc.property(shelf(2, 5), window, fc.boolean(), (all, of, useUp) => {
        const set = useUp ? all.map((food, j) => ({ ...food, useUp: j === 0 })) : all
        const proposal = proposalOf(set, of)
        if (proposal === null) return
        const leaner = lean(proposal, of)
        const lost = Math.min(1, proposal.quality) - Math.min(1, leaner.quality)
        expect(lost).toBeLessThanOrEqual(0.005 + 1e-9)
        if (proposal.quality >= 1) expect(leaner.quality).toBeGreaterThanOrEqual(1 - 1e-9)
        if (useUp) expect(leaner.set).toContain(set[0])
        if (leaner.set.length < set.length) fewer++
      }),
      { numRuns: 400 },
    )
    expect(fewer).toBeGreaterThan(0)
  })
})

describe('different proposals', () => {
  const of: Window = { leastProteinG: 30, mostProteinG: 31.5, energyAtMostKcal: null, massAtMostG: null }
  const open = GALLEY.filter(({ food }) => food.place === 'protein' && food.origin === 'plant').map(
    ({ food }) =>
      candidateOf(food, basis.pattern, { leastG: food.portionG.least, mostG: food.portionG.most }),
  )
  const aim = { enough: 15, slack: 0.12, growth: 0.12, seeds: 16 }
  const found = new Search({ forced: [], open, foodsAtMost: 3, window: of }, aim).run()

  it('share at most a third of the smaller one where the shelf allows, the best first', () => {
    const chosen = differentProposals(found, 3, new Set())
    expect(chosen).toHaveLength(3)
    expect(chosen[0]).toBe(found[0])
    for (const [i, a] of chosen.entries()) {
      for (const b of chosen.slice(i + 1)) {
        const both = a.kins.filter(kin => b.kins.includes(kin)).length
        expect(both).toBeLessThanOrEqual(Math.min(a.kins.length, b.kins.length) / 3)
        expect(better(b, a)).toBe(false)
      }
    }
  })

  it('differ in one foodstuff at least where more are asked for than there are meals', () => {
    const chosen = differentProposals(found, 9, new Set())
    expect(new Set(chosen.map(({ kins }) => kins.join())).size).toBe(chosen.length)
  })

  it('prefer more of what is to be used up, then fewer foods, then less energy, where scores are equal', () => {
    const base = found[0]!
    const like = (more: object) => ({ ...base, quality: 1.2, ...more })
    const used = { set: base.set.map(food => ({ ...food, useUp: true })) }
    const moreG = base.grams.map(g => g + 5)
    expect(
      better(like({ ...used, grams: moreG, places: 3, kcal: 900 }), like({ ...used, places: 2, kcal: 1 })),
    ).toBe(true)
    expect(better(like({ places: 2, kcal: 900 }), like({ places: 3, kcal: 1 }))).toBe(true)
    expect(better(like({ kcal: 400 }), like({ kcal: 500 }))).toBe(true)
    expect(better(like({ quality: 0.9, places: 1 }), like({ quality: 0.95, places: 3 }))).toBe(false)
  })
})
