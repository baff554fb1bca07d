import { type OwnFood, ownFoodSchema } from '../foods/own-food.ts'
import { withOwnFoods } from '../foods/own-table.ts'
import type { Table } from '../foods/table.ts'
import { openStore } from './kept.ts'

/** The foods from packets that the cook keeps; one that is damaged is passed over. */
export async function keptOwnFoods(env: Readonly<Record<string, string | undefined>>): Promise<OwnFood[]> {
  const { document } = await (await openStore(env)).read()
  return ownFoodsIn(document.ownFoods)
}

/** The own foods among what a store holds. */
export function ownFoodsIn(kept: readonly unknown[]): OwnFood[] {
  return kept.flatMap(value => {
    const parsed = ownFoodSchema.safeParse(value)
    return parsed.success ? [parsed.data] : []
  })
}

/** The id of a kept food, be it sound or not. */
export const idOf = (kept: unknown): unknown => (kept as { id?: unknown } | null)?.id

/** The table with them. */
export const tableWith = (table: Table, own: readonly OwnFood[]): Table => withOwnFoods(table, own).table
