import { type OwnFood, ownFoodProblems, ownFoodToFood } from './own-food.ts'
import type { Table } from './table.ts'

/** How the table cites an own food. */
const OWN_SOURCE = { id: 'own', citation: 'your own food: the label in your hand', licence: 'yours' }

/**
 * The table with the cook's own foods behind its rows, so that search, scores and pairings take them like any other.
 * An own food that no longer holds (a part is gone from the table) is left out and told of.
 */
export function withOwnFoods(table: Table, own: readonly OwnFood[]): { table: Table; problems: string[] } {
  const problems: string[] = []
  const foods = own.flatMap(food => {
    const wrong = ownFoodProblems(food, table)
    if (table.foodById.has(food.id)) wrong.push(`there is a food "${food.id}" already`)
    if (wrong.length === 0) return [ownFoodToFood(food, table)]
    problems.push(`${food.name} is left out: ${wrong.join('; ')}`)
    return []
  })
  if (foods.length === 0) return { table, problems }
  return {
    table: {
      ...table,
      foods: [...table.foods, ...foods],
      foodById: new Map([...table.foodById, ...foods.map(food => [food.id, food] as const)]),
      sourceById: new Map([...table.sourceById, [OWN_SOURCE.id, OWN_SOURCE]]),
    },
    problems,
  }
}
