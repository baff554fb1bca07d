import type { Food, Measure } from '../../foods/food.ts'
import { AMINO_ACIDS, type AminoProfile, profileOf } from '../../nutrition/amino-acids.ts'

/** What the table keeps of a food per 100 g, but the crude protein, which follows from the nitrogen factor. */
export type Nutrients = Omit<Food['per100g'], 'crudeProteinG'>

/** A row of a dataset, or a mixture of such rows. */
export interface Composition {
  nitrogenFactor: number
  per100g: Nutrients
  measures: Measure[]
  sources: string[]
}

/** mg of each amino acid in 1 g of crude protein (nitrogen x 6.25). */
export interface Profile {
  mgPerG: AminoProfile
  sources: string[]
  notes: string[]
}

/** Nitrogen x 6.25, from a protein that a table states with its own factor. */
export const crudeProtein = (proteinG: number, nitrogenFactor: number): number =>
  (proteinG * 6.25) / nitrogenFactor

export const NUTRIENT_KEYS = [
  'proteinG',
  'kcal',
  'waterG',
  'fatG',
  'carbohydrateG',
  'fibreG',
  'ashG',
  'ironMg',
  'zincMg',
  'calciumMg',
  'magnesiumMg',
  'potassiumMg',
  'sodiumMg',
  'phytateMg',
  'vitaminB12Ug',
] as const satisfies readonly (keyof Nutrients)[]

/** A record of nutrients from one value a key; protein and energy are never null. */
export function nutrientsOf(value: (key: keyof Nutrients) => number | null): Nutrients {
  const nutrients = Object.fromEntries(NUTRIENT_KEYS.map(key => [key, value(key)])) as unknown as Nutrients
  nutrients.proteinG ??= 0
  nutrients.kcal ??= 0
  return nutrients
}

/** A weighted mean by mass; a figure that one part lacks is unknown in the mixture. Shares must add up to 1. */
export function mixCompositions(parts: { composition: Composition; share: number }[]): Composition {
  const per100g = nutrientsOf(key => {
    let sum = 0
    for (const { composition, share } of parts) {
      const value = composition.per100g[key]
      if (value === null) return null
      sum += share * value
    }
    return sum
  })
  const crude = parts.reduce(
    (sum, { composition: { per100g, nitrogenFactor }, share }) =>
      sum + share * crudeProtein(per100g.proteinG, nitrogenFactor),
    0,
  )
  return {
    per100g,
    nitrogenFactor: crude === 0 ? 6.25 : (6.25 * per100g.proteinG) / crude,
    measures: parts[0]!.composition.measures,
    sources: [...new Set(parts.flatMap(({ composition }) => composition.sources))],
  }
}

/** The mean profile of some crude proteins, weighted by their amounts. */
export function mixProfiles(parts: { profile: Profile; crudeG: number }[]): Profile {
  const total = parts.reduce((sum, { crudeG }) => sum + crudeG, 0)
  return {
    mgPerG: profileOf(
      a => parts.reduce((sum, { profile, crudeG }) => sum + profile.mgPerG[a] * crudeG, 0) / total,
    ),
    sources: [...new Set(parts.flatMap(({ profile }) => profile.sources))],
    notes: [...new Set(parts.flatMap(({ profile }) => profile.notes))],
  }
}

/** A cooked food from its dry one: every nutrient spread over `yieldFactor` times the mass; water makes up the rest. */
export function cookedFromDry(dry: Composition, yieldFactor: number): Composition {
  const per100g = nutrientsOf(key => {
    const value = dry.per100g[key]
    if (value === null) return null
    return key === 'waterG' ? 100 - (100 - value) / yieldFactor : value / yieldFactor
  })
  return { ...dry, per100g, measures: [] }
}

/** The sum of the eleven amino acids in mg per g crude protein. */
export const sumOf = (profile: AminoProfile): number => AMINO_ACIDS.reduce((sum, a) => sum + profile[a], 0)
