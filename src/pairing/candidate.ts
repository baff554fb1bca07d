import type { Food } from '../foods/food.ts'
import { STAVES } from '../nutrition/amino-acids.ts'
import type { Pattern } from '../nutrition/pattern.ts'
import { digestibleMgPerG } from '../nutrition/staves.ts'

/** A food as the combiner sees it: figures per gram, and the least and most grams of a serving. */
export interface Candidate {
  food: Food
  /** protein per g, on the table's basis */
  protein: number
  /** crude protein per g */
  crude: number
  kcal: number
  /** per g of food: digestible amount of each stave / its amount in 1 g of the pattern */
  staves: Float64Array
  leastG: number
  mostG: number
  /** must it be in? */
  useUp: boolean
  /** does it take one of the places of a pairing? */
  takesPlace: boolean
}

/** A food's figures per gram against a pattern. */
export function candidateOf(
  food: Food,
  pattern: Pattern,
  limits: { leastG: number; mostG: number; useUp?: boolean },
): Candidate {
  const crude = food.per100g.crudeProteinG / 100
  return {
    food,
    protein: food.per100g.proteinG / 100,
    crude,
    kcal: food.per100g.kcal / 100,
    staves: Float64Array.from(
      STAVES,
      stave => (crude * digestibleMgPerG(food, stave)) / pattern.mgPerG[stave],
    ),
    leastG: limits.leastG,
    mostG: limits.mostG,
    useUp: limits.useUp ?? false,
    takesPlace: food.place === 'protein',
  }
}

/** DIAAS as a fraction of some grams of candidates; 0 without protein. */
export function qualityOf(set: readonly Candidate[], grams: ArrayLike<number>): number {
  let crude = 0
  for (let j = 0; j < set.length; j++) crude += grams[j]! * set[j]!.crude
  if (crude <= 0) return 0
  let least = Number.POSITIVE_INFINITY
  for (let i = 0; i < STAVES.length; i++) {
    let sum = 0
    for (let j = 0; j < set.length; j++) sum += grams[j]! * set[j]!.staves[i]!
    if (sum < least) least = sum
  }
  return least / crude
}

/** The sum over candidates of grams x a figure per gram. */
export function totalOf(
  set: readonly Candidate[],
  grams: ArrayLike<number>,
  figure: 'protein' | 'crude' | 'kcal',
): number {
  let sum = 0
  for (let j = 0; j < set.length; j++) sum += grams[j]! * set[j]![figure]
  return sum
}
