import type { Food } from '../../foods/food.ts'
import { type FoodYield, foodYieldSchema } from '../../kitchen/kitchen-file.ts'
import { yieldByWater } from '../../kitchen/water-balance.ts'
import { rowFor } from './curated-foods.ts'

type Row = Record<string, string>

const DRY: readonly Food['state'][] = ['dry', 'dried', 'powder']
const COOKED: readonly Food['state'][] = ['boiled', 'rehydrated']
const ROLES: readonly Food['role'][] = ['pulse', 'soy', 'grain', 'mushroom']

/**
 * The yields of every pulse, grain, pasta, soy food and dried mushroom: the curated figure where there is one, else
 * the water balance of the table's own dry and cooked rows, else the curated figure of the whole class.
 */
export function compileYields(foods: readonly Food[], rows: readonly Row[]): FoodYield[] {
  const powderKins = new Set(foods.filter(({ state }) => state === 'powder').map(({ kin }) => kin))
  // What is made of its own powder and water (seitan of wheat gluten) counts as cooked.
  const cooked = foods.filter(
    food => COOKED.includes(food.state) || (food.state === 'product' && powderKins.has(food.kin)),
  )
  const cookedKins = new Set(cooked.map(({ kin }) => kin))
  // A meal that the table holds cooked too is boiled like a grain: polenta.
  const dry = foods.filter(
    food => DRY.includes(food.state) || (food.state === 'flour' && cookedKins.has(food.kin)),
  )
  const yields: { found: FoodYield; likeness: number }[] = []
  for (const from of dry) {
    const to = likest(from, cooked)
    const found = yieldOf(from, to, rows)
    if (found !== null) yields.push({ found, likeness: to === null ? 0 : alike(from.id, to.id) })
  }
  for (const to of cooked) {
    if (yields.some(({ found }) => found.to === to.id)) continue
    const found = ROLES.includes(to.role) ? yieldOf(null, to, rows) : null
    if (found !== null) yields.push({ found, likeness: 0 })
  }
  // Where several dry foods become the same cooked one, the likest comes first: that is the way back.
  return yields
    .sort(
      (a, b) =>
        compare(a.found.to ?? '', b.found.to ?? '') ||
        b.likeness - a.likeness ||
        compare(a.found.from ?? '', b.found.from ?? ''),
    )
    .map(({ found }) => found)
}

function yieldOf(from: Food | null, to: Food | null, rows: readonly Row[]): FoodYield | null {
  const food = from ?? to
  if (food === null) return null
  const curated = rowFor(food, rows)
  if (curated !== null && curated.fit > 1) return curatedYield(from, to, curated.row)
  const balanced = from === null || to === null ? null : balancedYield(from, to)
  if (balanced !== null) return balanced
  return curated === null ? null : curatedYield(from, to, curated.row)
}

function curatedYield(from: Food | null, to: Food | null, row: Row): FoodYield {
  const parsed = foodYieldSchema.safeParse({
    from: from?.id ?? null,
    to: to?.id ?? null,
    before: row.before,
    after: row.after,
    factor: Number(row.factor),
    low: Number(row.low),
    high: Number(row.high),
    basis: 'curated',
    source: row.source,
    provenance: row.provenance,
  })
  if (parsed.success) return parsed.data
  const [issue] = parsed.error.issues
  throw new Error(`data/curation/yields.csv (${row.foods}): ${issue?.path.join('.')}: ${issue?.message}`)
}

function balancedYield(from: Food, to: Food): FoodYield | null {
  const [before, after] = [from.per100g, to.per100g]
  if (before.waterG === null || after.waterG === null) return null
  const balance = yieldByWater(
    { waterG: before.waterG, crudeProteinG: before.crudeProteinG },
    { waterG: after.waterG, crudeProteinG: after.crudeProteinG },
  )
  // A drained food weighs no less than it did dry: a lower factor says that the rows do not belong together.
  if (balance === null || balance.factor < 1.2) return null
  return {
    from: from.id,
    to: to.id,
    before: from.state === 'dried' ? 'dried' : 'dry',
    after: to.state === 'rehydrated' ? 'soaked' : 'boiled',
    factor: rounded(balance.factor),
    low: Math.min(rounded(balance.low), rounded(balance.factor * 0.9)),
    high: Math.max(rounded(balance.high), rounded(balance.factor * 1.1)),
    basis: 'water balance',
    source: 'the water and protein of the two rows of the table; width at least 10 %',
    provenance: 'computed',
  }
}

/** The cooked food of the same kin whose id is the likest. */
function likest(from: Food, cooked: readonly Food[]): Food | null {
  let best: Food | null = null
  for (const to of cooked) {
    if (to.kin !== from.kin) continue
    if (best === null || alike(from.id, to.id) > alike(from.id, best.id)) best = to
  }
  return best
}

/** How many words two ids share at their start. */
function alike(a: string, b: string): number {
  const [first, second] = [a.split('-'), b.split('-')]
  let words = 0
  while (words < first.length && first[words] === second[words]) words++
  return words
}

const rounded = (factor: number): number => Math.round(factor * 100) / 100
const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0)
