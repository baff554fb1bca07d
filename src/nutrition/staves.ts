import { STAVE_MEMBERS, STAVES, type Stave, type Staves, stavesOf } from './amino-acids.ts'
import type { Pattern } from './pattern.ts'
import type { Portion, ProteinSource } from './protein-source.ts'

/**
 * Digestible mg of one stave's amino acids in 1 g of a food's crude protein. Each amino acid is made digestible
 * with its own coefficient before the members of a pair are added (FAO Food and Nutrition Paper 92, 2013).
 *
 * @example lysine 28 mg/g at 0.82 (wheat) gives 22.96 mg/g
 */
export function digestibleMgPerG(
  food: Pick<ProteinSource, 'aminoMgPerG' | 'digestibility'>,
  stave: Stave,
): number {
  let mg = 0
  for (const aminoAcid of STAVE_MEMBERS[stave])
    mg += food.aminoMgPerG[aminoAcid] * food.digestibility[aminoAcid]
  return mg
}

/** Crude protein (N x 6.25) of some portions together, in g. */
export function crudeProteinOf(portions: readonly Portion[]): number {
  let g = 0
  for (const { food, grams } of portions) g += (grams / 100) * food.per100g.crudeProteinG
  return g
}

/**
 * The staves of a plate: each indispensable amino acid, digestible, as % of the pattern. Over a mixture the
 * digestible amounts and the protein are summed over the foods first (FAO Food and Nutrition Paper 92, 2013).
 * `null` where there is no protein to score.
 */
export function stavesOfPlate(portions: readonly Portion[], pattern: Pattern): Staves | null {
  const proteinG = crudeProteinOf(portions)
  if (!(proteinG > 0)) return null
  return stavesOf(stave => {
    let mg = 0
    for (const { food, grams } of portions) {
      mg += (grams / 100) * food.per100g.crudeProteinG * digestibleMgPerG(food, stave)
    }
    return (100 * mg) / (proteinG * pattern.mgPerG[stave])
  })
}

/** The shortest stave: the limiting amino acid. Of two that tie, the first in the order of STAVES. */
export function shortestStave(staves: Staves): Stave {
  return STAVES.reduce((shortest, stave) => (staves[stave] < staves[shortest] ? stave : shortest))
}
