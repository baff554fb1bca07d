/**
 * The allergens of Annex II of Regulation (EU) No 1169/2011 (fourteen) and of the United States' list
 * (21 U.S.C. 321(qq): nine). Wheat stands beside gluten because the American list names wheat alone;
 * a food of wheat carries both.
 */
export const ALLERGEN_IDS = [
  'gluten',
  'wheat',
  'crustaceans',
  'egg',
  'fish',
  'peanut',
  'soy',
  'milk',
  'tree-nuts',
  'celery',
  'mustard',
  'sesame',
  'sulphites',
  'lupin',
  'molluscs',
] as const
export type AllergenId = (typeof ALLERGEN_IDS)[number]
