import type { Food } from '../../foods/food.ts'
import { sumOf } from './nutrients.ts'

/** One thing that a row of the table must not be: the rule by which exceptions.csv excuses it, and what is wrong. */
export interface Finding {
  rule: string
  what: string
}

/** What a checked row holds that its food does not show. */
export interface Checked {
  food: Food
  /** whose profile it is, where that is another species */
  doubts: readonly string[]
}

/**
 * The rules that no real food breaks. Those of the composition are arithmetic; the bounds on the amino acids' sum are
 * wide enough for leaves and mushrooms (much non-protein nitrogen) and for gelatin-free animal foods.
 */
const RULES: Record<string, (food: Food) => string | false> = {
  'protein-in-dry-matter': ({ per100g: { proteinG, waterG } }) =>
    waterG !== null &&
    proteinG > 100 - waterG + 0.05 &&
    `protein ${round(proteinG)} g is more than the dry matter ${round(100 - waterG)} g`,
  'amino-sum': ({ per100g, aminoMgPerG }) => {
    const share = sumOf(aminoMgPerG) / 10
    return (
      per100g.proteinG > 2 &&
      (share < 25 || share > 75) &&
      `the eleven amino acids are ${round(share)} % of the crude protein; 25-75 % is possible`
    )
  },
  'proximate-sum': ({ per100g: { waterG, proteinG, fatG, carbohydrateG, ashG } }) => {
    if (waterG === null || fatG === null || carbohydrateG === null || ashG === null) return false
    const sum = waterG + proteinG + fatG + carbohydrateG + ashG
    return Math.abs(sum - 100) > 6 && `water, protein, fat, carbohydrate and ash are ${round(sum)} g of 100 g`
  },
  energy: ({ per100g: { kcal, proteinG, fatG, carbohydrateG, fibreG } }) => {
    if (fatG === null || carbohydrateG === null) return false
    const most = 4.4 * proteinG + 9.1 * fatG + 4.3 * carbohydrateG
    const least = 2.4 * proteinG + 8.3 * fatG + 3.4 * Math.max(0, carbohydrateG - (fibreG ?? 0))
    return (
      (kcal > most + 12 || kcal < least - 12) &&
      `${round(kcal)} kcal, but the macronutrients give ${round(least)} to ${round(most)}`
    )
  },
  // What is left when food burns holds all of its metals, so they cannot outweigh it.
  minerals: ({ per100g: { ashG, calciumMg, ironMg, magnesiumMg, potassiumMg, sodiumMg, zincMg } }) => {
    if (ashG === null) return false
    const mg = [calciumMg, ironMg, magnesiumMg, potassiumMg, sodiumMg, zincMg]
    const metalsG = mg.reduce<number>((sum, value) => sum + (value ?? 0), 0) / 1000
    return (
      metalsG > 1.05 * ashG + 0.15 && `the minerals are ${round(metalsG)} g, but the ash ${round(ashG)} g`
    )
  },
  // Clams and liver, the richest foods known, hold just under 100 ug.
  'vitamin-b12': ({ per100g: { vitaminB12Ug } }) =>
    vitaminB12Ug !== null &&
    vitaminB12Ug > 100 &&
    `${round(vitaminB12Ug)} ug of vitamin B12 in 100 g; no food holds so much`,
  portion: ({ portionG: { least, usual, most } }) =>
    (least > usual || usual > most) &&
    `portions must be least <= usual <= most, not ${least}, ${usual}, ${most}`,
  'related-species-note': ({ doubts, note }) =>
    doubts.includes('related-species') &&
    note === '' &&
    'a profile of another species needs a note that says whose',
  'estimated-note': ({ profileTier, note }) =>
    profileTier === 'estimated' && note === '' && 'an estimated profile needs a note that says why',
  // The American table writes brands in capitals.
  brand: ({ name, aliases }) =>
    [name, ...aliases].some(text => /\b[A-Z]{5,}\b/.test(text)) &&
    'a name or alias in capitals looks like a brand; leave brands out',
  text: ({ name, aliases, firstFor, note }) =>
    // biome-ignore lint/suspicious/noControlCharactersInRegex: that is what is looked for
    [name, note, ...aliases, ...firstFor].some(text => /[\u0000-\u001f\u007f-\u009f®™©]/.test(text)) &&
    'a name, alias or note holds a control character or a trade mark sign',
}

const round = (value: number): number => Number(value.toPrecision(3))

/** Which rules a food breaks. */
export function findingsOf(food: Food): Finding[] {
  return Object.entries(RULES).flatMap(([rule, check]) => {
    const what = check(food)
    return what === false ? [] : [{ rule, what }]
  })
}

export const RULE_NAMES = Object.keys(RULES)
