import { scoreBasis } from '../foods/score.ts'
import { planningRefusal } from '../kitchen/conditions.ts'
import { mealTargetG } from '../nutrition/targets.ts'
import { liftContext, liftOptions } from '../pairing/lift.ts'
import type { LiftOption, PairingProblem, ShelfFood } from '../pairing/problem.ts'
import type { Settings } from '../shelf/settings.ts'
import type { Knowledge, State } from './state.ts'
import { noBodyMassTarget } from './stepping-back.ts'

/** Protein of a serving, g: plain grams win over body mass. */
export function targetOf(settings: Settings): number {
  const { targetG, bodyMassKg, gPerKgPerDay, mealsPerDay, conditions } = settings
  if (targetG !== null) return targetG
  if (bodyMassKg === null || noBodyMassTarget({ conditions }) !== null) return 35
  return mealTargetG({ bodyMassKg, gPerKgPerDay, mealsPerDay })
}

/** How many pairings the bench lists. */
const PAIRINGS = 5

/** The pairing problem that the shelf and the bench set. */
export function problemOf(
  { shelf, settings }: Pick<State, 'shelf' | 'settings'>,
  { table }: Pick<Knowledge, 'table'>,
): PairingProblem {
  return {
    shelf: shelf.items.flatMap((item): ShelfFood[] => {
      const food = table.foodById.get(item.food)
      return food === undefined ? [] : [{ food, onHandG: item.grams, mark: item.mark }]
    }),
    targetG: targetOf(settings),
    servings: settings.servings,
    foodsAtMost: settings.foodsAtMost,
    basis: scoreBasis(table, settings.pattern),
    without: settings.without,
    allow: { eggs: settings.eggs, dairy: settings.dairy },
    energyAtMostKcal: settings.energyAtMostKcal,
    massAtMostG: settings.massAtMostG,
    pairings: PAIRINGS,
    market: () => table.foods,
  }
}

/** What would lift the plate: first what needs no shopping. The keys 1 to 3 go by this order. */
export function liftsOf(state: State, knowledge: Knowledge): LiftOption[] {
  const options = liftOptions(state.plate, liftContext(problemOf(state, knowledge)))
  return options.sort((a, b) => Number(b.onShelf) - Number(a.onShelf))
}

/** Why nothing may be planned with what the settings tell, or null. */
export const refusalOf = (settings: Settings, { table }: Knowledge): string | null =>
  planningRefusal({ conditions: settings.conditions, pattern: table.patternById.get(settings.pattern)! })
