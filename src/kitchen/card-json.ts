import type { Card } from './card.ts'

/** A card for JSON: numbers unrounded, the unit in the key. Figures are for one serving. */
export function cardJson(card: Card) {
  const { score } = card
  return {
    servings: card.servings,
    eat_at: card.eatAt,
    units: card.units,
    take: card.take.map(taken => ({
      food: taken.food.id,
      name: taken.food.name,
      grams_per_serving: taken.gramsPerServing,
      grams_in_all: taken.gramsInAll,
      protein_g_per_serving: taken.proteinG,
      amount: taken.amount,
      from_dry: taken.fromDry,
    })),
    timeline: card.steps.map(step => ({
      minutes_before: step.minutesBefore,
      earliest_minutes_before: step.earliestBefore,
      when: step.when,
      not_before: step.notBefore,
      kind: step.kind,
      food: step.foodId,
      text: step.text,
    })),
    as_it_is: card.asItIs.map(({ id }) => id),
    per_serving: {
      pattern: score.pattern.id,
      grams: score.grams,
      protein_g: score.proteinG,
      crude_protein_g: score.crudeProteinG,
      adjusted_protein_g: score.adjustedProteinG,
      diaas: score.diaas,
      diaas_low: score.band?.low ?? null,
      diaas_high: score.band?.high ?? null,
      class: score.class,
      limiting: score.limiting,
      staves: score.staves,
      kcal: score.kcal,
      leucine_g: score.leucineG,
      fibre_g: score.fibreG,
      iron_mg: card.iron.amount,
      iron_unknown_for: card.iron.unknown,
      zinc_mg: card.zinc.amount,
      zinc_unknown_for: card.zinc.unknown,
      phytate_mg: card.phytate.amount,
      phytate_unknown_for: card.phytate.unknown,
      phytate_zinc_molar_ratio: card.phytateZincRatio,
    },
    staves_in_words: card.staveWords,
    allergens: card.allergens,
    cautions: card.cautions.map(({ id, text, source }) => ({ id, text, source })),
    notes: card.notes,
    storage: card.storage.map(({ id, text, source }) => ({ id, text, source })),
    note: card.standingNote,
  }
}
