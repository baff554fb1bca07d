import type { Food, Measure } from './food.ts'
import { keyboardSigns, scanAmount } from './scan-amount.ts'
import { type Unit, unitOf } from './units.ts'
import { wordsOf } from './words.ts'

/** A measure of a food, taken apart: `1/4 block, drained` */
export interface ParsedMeasure {
  measure: Measure
  /** grams in one: of `1/4 block` 81 g, four times that */
  grams: number
  unit: Unit | null
  /** what the label of a container says, g: `1 can 400 g, drained` weighs less */
  labelG: number | null
  /** singular words of the measure's noun: `block`; `potato` */
  nouns: string[]
  /** what it says after its first comma and in brackets, and its words of size */
  qualifiers: string[]
}

const SIZES = [
  'small',
  'medium',
  'large',
  'extra large',
  'big',
  'thick',
  'thin',
  'whole',
  'average',
  'standard',
]

/** Takes a measure's name apart; a name without an amount counts as one. */
export function parseMeasure(measure: Measure): ParsedMeasure {
  // dimensions in brackets tell nothing that anyone would type
  const name = keyboardSigns(measure.name).replace(/\s*\((?:approx|yield|[\d"])[^()]*\)/i, '')
  const amount = scanAmount(name)
  const term = amount?.terms[0]
  const count = amount?.doubt === null && term !== undefined && term.count > 0 ? term.count : 1
  const rest = term === undefined ? name : name.slice(amount!.end)
  const cut = rest.search(/[,(]/)
  const nouns = wordsOf((cut < 0 ? rest : rest.slice(0, cut)).replace(/\d.*$/, ''))
  const sizes = term?.sizes ?? []
  return {
    measure,
    grams: measure.grams / count,
    unit: term?.unit ?? null,
    labelG: term?.eachG ?? null,
    nouns: nouns.filter(word => !SIZES.includes(word)),
    qualifiers: [
      ...sizes,
      ...nouns.filter(word => SIZES.includes(word)),
      ...(cut < 0 ? [] : wordsOf(rest.slice(cut)).filter(word => !/^\d/.test(word))),
    ],
  }
}

const parsed = new WeakMap<Food, ParsedMeasure[]>()

/** A food's measures, taken apart. */
export function measuresOf(food: Food): readonly ParsedMeasure[] {
  let measures = parsed.get(food)
  if (measures === undefined) {
    measures = food.measures.map(parseMeasure)
    parsed.set(food, measures)
  }
  return measures
}

/** What one of a unit weighs, and by which measure. */
export interface Weighed {
  grams: number
  measure: string
  /** anything that must be said with it, or empty */
  note: string
}
export type WeighedUnit = Weighed | { several: ParsedMeasure[] } | null

/** What these leave standing does not change what is in the measure. */
const NEUTRAL = new Set(
  'drained rinsed solid edible cooked boiled raw dry dried fresh whole average standard'.split(' '),
)
/** Of two measures that differ by less than this, either will do. */
const ALIKE = 0.1
/** Nuts, seeds and dried fruit in a closed hand: common practice, and the 30 g portion of dietary guidelines. */
const HANDFUL_G = 30
/** Of the label's net weight, what is left of canned pulses when they are drained (chickpeas 253 of 425 g, SR28). */
const DRAINED_SHARE = 0.6

/**
 * What one `unit` of the food weighs, by the food's own measures: the same measure, or for a volume another volume
 * measure of the same food. Never by water or by another food.
 *
 * @param words the words that stand with the amount (`chopped`, `large`), which choose among measures of one unit
 * @param eachG what the label of a container says that it weighs, g, or null
 */
export function weighUnit(
  food: Food,
  unit: Exclude<Unit, { kind: 'mass' }>,
  words: readonly string[],
  eachG: number | null,
): WeighedUnit {
  if (eachG !== null) return weighLabelled(food, unit, eachG)
  if (unit.name === 'serving') {
    return { grams: food.portionG.usual, measure: 'usual portion', note: 'the usual portion of the table' }
  }
  const measures = measuresOf(food)
  const same = measures.filter(
    ({ unit: own, nouns }) =>
      own?.name === unit.name || (own === null && unit.kind === 'piece' && nouns.includes(unit.name)),
  )
  const chosen = choose(same, words)
  if (chosen !== null) return chosen
  if (unit.kind === 'volume') {
    const volumes = measures.filter(({ unit: own }) => own?.kind === 'volume')
    const nearest = choose(largestFirst(volumes), words)
    if (nearest === null || 'several' in nearest) return nearest
    const by = volumes.find(({ measure }) => measure.name === nearest.measure)!
    const ratio = unit.millilitres / (by.unit as Extract<Unit, { kind: 'volume' }>).millilitres
    return { grams: by.grams * ratio, measure: nearest.measure, note: `from its ${by.unit!.name}` }
  }
  const dried = food.role === 'fruit' && (food.state === 'dried' || food.state === 'dry')
  const isSized = words.some(word => SIZES.includes(word) && !NEUTRAL.has(word))
  if (unit.name === 'handful' && !isSized && (food.role === 'nut-seed' || dried) && food.state !== 'flour') {
    return { grams: HANDFUL_G, measure: 'handful', note: 'a handful taken as 30 g, common practice' }
  }
  return null
}

function weighLabelled(food: Food, unit: Unit, eachG: number): Weighed {
  const isDrained = food.state === 'canned' && wordsOf(food.name).includes('drained')
  if (!isDrained || (unit.name !== 'can' && unit.name !== 'jar'))
    return { grams: eachG, measure: unit.name, note: '' }
  const own = measuresOf(food).find(measure => measure.unit?.name === unit.name && measure.labelG !== null)
  if (own !== undefined)
    return { grams: (eachG * own.grams) / own.labelG!, measure: own.measure.name, note: 'drained' }
  return {
    grams: eachG * DRAINED_SHARE,
    measure: unit.name,
    note: `drained, about ${DRAINED_SHARE * 100} % of what the label says, common practice`,
  }
}

/** Largest units first: a spoon derived from a cup is nearer the truth than a cup from a spoon. */
function largestFirst(measures: readonly ParsedMeasure[]): ParsedMeasure[] {
  const millilitres = ({ unit }: ParsedMeasure) => (unit?.kind === 'volume' ? unit.millilitres : 0)
  return [...measures].sort((a, b) => millilitres(b) - millilitres(a))
}

/** The measure that the words name; without such words the bare one, or any if all weigh nearly the same. */
function choose(measures: readonly ParsedMeasure[], words: readonly string[]): WeighedUnit {
  const offered = measures.filter(measure => !isPacked(measure) || words.includes('packed'))
  if (offered.length === 0) return measures.length === 0 ? null : { several: [...measures] }
  const fitting = offered.filter(({ qualifiers }) => {
    const telling = qualifiers.filter(word => !NEUTRAL.has(word))
    return telling.length > 0 && telling.every(word => words.includes(word))
  })
  if (fitting.length > 0) return weighedBy(fitting[0]!)
  const touched = offered.filter(({ qualifiers }) =>
    qualifiers.some(word => !NEUTRAL.has(word) && words.includes(word)),
  )
  if (touched.length === 1) return weighedBy(touched[0]!)
  // a size was said that the food is not known in
  if (words.some(word => SIZES.includes(word) && !NEUTRAL.has(word))) return null
  const bare = offered.find(({ qualifiers }) => qualifiers.every(word => NEUTRAL.has(word)))
  if (bare !== undefined) return weighedBy(bare)
  const grams = offered.map(measure => measure.grams)
  if (Math.max(...grams) <= Math.min(...grams) * (1 + ALIKE)) return weighedBy(offered[0]!)
  const medium = offered.find(({ qualifiers }) => qualifiers.includes('medium'))
  if (medium !== undefined) return { ...weighedBy(medium), note: 'a medium one taken' }
  return { several: offered }
}

function weighedBy({ grams, measure }: ParsedMeasure): Weighed {
  return { grams, measure: measure.name, note: '' }
}

/** Pressed down is not how a cup is filled unless it is said. */
function isPacked({ qualifiers }: ParsedMeasure): boolean {
  return qualifiers.includes('packed') && !qualifiers.includes('not') && !qualifiers.includes('loosely')
}

/** Units that say nothing of one whole: `1 slice` of bread is not a bread. */
const WHOLES = new Set([
  'piece',
  'kernel',
  'patty',
  'ear',
  'spear',
  'leaf',
  'pod',
  'bar',
  'clove',
  'sheet',
  'head',
  'stalk',
])

/**
 * What one of the food itself weighs (`two eggs`, `3 large potatoes`): by a measure named after it or after its size.
 *
 * @param words the words of the food as written, and of size
 */
export function weighOne(food: Food, words: readonly string[]): WeighedUnit {
  const name = wordsOf(food.name)
  const ones = measuresOf(food).filter(({ unit, nouns, qualifiers }) => {
    if (unit?.kind === 'volume' || unit?.kind === 'mass') return false
    if (unit !== null) return WHOLES.has(unit.name)
    if (nouns.length === 0) return qualifiers.length > 0
    return nouns.every(
      noun => name.includes(noun) || words.includes(noun) || noun === 'fruit' || noun === 'each',
    )
  })
  const telling = words.filter(word => SIZES.includes(word))
  const chosen = choose(ones, telling)
  if (chosen !== null && 'several' in chosen && telling.length === 0) {
    const medium = chosen.several.find(({ qualifiers }) => qualifiers.includes('medium'))
    const large = chosen.several.find(({ qualifiers }) => qualifiers.includes('large'))
    const usual = medium ?? large
    if (usual !== undefined) {
      return { grams: usual.grams, measure: usual.measure.name, note: `${usual.measure.name} taken` }
    }
  }
  return chosen
}

/** Is there a measure by which a text's unit could be meant? */
export function hasMeasure(food: Food, unitName: string): boolean {
  const asked = unitOf(unitName)
  return asked !== null && asked.kind !== 'mass' && weighUnit(food, asked, [], null) !== null
}

/** A food's measures in words: `1 cup (198 g), 1 tbsp (12 g)`. */
export function measureList(food: Food): string {
  return food.measures.map(({ name, grams }) => `${measureText(name)} (${gramsText(grams)})`).join(', ')
}

/** A measure's name without what its dataset left hanging. */
export function measureText(name: string): string {
  return name.replace(/[\s,]+$/, '')
}

/** Grams as people write them: whole from 10 up, else one decimal. */
export function gramsText(grams: number): string {
  const places = grams >= 10 ? 0 : grams >= 1 ? 1 : 2
  return `${Number(grams.toFixed(places))} g`
}
