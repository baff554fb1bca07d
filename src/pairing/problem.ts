import type { AllergenId } from '../foods/allergens.ts'
import type { Food } from '../foods/food.ts'
import type { PlateScore, ScoreBasis } from '../nutrition/plate-score.ts'
import type { Portion } from '../nutrition/protein-source.ts'

export type Mark = '' | 'use-up' | 'hold-back'

/** A food on hand. `onHandG` null: as much as one likes (the whole table as a shop). */
export interface ShelfFood {
  food: Food
  onHandG: number | null
  mark: Mark
}

/**
 * The pairing problem: grams of at most `foodsAtMost` foods a serving, so that protein is in
 * [targetG, 1.05 x targetG] and min(DIAAS, 100) is greatest.
 */
export interface PairingProblem {
  shelf: readonly ShelfFood[]
  /** protein a serving, g, on the table's basis (nitrogen x the food's own factor) */
  targetG: number
  servings: number
  foodsAtMost: number
  basis: ScoreBasis
  without: readonly AllergenId[]
  allow: { eggs: boolean; dairy: boolean }
  /** a serving, kcal */
  energyAtMostKcal: number | null
  /** a serving, g */
  massAtMostG: number | null
  /** how many different pairings to return */
  pairings: number
  /** foods that could be bought, for what would lift a pairing; none: the shelf alone */
  market?: () => readonly Food[]
}

/** One change that would raise the DIAAS of a plate: `deltaG` more (or less) of a food. */
export interface LiftOption {
  food: Food
  deltaG: number
  /** DIAAS after the change, per cent */
  diaas: number
  /** is the food on the shelf (or plate) already? */
  onShelf: boolean
}

/** One proposal: practical grams a serving, its score, the reason in plain words, and what would lift it most. */
export interface Pairing {
  portions: Portion<Food>[]
  score: PlateScore<Food>
  why: string[]
  nextLift: LiftOption | null
}

/** `reached` false: no plate meets the target; `pairings` then holds the nearest plates and `reason` says why. */
export interface PairingAnswer {
  reached: boolean
  pairings: Pairing[]
  reason: string | null
}
