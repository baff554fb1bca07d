import type { Food } from '../../foods/food.ts'
import { diaasOf } from '../../nutrition/diaas.ts'
import type { Pattern } from '../../nutrition/pattern.ts'

/** A camelCase key with its unit in snake_case: `proteinG` to `protein_g`, `vitaminB12Ug` to `vitamin_b12_ug`. */
function snakeCase(key: string): string {
  return key.replace(/[A-Z]/g, letter => `_${letter.toLowerCase()}`)
}

function snakeKeys<T>(record: Record<string, T>): Record<string, T> {
  return Object.fromEntries(Object.entries(record).map(([key, value]) => [snakeCase(key), value]))
}

/** All of a food in the stable JSON contract. `diaas` and `limiting` are against `pattern`; null without protein. */
export function foodJson(food: Food, pattern: Pattern) {
  const { diaas, limiting } = diaasOf([{ food, grams: 100 }], pattern)
  return {
    id: food.id,
    name: food.name,
    aliases: food.aliases,
    role: food.role,
    state: food.state,
    origin: food.origin,
    nitrogen_factor: food.nitrogenFactor,
    per_100g: snakeKeys(food.per100g),
    amino_mg_per_g: food.aminoMgPerG,
    digestibility: snakeKeys(food.digestibility),
    digestibility_class: food.digestibilityClass,
    profile_tier: food.profileTier,
    digestibility_tier: food.digestibilityTier,
    doubts: food.doubts,
    diaas,
    limiting,
    portion_g: food.portionG,
    measures: food.measures,
    allergens: food.allergens,
    cautions: food.cautions,
    sources: food.sources,
    note: food.note,
  }
}

/** A hit of the search: enough to choose by. */
export function hitJson(food: Food, pattern: Pattern) {
  const { diaas, limiting } = diaasOf([{ food, grams: 100 }], pattern)
  return {
    id: food.id,
    name: food.name,
    state: food.state,
    role: food.role,
    protein_g_per_100g: food.per100g.proteinG,
    diaas,
    limiting,
  }
}
