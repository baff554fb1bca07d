import { plainText } from './plain-text.ts'

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
