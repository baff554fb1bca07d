import type { Food } from '../../foods/food.ts'
import { type CookingMethod, cookingMethodSchema } from '../../kitchen/kitchen-file.ts'
import { rowFor } from './curated-foods.ts'

type Row = Record<string, string>

/**
 * The cooking methods that the table's foods call for, and which food is cooked how. A row that names a pulse or
 * grain means it dry; `role/state` rows take what no row names.
 */
export function compileCooking(
  foods: readonly Food[],
  rows: readonly Row[],
): { cooking: CookingMethod[]; cookingOf: Record<string, string> } {
  const methods = rows.map(method)
  const named = rows.map((row, i) => ({ foods: row.foods, method: methods[i]! }))
  const cookingOf: Record<string, string> = {}
  for (const food of [...foods].sort((a, b) => (a.id < b.id ? -1 : 1))) {
    const found = rowFor(food, named)
    if (found === null || !suits(food, found)) {
      const general = rowFor({ id: '', role: food.role, state: food.state }, named)
      if (general !== null) cookingOf[food.id] = general.row.method.id
    } else {
      cookingOf[food.id] = found.row.method.id
    }
  }
  return { cooking: methods, cookingOf }
}

/** A stem stands for the food as it is before it is cooked; its cooked, canned and roasted forms are another matter. */
function suits(food: Food, { fit }: { fit: number }): boolean {
  return fit !== 2 || ['dry', 'dried', 'raw', 'frozen', 'product', 'fermented', 'powder'].includes(food.state)
}

function method(row: Row): CookingMethod {
  const parsed = cookingMethodSchema.safeParse({
    id: row.id,
    heat: row.heat,
    soakHLeast: Number(row.soak_h_least),
    soakHMost: Number(row.soak_h_most),
    waterRatio: row.water_ratio === '' ? null : Number(row.water_ratio),
    water: row.water === '' ? null : row.water,
    hardBoilMin: Number(row.hard_boil_min),
    cookMinLeast: Number(row.cook_min_least),
    cookMinMost: Number(row.cook_min_most),
    restMin: Number(row.rest_min),
    pressureMin: row.pressure_min === '' ? null : Number(row.pressure_min),
    rinse: row.rinse === 'yes',
    note: row.note,
    source: row.source,
    provenance: row.provenance,
  })
  if (parsed.success) return parsed.data
  const [issue] = parsed.error.issues
  throw new Error(`data/curation/cooking.csv (${row.id}): ${issue?.path.join('.')}: ${issue?.message}`)
}
