import type { Food } from '../foods/food.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import type { CautionText } from './kitchen-file.ts'
import { loadKitchen } from './load.ts'

/**
 * What to watch out for with the foods on a plate.
 *
 *     cautionsFor(foods)                                  // each that applies once, the most important first
 *     cautionsFor(foods, { conditions: ['gout'], boxed: true })
 */
export interface Caution {
  id: string
  /** one or two sentences in plain words */
  text: string
  source: string
  weight: number
}

/** What a caution may depend on beyond the foods. */
export interface CautionContext {
  /** ids of the conditions that the settings tell of */
  conditions?: readonly string[]
  /** the food goes into a box for later */
  boxed?: boolean
  /** grams a serving, for the cautions that depend on the amount (salt, fibre) */
  portions?: readonly Portion<Food>[]
}

/** Goes under every answer that suggests food. */
export const STANDING_NOTE =
  'For information, for healthy people over three; not medical advice. Local food-safety rules come first.'

/** The longer form, for cards and help. */
export const FULL_NOTE =
  'This compares amino acids in foods with a published pattern: arithmetic for healthy people over three, not medical advice. If you are pregnant, under 18, have kidney or liver disease, phenylketonuria or another metabolic disorder, an eating disorder now or before, or take warfarin or an MAO inhibitor, ask your doctor or a registered dietitian first. Local food-safety rules come first.'

/** A serving with more sodium than this (mg) is flagged: two fifths of the day's 2000 mg (WHO 2012). Our judgement. */
const SODIUM_FLAG_MG = 800
/** A serving with more fibre than this (g) is flagged; a day's adequate intake is about 25 g (EFSA 2010). */
const FIBRE_FLAG_G = 25

/** Cautions that weigh more where the settings tell of a condition. */
const WEIGHTIER: Record<string, readonly string[]> = {
  'vitamin-k': ['blood-thinners'],
  'natto-vitamin-k': ['blood-thinners'],
  'kelp-iodine': ['pregnancy'],
  'seaweed-iodine': ['pregnancy'],
  sprouts: ['pregnancy', 'under-18'],
  poppy: ['pregnancy', 'under-18'],
  sodium: ['kidney-disease'],
}
const WEIGHTIER_BY = 100

/** Each caution that the foods call for, once, the most important first. Unknown ids are passed over. */
export function cautionsFor(
  foods: readonly Food[],
  context: CautionContext = {},
  texts: readonly CautionText[] = loadKitchen().cautions,
): Caution[] {
  const called = new Set(foods.flatMap(food => food.cautions))
  for (const id of cautionsOfAmounts(context.portions ?? [])) called.add(id)
  const textById = new Map(texts.map(text => [text.id, text]))
  const covered = new Set([...called].flatMap(id => textById.get(id)?.covers ?? []))
  return [...called]
    .filter(id => !covered.has(id))
    .flatMap(id => {
      const text = textById.get(id)
      if (text === undefined) return []
      return [{ id, text: text.text, source: text.source, weight: weightOf(text, context) }]
    })
    .sort((a, b) => b.weight - a.weight || (a.id < b.id ? -1 : 1))
}

function weightOf(text: CautionText, { conditions = [], boxed = false }: CautionContext): number {
  const weight = boxed ? (text.weightBoxed ?? text.weight) : text.weight
  const concerned = WEIGHTIER[text.id]?.some(id => conditions.includes(id)) ?? false
  return concerned ? weight + WEIGHTIER_BY : weight
}

function cautionsOfAmounts(portions: readonly Portion<Food>[]): string[] {
  const sum = (per100g: (food: Food) => number | null) =>
    portions.reduce((total, { food, grams }) => total + ((per100g(food) ?? 0) * grams) / 100, 0)
  const ids: string[] = []
  if (sum(food => food.per100g.sodiumMg) > SODIUM_FLAG_MG) ids.push('sodium')
  if (sum(food => food.per100g.fibreG) > FIBRE_FLAG_G) ids.push('high-fibre')
  return ids
}
