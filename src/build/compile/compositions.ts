import type { IfctFood } from './ifct.ts'
import { type Composition, cookedFromDry, mixCompositions, nutrientsOf } from './nutrients.ts'
import type { Problems } from './problems.ts'
import { splitOnce } from './profiles.ts'
import { numberOf, type Row } from './rows.ts'

/** Columns of composition.csv by nutrient. */
const COLUMN = {
  proteinG: 'protein_g',
  kcal: 'kcal',
  waterG: 'water_g',
  fatG: 'fat_g',
  carbohydrateG: 'carbohydrate_g',
  fibreG: 'fibre_g',
  ashG: 'ash_g',
  ironMg: 'iron_mg',
  zincMg: 'zinc_mg',
  calciumMg: 'calcium_mg',
  magnesiumMg: 'magnesium_mg',
  potassiumMg: 'potassium_mg',
  sodiumMg: 'sodium_mg',
  phytateMg: 'phytate_mg',
  vitaminB12Ug: 'vitamin_b12_ug',
} as const

export interface KnownCompositions {
  sr28: Map<string, Composition>
  ifct: Map<string, IfctFood>
  own: Map<string, Row>
  /** the `composition` cell of each food of the table, for `dry:` and `mix:` */
  foods: Map<string, Row>
}

/**
 * The composition that a food names: `sr28:16070`, `ifct:B014`, `ifct:D010+D011` (their mean), `own:ID` (a row of
 * composition.csv), `dry:FOOD*YIELD` (cooked from another food of the table) or `mix:FOOD*SHARE+...`.
 */
export function resolveComposition(
  expression: string,
  known: KnownCompositions,
  where: string,
  problems: Problems,
  depth = 0,
): Composition | null {
  const [kind, rest = ''] = splitOnce(expression, ':')
  const unknown = (what: string): null => {
    problems.add(where, `composition "${expression}": ${what}`)
    return null
  }
  if (depth > 5) return unknown('refers to itself')
  const ofFood = (id: string): Composition | null => {
    const row = known.foods.get(id)
    if (row === undefined) return unknown(`there is no food "${id}"`)
    const composition = resolveComposition(row.text.composition ?? '', known, row.where, problems, depth + 1)
    const factor = numberOf(row, 'nitrogen_factor', problems)
    return composition === null || factor === null ? composition : { ...composition, nitrogenFactor: factor }
  }
  switch (kind) {
    case 'sr28':
      return known.sr28.get(rest) ?? unknown('SR28 has no such number')
    case 'ifct': {
      const parts = rest.split('+').map(code => known.ifct.get(code.trim()) ?? null)
      if (parts.some(part => part === null)) return unknown('the Indian table has no such code')
      return mixCompositions(parts.map(part => ({ composition: part!, share: 1 / parts.length })))
    }
    case 'own': {
      const row = known.own.get(rest)
      if (row === undefined) return unknown('composition.csv has no such row')
      return {
        nitrogenFactor: numberOf(row, 'nitrogen_factor', problems) ?? 6.25,
        per100g: nutrientsOf(key => numberOf(row, COLUMN[key], problems)),
        measures: [],
        sources: [row.text.source ?? ''],
      }
    }
    case 'dry': {
      const [id = '', factor = ''] = splitOnce(rest, '*')
      const dry = ofFood(id)
      const yieldFactor = Number(factor)
      if (!(yieldFactor > 0.2 && yieldFactor < 20)) return unknown('give FOOD*YIELD with a yield such as 2.5')
      return dry === null ? null : cookedFromDry(dry, yieldFactor)
    }
    case 'mix': {
      const parts = rest.split('+').map(part => {
        const [id = '', share = ''] = splitOnce(part.trim(), '*')
        return { composition: ofFood(id), share: Number(share) }
      })
      if (Math.abs(parts.reduce((sum, { share }) => sum + share, 0) - 1) > 1e-6)
        return unknown('the shares must add up to 1')
      if (parts.some(({ composition }) => composition === null)) return null
      return mixCompositions(parts.map(({ composition, share }) => ({ composition: composition!, share })))
    }
    default:
      return unknown('give sr28:, ifct:, own:, dry: or mix:')
  }
}
