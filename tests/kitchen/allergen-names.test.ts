import { describe, expect, test } from 'vitest'
import { ALLERGEN_IDS } from '../../src/foods/allergens.ts'
import { allergenName, EU_FOURTEEN, readAllergens, US_NINE } from '../../src/kitchen/allergen-names.ts'

const read = (text: string) => {
  const reading = readAllergens(text)
  return reading.ok ? reading.allergens : reading.problem
}

describe('allergens by name', () => {
  test('fourteen in Europe, nine in the United States', () => {
    expect(EU_FOURTEEN).toHaveLength(14)
    expect(US_NINE).toHaveLength(9)
  })

  test('every allergen is known by its id and by its full name', () => {
    for (const id of ALLERGEN_IDS) {
      expect(read(id)).toContain(id)
      expect(read(allergenName(id))).toContain(id)
      expect(read(allergenName(id).toUpperCase())).toContain(id)
    }
  })

  test.each([
    ['gluten', ['gluten']],
    ['Gluten-free', ['gluten']],
    ['wheat', ['wheat']],
    ['oats', ['gluten']],
    ['dairy', ['milk']],
    ['lactose', ['milk']],
    ['soya', ['soy']],
    ['soybeans', ['soy']],
    ['tree nuts', ['tree-nuts']],
    ['Tree-Nuts', ['tree-nuts']],
    ['cashews', ['tree-nuts']],
    ['groundnuts', ['peanut']],
    ['nuts', ['peanut', 'tree-nuts']],
    ['shellfish', ['crustaceans', 'molluscs']],
    ['mollusks', ['molluscs']],
    ['sulfites', ['sulphites']],
    ['lupine', ['lupin']],
    ['eggs', ['egg']],
    ['tahini', ['sesame']],
    ['celeriac', ['celery']],
    ['  SESAME   seeds ', ['sesame']],
    ['anchovies', ['fish']],
    ['coeliac', ['gluten']],
  ])('%j', (text, allergens) => {
    expect(read(text)).toEqual(allergens)
  })

  test('an unknown word is refused in one line with the nearest names', () => {
    expect(read('glutn')).toMatch(/^not an allergen.*nearest: gluten/)
    expect(read('sesmae')).toMatch(/nearest: sesame/)
    for (const text of ['kryptonite', 'x'.repeat(10_000), '\u001b[31mred', '🥜', 'nuts\nand']) {
      const reading = readAllergens(text)
      if (!reading.ok) {
        expect(reading.problem).not.toMatch(/\n/)
        expect(reading.problem.length).toBeLessThan(200)
      }
    }
  })

  test.each(['', '   ', 'free', '--'])('%j names none', text => {
    expect(read(text)).toMatch(/^no allergen named/)
  })
})
