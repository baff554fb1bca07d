import { ALLERGEN_IDS, type AllergenId } from '../../foods/allergens.ts'
import type { Food } from '../../foods/food.ts'

type Row = Record<string, string>

/** A food whose name says an allergen that its row does not carry. */
export interface MissingAllergen {
  food: string
  said: string
  keyword: string
  allergen: AllergenId
}

/**
 * Holds every food against data/curation/allergen-keywords.csv: where its name or an alias says a keyword (whole
 * words, singular or plural) and none of the words that take it back (`unless`), it must carry the allergens. Rows
 * marked `may` (the label decides) ask for none.
 */
export function missingAllergens(
  foods: readonly Pick<Food, 'id' | 'name' | 'aliases' | 'allergens'>[],
  rows: readonly Row[],
): MissingAllergen[] {
  const keywords = rows
    .filter(row => row.certainty === 'contains')
    .map(row => ({
      keyword: row.keyword ?? '',
      said: wordsPattern(row.keyword ?? ''),
      unless: (row.unless ?? '')
        .split(' ')
        .filter(word => word !== '')
        .map(wordsPattern),
      allergens: (row.allergens ?? '').split(' ').map(allergenOf),
    }))
  return foods.flatMap(food =>
    [food.name, ...food.aliases].flatMap(said => {
      const text = said.toLowerCase()
      return keywords.flatMap(({ keyword, said: pattern, unless, allergens }) => {
        if (!pattern.test(text) || unless.some(word => word.test(text))) return []
        return allergens
          .filter(allergen => !food.allergens.includes(allergen))
          .map(allergen => ({ food: food.id, said, keyword, allergen }))
      })
    }),
  )
}

function wordsPattern(words: string): RegExp {
  const escaped = words
    .toLowerCase()
    .replace(/[.*+?^${}()|[\]\\]/g, '\\$&')
    .replace(/ /g, '[ -]')
  return new RegExp(`(?<![\\p{L}])${escaped}(?:s|es)?(?![\\p{L}])`, 'u')
}

function allergenOf(id: string): AllergenId {
  const known = ALLERGEN_IDS.find(allergen => allergen === id)
  if (known === undefined) throw new Error(`data/curation/allergen-keywords.csv: "${id}" is no allergen`)
  return known
}
