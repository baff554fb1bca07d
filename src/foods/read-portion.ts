import { isUnusualState } from './everyday.ts'
import type { Food } from './food.ts'
import {
  gramsText,
  hasMeasure,
  measureList,
  measureText,
  type ParsedMeasure,
  weighOne,
  weighUnit,
} from './measures.ts'
import { cleaned, type Parted, partPortion } from './part-portion.ts'
import { plainText } from './plain-text.ts'
import type { Doubt, Scanned, Term } from './scan-amount.ts'
import { type Finder, nearestKinds, type Resolution, resolve, shown, whyNoFood } from './search.ts'
import { statesOf } from './state-words.ts'
import { type Unit, unitOf } from './units.ts'
import { wordsOf } from './words.ts'

/** A reading that may be meant; `text`, typed as it is, would be understood. */
export interface NearReading {
  text: string
  food: Food
  /** null where the amount can't be told either */
  grams: number | null
}

export type PortionReading =
  | {
      ok: true
      food: Food
      /** of the food in the state that its name says */
      grams: number
      /** the measure by which it was weighed, or null where the text gave a mass */
      measure: string | null
      /** what was understood, in one plain line */
      echo: string
    }
  | { ok: false; problem: string; nearest: NearReading[] }

export interface PortionOptions {
  /** where no amount is given: refuse, or take the food's usual portion; refused where not said */
  missingAmount?: 'refuse' | 'usual portion'
}

const LONGEST = 200
/** More than this on one plate or shelf is a slip of the keyboard, g. */
const MOST_G = 10_000
const LEAST_G = 0.01

type Refused = Extract<PortionReading, { ok: false }>

/**
 * Reads a portion as people write it: an amount and a food, in either order. Amounts are masses, or measures of the
 * food's own. What is not understood, or may be several things, is refused with up to three readings that would be.
 *
 * @example readPortion('1 1/2 cups cooked brown rice', finder)
 * @example readPortion('lentils 200g', finder)
 */
export function readPortion(text: string, finder: Finder, options: PortionOptions = {}): PortionReading {
  const said = shown(text)
  if (said === '')
    return refused('no portion is given; write an amount and a food, such as 200 g boiled lentils')
  if (text.length > 20 * LONGEST || plainText(text).trim().length > LONGEST) {
    return refused(
      `"${said}" is too long for a portion; write an amount and a food in at most ${LONGEST} letters`,
    )
  }
  const plain = plainText(text).trim()
  const whole = finder.byId(plain.toLowerCase())
  const parted = whole === undefined ? partPortion(plain) : { amount: null, amountText: '', foodText: plain }
  return readParted(said, parted, finder, options)
}

function refused(problem: string, nearest: NearReading[] = []): Refused {
  return { ok: false, problem, nearest: nearest.slice(0, 3) }
}

function readParted(said: string, parted: Parted, finder: Finder, options: PortionOptions): PortionReading {
  const { amount, amountText, foodText } = parted
  if (foodText === '') {
    return refused(`"${said}" names no food; write an amount and a food, such as 200 g boiled lentils`)
  }
  if (amount !== null && MORE_AMOUNTS.test(foodText)) {
    return refused(`"${said}" gives two amounts; give one, such as ${amountText} and the food`)
  }
  const resolution = resolveFor(amount, foodText, finder)
  const named = unitInName(parted, resolution, finder)
  if (named !== null) return readParted(said, named, finder, options)
  if (resolution.kind !== 'food') return noFood(parted, resolution)
  const { food, candidate } = inMeasuredState(resolution, amount, foodText, finder)
  if (amount === null) {
    if (options.missingAmount === 'usual portion') {
      const grams = food.portionG.usual
      const echo = `${said}: ${gramsText(grams)} ${food.name} (no amount given: its usual portion)`
      return { ok: true, food, grams, measure: 'usual portion', echo }
    }
    return refused(`"${said}" says no amount; how much ${food.name}?`, usualReadings(food))
  }
  if (amount.doubt !== null) return doubtful(said, amount, amount.doubt, food)
  const weighed = weighTerms(amount.terms, food, foodText)
  if (weighed === null || 'several' in weighed) return noMeasure(said, amount, food, weighed?.several ?? null)
  const { grams } = weighed
  const problem = amountProblem(said, grams, food)
  if (problem !== null) return refused(problem, usualReadings(food))
  const state = candidate !== null && !candidate.stateAsked ? stateNote(food, finder) : ''
  const notes = [...weighed.notes, state].filter(note => note !== '')
  const echo = `${said}: ${gramsText(grams)} ${food.name}${notes.length === 0 ? '' : ` (${notes.join('; ')})`}`
  return { ok: true, food, grams, measure: weighed.measure, echo }
}

/** An amount with a unit further on in the food's words. */
const MORE_AMOUNTS = /(^|[\s(])\d+(?:[.,]\d+)?\s*(?:g|kg|mg|oz|lb|lbs|ml|grams?|cups?|tbsp|tsp)(?=$|[\s,;)])/i
/** The food, in the light of the amount: a can holds what is canned, and of several foods only one may come in slices. */
function resolveFor(amount: Scanned | null, foodText: string, finder: Finder): Resolution {
  const unit = amount?.terms[0]?.unit ?? null
  if (unit?.kind === 'piece' && unit.name === 'can') {
    const saysState = wordsOf(foodText).some(word => statesOf(word) !== null)
    const canned = saysState ? null : resolve(`canned ${foodText}`, finder)
    if (canned?.kind === 'food') return canned
  }
  const resolution = resolve(foodText, finder)
  if (resolution.kind !== 'several' || unit === null || unit.kind === 'mass') return resolution
  const measured = resolution.candidates.filter(({ food }) => hasMeasure(food, unit.name))
  const kins = new Set(measured.map(({ food }) => food.kin))
  return kins.size === 1 ? { kind: 'food', food: measured[0]!.food, candidate: measured[0]! } : resolution
}

/** Where no state was said, the state that has the measure: leaves come by the handful raw, not boiled. */
function inMeasuredState(
  resolution: Extract<Resolution, { kind: 'food' }>,
  amount: Scanned | null,
  foodText: string,
  finder: Finder,
): Extract<Resolution, { kind: 'food' }> {
  const { food, candidate } = resolution
  if (candidate === null || candidate.stateAsked || amount === null || amount.doubt !== null)
    return resolution
  const weighs = (other: Food) => weighTerms(amount.terms, other, foodText) !== null
  if (weighs(food)) return resolution
  const other = finder
    .weigh(foodText)
    .find(({ food: mate, whole }) => mate.kin === food.kin && whole && !isUnusualState(mate) && weighs(mate))
  return other === undefined ? resolution : { kind: 'food', food: other.food, candidate: other }
}

/** Units that also begin the names of foods: bottle gourd, pot barley, head lettuce. */
const IN_NAMES = new Set(['bottle', 'pot', 'ear', 'bar', 'head', 'stick'])

/** `120 g bottle gourd` and `2 bottle gourds`, where the unit turns out to be part of the food's name. */
function unitInName(parted: Parted, resolution: Resolution, finder: Finder): Parted | null {
  const term = parted.amount?.terms[0]
  if (term?.unit?.kind !== 'piece' || parted.amount?.terms.length !== 1) return null
  const foodText = `${term.unit.name} ${parted.foodText}`
  if (resolution.kind === 'food' && !IN_NAMES.has(term.unit.name)) return null
  const named = resolve(foodText, finder)
  if (named.kind !== 'food' || !(named.candidate?.exact || named.candidate?.first)) return null
  const plain: Term =
    term.eachG === null
      ? { ...term, unit: null, eachMl: null }
      : { ...term, count: term.count * term.eachG, unit: unitOf('g'), eachG: null }
  return { amount: { ...parted.amount, terms: [plain] }, amountText: parted.amountText, foodText }
}

interface WeighedTerms {
  grams: number
  measure: string | null
  notes: string[]
}

function weighTerms(terms: readonly Term[], food: Food, foodText: string) {
  const words = wordsOf(foodText)
  let grams = 0
  let measure: string | null = null
  const notes: string[] = []
  for (const { count, unit, eachG, eachMl, sizes } of terms) {
    if (unit?.kind === 'mass') {
      grams += count * unit.grams
      continue
    }
    const around = [...words, ...sizes]
    const one =
      unit === null
        ? weighOne(food, around)
        : eachMl === null
          ? weighUnit(food, unit, around, eachG)
          : weighMillilitres(food, eachMl, around)
    if (one === null || 'several' in one) return one
    grams += count * one.grams
    measure = one.measure
    const own = food.measures.find(({ name }) => name === one.measure)
    if (own !== undefined) notes.push(`${measureText(own.name)} = ${gramsText(own.grams)}`)
    if (one.note !== '') notes.push(one.note)
  }
  const weighed: WeighedTerms = { grams, measure, notes }
  return weighed
}

/** What a container holds whose label gives a volume. */
function weighMillilitres(food: Food, eachMl: number, words: readonly string[]) {
  const one = weighUnit(food, MILLILITRE, words, null)
  return one === null || 'several' in one ? one : { ...one, grams: one.grams * eachMl }
}
const MILLILITRE: Unit & { kind: 'volume' } = { kind: 'volume', name: 'ml', millilitres: 1 }

/** Where the food is there both dry and cooked and the text said neither, the difference must be seen. */
function stateNote(food: Food, finder: Finder): string {
  const others = finder.foods.filter(other => other.kin === food.kin && other.id !== food.id)
  const dry = (state: string) => state === 'dry' || state === 'raw'
  const cooked = (state: string) => state === 'boiled' || state === 'canned'
  if (dry(food.state) && others.some(({ state }) => cooked(state))) return `weighed ${food.state}, not cooked`
  if (cooked(food.state) && others.some(({ state }) => state === 'dry'))
    return `weighed ${food.state}, not dry`
  return ''
}

function amountProblem(said: string, grams: number, food: Food): string | null {
  if (Number.isNaN(grams)) return `"${said}" gives no number for the amount; write one, such as 200 g`
  if (grams < 0) return `"${said}" gives an amount below zero; write one above it, such as 200 g`
  if (grams === 0) return `"${said}" gives an amount of zero; write one above it, such as 200 g`
  if (grams > MOST_G) return `"${said}" is more than 10 kg of ${food.name}; write at most 10 kg`
  if (grams < LEAST_G) return `"${said}" is too little of ${food.name} to weigh; write at least ${LEAST_G} g`
  return null
}

function isSensible(grams: number): boolean {
  return grams >= LEAST_G && grams <= MOST_G
}

/** A food's usual portion, in grams and in its own measures. */
function usualReadings(food: Food): NearReading[] {
  const { usual } = food.portionG
  const readings = [inGrams(usual, food)]
  for (const { name, grams } of food.measures) {
    if (grams <= 3 * usual && grams >= usual / 20)
      readings.push({ text: `${measureWords(name)} ${food.name}`, food, grams })
  }
  return readings.filter(reading => isUnderstood(reading)).slice(0, 3)
}

/** A measure's name without what it says after its comma, as it stands before a food. */
function measureWords(name: string): string {
  return name.replace(/\s*[,(].*$/, '')
}

function inGrams(grams: number, food: Food): NearReading {
  const shownG = Number(grams.toPrecision(6))
  const byName = { text: `${shownG} g ${food.name}`, food, grams: shownG }
  return isUnderstood(byName) ? byName : { ...byName, text: `${shownG} g ${food.id}` }
}

/** Does the reading's text, parted again, weigh what it says? */
function isUnderstood({ text, food, grams }: NearReading): boolean {
  const { amount, foodText } = partPortion(text)
  if (
    amount === null ||
    amount.doubt !== null ||
    ![cleaned(food.name).toLowerCase(), food.id].includes(foodText.toLowerCase())
  )
    return false
  const weighed = weighTerms(amount.terms, food, foodText)
  return (
    weighed !== null &&
    !('several' in weighed) &&
    (grams === null || Math.abs(weighed.grams - grams) < 0.01 * grams)
  )
}

/** The readings of an amount with a food: as written if the food can be weighed so, else its usual portion. */
function readingOf(amount: Scanned | null, amountText: string, food: Food): NearReading {
  if (amount !== null && amount.doubt === null) {
    const weighed = weighTerms(amount.terms, food, '')
    if (weighed !== null && !('several' in weighed) && isSensible(weighed.grams)) {
      const reading = { text: `${amountText} ${food.name}`, food, grams: weighed.grams }
      if (isUnderstood(reading)) return reading
    }
  }
  return inGrams(food.portionG.usual, food)
}

function noFood(parted: Parted, resolution: Exclude<Resolution, { kind: 'food' }>): Refused {
  const foods = nearestKinds(resolution, 3)
  const problem = whyNoFood(shown(parted.foodText), resolution)
  return refused(
    problem,
    foods.map(food => readingOf(parted.amount, parted.amountText, food)),
  )
}

function doubtful(said: string, amount: Scanned, doubt: Doubt, food: Food): Refused {
  const as = (count: number): NearReading[] => {
    const term = { ...amount.terms[0]!, count, eachG: null, eachMl: null }
    const counted = { terms: [term], doubt: null, end: 0 }
    if (!(count > 0)) return []
    const unit = term.unit?.name ?? ''
    return [
      readingOf(counted, [countText(count), ...term.sizes, unit].filter(word => word !== '').join(' '), food),
    ]
  }
  switch (doubt.kind) {
    case 'range':
      return refused(`"${said}" gives a range; give one amount`, [
        ...as(doubt.low),
        ...as(doubt.high),
        ...as((doubt.low + doubt.high) / 2),
      ])
    case 'comma': {
      const size = amount.terms[0]!
      if (size.eachG !== null || size.eachMl !== null) {
        const total =
          size.eachG === null
            ? []
            : [doubt.low, doubt.high].filter(isSensible).map(grams => inGrams(grams, food))
        return refused(`"${said}" may mean the weight of each or of all; give the whole weight`, total)
      }
      return refused(`"${said}" may mean ${doubt.low} or ${doubt.high}; write it without the comma`, [
        ...as(doubt.low),
        ...as(doubt.high),
      ])
    }
    case 'heaped':
      return refused(
        `"${said}": ${doubt.word} is no fixed amount; give it level or in grams`,
        as(amount.terms[0]!.count),
      )
    case 'vague':
      return refused(
        `"${said}": "${doubt.word}" is no fixed amount; how much ${food.name}?`,
        usualReadings(food),
      )
    case 'not-finite':
      return refused(
        `"${said}" gives no number for the amount; write one, such as 200 g`,
        usualReadings(food),
      )
  }
}

function countText(count: number): string {
  return String(Number(count.toFixed(3)))
}

function noMeasure(
  said: string,
  amount: Scanned,
  food: Food,
  several: readonly ParsedMeasure[] | null,
): Refused {
  const term = amount.terms[0]!
  const unit = term.unit
  if (several !== null) {
    const names = several.map(({ measure }) => measureText(measure.name)).join(' or ')
    const readings = several.map(({ grams }) => inGrams(Math.round(term.count * grams * 10) / 10, food))
    return refused(
      `"${said}" may be any of several measures of ${food.name}: ${names}; give grams`,
      readings.filter(({ grams }) => grams !== null && isSensible(grams)),
    )
  }
  const meant = READINGS_OF.get(unit?.name ?? '')
  if (meant !== undefined) {
    const readings = meant.units.map(({ text, unit }) => {
      const exact: Scanned = {
        terms: [{ ...term, unit, count: term.count * text.count }],
        doubt: null,
        end: 0,
      }
      return readingOf(exact, `${countText(term.count * text.count)} ${text.unit}`, food)
    })
    return refused(`"${said}": ${meant.why}`, readings)
  }
  const has = food.measures.length === 0 ? 'give grams' : `give grams or ${measureList(food)}`
  if (unit === null) {
    return refused(
      `"${said}": the table does not know what one ${food.name} weighs; ${has}`,
      usualReadings(food),
    )
  }
  return refused(`"${said}": the table has no ${unit.name} of ${food.name}; ${has}`, usualReadings(food))
}

interface Meant {
  why: string
  units: { text: { count: number; unit: string }; unit: Unit }[]
}

function meant(why: string, ...units: [count: number, unit: string][]): Meant {
  return { why, units: units.map(([count, unit]) => ({ text: { count, unit }, unit: unitOf(unit)! })) }
}

/** Units that differ by country or by spoon, with what each may mean (a pint: 473 ml US customary, 568 ml imperial). */
const READINGS_OF = new Map([
  ['spoon', meant('a spoon may be a tablespoon or a teaspoon; say tbsp or tsp', [1, 'tbsp'], [1, 'tsp'])],
  ['pint', meant('a pint is 473 ml in America and 568 ml in Britain; give ml', [473, 'ml'], [568, 'ml'])],
  ['quart', meant('a quart is 946 ml in America and 1137 ml in Britain; give ml', [946, 'ml'], [1137, 'ml'])],
  [
    'gallon',
    meant('a gallon is 3785 ml in America and 4546 ml in Britain; give ml', [3785, 'ml'], [4546, 'ml']),
  ],
])
