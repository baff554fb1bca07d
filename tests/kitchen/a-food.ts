import type { Food } from '../../src/foods/food.ts'
import { profileOf } from '../../src/nutrition/amino-acids.ts'

type Given = Partial<Omit<Food, 'per100g'>> & { per100g?: Partial<Food['per100g']> }

/** A food for tests: plain boiled lentils in all that a test does not say. */
export function aFood(given: Given): Food {
  return {
    id: 'test-food',
    name: 'Test food, boiled',
    aliases: [],
    firstFor: [],
    kin: 'test-kin',
    role: 'pulse',
    state: 'boiled',
    origin: 'plant',
    place: 'protein',
    nitrogenFactor: 6.25,
    aminoMgPerG: profileOf(() => 50),
    digestibility: { ...profileOf(() => 0.85), proteinFaecal: 0.85 },
    digestibilityClass: 'pulse',
    profileTier: 'measured',
    digestibilityTier: 'ileal, this class',
    doubts: [],
    portionG: { least: 50, usual: 200, most: 350 },
    stepG: 5,
    measures: [],
    allergens: [],
    cautions: [],
    sources: ['test'],
    note: '',
    ...given,
    per100g: {
      proteinG: 9,
      crudeProteinG: 9,
      kcal: 116,
      waterG: 70,
      fatG: 0.4,
      carbohydrateG: 20,
      fibreG: 8,
      ashG: 0.8,
      ironMg: 3.3,
      zincMg: 1.3,
      calciumMg: 19,
      magnesiumMg: 36,
      potassiumMg: 369,
      sodiumMg: 2,
      phytateMg: 200,
      vitaminB12Ug: 0,
      ...given.per100g,
    },
  }
}
