import type { Food } from '../../foods/food.ts'
import type { PlateScore } from '../../nutrition/plate-score.ts'

/** A scored plate in the stable JSON contract: numbers unrounded, the unit in the key. */
export function scoreJson(score: PlateScore<Food>) {
  return {
    pattern: score.pattern.id,
    items: score.items.map(item => ({
      food: item.food.id,
      name: item.food.name,
      grams: item.grams,
      protein_g: item.proteinG,
      kcal: item.kcal,
      diaas_alone: item.diaasAlone,
      profile_tier: item.food.profileTier,
      digestibility_tier: item.food.digestibilityTier,
    })),
    grams: score.grams,
    kcal: score.kcal,
    protein_g: score.proteinG,
    crude_protein_g: score.crudeProteinG,
    adjusted_protein_g: score.adjustedProteinG,
    leucine_g: score.leucineG,
    fibre_g: score.fibreG,
    diaas: score.diaas,
    limiting: score.limiting,
    diaas_low: score.band?.low ?? null,
    diaas_high: score.band?.high ?? null,
    limiting_share: score.band?.limitingShare ?? null,
    class: score.class,
    pdcaas: score.pdcaas,
    staves: score.staves,
    gain: score.gain,
    lift: score.lift,
  }
}
