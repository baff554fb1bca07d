import { describe, expect, test } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { loadKitchen } from '../../src/kitchen/load.ts'
import { yieldByWater } from '../../src/kitchen/water-balance.ts'
import { cookedFrom, dryFor } from '../../src/kitchen/yields.ts'

const table = loadTable()
const { yields } = loadKitchen()

describe('the water balance against worked examples', () => {
  // USDA SR28 (2015), NDB 16001 and 16002, adzuki beans: water 13.44 and 66.29 %, protein 19.87 and 7.52 g.
  test('adzuki beans: 2.60, between 2.57 and 2.64', () => {
    const found = yieldByWater(
      { waterG: 13.44, crudeProteinG: 19.87 },
      { waterG: 66.29, crudeProteinG: 7.52 },
    )!
    expect(found.factor).toBeCloseTo(2.6, 2)
    expect(found.low).toBeCloseTo(2.57, 2)
    expect(found.high).toBeCloseTo(2.64, 2)
  })

  // Plant Foods for Human Nutrition 1986;36:157-165: ten varieties of beans reach about 65 % moisture and 2.5 times
  // their weight (read, abstract). Water 11 % dry, as USDA SR28 gives for black turtle beans.
  test('ten varieties of beans: 2.5, within 3 %', () => {
    const found = yieldByWater({ waterG: 11, crudeProteinG: 22 }, { waterG: 65, crudeProteinG: 22 / 2.5 })!
    expect(Math.abs(found.factor - 2.5) / 2.5).toBeLessThan(0.03)
  })
})

describe('yields of the table against handbook values', () => {
  // USDA SR28 pairs by protein and dry matter (read and computed), and UK composition tables by protein (memory).
  test.each([
    ['chickpeas', 2.32, 'USDA SR28, NDB 16056 and 16057'],
    ['chickpeas', 2.54, 'UK composition tables (memory)'],
    ['kidney-beans', 2.63, 'USDA SR28, NDB 16032 and 16033; UK composition tables (memory)'],
    ['pinto-beans', 2.39, 'USDA SR28, NDB 16042 and 16043'],
    ['lentils-brown', 2.87, 'USDA SR28, NDB 16069 and 16070'],
    ['lentils-brown', 2.76, 'UK composition tables (memory)'],
    ['rice-white', 2.72, 'USDA SR28, NDB 20044 and 20045'],
    ['rice-white', 2.81, 'UK composition tables (memory)'],
    ['rice-brown', 2.86, 'USDA SR28, NDB 20036 and 20037'],
    ['rice-brown', 2.58, 'UK composition tables (memory)'],
    ['quinoa', 3.13, 'USDA SR28, NDB 20035 and 20137'],
    ['couscous', 528 / 173, 'USDA SR28, NDB 20029: 1 cup dry of 173 g gives 528 g'],
    ['bulgur', 4.04, 'USDA SR28, NDB 20012 and 20013'],
  ])('%s: %d lies in its range (%s)', (stem, factor) => {
    const found = yields.find(({ from }) => from === `${stem}-dry`)
    expect(found, `${stem}-dry has a yield`).toBeDefined()
    expect(factor).toBeGreaterThanOrEqual(found!.low - 0.005)
    expect(factor).toBeLessThanOrEqual(found!.high + 0.005)
  })
})

/** What stands dry in the table and is not boiled or soaked by itself. */
const EATEN_DRY =
  /flour|bran|germ|bread|cracker|crispbread|cake|tortilla|cereal|muesli|popcorn|powder|starch|nut|peanut|cocoa|noodle cup|papad|flakes-(?!oat)|malt|puff|pretzel|roti|rusk|toast/

describe('every food that is boiled or soaked has its yield both ways', () => {
  const cooked = table.foods.filter(
    ({ role, state, origin }) =>
      origin === 'plant' &&
      ['pulse', 'soy', 'grain', 'mushroom'].includes(role) &&
      ['dry', 'dried'].includes(state),
  )

  test.each(cooked.filter(({ id }) => !EATEN_DRY.test(id)).map(({ id }) => id))('%s', id => {
    const there = cookedFrom({ id }, 100, yields)
    expect(there, id).not.toBeNull()
    expect(there!.grams).toBeGreaterThan(120)
    if (there!.food === null) return
    const back = dryFor({ id: there!.food }, there!.grams, yields)!
    expect(back.grams).toBeGreaterThan(40)
    expect(back.grams).toBeLessThan(250)
  })

  test('what a yield names stands in the table', () => {
    for (const { from, to } of yields) {
      if (from !== null) expect(table.foodById.has(from), from).toBe(true)
      if (to !== null) expect(table.foodById.has(to), to).toBe(true)
    }
  })

  test('protein is not made in the pot: a yield keeps it within 30 %', () => {
    for (const { from, to, factor } of yields) {
      const before = table.foodById.get(from ?? '')
      const after = table.foodById.get(to ?? '')
      if (before === undefined || after === undefined) continue
      const kept = (after.per100g.crudeProteinG * factor) / before.per100g.crudeProteinG
      expect(kept, `${from} to ${to}`).toBeGreaterThan(0.7)
      expect(kept, `${from} to ${to}`).toBeLessThan(1.25)
    }
  })
})
