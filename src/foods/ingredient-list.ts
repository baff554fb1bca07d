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
      /** words that name no food of the table: taken to bring no protein */
      leftOut: string[]
    }
  | { ok: false; problem: string }

const INGREDIENTS_AT_MOST = 40

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
  const leftOut: string[] = []
  for (const word of words) {
    const found = resolve(word)
    if (!found.ok) leftOut.push(word)
    else if (!foods.some(({ id }) => id === found.food.id)) foods.push(found.food)
  }
  if (!foods.some(({ per100g }) => per100g.crudeProteinG > 0))
    return {
      ok: false,
      problem: `no ingredient that brings protein is known: ${leftOut.slice(0, 5).join(', ').slice(0, 100)}`,
    }
  return { ok: true, foods, leftOut }
}
