import { describe, expect, test } from 'vitest'
import { missingAllergens } from '../../src/build/compile/allergen-keywords.ts'
import { readCurationRows } from '../../src/build/compile/kitchen.ts'
import { ALLERGEN_IDS } from '../../src/foods/allergens.ts'
import { loadTable } from '../../src/foods/load.ts'
import { readAllergens } from '../../src/kitchen/allergen-names.ts'
import { aFood } from './a-food.ts'

const rows = readCurationRows('allergen-keywords')

describe('allergens over the whole table', () => {
  test('no food is called by an allergen that its row does not carry', () => {
    expect(missingAllergens(loadTable().foods, rows)).toEqual([])
  })

  test('wheat always carries gluten too, and egg, milk and fish their own', () => {
    for (const food of loadTable().foods) {
      if (food.allergens.includes('wheat')) expect(food.allergens, food.id).toContain('gluten')
      if (food.origin === 'egg') expect(food.allergens, food.id).toContain('egg')
      if (food.origin === 'dairy') expect(food.allergens, food.id).toContain('milk')
      if (food.role === 'soy') expect(food.allergens, food.id).toContain('soy')
    }
  })

  test('the check finds what is missing, by name and by alias, in the plural, and takes nothing for what it is not', () => {
    const found = (name: string, aliases: string[] = []) =>
      missingAllergens([aFood({ id: 'x', name, aliases })], rows).map(({ allergen }) => allergen)
    expect(found('Walnuts, raw')).toEqual(['tree-nuts'])
    expect(found('Paste of seeds', ['tahini'])).toEqual(['sesame'])
    expect(found('Soybeans, dry')).toContain('soy')
    expect(found('Wheat-flour')).toContain('gluten')
    expect(found('Buckwheat groats, dry')).toEqual([])
    expect(found('Eggplant, raw')).toEqual([])
    expect(found('Pasta, red lentil, dry')).toEqual([])
    expect(found('Chestnuts')).toEqual([])
  })

  test('every keyword row names allergens that there are, with its source', () => {
    expect(rows.length).toBeGreaterThan(200)
    const known = new Set<string>(ALLERGEN_IDS)
    for (const row of rows) {
      for (const id of row.allergens!.split(' ')) expect(known, row.keyword).toContain(id)
      expect(['contains', 'may']).toContain(row.certainty)
      expect(row.source).toMatch(/1169\/2011/)
      expect(row.provenance).toMatch(/read|memory/)
    }
  })

  test('every allergen of the two laws can be asked for and stands on some keyword', () => {
    const stands = new Set(rows.flatMap(row => row.allergens!.split(' ')))
    for (const id of ALLERGEN_IDS) {
      expect(stands).toContain(id)
      expect(readAllergens(id)).toMatchObject({ ok: true })
    }
  })
})
