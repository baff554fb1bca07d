import type { AllergenId } from '../foods/allergens.ts'
import type { Food } from '../foods/food.ts'
import type { Pattern } from '../nutrition/pattern.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import { barred, servingLimits } from './admit.ts'
import { type Candidate, candidateOf, qualityOf, totalOf } from './candidate.ts'
import type { LiftOption, PairingProblem, ShelfFood } from './problem.ts'

/** What a lift may use: the shelf with its marks, the foods that could be bought, and what is to be left out. */
export interface LiftContext {
  pattern: Pattern
  shelf: readonly ShelfFood[]
  servings: number
  without: readonly AllergenId[]
  allow: { eggs: boolean; dairy: boolean }
  /** the protein that a plate must keep, g; what brings it below is no lift (a plate already below may not lose more) */
  leastProteinG?: number
  /** read only where the shelf itself does not help enough */
  market: () => readonly Food[]
}

/** A change that raises the DIAAS by less than this (per cent) is not worth a cook's while. */
const WORTH = 0.5
/** A food of the market is only named where it beats the shelf by this (per cent). */
const WORTH_BUYING = 2
/** From this DIAAS (per cent) on a protein may be called good (FAO Food and Nutrition Paper 92, 2013). */
const GOOD = 75
/** A lift adds a little: at most this share of a usual portion, or of what is on the plate. */
const LITTLE = 0.75

export function liftContext(problem: PairingProblem): LiftContext {
  return {
    pattern: problem.basis.pattern,
    shelf: problem.shelf,
    servings: problem.servings,
    without: problem.without,
    allow: problem.allow,
    leastProteinG: problem.targetG,
    market: problem.market ?? (() => []),
  }
}

/**
 * The best single changes to a plate, at most three and of different kinds: more (or less) of a food that is on it, a
 * little of another from the shelf, and a food that is not on the shelf. Each in practical grams, the greatest first.
 * Empty where no change is worth it, or where nothing is short (DIAAS 100 or more).
 */
export function liftOptions(portions: readonly Portion<Food>[], context: LiftContext): LiftOption[] {
  const plate = lackingPlate(portions, context)
  return plate === null ? [] : ranked([...atHome(plate, context), bought(plate, context)])
}

/** The one change to name beside a pairing: from the shelf where that helps, else (or where far better) from the table. */
export function nextLift(portions: readonly Portion<Food>[], context: LiftContext): LiftOption | null {
  const plate = lackingPlate(portions, context)
  if (plate === null) return null
  const home = ranked(atHome(plate, context))[0] ?? null
  if (home !== null && home.diaas >= GOOD) return home
  const away = bought(plate, context)
  if (home === null || away === null) return home ?? away
  return away.diaas >= GOOD && away.diaas - home.diaas > WORTH_BUYING ? away : home
}

/** A plate whose shortest stave is short, as the search for a lift sees it. */
interface LackingPlate {
  set: Candidate[]
  grams: number[]
  quality: number
  kins: ReadonlySet<string>
}

/** Null where nothing is short, or nothing is there. */
function lackingPlate(portions: readonly Portion<Food>[], context: LiftContext): LackingPlate | null {
  const set = portions.map(({ food, grams }) =>
    candidateOf(food, context.pattern, { leastG: grams, mostG: grams }),
  )
  const grams = portions.map(portion => portion.grams)
  const quality = qualityOf(set, grams)
  if (set.length === 0 || quality >= 1) return null
  return { set, grams, quality, kins: new Set(portions.map(({ food }) => food.kin)) }
}

/** The best change to what is on the plate, and the best addition from the shelf. */
function atHome(plate: LackingPlate, context: LiftContext): (LiftOption | null)[] {
  const changed = plate.set.map((_, at) => changeOf(plate.set, plate.grams, at, context))
  const added = context.shelf
    .filter(({ food, mark }) => mark !== 'hold-back' && mayBeAdded(food, plate, context))
    .map(item => additionOf(plate.set, plate.grams, item, context, true))
  return [best(changed, plate), best(added, plate)]
}

/** The best addition that is not on the shelf in any state. */
function bought(plate: LackingPlate, context: LiftContext): LiftOption | null {
  const shelfKins = new Set(context.shelf.map(({ food }) => food.kin))
  const added = context
    .market()
    .filter(food => !shelfKins.has(food.kin) && mayBeAdded(food, plate, context))
    .map(food => additionOf(plate.set, plate.grams, { food, onHandG: null, mark: '' }, context, false))
  return best(added, plate)
}

function mayBeAdded(food: Food, plate: LackingPlate, context: LiftContext): boolean {
  return (
    food.place === 'protein' &&
    food.per100g.proteinG > 0 &&
    !plate.kins.has(food.kin) &&
    barred(food, context) === null
  )
}

/** The option with the greatest score, if it is worth a cook's while. */
function best(options: readonly (LiftOption | null)[], plate: LackingPlate): LiftOption | null {
  let found: LiftOption | null = null
  for (const option of options) {
    if (option !== null && (found === null || option.diaas > found.diaas)) found = option
  }
  return found !== null && found.diaas >= 100 * plate.quality + WORTH ? found : null
}

function ranked(options: readonly (LiftOption | null)[]): LiftOption[] {
  return options
    .filter(option => option !== null)
    .sort((a, b) => Math.min(100, b.diaas) - Math.min(100, a.diaas) || Number(b.onShelf) - Number(a.onShelf))
}

/** The best practical change to the grams of one food of the plate, up or down. */
function changeOf(
  plate: readonly Candidate[],
  grams: readonly number[],
  at: number,
  context: LiftContext,
): LiftOption | null {
  const { food } = plate[at]!
  const here = grams[at]!
  const item = context.shelf.find(entry => entry.food.id === food.id)
  const most = item === undefined ? food.portionG.most : servingLimits(item, context.servings).mostG
  const least = Math.max(food.portionG.least, here * (1 - LITTLE / 2))
  const steps: number[] = []
  for (let g = food.stepG; here + g <= most && g <= here * LITTLE; g += food.stepG) steps.push(g)
  const spareG = totalOf(plate, grams, 'protein') - (context.leastProteinG ?? 0)
  for (let g = -food.stepG; here + g >= least && -g * plate[at]!.protein <= spareG; g -= food.stepG) {
    steps.push(g)
  }
  return bestStep(steps, food, true, step =>
    qualityOf(
      plate,
      grams.map((g, j) => (j === at ? g + step : g)),
    ),
  )
}

/** The best practical amount of a food that is not on the plate yet. */
function additionOf(
  plate: readonly Candidate[],
  grams: readonly number[],
  item: ShelfFood,
  context: LiftContext,
  onShelf: boolean,
): LiftOption | null {
  const { food } = item
  const { leastG, mostG } = servingLimits(item, context.servings)
  const most = Math.min(mostG, Math.max(leastG, food.portionG.usual * LITTLE))
  const added = [...plate, candidateOf(food, context.pattern, { leastG, mostG })]
  const steps: number[] = []
  for (let g = Math.ceil(leastG / food.stepG) * food.stepG; g <= most; g += food.stepG) steps.push(g)
  return bestStep(steps, food, onShelf, step => qualityOf(added, [...grams, step]))
}

/** The step with the greatest truncated score; of those within a tenth of a point of it, the smallest. */
function bestStep(
  steps: readonly number[],
  food: Food,
  onShelf: boolean,
  qualityAt: (step: number) => number,
): LiftOption | null {
  const tried = steps.map(deltaG => ({ food, deltaG, diaas: 100 * qualityAt(deltaG), onShelf }))
  const best = Math.max(...tried.map(({ diaas }) => Math.min(100, diaas)))
  const near = tried.filter(({ diaas }) => Math.min(100, diaas) >= best - 0.1)
  return near.reduce<LiftOption | null>(
    (least, option) => (least === null || Math.abs(option.deltaG) < Math.abs(least.deltaG) ? option : least),
    null,
  )
}
