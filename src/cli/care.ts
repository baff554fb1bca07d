import type { Food } from '../foods/food.ts'
import { allergenName } from '../kitchen/allergen-names.ts'
import { cautionsFor, STANDING_NOTE } from '../kitchen/cautions.ts'
import { wrapLines } from '../tui/text/lines.ts'

/** The allergens of some foods, each once, by their full names. */
export function allergensOf(foods: readonly Food[]): string[] {
  return [...new Set(foods.flatMap(food => food.allergens))].map(allergenName)
}

/** What goes under every answer that suggests food: allergens, the cautions that its foods call for, and the standing note. */
export function careLines(foods: readonly Food[], columns: number): string[] {
  const allergens = allergensOf(foods)
  const lines = allergens.length === 0 ? [] : [`Allergens: ${allergens.join(', ')}.`]
  lines.push(...cautionsFor(foods).map(({ text }) => text), STANDING_NOTE)
  return lines.flatMap(line => wrapLines(line, columns, 2))
}

/** The same for JSON. */
export function careJson(foods: readonly Food[]) {
  return {
    allergens: [...new Set(foods.flatMap(food => food.allergens))],
    cautions: cautionsFor(foods).map(({ id, text, source }) => ({ id, text, source })),
    note: STANDING_NOTE,
  }
}
