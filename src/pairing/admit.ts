import type { AllergenId } from '../foods/allergens.ts'
import type { Food } from '../foods/food.ts'
import { type Candidate, candidateOf } from './candidate.ts'
import type { PairingProblem, ShelfFood } from './problem.ts'

/** The shelf sorted by what the combiner may do with it. */
export interface Admitted {
  /** foods that must be in */
  forced: Candidate[]
  /** foods that may take a place */
  open: Candidate[]
  /** marks that contradict what else is asked, each in one line */
  contradictions: string[]
  /** how many foods each rule keeps out, for explaining an empty answer */
  keptOut: { animal: number; allergen: number; heldBack: number; noPlace: number; tooLittle: number }
}

/** Why a food may not be suggested at all: it is an animal food that is not allowed, or has an allergen to avoid. */
export function barred(
  food: Food,
  rules: { without: readonly AllergenId[]; allow: { eggs: boolean; dairy: boolean } },
): 'animal' | 'allergen' | null {
  const allowed =
    food.origin === 'plant' ||
    (food.origin === 'egg' && rules.allow.eggs) ||
    (food.origin === 'dairy' && rules.allow.dairy)
  if (!allowed) return 'animal'
  return food.allergens.some(allergen => rules.without.includes(allergen)) ? 'allergen' : null
}

/** The least and most grams of a serving: a portion that a person eats, and no more than the serving's share of what is there. */
export function servingLimits(
  { food, onHandG }: ShelfFood,
  servings: number,
): { leastG: number; mostG: number } {
  const shareG = onHandG === null ? Number.POSITIVE_INFINITY : onHandG / servings
  return { leastG: food.portionG.least, mostG: Math.min(food.portionG.most, shareG) }
}

/** Sorts a problem's shelf into foods that must be in, may be in, and must not. */
export function admit(problem: PairingProblem): Admitted {
  const { shelf, servings, basis } = problem
  const forced: Candidate[] = []
  const open: Candidate[] = []
  const contradictions: string[] = []
  const keptOut = { animal: 0, allergen: 0, heldBack: 0, noPlace: 0, tooLittle: 0 }
  for (const item of shelf) {
    const { food, mark } = item
    const bar = barred(food, problem)
    const limits = servingLimits(item, servings)
    if (mark === 'use-up') {
      if (bar === 'allergen') {
        const allergens = food.allergens.filter(allergen => problem.without.includes(allergen)).join(', ')
        contradictions.push(`${food.name} is to be used up, but holds what is to be left out (${allergens})`)
      } else if (bar === 'animal') {
        contradictions.push(`${food.name} is to be used up, but is an animal food that is not allowed`)
      } else if (limits.mostG > 0) {
        // What is left of a food to be used up goes in whole, even where it is less than a portion.
        const leastG = Math.min(limits.leastG, limits.mostG)
        forced.push(candidateOf(food, basis.pattern, { leastG, mostG: limits.mostG, useUp: true }))
      }
      continue
    }
    if (mark === 'hold-back') keptOut.heldBack++
    else if (bar !== null) keptOut[bar]++
    else if (food.place !== 'protein' || food.per100g.proteinG <= 0) keptOut.noPlace++
    else if (limits.mostG < limits.leastG) keptOut.tooLittle++
    else open.push(candidateOf(food, basis.pattern, limits))
  }
  const places = forced.filter(({ takesPlace }) => takesPlace).length
  if (places > problem.foodsAtMost) {
    contradictions.push(
      `${places} foods are to be used up, but a pairing may hold ${problem.foodsAtMost}; allow more foods or take a mark off`,
    )
  }
  for (const [i, a] of forced.entries()) {
    const twin = forced.slice(i + 1).find(b => b.food.kin === a.food.kin)
    if (twin !== undefined) {
      contradictions.push(
        `${a.food.name} and ${twin.food.name} are one food and both to be used up; take a mark off`,
      )
    }
  }
  return { forced, open, contradictions, keptOut }
}
