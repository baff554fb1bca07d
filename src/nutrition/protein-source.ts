import type { AminoProfile } from './amino-acids.ts'

/** How the amino-acid profile is known, the firmest first. */
export const PROFILE_TIERS = ['measured', 'borrowed', 'estimated'] as const
export type ProfileTier = (typeof PROFILE_TIERS)[number]

/** How the digestibility is known, the firmest first. */
export const DIGESTIBILITY_TIERS = [
  'ileal, this food',
  'ileal, this class',
  'faecal',
  'class default',
] as const
export type DigestibilityTier = (typeof DIGESTIBILITY_TIERS)[number]

/** What widens the band of a food beyond its tiers (coefficients in data/curation/uncertainty.csv). */
export const DOUBTS = ['heat-damaged', 'non-protein-nitrogen', 'related-species', 'own-food'] as const
export type Doubt = (typeof DOUBTS)[number]

/** Fractions of each amino acid absorbed by the end of the small bowel, and of whole protein by faecal balance. */
export type Digestibility = AminoProfile & { proteinFaecal: number }

/**
 * What the score needs to know of a food. `proteinG` is the table's protein (nitrogen x the food's own factor);
 * `crudeProteinG` is nitrogen x 6.25, the basis on which amino acids and scores are stated. Both per 100 g.
 */
export interface ProteinSource {
  id: string
  per100g: { proteinG: number; crudeProteinG: number; kcal: number; fibreG: number | null }
  /** mg of each amino acid in 1 g of crude protein */
  aminoMgPerG: AminoProfile
  digestibility: Digestibility
  profileTier: ProfileTier
  digestibilityTier: DigestibilityTier
  doubts: readonly Doubt[]
}

/** So many grams of a food, as it is weighed in the state that its id names. */
export interface Portion<S extends ProteinSource = ProteinSource> {
  food: S
  grams: number
}
