import type { Measure } from '../../foods/food.ts'
import { type Composition, nutrientsOf } from './nutrients.ts'

/** Columns of ABBREV.txt by place (USDA SR28 documentation, abbreviated file). */
const COLUMN = {
  waterG: 2,
  kcal: 3,
  proteinG: 4,
  fatG: 5,
  ashG: 6,
  carbohydrateG: 7,
  fibreG: 8,
  calciumMg: 10,
  ironMg: 11,
  magnesiumMg: 12,
  potassiumMg: 14,
  sodiumMg: 15,
  zincMg: 16,
  vitaminB12Ug: 31,
  phytateMg: -1,
} as const
const FIRST_MEASURE = 48

const fieldsOf = (line: string): string[] =>
  line.split('^').map(field => field.replace(/^~|~\r?$|\r$/g, '').trim())

/** The foods of USDA SR28 by their five-digit number, from the two files of the npm package. */
export function parseSr28(
  abbrev: string,
  descriptions: string,
): Map<string, Composition & { description: string }> {
  const described = new Map<string, { description: string; factor: number }>()
  for (const line of descriptions.split('\n')) {
    if (line.trim() === '') continue
    const fields = fieldsOf(line)
    described.set(fields[0]!, { description: fields[2]!, factor: Number(fields[10]) || 6.25 })
  }
  const foods = new Map<string, Composition & { description: string }>()
  for (const line of abbrev.split('\n')) {
    if (line.trim() === '') continue
    const fields = fieldsOf(line)
    const number = (at: number) => (at < 0 || (fields[at] ?? '') === '' ? null : Number(fields[at]))
    const known = described.get(fields[0]!)
    foods.set(fields[0]!, {
      description: known?.description ?? fields[1]!,
      nitrogenFactor: known?.factor ?? 6.25,
      per100g: nutrientsOf(key => number(COLUMN[key])),
      measures: [
        ...measureOf(fields[FIRST_MEASURE], fields[FIRST_MEASURE + 1]),
        ...measureOf(fields[FIRST_MEASURE + 2], fields[FIRST_MEASURE + 3]),
      ],
      sources: ['usda-sr28'],
    })
  }
  return foods
}

/** Words that make a measure useless to a cook, or that name a pack. */
const USELESS =
  /serving|package|pkg|container|oz\b|lb\b|cubic|nlea|yield|bunch|recipe|quart|as purchased|excludes|portion|pouch|box|bottle|^unit/i

/** `.25 cup` weighing 28 g is `1 cup` of 112 g; measures that a kitchen has no use for are left out. */
export function measureOf(grams: string | undefined, description: string | undefined): Measure[] {
  const g = Number(grams)
  const match = /^([\d.]+)\s+(.+)$/.exec(description ?? '')
  if (!(g > 0) || match === null) return []
  const amount = Number(match[1])
  const unit = match[2]!
    .toLowerCase()
    .replace(/tablespoons?/, 'tbsp')
    .replace(/teaspoons?/, 'tsp')
    .replace(/^cups?\b/, 'cup')
    .replace(/\s*\(.*$/, '')
    // An inch mark, and what follows it, is no word.
    .replace(/,? *[\d/-]*".*$/, '')
    .replace(/\s+/g, ' ')
    .replace(/[\s,]+$/, '')
    .replace(/^(slice|spear|pod|sprout|cup|piece|fruit|beet|grape|bean|cake|mushroom)s\b/, '$1')
    .replace(/^leaves\b/, 'leaf')
    .replace(/^berries\b/, 'berry')
    .replace(/^flowerets?\b/, 'floret')
    .trim()
  if (!(amount > 0) || USELESS.test(unit) || !/^[a-z]/.test(unit)) return []
  return [{ name: `1 ${unit}`, grams: Number((g / amount).toPrecision(4)), source: 'usda-sr28' }]
}
