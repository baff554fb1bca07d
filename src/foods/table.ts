import type { Pattern, PatternId } from '../nutrition/pattern.ts'
import type { Coefficients } from '../nutrition/uncertainty.ts'
import type { Food } from './food.ts'

/** A source that rows of the table cite by id. */
export interface Source {
  id: string
  citation: string
  licence: string
}

/** The bundled composition table, as data/foods.json holds it. */
export interface TableFile {
  patterns: Pattern[]
  coefficients: Coefficients
  sources: Source[]
  foods: Food[]
}

/** What parts the foods from the rest in data/foods.json: after it, a food a line. */
export const FOODS_MARK = ',\n"foods":[\n'

/** The table with its look-ups. */
export interface Table {
  foods: readonly Food[]
  foodById: ReadonlyMap<string, Food>
  patterns: readonly Pattern[]
  patternById: ReadonlyMap<PatternId, Pattern>
  coefficients: Coefficients
  sourceById: ReadonlyMap<string, Source>
}

/** Indexes a table file. */
export function tableOf(file: TableFile): Table {
  return {
    foods: file.foods,
    foodById: new Map(file.foods.map(food => [food.id, food])),
    patterns: file.patterns,
    patternById: new Map(file.patterns.map(pattern => [pattern.id, pattern])),
    coefficients: file.coefficients,
    sourceById: new Map(file.sources.map(source => [source.id, source])),
  }
}
