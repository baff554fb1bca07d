import { describe, expect, test } from 'vitest'
import type { CookingMethod } from '../../src/kitchen/kitchen-file.ts'
import { clockText, durationText, minutesOfDay, timeline } from '../../src/kitchen/timeline.ts'
import { aFood } from './a-food.ts'

const plain: CookingMethod = {
  id: 'plain',
  heat: 'simmer',
  soakHLeast: 0,
  soakHMost: 0,
  waterRatio: 2,
  water: 'absorb',
  hardBoilMin: 0,
  cookMinLeast: 15,
  cookMinMost: 20,
  restMin: 5,
  pressureMin: null,
  rinse: true,
  note: '',
  source: 'test',
  provenance: 'test',
}
const beanMethod: CookingMethod = {
  ...plain,
  soakHLeast: 8,
  soakHMost: 12,
  waterRatio: 3,
  water: 'drain',
  hardBoilMin: 30,
  cookMinLeast: 60,
  cookMinMost: 120,
  restMin: 0,
  pressureMin: 12,
}
const cup = [{ name: '1 cup', grams: 200, source: 'test' }]
const rice = { food: aFood({ id: 'rice', name: 'Rice', measures: cup }), grams: 400, method: plain }
const beans = { food: aFood({ id: 'beans', name: 'Beans', measures: cup }), grams: 200, method: beanMethod }

describe('the timeline', () => {
  test('counts back from the meal, the longest first, so that all is ready together', () => {
    const steps = timeline([rice, beans], 'metric')
    expect(steps.map(({ foodId, kind, minutesBefore }) => [foodId, kind, minutesBefore])).toEqual([
      // 120 min on the heat, 10 to the boil, 5 to rinse, 8 h of soaking
      ['beans', 'soak', 120 + 10 + 5 + 480],
      ['beans', 'put on', 135],
      ['beans', 'boil hard', 120],
      ['beans', 'cook', 90],
      // 20 min on the heat and 5 of rest, 10 to the boil, 5 to rinse
      ['rice', 'put on', 40],
      ['rice', 'cook', 25],
      ['rice', 'rest', 5],
    ])
    expect(steps[0]!.earliestBefore).toBe(120 + 10 + 5 + 720)
  })

  test("says water by the food's own cup, and throws soaking water away", () => {
    const [, putOn] = timeline([beans], 'metric')
    // 200 g are 1 cup; 3 cups of 236.6 ml
    expect(putOn!.text).toBe(
      'throw the soaking water away, rinse, put 200 g on in 700 ml of fresh water (1 to 3 by volume)',
    )
    const [riceOn] = timeline([rice], 'us')
    expect(riceOn!.text).toBe('rinse, put 14 oz on in 4 cups of water (1 to 2 by volume)')
  })

  test('ranges stay ranges, and a hard boil is said before the simmer', () => {
    const texts = timeline([beans], 'metric').map(({ text }) => text)
    expect(texts[2]).toMatch(/boil hard for 30 min, lid off/)
    expect(texts[3]).toMatch(/60-120 min in all, then drain; or 12 min in a pressure cooker after the soak/)
  })

  test('boiling water over, off the heat', () => {
    const couscous = {
      ...plain,
      heat: 'soak',
      rinse: false,
      cookMinLeast: 0,
      cookMinMost: 0,
      restMin: 10,
      waterRatio: 1.5,
    } as CookingMethod
    const steps = timeline([{ ...rice, method: couscous }], 'metric')
    expect(steps.map(({ kind, minutesBefore }) => [kind, minutesBefore])).toEqual([
      ['put on', 20],
      ['rest', 10],
    ])
    expect(steps[0]!.text).toBe('boil 700 ml of water for 400 g')
  })

  test('a soak that is optional is a remark, not a step', () => {
    const steps = timeline([{ ...rice, method: { ...plain, soakHMost: 12 } }], 'metric')
    expect(steps.some(({ kind }) => kind === 'soak')).toBe(false)
    expect(steps.find(({ kind }) => kind === 'cook')!.text).toMatch(/sooner after a soak of up to 12 h/)
  })

  test('nothing to cook, no steps', () => {
    expect(timeline([], 'metric')).toEqual([])
  })
})

describe('clock times', () => {
  test.each([
    ['19:00', 1140],
    ['7:05', 425],
    ['00:00', 0],
    [' 23:59 ', 1439],
    ['19.30', 1170],
  ])('%j', (text, minutes) => {
    expect(minutesOfDay(text)).toBe(minutes)
  })
  test.each(['', '24:00', '19:60', '7pm', '19', '1:5', 'noon', '-1:00', '19:00:00'])('%j is none', text => {
    expect(minutesOfDay(text)).toBeNull()
  })

  test('before the meal, to the five minutes before, over midnight and longer', () => {
    expect(clockText(0, 1140)).toBe('19:00')
    expect(clockText(13, 1140)).toBe('18:45')
    expect(clockText(20 * 60, 1140)).toBe('23:00 the day before')
    expect(clockText(44 * 60, 1140)).toBe('23:00, 2 days before')
    expect(clockText(19 * 60, 1140)).toBe('00:00')
    expect(clockText(95, null)).toBe('1 h 35 min before')
    expect(clockText(0, null)).toBe('the meal')
    expect(durationText(60)).toBe('1 h')
    expect(durationText(12)).toBe('15 min')
  })
})
