import type { Food } from './food.ts'
import { plainText } from './plain-text.ts'
import type { ResolveFood } from './protein-parts.ts'

/**
 * The ingredients of a label in its order, which is by mass, the most first (Regulation (EU) No 1169/2011, Article
 * 18; 21 CFR 101.4). What stands in brackets, percentages and a leading `Ingredients:` are left out.
 *
 * @example ingredientsOf('Ingredients: wheat flour (wheat, iron), soy protein 20 %, oats.')
 * // ['wheat flour', 'soy protein', 'oats']
 */
export function ingredientsOf(text: string): string[] {
  let plain = plainText(text).replace(/^\s*ingredients?\s*:/i, '')
  for (let before = ''; before !== plain; ) {
    before = plain
    plain = plain.replace(/\([^()]*\)|\[[^[\]]*\]/g, ' ')
  }
  return plain
    .split(/[,;]/)
    .map(piece =>
      piece
        .replace(/\d+(?:[.,]\d+)? ?%/g, ' ')
        .replace(/[()[\]*.]/g, ' ')
        .replace(/ +/g, ' ')
        .trim(),
    )
    .filter(piece => piece !== '')
}

export type LabelReading =
  | {
      ok: true
      /** the foods of the ingredients that are known, in the label's order */
      foods: Food[]
      /** words taken to bring no protein: water, salt and the like, and what no food is called */
      leftOut: string[]
      /** foods taken for words that may mean others too; to be shown */
      assumed: Food[]
    }
  | { ok: false; problem: string }

const INGREDIENTS_AT_MOST = 40

/** What labels list that brings no protein to speak of. */
const WITHOUT_PROTEIN =
  /^(?:(?:sea|table|iodi[sz]ed|rock) )?(?:water|salt|sugar|.*\b(?:oils?|vinegar|syrup|juice|starch|flavou?rings?|vitamins?|acid|emulsifiers?|stabili[sz]ers?|thickeners?|sweeteners?|colou?rs?|colou?rings?|raising agents?|preservatives?|antioxidants?|spices?|herbs?)|e ?\d{3}[a-z]?)$/i

/**
 * The foods of a label's ingredients in descending order of mass. What the table does not know (salt, flavourings,
 * vitamins) is left out and told: an ingredient without protein changes neither the score nor the order of the others.
 */
export function readLabel(text: string, resolve: ResolveFood): LabelReading {
  const words = ingredientsOf(text)
  if (words.length === 0)
    return {
      ok: false,
      problem: 'give the ingredients in the order of the label, such as "wheat flour, soy protein, oats"',
    }
  if (words.length > INGREDIENTS_AT_MOST)
    return {
      ok: false,
      problem: `${words.length} ingredients are too many; give the first ${INGREDIENTS_AT_MOST}`,
    }
  const foods: Food[] = []
  const assumed: Food[] = []
  const leftOut: string[] = []
  for (const word of words) {
    if (WITHOUT_PROTEIN.test(word)) {
      leftOut.push(word)
      continue
    }
    const found = resolve(word)
    if (!found.ok) {
      // A word that nearly names a food may be one that brings protein: leaving it out would narrow the range.
      if (found.unknown === false) return { ok: false, problem: plainText(found.problem) }
      leftOut.push(word)
      continue
    }
    if (found.assumed) assumed.push(found.food)
    if (!foods.some(({ id }) => id === found.food.id)) foods.push(found.food)
  }
  if (!foods.some(({ per100g }) => per100g.crudeProteinG > 0))
    return {
      ok: false,
      problem: `no ingredient that brings protein is known: ${leftOut.slice(0, 5).join(', ').slice(0, 100)}`,
    }
  return { ok: true, foods, leftOut, assumed }
}
