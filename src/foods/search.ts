import type { Food } from './food.ts'
import { type FoodIndex, indexFoods } from './food-index.ts'
import { markedRanges } from './marked-ranges.ts'
import { createNearWords } from './near-words.ts'
import { plainText } from './plain-text.ts'
import { readQuery } from './query.ts'
import { type Candidate, rank } from './rank.ts'
import { foodsWithSameBeginnings } from './same-beginnings.ts'
import { fold } from './words.ts'

export interface FindOptions {
  /** at most so many hits; 20 where not said */
  limit?: number
  /** only foods for which this holds */
  accept?: (food: Food) => boolean
}

export interface Hit {
  food: Food
  /** higher fits better; for order only */
  score: number
  /** the letters of the food's name that the words met, as ranges, end exclusive; may be empty */
  matched: [start: number, end: number][]
}

/** The search over one list of foods. Its index is made when it is first needed. */
export interface Finder {
  foods: readonly Food[]
  /** the food of that id, if it is one of `foods` */
  byId(id: string): Food | undefined
  /** foods by name, alias, local name and state, best first; typing mistakes and unfinished words are forgiven */
  find(words: string, options?: FindOptions): Hit[]
  /** every food that answers the words, best first, with what is needed to tell sure from doubtful */
  weigh(words: string): readonly Candidate[]
}

export type FoodReading = { ok: true; food: Food } | { ok: false; problem: string; nearest: Food[] }

const DEFAULT_LIMIT = 20
const REMEMBERED = 200
/** A command asks a few times and ends; who asks more often is typing, and is served faster by the whole index. */
const QUICK_SEARCHES = 8

export function createFinder(foods: readonly Food[]): Finder {
  let index: FoodIndex | null = null
  let near: ReturnType<typeof createNearWords> | null = null
  let byId: Map<string, Food> | null = null
  const answers = new Map<string, readonly Candidate[]>()
  let quickSearches = 0

  function weigh(words: string): readonly Candidate[] {
    const key = words.slice(0, 400)
    const before = answers.get(key)
    if (before !== undefined) return before
    const candidates = weighAmongFew(key) ?? rankAmongAll(key)
    if (answers.size >= REMEMBERED) answers.clear()
    answers.set(key, candidates)
    return candidates
  }

  /** The same answer from a small index of the foods that come into question, or null where it takes the whole one. */
  function weighAmongFew(words: string): readonly Candidate[] | null {
    if (index !== null || quickSearches >= QUICK_SEARCHES) return null
    quickSearches++
    const few = foodsWithSameBeginnings(
      foods,
      readQuery(words)
        .filter(word => word.states === null)
        .map(word => word.stem),
    )
    if (few === null) return null
    let isMistyped = false
    const candidates = rank(
      indexFoods(few),
      () => {
        isMistyped = true
        return []
      },
      words,
    )
    return isMistyped || !candidates[0]?.whole ? null : candidates
  }

  function rankAmongAll(words: string): readonly Candidate[] {
    index ??= indexFoods(foods)
    const known = index.words
    near ??= createNearWords(
      () => [...known.keys()],
      word => known.get(word)!.rarity,
    )
    return rank(index, near, words)
  }

  function foodById(id: string): Food | undefined {
    byId ??= new Map(foods.map(food => [food.id, food]))
    return byId.get(id)
  }

  return {
    foods,
    byId: foodById,
    weigh,
    find(words, { limit = DEFAULT_LIMIT, accept } = {}) {
      const exact = foodById(words.trim())
      const hits: Hit[] = []
      if (exact !== undefined && (accept === undefined || accept(exact)) && limit > 0)
        hits.push({ food: exact, score: 2, matched: markedRanges(exact.name, words) })
      for (const { food, score } of weigh(words)) {
        if (hits.length >= limit) break
        if (food === exact || (accept !== undefined && !accept(food))) continue
        hits.push({ food, score, matched: markedRanges(food.name, words) })
      }
      return hits
    },
  }
}

/** Up to `n` foods that the words may mean, for an error message; none where nothing is like them. */
export function nearestFoods(words: string, finder: Finder, n = 3): Food[] {
  return finder.find(words, { limit: n }).map(hit => hit.food)
}

/** What the words mean, how surely, and what else they may mean. */
export type Resolution =
  | { kind: 'food'; food: Food; candidate: Candidate | null }
  | { kind: 'unknown' | 'unsure' | 'several' | 'no-such-state'; candidates: readonly Candidate[] }

/** Foods whose words fit so nearly alike that choosing would be a guess. */
const ALIKE = 0.03

/**
 * The one food that words mean: an id, a name or an alias as it stands, or else the best hit, if every word is
 * answered, the state that was asked for is there, and no other kind of food fits as well.
 */
export function resolve(words: string, finder: Finder): Resolution {
  const trimmed = words.trim()
  const byId = finder.byId(trimmed) ?? finder.byId(trimmed.toLowerCase())
  if (byId !== undefined) return { kind: 'food', food: byId, candidate: null }
  const candidates = finder.weigh(words)
  const folded = fold(trimmed)
  const named = candidates.filter(({ food }) => fold(food.name) === folded)
  if (named.length === 1) return { kind: 'food', food: named[0]!.food, candidate: named[0]! }
  const top = candidates[0]
  if (top === undefined) return { kind: 'unknown', candidates }
  if (!top.whole) return { kind: 'unknown', candidates }
  if (!top.inState) return { kind: 'no-such-state', candidates }
  if (!top.sure) return { kind: 'unsure', candidates }
  if (!top.first) {
    const rivals = candidates.filter(
      other => other.food.kin !== top.food.kin && other.inState && other.text > top.text - ALIKE,
    )
    if (rivals.length > 0) return { kind: 'several', candidates: [top, ...rivals] }
  }
  return { kind: 'food', food: top.food, candidate: top }
}

/** A food that a command names by id or in words. `problem` is one plain line and names the nearest itself. */
export function foodByWords(text: string, finder: Finder): FoodReading {
  const said = shown(text)
  if (said === '') return { ok: false, problem: 'no food is named; give an id or words', nearest: [] }
  const resolution = resolve(text, finder)
  if (resolution.kind === 'food') return { ok: true, food: resolution.food }
  const nearest = nearestKinds(resolution, 3)
  const why = whyNoFood(said, resolution)
  const problem = nearest.length === 0 ? why : `${why}; nearest: ${orList(nearest.map(food => food.id))}`
  return { ok: false, problem, nearest }
}

/** Why words name no one food, without the foods that may be meant; those are offered beside it. */
export function whyNoFood(said: string, resolution: Exclude<Resolution, { kind: 'food' }>): string {
  if (resolution.candidates.length === 0)
    return `no food is called "${said}" or nearly so; look it up with: shortstave find WORD`
  if (resolution.kind === 'several') return `"${said}" may be any of several foods; say which`
  if (resolution.kind === 'no-such-state') return `"${said}" is not in the table in that state`
  return `no food is called "${said}"`
}

/** The foods to offer where words named no one food: of several kinds the first of each, else the best as they come. */
export function nearestKinds(resolution: Exclude<Resolution, { kind: 'food' }>, n: number): Food[] {
  const foods: Food[] = []
  const kins = new Set<string>()
  for (const { food } of resolution.candidates) {
    if (resolution.kind === 'several' && kins.has(food.kin)) continue
    kins.add(food.kin)
    foods.push(food)
    if (foods.length === n) break
  }
  return foods
}

/** A user's words as a message may quote them. */
export function shown(text: string): string {
  const plain = plainText(text.slice(0, 1000)).replace(/\s+/g, ' ').trim()
  return plain.length > 60 ? `${plain.slice(0, 59)}…` : plain
}

function orList(words: readonly string[]): string {
  return words.length < 2 ? (words[0] ?? '') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`
}
