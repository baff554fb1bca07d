import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ALLERGEN_IDS } from '../../src/foods/allergens.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { scorePlate } from '../../src/nutrition/plate-score.ts'
import { seededUniform } from '../../src/nutrition/random.ts'
import { admit } from '../../src/pairing/admit.ts'
import { bestProposals, findPairings, windowOf } from '../../src/pairing/find-pairings.ts'
import type { Mark, PairingProblem } from '../../src/pairing/problem.ts'
import { highs, optimumOf } from '../bench/optimum.ts'
import { hardProblem, randomProblem } from '../bench/random-shelves.ts'
import { basis, GALLEY, problemOf, shelfOf, table } from './problems.ts'

const paired = table.foods.filter(({ place }) => place === 'protein' || place === 'seasoning')

const anyProblem = fc
  .record({
    items: fc.uniqueArray(
      fc.record({
        at: fc.nat(paired.length - 1),
        grams: fc.integer({ min: 5, max: 3000 }),
        mark: fc.constantFrom<Mark>('', '', '', '', 'hold-back', 'use-up'),
      }),
      { minLength: 1, maxLength: 14, selector: ({ at }) => at },
    ),
    targetG: fc.integer({ min: 10, max: 50 }),
    servings: fc.integer({ min: 1, max: 4 }),
    foodsAtMost: fc.integer({ min: 1, max: 5 }),
    without: fc.subarray([...ALLERGEN_IDS], { maxLength: 2 }),
    eggs: fc.boolean(),
    dairy: fc.boolean(),
    energyAtMostKcal: fc.option(fc.integer({ min: 300, max: 1200 })),
    massAtMostG: fc.option(fc.integer({ min: 150, max: 900 })),
  })
  .map(
    ({ items, eggs, dairy, ...more }): PairingProblem =>
      problemOf(
        items.map(({ at, grams, mark }) => ({ food: paired[at]!, onHandG: grams, mark })),
        { ...more, allow: { eggs, dairy } },
      ),
  )

describe('whatever the shelf', () => {
  it('every proposal keeps to every constraint', () => {
    fc.assert(
      fc.property(anyProblem, problem => {
        const answer = findPairings(problem)
        expect(answer.reached).toBe(answer.reason === null)
        const useUp = problem.shelf.filter(({ mark }) => mark === 'use-up').map(item => item.food.id)
        for (const { portions, score } of answer.pairings) {
          const onShelf = new Map(problem.shelf.map(item => [item.food.id, item]))
          const places = portions.filter(portion => portion.food.place === 'protein')
          expect(places.length).toBeLessThanOrEqual(problem.foodsAtMost)
          expect(new Set(portions.map(portion => portion.food.kin)).size).toBe(portions.length)
          for (const portion of portions) {
            const item = onShelf.get(portion.food.id)!
            const share = item.onHandG! / problem.servings
            expect(portion.grams).toBeGreaterThan(0)
            expect(portion.grams).toBeLessThanOrEqual(Math.min(share, portion.food.portionG.most) + 1e-9)
            expect(portion.grams).toBeGreaterThanOrEqual(Math.min(share, portion.food.portionG.least) - 1)
            expect(item.mark).not.toBe('hold-back')
            expect(portion.food.allergens.filter(id => problem.without.includes(id))).toEqual([])
            if (portion.food.origin === 'egg') expect(problem.allow.eggs).toBe(true)
            if (portion.food.origin === 'dairy') expect(problem.allow.dairy).toBe(true)
            expect(portion.food.origin).not.toBe('animal')
            if (portion.food.place === 'seasoning') expect(item.mark).toBe('use-up')
          }
          for (const role of new Set(places.map(portion => portion.food.role))) {
            const free = places.filter(
              portion => portion.food.role === role && !useUp.includes(portion.food.id),
            )
            expect(free.length).toBeLessThanOrEqual(2)
          }
          for (const id of useUp) expect(portions.map(portion => portion.food.id)).toContain(id)
          if (problem.energyAtMostKcal !== null && answer.reached)
            expect(score.kcal).toBeLessThanOrEqual(problem.energyAtMostKcal + 1e-6)
          if (problem.massAtMostG !== null && answer.reached)
            expect(score.grams).toBeLessThanOrEqual(problem.massAtMostG + 1e-6)
          // Where steps of 5 g cannot meet the window, the plate misses it by less than a step brings.
          if (answer.reached) {
            const step = Math.max(
              ...portions.map(portion => (portion.food.stepG * portion.food.per100g.proteinG) / 100),
            )
            expect(score.proteinG).toBeGreaterThanOrEqual(problem.targetG - step)
            expect(score.proteinG).toBeLessThanOrEqual(1.05 * problem.targetG + step)
          }
        }
      }),
      { numRuns: 300 },
    )
  })

  it('the same problem has the same answer', () => {
    fc.assert(
      fc.property(anyProblem, problem => {
        const ids = () =>
          findPairings(problem).pairings.map(({ portions }) =>
            portions.map(({ food: { id }, grams }) => [id, grams]),
          )
        expect(ids()).toEqual(ids())
      }),
      { numRuns: 30 },
    )
  })
})

describe('against a general-purpose solver (npm highs), the same problem with continuous grams', () => {
  it('finds the optimum of random and of hard shelves', async () => {
    const solver = await highs()
    const uniform = seededUniform(3)
    for (let i = 0; i < 36; i++) {
      const make = i % 3 === 0 ? hardProblem : randomProblem
      const problem = make(table, uniform, 8 + Math.floor(25 * uniform()), 2 + (i % 4))
      const best = bestProposals({ ...problem, pairings: 1 }, admit(problem), windowOf(problem))[0]
      const optimum = optimumOf(problem, solver)
      if (optimum === null) expect(best).toBeUndefined()
      else expect(optimum - Math.min(100, 100 * best!.quality)).toBeLessThan(0.5)
    }
  })
})

describe('the galley', () => {
  it('has three different pairings that reach the target with the best quality first', () => {
    const { reached, pairings, reason } = findPairings(problemOf(GALLEY))
    expect(reached).toBe(true)
    expect(reason).toBeNull()
    expect(pairings).toHaveLength(3)
    const kins = pairings.map(({ portions }) => portions.map(({ food: { kin } }) => kin))
    for (const [i, a] of kins.entries()) {
      for (const b of kins.slice(i + 1))
        expect(a.filter(kin => b.includes(kin)).length).toBeLessThan(Math.max(a.length, b.length))
    }
    const scores = pairings.map(({ score }) => Math.min(100, score.diaas!))
    expect([...scores].sort((a, b) => b - a)).toEqual(scores)
  })

  it('beats its best single food', () => {
    const singles = GALLEY.filter(
      ({ food: { place, origin } }) => place === 'protein' && origin === 'plant',
    ).map(item => diaasOf([{ food: item.food, grams: 1 }], basis.pattern).diaas!)
    expect(findPairings(problemOf(GALLEY)).pairings[0]!.score.diaas!).toBeGreaterThan(
      Math.min(99, Math.max(...singles)),
    )
  })

  it('puts in what is to be used up, and more of it where nothing is lost by it', () => {
    const used = GALLEY.map(item =>
      item.food.id === 'oats-rolled' ? { ...item, mark: 'use-up' as const } : item,
    )
    for (const { portions } of findPairings(problemOf(used)).pairings) {
      expect(portions.map(({ food: { id } }) => id)).toContain('oats-rolled')
    }
    const oil = GALLEY.map(item =>
      item.food.id === 'carrots-raw' ? { ...item, mark: 'use-up' as const } : item,
    )
    const [first] = findPairings(problemOf(oil)).pairings
    const carrots = first!.portions.find(({ food: { id } }) => id === 'carrots-raw')!
    expect(carrots.grams).toBeGreaterThan(carrots.food.portionG.least)
    // A step more would cost quality, or leave the window.
    const more = scorePlate(
      first!.portions.map(portion =>
        portion === carrots ? { ...portion, grams: portion.grams + 50 } : portion,
      ),
      basis,
    )
    const lost = Math.min(100, more.diaas!) < Math.min(100, first!.score.diaas!) - 0.01
    expect(lost || more.proteinG > 1.05 * 35 || carrots.grams >= carrots.food.portionG.most).toBe(true)
  })

  it('uses eggs and milk only where they are allowed', () => {
    const ids = (allow: { eggs: boolean; dairy: boolean }) =>
      findPairings(problemOf(GALLEY, { allow, pairings: 5 })).pairings.flatMap(({ portions }) =>
        portions.map(({ food: { id } }) => id),
      )
    expect(ids({ eggs: false, dairy: false })).not.toContain('eggs-raw')
    expect(ids({ eggs: true, dairy: true })).toContain('eggs-raw')
  })
})

describe('where no plate is possible, the reason and the nearest plate', () => {
  it.each([
    ['an empty shelf', problemOf([]), /shelf is empty/, 0],
    ['nothing plant-based', problemOf(shelfOf('eggs-raw 600', 'cheddar 300')), /2 animal foods/, 0],
    [
      'only what brings no protein',
      problemOf(shelfOf('olive-oil 500', 'carrots-raw 500')),
      /no protein to speak of/,
      0,
    ],
    ['everything held back', problemOf(shelfOf('tofu-firm 600 hold-back')), /held back/, 0],
    ['an allergen in all of it', problemOf(shelfOf('tofu-firm 600'), { without: ['soy'] }), /allergen/, 0],
    [
      'a target too high',
      problemOf(shelfOf('rice-white-dry 500'), { targetG: 60 }),
      /60 g protein .* 7\.8 g at most/,
      1,
    ],
    [
      'too little on hand for the servings',
      problemOf(shelfOf('tofu-firm 200', 'rice-white-dry 400'), { servings: 4, targetG: 40 }),
      /shared among 4 servings/,
      1,
    ],
    [
      'an energy ceiling',
      problemOf(shelfOf('peanut-butter 500', 'oats-rolled 500'), { energyAtMostKcal: 200 }),
      /200 kcal/,
      1,
    ],
    [
      'marks that do not fit within a ceiling',
      problemOf(
        shelfOf(
          'adzuki-beans-boiled 21 use-up',
          'soba-noodles-boiled 80 use-up',
          'couscous-boiled 50 use-up',
        ),
        {
          massAtMostG: 150,
          targetG: 10,
        },
      ),
      /does not fit within 150 g: its least portions come to 151 g/,
      1,
    ],
    [
      'a mark against an allergen',
      problemOf(shelfOf('tofu-firm 600 use-up', 'rice-white-dry 500'), { without: ['soy'] }),
      /used up, but holds/,
      0,
    ],
    [
      'a mark on an animal food',
      problemOf(shelfOf('eggs-raw 600 use-up', 'rice-white-dry 500')),
      /animal food that is not allowed/,
      0,
    ],
    [
      'more marks than places',
      problemOf(shelfOf('tofu-firm 600 use-up', 'lentils-red-dry 500 use-up'), { foodsAtMost: 1 }),
      /2 foods are to be used up/,
      0,
    ],
    [
      'one food to be used up twice',
      problemOf(shelfOf('lentils-red-dry 500 use-up', 'lentils-red-boiled 500 use-up')),
      /are one food/,
      0,
    ],
  ])('%s', (_, problem, reason, plates) => {
    const answer = findPairings(problem)
    expect(answer.reached).toBe(false)
    expect(answer.reason).toMatch(reason)
    expect(answer.pairings).toHaveLength(plates)
  })
})
