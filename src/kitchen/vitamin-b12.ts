import type { Food } from '../foods/food.ts'

/** The line on vitamin B12 and where it comes from. */
export const B12_NOTE = {
  text: 'Plants bring no vitamin B12 that counts (nori, spirulina and tempeh neither): with plants alone, take it as a supplement or in fortified food.',
  source:
    'EFSA Journal 2015;13(7):4150 (adults 4 ug a day); US National Institutes of Health, fact sheet on vitamin B12',
} as const

/**
 * The B12 note where all foods of a plate are plants and it has not been said today, else null. The caller keeps
 * `today` as the next `lastDay` when a note comes back. Days are YYYY-MM-DD.
 */
export function b12NoteFor(
  foods: readonly Pick<Food, 'origin'>[],
  { lastDay, today }: { lastDay: string | null; today: string },
): typeof B12_NOTE | null {
  if (foods.length === 0 || lastDay === today) return null
  return foods.every(({ origin }) => origin === 'plant') ? B12_NOTE : null
}
