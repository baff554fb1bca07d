import type { Food } from '../foods/food.ts'
import { approximate, type Fraction, fractionText, roundToOneOf } from './fractions.ts'

/** One countable unit of a food: `1 slice` with the grams of one. */
interface Unit {
  name: string
  grams: number
}

const TBSP_IN_CUP = 16
const TSP_IN_TBSP = 3

/** A measure and a weight that differ by less than this are called equal; above it the measure is `about`. */
const EQUAL_WITHIN = 0.04
/** A measure further off than this is not offered. */
const OFFERED_WITHIN = 0.15

/** More pieces than this are rather filled into a cup. */
const COUNTED_GLADLY = 8

/** More cups than this nobody fills: the scale is quicker. */
const CUPS_AT_MOST = 12

const CUP_PARTS = [0, 1 / 4, 1 / 3, 1 / 2, 2 / 3, 3 / 4] as const
const SPOON_PARTS = [0, 1 / 2] as const
const PIECE_PARTS = [0, 1 / 2] as const

/**
 * An amount in cups (quarters and thirds), tablespoons (halves), teaspoons (halves) or the food's own pieces, or null
 * where the food has no measure that comes near. A cup is that of the table's measures: 237 ml, 16 tablespoons.
 *
 * @example 95 g of lentils, 192 g to the cup: `1/2 cup`
 */
export function measureText(food: Pick<Food, 'measures' | 'state'>, grams: number): string | null {
  if (!(grams > 0)) return null
  const cup = filledMeasure(food)
  const options: Option[] = []
  if (cup !== null) {
    for (const option of [...cupOptions(grams, cup.cupG), ...spoonOptions(grams, cup.cupG)])
      options.push({ ...option, text: option.text + cup.form })
  }
  for (const unit of piecesOf(food)) {
    const count = roundToOneOf(grams / unit.grams, PIECE_PARTS)
    if (count.value > 0 && count.value <= 24) {
      options.push({
        text: pieceText(count, unit.name),
        grams: count.value * unit.grams,
        effort: count.value <= COUNTED_GLADLY ? 0.5 : 1.5,
      })
    }
  }
  const offered = options
    .map(option => ({ ...option, error: Math.abs(option.grams - grams) / grams }))
    .filter(({ error }) => error <= OFFERED_WITHIN)
    .sort((a, b) => band(a.error) - band(b.error) || a.effort - b.effort || a.error - b.error)
  const [best] = offered
  if (best === undefined) return null
  return approximate(best.text, best.error > EQUAL_WITHIN)
}

interface Option {
  text: string
  grams: number
  /** how much handling it asks for: the least is offered first */
  effort: number
}

/** Errors within the same band are as good as each other to a cook. */
const band = (error: number): number => (error <= EQUAL_WITHIN ? 0 : error <= 0.08 ? 1 : 2)

function cupOptions(grams: number, cupG: number): Option[] {
  const count = roundToOneOf(grams / cupG, CUP_PARTS)
  if (count.value < 1 / 4 || count.value > CUPS_AT_MOST) return []
  const options = [{ text: cups(count), grams: count.value * cupG, effort: 1 }]
  // A quarter, third or half cup and a few spoons more, for amounts that fall between.
  const tbspG = cupG / TBSP_IN_CUP
  for (const part of [count.value, count.value - 1 / 4, count.value - 1 / 6, count.value - 1 / 12]) {
    const under = roundToOneOf(part, CUP_PARTS)
    const spoons = Math.round((grams - under.value * cupG) / tbspG)
    if (under.value >= 1 / 4 && spoons >= 1 && spoons <= 3) {
      options.push({
        text: `${cups(under)} + ${spoons} tbsp`,
        grams: under.value * cupG + spoons * tbspG,
        effort: 2,
      })
    }
  }
  return options
}

function spoonOptions(grams: number, cupG: number): Option[] {
  const tbspG = cupG / TBSP_IN_CUP
  const options: Option[] = []
  const spoons = roundToOneOf(grams / tbspG, SPOON_PARTS)
  if (spoons.value >= 1 && spoons.value <= 4) {
    options.push({
      text: `${fractionText(spoons)} tbsp`,
      grams: spoons.value * tbspG,
      effort: spoons.value < 4 ? 0.8 : 1.5,
    })
  }
  const teaspoons = roundToOneOf((grams / tbspG) * TSP_IN_TBSP, SPOON_PARTS)
  if (teaspoons.value >= 1 / 2 && teaspoons.value <= 2.5) {
    options.push({
      text: `${fractionText(teaspoons)} tsp`,
      grams: (teaspoons.value * tbspG) / TSP_IN_TBSP,
      effort: 0.9,
    })
  }
  return options
}

const cups = (count: Fraction): string => `${fractionText(count)} ${count.value > 1 ? 'cups' : 'cup'}`

function pieceText(count: Fraction, name: string): string {
  if (count.value <= 1) return `${fractionText(count)} ${name}`
  const [head = '', ...rest] = name.split(/(?=,| )/)
  const plural = /(s|x|ch|sh)$/.test(head)
    ? `${head}es`
    : /[^aeiou]y$/.test(head)
      ? `${head.slice(0, -1)}ies`
      : `${head}s`
  return `${fractionText(count)} ${plural}${rest.join('')}`
}

/** `1 cup, chopped` as 1 and `cup, chopped`; `1/4 block` as 0.25 and `block`; `½ cup` as 0.5. */
function split(name: string): { count: number; unit: string } | null {
  const match = /^\s*(\d+(?:\.\d+)?|\d+\s*\/\s*\d+|[½¼¾⅓⅔])\s+(.+?)\s*$/.exec(name)
  if (match === null) return null
  const [, amount = '', said = ''] = match
  const unit = said.replace(/[,;: ]+$/, '')
  const signs: Record<string, number> = { '½': 1 / 2, '¼': 1 / 4, '¾': 3 / 4, '⅓': 1 / 3, '⅔': 2 / 3 }
  const [over, under] = amount.split('/').map(Number)
  const count = signs[amount] ?? (under === undefined ? over! : over! / under)
  return count > 0 && Number.isFinite(count) ? { count, unit } : null
}

/** Grams of a cup of the food: of a cup measure, else of spoons; the first that the food lists. */
export function cupOf(food: Pick<Food, 'measures'>): number | null {
  return filledMeasure(food)?.cupG ?? null
}

const FILLED = [
  [/^cups?\b/, 1],
  [/^(tbsp|tablespoons?)\b/, TBSP_IN_CUP],
  [/^(tsp|teaspoons?)\b/, TBSP_IN_CUP * TSP_IN_TBSP],
] as const

/** The cup, and the form it is filled in (`, whole`) where the food fills it in several. */
function filledMeasure(food: Pick<Food, 'measures'>): { cupG: number; form: string } | null {
  for (const [pattern, toCup] of FILLED) {
    const found = food.measures.flatMap(({ name, grams }) => {
      const parts = split(name)
      if (parts === null || !pattern.test(parts.unit.toLowerCase())) return []
      return [{ cupG: (grams / parts.count) * toCup, form: /,[^,]*/.exec(parts.unit)?.[0] ?? '' }]
    })
    const [first] = found
    if (first !== undefined) return { cupG: first.cupG, form: found.length > 1 ? first.form : '' }
  }
  return null
}

/** Measures that are counted, not filled: slices, blocks, cans. Weights and volumes are none. */
function piecesOf(food: Pick<Food, 'measures'>): Unit[] {
  return food.measures.flatMap(({ name, grams }) => {
    const parts = split(name)
    if (
      parts === null ||
      /^(cup|tbsp|tablespoon|tsp|teaspoon|oz|fl oz|lb|g|ml|handful|portion|serving)/i.test(parts.unit)
    )
      return []
    return [{ name: parts.unit, grams: grams / parts.count }]
  })
}
