import type { AllergenId } from '../foods/allergens.ts'
import type { Food, Role } from '../foods/food.ts'
import { STAVES, type Stave } from '../nutrition/amino-acids.ts'
import { diaasOf } from '../nutrition/diaas.ts'
import type { Pattern } from '../nutrition/pattern.ts'
import { barred } from './admit.ts'
import { type Candidate, candidateOf, qualityOf } from './candidate.ts'

/** A partner that mends a food: how much of it to the food by weight, as both are weighed, and what that reaches. */
export interface Complement {
  food: Food
  /** g of the partner to 1 g of the food */
  ratio: number
  /** a plate with a usual portion of one of them in this proportion, g */
  example: { foodG: number; partnerG: number }
  /** DIAAS of the mixture, per cent */
  diaas: number
  limiting: Stave
  /** DIAAS of the mixture less the better of the two alone, per cent */
  lift: number
  /** DIAAS of the mixture less that of the food alone, per cent */
  mends: number
}

export interface ComplementOptions {
  pattern: Pattern
  without: readonly AllergenId[]
  allow: { eggs: boolean; dairy: boolean }
  /** how many to return */
  count: number
  /** how many of one role, so that the answer is not ten powders */
  perRole: number
}

/** A partner that raises the score by less than this (per cent) mends nothing. */
const WORTH = 1

/**
 * What mends a food best, in what proportion by weight: a usual portion of the food or more, and of the partner what a
 * person would eat. The best of each
 * role first; ties go to the proportion with least of the partner. Empty where nothing helps, or the food lacks nothing.
 */
export function complementsOf(
  food: Food,
  partners: readonly Food[],
  options: ComplementOptions,
): Complement[] {
  const own = diaasOf([{ food, grams: 100 }], options.pattern).diaas
  if (own === null) return []
  const candidate = (of: Food) =>
    candidateOf(of, options.pattern, { leastG: of.portionG.least, mostG: of.portionG.most })
  const mended = candidate(food)
  const found = partners
    .filter(
      partner =>
        partner.kin !== food.kin &&
        partner.place === 'protein' &&
        partner.per100g.proteinG > 0 &&
        barred(partner, options) === null,
    )
    .map(partner => complementOf(mended, candidate(partner), options.pattern))
    .filter(complement => Math.min(100, complement.diaas) >= Math.min(100, own) + WORTH)
    .sort(
      (a, b) =>
        Math.min(100, b.diaas) - Math.min(100, a.diaas) ||
        a.ratio - b.ratio ||
        (a.food.id < b.food.id ? -1 : 1),
    )
  const taken = new Map<Role, number>()
  const kins = new Set<string>()
  return found
    .filter(({ food: { role, kin } }) => {
      const times = taken.get(role) ?? 0
      if (times >= options.perRole || kins.has(kin)) return false
      taken.set(role, times + 1)
      kins.add(kin)
      return true
    })
    .slice(0, options.count)
}

/**
 * The best proportion of two foods, exactly. With the ratio r of the partner each stave is (a + r b) / (c + r d) over one
 * and the same denominator, so the least of nine changes hands only where two numerators cross; the greatest least
 * value stands at such a crossing, where a stave crosses 100 %, or at an end of what portions allow.
 */
function complementOf(food: Candidate, partner: Candidate, pattern: Pattern): Complement {
  const least = partner.leastG / food.mostG
  // The food that is mended stays what is eaten: a usual portion of it at the least.
  const most = Math.max(least, partner.mostG / Math.max(food.leastG, food.food.portionG.usual))
  const ratios = [least, most]
  const cross = (numerator: number, denominator: number) => {
    const ratio = numerator / denominator
    if (ratio > least && ratio < most) ratios.push(ratio)
  }
  for (let i = 0; i < STAVES.length; i++) {
    cross(food.crude - food.staves[i]!, partner.staves[i]! - partner.crude)
    for (let j = 0; j < i; j++) {
      cross(food.staves[i]! - food.staves[j]!, partner.staves[j]! - partner.staves[i]!)
    }
  }
  const pair = [food, partner]
  const truncated = (ratio: number) => Math.min(1, qualityOf(pair, [1, ratio]))
  const best = Math.max(...ratios.map(truncated))
  const ratio = Math.min(...ratios.filter(r => truncated(r) >= best - 1e-9))
  const mixture = diaasOf(
    [
      { food: food.food, grams: 1 },
      { food: partner.food, grams: ratio },
    ],
    pattern,
  )
  const alone = (of: Food) => diaasOf([{ food: of, grams: 1 }], pattern).diaas ?? 0
  const foodG = Math.min(
    Math.max(food.food.portionG.usual, partner.leastG / ratio),
    food.mostG,
    partner.mostG / ratio,
  )
  return {
    food: partner.food,
    ratio,
    example: { foodG, partnerG: foodG * ratio },
    diaas: mixture.diaas ?? 0,
    limiting: mixture.limiting ?? 'lys',
    lift: (mixture.diaas ?? 0) - Math.max(alone(food.food), alone(partner.food)),
    mends: (mixture.diaas ?? 0) - alone(food.food),
  }
}

/** A proportion in small whole parts, as cooks say it: 0.33 is `3 parts to 1`, 1.5 is `2 parts to 3`. */
export function inParts(ratio: number): { food: number; partner: number } {
  let best = { food: 1, partner: 1 }
  let miss = Number.POSITIVE_INFINITY
  for (let food = 1; food <= 12; food++) {
    for (const partner of [1, 2, 3, 4, 5, 6, 8, 10, 12]) {
      if (food > 4 && partner > 1) continue
      if ([2, 3, 4].some(common => food % common === 0 && partner % common === 0)) continue
      const here = Math.abs(Math.log(partner / food / ratio)) + 0.01 * (food + partner)
      if (here < miss) {
        miss = here
        best = { food, partner }
      }
    }
  }
  return best
}
