import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isDay } from '../../src/shelf/marks.ts'
import { dayByWords } from '../../src/tui/text/day-words.ts'

// A Monday.
const TODAY = '2026-06-01'

describe('dayByWords', () => {
  it.each([
    ['today', '2026-06-01'],
    ['Tomorrow', '2026-06-02'],
    ['3 days', '2026-06-04'],
    ['3d', '2026-06-04'],
    ['in 2 weeks', '2026-06-15'],
    ['+10', '2026-06-11'],
    ['1 month', '2026-07-01'],
    ['friday', '2026-06-05'],
    ['fri', '2026-06-05'],
    ['next monday', '2026-06-08'],
    ['31 dec', '2026-12-31'],
    ['Dec 31st', '2026-12-31'],
    ['1 march', '2027-03-01'],
    ['1 March 2026', '2026-03-01'],
    ['2026-12-31', '2026-12-31'],
    ['2026-7-4', '2026-07-04'],
  ])('%s', (text, day) => {
    expect(dayByWords(text, TODAY)).toBe(day)
  })

  it.each([
    '',
    '3',
    '3/4',
    '4.5.26',
    'soon',
    '31 feb',
    '2026-02-30',
    'frog',
    'decade 3',
    'fridge',
    'marchpane 3',
  ])('takes "%s" for no day', text => {
    expect(dayByWords(text, TODAY)).toBeNull()
  })

  it('ends a month on its last day where it is shorter', () => {
    expect(dayByWords('1 month', '2026-01-31')).toBe('2026-02-28')
    expect(dayByWords('13 months', '2026-12-31')).toBe('2028-01-31')
  })

  it('gives a day that there is, or none, whatever is typed', () => {
    const words = fc.constantFrom(
      'in',
      '3',
      '31',
      '400',
      'days',
      'w',
      'months',
      'feb',
      'fri',
      '2027',
      '-',
      '+',
    )
    fc.assert(
      fc.property(fc.array(words, { maxLength: 4 }), parts => {
        const day = dayByWords(parts.join(' '), TODAY)
        expect(day === null || isDay(day)).toBe(true)
      }),
    )
  })
})
