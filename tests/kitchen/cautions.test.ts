import { describe, expect, test } from 'vitest'
import type { Food } from '../../src/foods/food.ts'
import { cautionsFor, STANDING_NOTE } from '../../src/kitchen/cautions.ts'
import { planningRefusal, stepBack } from '../../src/kitchen/conditions.ts'
import { loadKitchen } from '../../src/kitchen/load.ts'
import { b12NoteFor } from '../../src/kitchen/vitamin-b12.ts'
import { aFood } from './a-food.ts'

const ids = (foods: Food[], context = {}) => cautionsFor(foods, context).map(({ id }) => id)

describe('cautions of a plate', () => {
  test('each stands once, the most important first', () => {
    const kidney = aFood({ id: 'kidney-beans', cautions: ['kidney-bean-raw', 'cooked-pulse-cooling'] })
    const more = aFood({
      id: 'more-beans',
      cautions: ['cooked-pulse-cooling', 'kidney-bean-raw', 'high-fibre'],
    })
    expect(ids([more, kidney])).toEqual(['kidney-bean-raw', 'cooked-pulse-cooling', 'high-fibre'])
  })

  test('the stricter line stands for the milder of its kind', () => {
    const foods = [
      aFood({ id: 'a', cautions: ['bean-raw', 'cooked-pulse-cooling', 'seaweed-iodine'] }),
      aFood({ id: 'b', cautions: ['kidney-bean-raw', 'cooked-grain-cooling', 'kelp-iodine'] }),
    ]
    expect(ids(foods)).toEqual(['kidney-bean-raw', 'kelp-iodine', 'cooked-grain-cooling'])
  })

  test('in a box for later, cooling comes first', () => {
    const foods = [aFood({ id: 'a', cautions: ['favism', 'cooked-grain-cooling'] })]
    expect(ids(foods)[0]).toBe('favism')
    expect(ids(foods, { boxed: true })[0]).toBe('cooked-grain-cooling')
  })

  test('a told condition moves its caution up', () => {
    const kale = [aFood({ id: 'kale', cautions: ['vitamin-k', 'potato-green'] })]
    expect(ids(kale)).toEqual(['potato-green', 'vitamin-k'])
    expect(ids(kale, { conditions: ['blood-thinners'] })).toEqual(['vitamin-k', 'potato-green'])
  })

  test('much salt and much fibre are told by the grams on the plate', () => {
    const food = aFood({ id: 'salty', per100g: { sodiumMg: 900, fibreG: 30 } })
    expect(ids([food], { portions: [{ food, grams: 100 }] })).toEqual(['sodium', 'high-fibre'])
    expect(ids([food], { portions: [{ food, grams: 80 }] })).toEqual([])
  })

  test('a plate without such foods calls for none, and an unknown id for none', () => {
    expect(ids([])).toEqual([])
    expect(ids([aFood({ id: 'x', cautions: ['no-such-caution'] })])).toEqual([])
  })

  test('every text has a source and its provenance, and covers only cautions that there are', () => {
    const { cautions, conditions } = loadKitchen()
    const known = new Set(cautions.map(({ id }) => id))
    for (const caution of cautions) for (const id of caution.covers) expect(known).toContain(id)
    for (const { source, provenance } of [...cautions, ...conditions]) {
      expect(source.length).toBeGreaterThan(5)
      expect(provenance).toMatch(/read|memory|common practice|judgement/)
    }
  })

  test('the standing note leaves the last word to others', () => {
    expect(STANDING_NOTE).toMatch(/not medical advice/)
    expect(STANDING_NOTE).toMatch(/food-safety rules come first/)
  })
})

describe('what a person tells', () => {
  test.each([
    [{ conditions: ['phenylketonuria'] }, /metabolic clinic/],
    [{ conditions: ['gout', 'phenylketonuria'] }, /metabolic clinic/],
    [{ age: 2 }, /under three/],
    [{ pattern: { planning: false } }, /under three/],
  ])('no pairing for %j', (person, reason) => {
    expect(planningRefusal(person)).toMatch(reason)
  })

  test.each([[{}], [{ conditions: ['kidney-disease'] }], [{ age: 3 }], [{ pattern: { planning: true } }]])(
    'pairings for %j',
    person => {
      expect(planningRefusal(person)).toBeNull()
    },
  )

  test('nothing told: nothing held back', () => {
    expect(stepBack([])).toEqual({ bodyMassTargets: true, numbers: true, notes: [] })
  })

  test.each([
    ['kidney-disease', { bodyMassTargets: false, numbers: true }],
    ['under-18', { bodyMassTargets: false, numbers: true }],
    ['pregnancy', { bodyMassTargets: false, numbers: true }],
    ['phenylketonuria', { bodyMassTargets: false, numbers: true }],
    ['eating-disorder-history', { bodyMassTargets: false, numbers: false }],
    ['blood-thinners', { bodyMassTargets: true, numbers: true }],
    ['gout', { bodyMassTargets: true, numbers: true }],
  ])('%s', (condition, expected) => {
    const back = stepBack([condition])
    expect(back).toMatchObject(expected)
    expect(back.notes).toHaveLength(1)
    expect(back.notes[0]!.text).toMatch(/doctor|dietitian|clinic/)
  })

  test('an age under 18 counts as told, once', () => {
    expect(stepBack([], 17).notes.map(({ id }) => id)).toEqual(['under-18'])
    expect(stepBack(['under-18'], 17).notes).toHaveLength(1)
    expect(stepBack([], 18).notes).toEqual([])
  })
})

describe('the line on vitamin B12', () => {
  const plant = { origin: 'plant' } as const
  test('where all are plants, once a day', () => {
    expect(b12NoteFor([plant], { lastDay: null, today: '2026-12-01' })?.text).toMatch(/B12/)
    expect(b12NoteFor([plant], { lastDay: '2026-12-01', today: '2026-12-01' })).toBeNull()
    expect(b12NoteFor([plant], { lastDay: '2026-11-30', today: '2026-12-01' })).not.toBeNull()
  })
  test('not with egg or dairy, nor on an empty plate', () => {
    const day = { lastDay: null, today: '2026-12-01' }
    expect(b12NoteFor([plant, { origin: 'egg' }], day)).toBeNull()
    expect(b12NoteFor([], day)).toBeNull()
  })
})
