import { describe, expect, it } from 'vitest'
import { STAVE_NAMES, STAVES } from '../../src/nutrition/amino-acids.ts'
import { diaasOf } from '../../src/nutrition/diaas.ts'
import { scorePlate } from '../../src/nutrition/plate-score.ts'
import { stavesOfPlate } from '../../src/nutrition/staves.ts'
import { complementsOf, inParts } from '../../src/pairing/complement.ts'
import { findPairings } from '../../src/pairing/find-pairings.ts'
import { liftContext, liftOptions, nextLift } from '../../src/pairing/lift.ts'
import { shortName, whyOf } from '../../src/pairing/reasons.ts'
import { basis, food, GALLEY, problemOf, shelfOf, table } from './problems.ts'

const { pattern } = basis
const plantsOnly = {
  pattern,
  without: [],
  allow: { eggs: false, dairy: false },
  count: 8,
  perRole: 2,
} as const

describe('what would lift a plate', () => {
  const lentils = [{ food: food('lentils-red-dry'), grams: 80 }]
  const context = (more = {}) => liftContext({ ...problemOf(GALLEY, { market: () => table.foods }), ...more })

  it('scores what it says', () => {
    const options = liftOptions(lentils, context())
    expect(options.length).toBeGreaterThan(1)
    for (const option of options) {
      const there = lentils.some(portion => portion.food.id === option.food.id)
      const plate = there
        ? lentils.map(portion => ({ ...portion, grams: portion.grams + option.deltaG }))
        : [...lentils, { food: option.food, grams: option.deltaG }]
      expect(diaasOf(plate, pattern).diaas!).toBeCloseTo(option.diaas, 9)
      expect(option.diaas).toBeGreaterThan(diaasOf(lentils, pattern).diaas!)
    }
  })

  it('takes the shelf before the shop, nothing barred, and nothing at all where nothing is short', () => {
    expect(nextLift(lentils, context())!.onShelf).toBe(true)
    const soyless = liftOptions(lentils, context({ without: ['soy'] }))
    for (const option of soyless) expect(option.food.allergens).not.toContain('soy')
    for (const option of soyless) expect(option.food.origin).toBe('plant')
    const full = [{ food: food('soy-protein-isolate'), grams: 40 }]
    expect(diaasOf(full, pattern).diaas!).toBeGreaterThanOrEqual(100)
    expect(liftOptions(full, context())).toEqual([])
    expect(liftOptions([], context())).toEqual([])
  })

  it('does not name what is held back, or a food in another state of what is on the plate', () => {
    const shelf = shelfOf('lentils-red-boiled 500', 'rice-brown-dry 500 hold-back')
    const options = liftOptions(lentils, liftContext(problemOf(shelf)))
    expect(options.map(option => option.food.id)).not.toContain('rice-brown-dry')
    expect(options.map(option => option.food.id)).not.toContain('lentils-red-boiled')
  })
})

describe('what would lift a pairing', () => {
  it('keeps its protein, its portions and what is on hand', () => {
    const shelves = [
      shelfOf('lentils-red-dry 500', 'rice-white-dry 1000'),
      shelfOf('lentils-red-dry 300', 'rice-brown-dry 500', 'sesame-seeds 100', 'peanuts-roasted 200'),
      GALLEY.filter(({ food: { allergens } }) => !allergens.includes('soy')),
    ]
    let met = 0
    for (const shelf of shelves) {
      for (const targetG of [20, 30, 35]) {
        const problem = problemOf(shelf, { targetG, market: () => table.foods })
        for (const { portions, score } of findPairings(problem).pairings) {
          for (const { food: lifted, deltaG, diaas, onShelf } of liftOptions(
            portions,
            liftContext(problem),
          )) {
            met++
            expect(score.proteinG + (deltaG * lifted.per100g.proteinG) / 100).toBeGreaterThanOrEqual(
              Math.min(targetG, score.proteinG) - 1e-6,
            )
            expect(diaas).toBeGreaterThan(score.diaas!)
            const item = shelf.find(({ food: { id } }) => id === lifted.id)
            expect(item !== undefined).toBe(onShelf)
            const there = portions.find(({ food: { id } }) => id === lifted.id)?.grams ?? 0
            expect(there + deltaG).toBeLessThanOrEqual(
              Math.min(lifted.portionG.most, item?.onHandG ?? lifted.portionG.most) + 1e-9,
            )
            if (there === 0) expect(portions.map(({ food: { kin } }) => kin)).not.toContain(lifted.kin)
          }
        }
      }
    }
    expect(met).toBeGreaterThan(5)
  })
})

describe('complements', () => {
  it.each([
    'lentils-red-boiled',
    'rice-brown-boiled',
    'bread-whole-wheat',
    'chickpeas-canned',
    'peanut-butter',
  ])('%s: the proportion is the best there is', id => {
    const mended = food(id)
    const found = complementsOf(mended, table.foods, plantsOnly)
    expect(found.length).toBeGreaterThan(3)
    for (const { food: partner, ratio, diaas, example } of found) {
      const least = partner.portionG.least / mended.portionG.most
      const most = partner.portionG.most / mended.portionG.usual
      for (let i = 0; i <= 300; i++) {
        const r = least * (most / least) ** (i / 300)
        const here = diaasOf(
          [
            { food: mended, grams: 1 },
            { food: partner, grams: r },
          ],
          pattern,
        ).diaas!
        expect(Math.min(100, here)).toBeLessThanOrEqual(Math.min(100, diaas) + 1e-6)
      }
      expect(example.partnerG / example.foodG).toBeCloseTo(ratio, 9)
      expect(example.foodG).toBeLessThanOrEqual(mended.portionG.most + 1e-9)
      expect(example.foodG).toBeGreaterThanOrEqual(mended.portionG.usual - 1e-9)
      expect(example.partnerG).toBeLessThanOrEqual(partner.portionG.most + 1e-9)
      expect(partner.kin).not.toBe(mended.kin)
      expect(partner.origin).toBe('plant')
    }
  })

  it('gives no more of one role than asked, and leaves allergens out', () => {
    const found = complementsOf(food('rice-brown-boiled'), table.foods, { ...plantsOnly, without: ['soy'] })
    for (const role of new Set(found.map(({ food: { role } }) => role))) {
      expect(found.filter(({ food }) => food.role === role).length).toBeLessThanOrEqual(2)
    }
    expect(found.some(({ food: { allergens } }) => allergens.includes('soy'))).toBe(false)
    expect(complementsOf(food('olive-oil'), table.foods, plantsOnly)).toEqual([])
  })

  it.each([
    [1, 1, 1],
    [0.5, 2, 1],
    [1 / 3, 3, 1],
    [1.5, 2, 3],
    [2, 1, 2],
    [0.1, 10, 1],
  ])('a ratio of %d is said as %d : %d', (ratio, mended, partner) => {
    expect(inParts(ratio)).toEqual({ food: mended, partner })
  })
})

describe('why', () => {
  it('says the figures that the score has', () => {
    const plate = [
      { food: food('lentils-red-boiled'), grams: 200 },
      { food: food('rice-brown-boiled'), grams: 200 },
    ]
    const score = scorePlate(plate, basis)
    const words = whyOf(score).join('\n')
    const own = diaasOf([plate[0]!], pattern)
    expect(words).toContain(`short of methionine + cysteine (${Math.floor(own.diaas!)})`)
    expect(words).toMatch(/Red lentils: rich in lysine/)
    expect(words).toMatch(/[Bb]rown rice/)
    expect(words).toContain(`${Math.floor(score.diaas!)} %`)
  })

  it('calls a food rich only in what it has in full and a partner lacks', () => {
    const staveOf = new Map(STAVES.map(stave => [STAVE_NAMES[stave], stave]))
    let met = 0
    for (const targetG of [20, 25, 30, 35, 40, 45]) {
      for (const { score, why } of findPairings(problemOf(GALLEY, { targetG, pairings: 6 })).pairings) {
        for (const line of why) {
          const [, name, rich, percent, short, lacks] =
            /^(.+?): rich in (.+?) \((\d+)\), short of (.+?) \((\d+)\);/.exec(line) ?? []
          if (name === undefined) continue
          met++
          const item = score.items.find(({ food: of }) => shortName(of) === name)!
          const own = stavesOfPlate([{ food: item.food, grams: 100 }], pattern)!
          expect(Math.floor(own[staveOf.get(rich!)!])).toBe(Number(percent))
          expect(Number(percent)).toBeGreaterThanOrEqual(100)
          expect(Math.floor(own[staveOf.get(short!)!])).toBe(Number(lacks))
          expect(Number(lacks)).toBeLessThan(100)
          const partners = score.items.filter(other => other !== item)
          expect(
            partners.some(other => {
              const theirs = stavesOfPlate([{ food: other.food, grams: 100 }], pattern)!
              return theirs[staveOf.get(rich!)!] < 100
            }),
          ).toBe(true)
        }
      }
    }
    expect(met).toBeGreaterThan(10)
  })

  it('names foods as a cook would', () => {
    expect(shortName(food('lentils-red-dry'))).toBe('Red lentils')
    expect(shortName(food('rice-brown-boiled'))).toBe('Brown rice')
    expect(shortName(food('tahini'))).toBe('Tahini')
    expect(shortName({ name: 'Beans, whole (black gram), boiled', state: 'boiled' })).toBe('Whole beans')
  })
})
