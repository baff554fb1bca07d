import { STAVE_MEMBERS, STAVES } from './amino-acids.ts'
import type { Pattern } from './pattern.ts'
import type { Portion } from './protein-source.ts'
import { crudeProteinOf } from './staves.ts'

/**
 * Protein digestibility-corrected amino acid score in per cent, truncated at 100: the amino acid score of the
 * mixture (total, not digestible, amino acids) times its protein's true faecal digestibility, weighted by protein.
 * `null` for a plate without protein. Source: FAO Food and Nutrition Paper 51 (1991); the pattern there is that
 * of children of 2-5 years.
 */
export function pdcaasOf(portions: readonly Portion[], pattern: Pattern): number | null {
  const proteinG = crudeProteinOf(portions)
  if (!(proteinG > 0)) return null
  let digestedG = 0
  for (const { food, grams } of portions) {
    digestedG += (grams / 100) * food.per100g.crudeProteinG * food.digestibility.proteinFaecal
  }
  const score = Math.min(
    ...STAVES.map(stave => {
      let mg = 0
      for (const { food, grams } of portions) {
        for (const aminoAcid of STAVE_MEMBERS[stave]) {
          mg += (grams / 100) * food.per100g.crudeProteinG * food.aminoMgPerG[aminoAcid]
        }
      }
      return mg / (proteinG * pattern.mgPerG[stave])
    }),
  )
  return Math.min(100, (100 * score * digestedG) / proteinG)
}
