import { describe, expect, it } from 'vitest'
import { profileOf } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import type { PatternId } from '../../src/nutrition/pattern.ts'
import type { ProteinSource } from '../../src/nutrition/protein-source.ts'
import { bandOf } from '../../src/nutrition/uncertainty.ts'
import { diaasAlone, food, median, pattern, table } from './lookup.ts'
import { PUBLISHED_DIAAS, type PublishedDiaas } from './published-diaas.ts'

/**
 * A published value and ours are two draws of one food from different laboratories, varieties and animals. Our own
 * stated 90 % band reaches 1.645 standard deviations to either side; if the published value is as uncertain as ours,
 * the difference of the two has sqrt(2) times that deviation. So 99 % of differences lie within
 * 2.576 x sqrt(2) / 1.645 = 2.21 half bands, and half of them within 0.674 x sqrt(2) / 1.645 = 0.58 half bands.
 * 2.21 is wide for one food. What makes the set strict is the second figure, taken over many foods: it must be met
 * closely, and the wrong formulas below do not meet it.
 */
const HALF_BANDS_99 = 2.21
const HALF_BANDS_50 = 0.58

/** What cannot be met, and why; a row that is met after all must be struck out. */
const CANNOT_BE_MET: readonly [id: string, pattern: PatternId, diaas: number, why: string][] = [
  [
    'millet-boiled',
    'fao-2013-child',
    7,
    'this rat study puts cereals a third to a half below all others; cooked millet in pigs has 22 (over 3 y)',
  ],
  ['wheat-berries-boiled', 'fao-2013-child', 20, 'the same study; others have 40-48 for wheat'],
  ['oats-boiled', 'fao-2013-child', 43, 'the same study; others have 54-57 for oats'],
]

const halfBand = (id: string, against: PatternId): number => {
  const band = bandOf([{ food: food(id), grams: 100 }], pattern(against), table.coefficients)!
  return Math.log(band.high / band.low) / 2
}
const excused = ([id, against, diaas]: PublishedDiaas) =>
  CANNOT_BE_MET.some(row => row[0] === id && row[1] === against && row[2] === diaas)
const missed = ([id, against, diaas]: PublishedDiaas) =>
  Math.abs(Math.log(diaasAlone(id, against) / diaas)) - (HALF_BANDS_99 * halfBand(id, against) + 0.5 / diaas)

type Formula = (food: ProteinSource, against: PatternId) => number
const right: Formula = (of, against) => diaasOf([{ food: of, grams: 100 }], pattern(against)).diaas!

const role = (...roles: string[]) => PUBLISHED_DIAAS.filter(([id]) => roles.includes(food(id).role))
const GROUPS = {
  all: PUBLISHED_DIAAS,
  pulses: role('pulse'),
  'soy and powders': role('soy', 'powder'),
  'published above 100': PUBLISHED_DIAAS.filter(([, , diaas]) => diaas > 100),
}
type Group = keyof typeof GROUPS

/** The middle deviation of a group, in units of what two draws of the stated uncertainty would have: about 1. */
function middleDeviation(group: Group, formula: Formula): number {
  return median(
    GROUPS[group].map(
      ([id, against, diaas]) =>
        Math.abs(Math.log(formula(food(id), against) / diaas)) / halfBand(id, against) / HALF_BANDS_50,
    ),
  )
}
/** A median of n such deviations has a standard error of about 1.2 / sqrt(n): 0.13 for all, 0.2-0.3 for a group. */
const AT_MOST: Record<Group, number> = {
  all: 1.2,
  pulses: 1.2,
  'soy and powders': 1.2,
  'published above 100': 1.3,
}

describe('published DIAAS of single foods', () => {
  it.each(PUBLISHED_DIAAS.filter(row => !excused(row)))('%s, %s: %d (%s)', (...row) => {
    expect(missed(row)).toBeLessThan(0)
  })

  it.each(CANNOT_BE_MET)('%s, %s: %d cannot be met: %s', (id, against, diaas) => {
    const row = PUBLISHED_DIAAS.find(r => r[0] === id && r[1] === against && r[2] === diaas)
    expect(row).toBeDefined()
    expect(missed(row!)).toBeGreaterThan(0)
  })

  it.each(Object.keys(GROUPS) as Group[])('%s: deviate as two draws would, and no more', group => {
    expect(GROUPS[group].length).toBeGreaterThan(12)
    expect(middleDeviation(group, right)).toBeLessThan(AT_MOST[group])
    // Nor much less, or the band, and with it the tolerance, would be wider than what is known.
    expect(middleDeviation(group, right)).toBeGreaterThan(0.5)
  })

  it('half of them are met within 13 %, and there is no lean of more than 5 % to either side', () => {
    const logs = PUBLISHED_DIAAS.map(([id, against, diaas]) => Math.log(diaasAlone(id, against) / diaas))
    expect(PUBLISHED_DIAAS.length).toBeGreaterThan(80)
    expect(median(logs.map(Math.abs))).toBeLessThan(0.13)
    expect(Math.abs(median(logs))).toBeLessThan(0.05)
  })

  const other = (against: PatternId): PatternId =>
    against === 'fao-2013-child' ? 'fao-2013-over-3y' : 'fao-2013-child'
  const flat = (of: ProteinSource, fraction: number): ProteinSource => ({
    ...of,
    digestibility: { ...profileOf(() => fraction), proteinFaecal: fraction },
  })
  it.each<[string, Group, Formula]>([
    ['the other age pattern', 'all', (of, against) => right(of, other(against))],
    ['total instead of digestible amino acids', 'all', (of, against) => right(flat(of, 1), against)],
    [
      'the whole protein`s faecal digestibility for each amino acid',
      'pulses',
      (of, against) => right(flat(of, of.digestibility.proteinFaecal), against),
    ],
    [
      'methionine without cysteine',
      'pulses',
      (of, against) => right({ ...of, aminoMgPerG: { ...of.aminoMgPerG, cys: 0 } }, against),
    ],
    ['truncation at 100', 'published above 100', (of, against) => Math.min(100, right(of, against))],
    ['a fifth too much', 'all', (of, against) => 1.2 * right(of, against)],
  ])('the wrong formula misses them: %s (%s)', (_, group, formula) => {
    expect(middleDeviation(group, formula)).toBeGreaterThan(AT_MOST[group])
  })
})
