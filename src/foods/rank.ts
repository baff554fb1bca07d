import { everydayness, isUnusualState, stateRank } from './everyday.ts'
import type { Food } from './food.ts'
import { type Entry, type FoodIndex, wordsBeginning } from './food-index.ts'
import type { NearWord } from './near-words.ts'
import { otherSpellings, type QueryWord, readQuery } from './query.ts'
import { stateGrade } from './state-words.ts'

/** How a food answers a query. */
export interface Candidate {
  food: Food
  /** what hits are ordered by: the text, the state, how everyday the food is; best about 1.6, never below 0 */
  score: number
  /** how well the words alone fit, without state and custom: about 0-1.5 */
  text: number
  /** is every word answered (state aside)? */
  whole: boolean
  /** is every state that was asked for the food's? */
  inState: boolean
  /** was a state asked for? */
  stateAsked: boolean
  /** is no word so short or so mistyped that it may well be another? */
  sure: boolean
  /** do the words, but for the state, make up a bare word for which this food or its kin is the first answer? */
  first: boolean
  /** do the words make up a name or alias of the food, nothing left over on either side? */
  exact: boolean
}

interface Lookup {
  word: string
  quality: number
}

type Near = (typed: string) => readonly NearWord[]

/** Words only begun are this sure at least; mistyped ones are below it. */
const BEGUN = 0.6
/** A word found elsewhere among the food's names than in the one looked at. */
const ELSEWHERE = 0.75
/** A name that belongs to the food's kin in another state. */
const OF_KIN = 0.9
const MISSING_WEAK = 0.15
const STATE_WEIGHT = 0.5

/** The foods that answer a query, best first; those that leave a word unanswered only where no food answers all. */
export function rank(index: FoodIndex, near: Near, query: string): Candidate[] {
  const words = readQuery(query)
  if (words.length === 0) return []
  const isKnown = (stem: string): boolean => index.words.has(stem)
  let found = best(index, [words, ...otherSpellings(words, isKnown)], near, false)
  if (!found.some(candidate => candidate.whole)) {
    const mended = best(index, [words], near, true)
    if (mended.some(candidate => candidate.whole) || found.length === 0) found = mended
  }
  const whole = found.filter(candidate => candidate.whole)
  const answers = whole.length > 0 ? whole : found
  return answers.sort(
    (a, b) =>
      b.score - a.score ||
      a.food.name.length - b.food.name.length ||
      (a.food.id < b.food.id ? -1 : a.food.id > b.food.id ? 1 : 0),
  )
}

function best(index: FoodIndex, queries: QueryWord[][], near: Near, mendAll: boolean): Candidate[] {
  const byFood = new Map<Food, Candidate>()
  for (const [place, words] of queries.entries()) {
    for (const candidate of answer(index, words, near, mendAll)) {
      candidate.score -= 0.02 * Math.min(place, 1)
      const present = byFood.get(candidate.food)
      if (
        present === undefined ||
        (candidate.whole && !present.whole) ||
        (candidate.whole === present.whole && candidate.score > present.score)
      )
        byFood.set(candidate.food, candidate)
    }
  }
  return [...byFood.values()]
}

/** The words of the index that a query's word may stand for, each with how surely. */
function lookUp(index: FoodIndex, word: QueryWord, isLast: boolean, near: Near, mendAll: boolean): Lookup[] {
  const { stem } = word
  const lookups: Lookup[] = []
  const isThere = index.words.has(stem)
  if (isThere) lookups.push({ word: stem, quality: 1 })
  // only the last word is still being typed; an earlier one may be cut short if enough of it stands
  if (isLast || (!isThere && stem.length >= 4)) {
    for (const { stem: longer } of wordsBeginning(index, stem)) {
      const share = stem.length / longer.length
      // a whole word goes before one that it merely begins
      const least = isThere ? BEGUN : isLast ? 0.82 : 0.72
      lookups.push({ word: longer, quality: least + 0.16 * share })
    }
  }
  if (lookups.length === 0 || (mendAll && !isThere)) {
    for (const { word, quality } of near(stem)) lookups.push({ word, quality })
  }
  return lookups
}

function answer(index: FoodIndex, words: QueryWord[], near: Near, mendAll: boolean): Candidate[] {
  const { entries, kins, entryAt } = index
  const n = words.length
  const isKnown = (stem: string): boolean => index.words.has(stem)
  /** by entry and word of the query: how well the entry answers it */
  const inEntry = new Map<number, Float64Array>()
  const inKin = new Map<number, Float64Array>()
  /** by position: how well the query covers the word there */
  const cover = new Map<number, number>()
  for (const [i, word] of words.entries()) {
    for (const { word: known, quality } of lookUp(index, word, i === n - 1, near, mendAll)) {
      for (const position of index.words.get(known)?.at ?? []) {
        const entry = entryAt[position]!
        let row = inEntry.get(entry)
        if (row === undefined) {
          row = new Float64Array(n)
          inEntry.set(entry, row)
        }
        if (quality > row[i]!) row[i] = quality
        if (quality > (cover.get(position) ?? 0)) cover.set(position, quality)
        const { kin, isLocal } = entries[entry]!
        let kinRow = inKin.get(kin)
        if (kinRow === undefined) {
          kinRow = new Float64Array(n)
          inKin.set(kin, kinRow)
        }
        if (!isLocal && quality > kinRow[i]!) kinRow[i] = quality
      }
    }
  }

  const byFood = new Map<number, Candidate>()
  for (const [place, row] of inEntry) {
    const entry = entries[place]!
    const covered = coverOf(index, entry, cover)
    const kinRow = inKin.get(entry.kin)!
    for (const food of entry.ownOnly ? entry.owners : kins[entry.kin]!) {
      const isOwner = entry.owners.includes(food)
      const candidate = weigh(index.foods[food]!, words, row, kinRow, entry, covered, isOwner, isKnown)
      const present = byFood.get(food)
      if (
        present === undefined ||
        (candidate.whole && !present.whole) ||
        (candidate.whole === present.whole && candidate.score > present.score)
      )
        byFood.set(food, candidate)
    }
  }
  return [...byFood.values()]
}

interface Covered {
  /** share of the entry's words that the query covers, by weight */
  share: number
  /** how well the noun that the entry is about is covered */
  head: number
}

function coverOf(index: FoodIndex, entry: Entry, cover: ReadonlyMap<number, number>): Covered {
  let sum = 0
  for (let position = entry.from; position < entry.from + entry.length; position++) {
    sum += index.weightAt[position]! * (cover.get(position) ?? 0)
  }
  return { share: sum / entry.weight, head: cover.get(entry.head) ?? 0 }
}

function weigh(
  food: Food,
  words: QueryWord[],
  row: Float64Array,
  kinRow: Float64Array,
  entry: Entry,
  covered: Covered,
  isOwner: boolean,
  isKnown: (stem: string) => boolean,
): Candidate {
  let weight = 0
  let sum = 0
  let whole = true
  let inState = true
  let stateAsked = false
  let stateGain = 0
  for (const [i, word] of words.entries()) {
    const here = row[i]!
    const elsewhere = ELSEWHERE * kinRow[i]!
    if (word.states !== null) {
      const grade = stateGrade(word.states, food.state)
      stateAsked = true
      const answered = Math.max(here >= 0.9 ? here : 0, grade)
      if (answered === 0) inState = false
      weight += STATE_WEIGHT
      sum += STATE_WEIGHT * Math.max(answered, here)
      stateGain += answered === 0 ? -0.35 : 0.1 * Math.max(answered, grade)
      continue
    }
    const quality = Math.max(here, elsewhere)
    if (quality === 0 && word.weak) {
      weight += MISSING_WEAK
      continue
    }
    weight += 1
    sum += quality
    if (quality === 0) whole = false
  }
  const asked = weight === 0 ? 0 : sum / weight
  const exact = asked > 0.97 && covered.share > 0.97
  let text = 0.6 * asked + 0.3 * covered.share + 0.06 * covered.head
  const first = entry.kind === 'firstFor' && covered.share > 0.8 * asked && whole && allHere(words, row)
  if (first) text += (isOwner ? 0.45 : 0.38) * covered.share * asked ** 2
  else if (exact) text += entry.kind === 'name' ? 0.12 : 0.1
  if (!isOwner) text *= OF_KIN
  if (!whole) text *= 0.6
  // a bare word's own food needs no state to be meant, nor an unusual state that has a name of its own (besan)
  const named = isOwner && (first || (isUnusualState(food) && whole && covered.share > 0.8))
  const state = stateAsked ? stateGain : named ? 0 : -0.015 * stateRank(food)
  const score = Math.max(0, text + state + everydayness(food))
  // a part of a local name is a chance likeness
  const isChance = entry.isLocal && covered.share < 0.6
  const sure = !isChance && isSure(words, row, kinRow, covered.share >= 0.75 * asked, isKnown)
  return { food, score, text, whole, inState, stateAsked, sure, first, exact }
}

/** Is every word found so surely that the food may be taken without asking? A mistyped word must make up its name. */
function isSure(
  words: QueryWord[],
  row: Float64Array,
  kinRow: Float64Array,
  isAbout: boolean,
  isKnown: (stem: string) => boolean,
): boolean {
  const found = words.map((_, i) => Math.max(row[i]!, kinRow[i]!))
  const right = found.filter(quality => quality === 1).length
  return words.every((word, i) => {
    if (word.states !== null || (word.weak && found[i] === 0)) return true
    if (found[i]! < leastSure(word.stem, isKnown(word.stem), right > 0)) return false
    return found[i]! >= BEGUN || isAbout
  })
}

/**
 * How surely a word must be found to be taken for what was meant. One that is known as it stands must be it; one of
 * three letters may be unfinished; a mistyped one must be of six letters, or of five beside another that is right.
 */
function leastSure(stem: string, isKnown: boolean, isSupported: boolean): number {
  if (isKnown || stem.length < 3) return 1
  if (stem.length < 5) return BEGUN
  if (stem.length === 5) return isSupported ? 0.48 : BEGUN
  return 0.38
}

/** Does the entry itself answer every word that is no state? A bare word must not gain by what stands elsewhere. */
function allHere(words: QueryWord[], row: Float64Array): boolean {
  return words.every((word, i) => row[i]! > 0 || word.states !== null || word.weak)
}
