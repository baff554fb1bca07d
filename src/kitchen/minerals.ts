import type { Food } from '../foods/food.ts'
import type { Portion } from '../nutrition/protein-source.ts'

/** Molar masses in g/mol: phytic acid C6H18O24P6, and zinc. Source: standard atomic masses (IUPAC). */
const PHYTATE_G_PER_MOL = 660.04
const ZINC_G_PER_MOL = 65.38

/**
 * Molar ratio of phytate to zinc, from mg of each; null without zinc.
 *
 * @example phytateZincRatio(1036, 8) is 12.83
 */
export function phytateZincRatio(phytateMg: number, zincMg: number): number | null {
  if (!(zincMg > 0)) return null
  return phytateMg / PHYTATE_G_PER_MOL / (zincMg / ZINC_G_PER_MOL)
}

export type ZincUptake = 'high' | 'moderate' | 'low'

/**
 * How well zinc is taken up at such a ratio, of a whole diet (a hint only on one plate): below 5 about 50 %, from 5 to
 * 15 about 30 %, above 15 about 15 %. Source: WHO, Trace elements in human nutrition and health (1996).
 */
export function zincUptake(ratio: number): ZincUptake {
  return ratio < 5 ? 'high' : ratio <= 15 ? 'moderate' : 'low'
}

/** A sum over the foods of a plate, with the names of those whose figure is not known. */
export interface KnownSum {
  amount: number
  unknown: string[]
}

/** Sums a figure per 100 g over portions. Unit: the figure's. */
export function knownSum(
  portions: readonly Portion<Food>[],
  per100g: (food: Food) => number | null,
): KnownSum {
  let amount = 0
  const unknown: string[] = []
  for (const { food, grams } of portions) {
    const value = per100g(food)
    if (value === null) unknown.push(food.name)
    else amount += (value * grams) / 100
  }
  return { amount, unknown }
}

/** What holds no phytate to speak of even where no table says so: it is a store of seeds. */
const WITHOUT_PHYTATE: readonly Food['role'][] = ['egg', 'dairy', 'meat-fish', 'fat-sugar']

/**
 * Iron, zinc and the phytate:zinc ratio of a plate. Where a food's phytate is not known, the ratio is at least that of
 * the known (`phytateZincAtLeast`); where a food's zinc is not known, there is none.
 */
export function mineralsOf(portions: readonly Portion<Food>[]) {
  const iron = knownSum(portions, food => food.per100g.ironMg)
  const zinc = knownSum(portions, food => food.per100g.zincMg)
  const phytate = knownSum(
    portions,
    food => food.per100g.phytateMg ?? (WITHOUT_PHYTATE.includes(food.role) ? 0 : null),
  )
  const ratio =
    zinc.unknown.length === 0 && phytate.unknown.length < portions.length
      ? phytateZincRatio(phytate.amount, zinc.amount)
      : null
  return { iron, zinc, phytate, phytateZincRatio: ratio, phytateZincAtLeast: phytate.unknown.length > 0 }
}
