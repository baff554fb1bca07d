import type { Food } from './food.ts'
import { statesOf } from './state-words.ts'
import { isStopWord, stemsOf, writtenWords } from './words.ts'

/** A name by which foods of one kin are known. */
export interface Entry {
  kind: 'name' | 'alias' | 'firstFor'
  /** places in `foods` of those that bear it themselves */
  owners: number[]
  /** place in `kins` */
  kin: number
  /** one of the local names: good by itself, no help to other names */
  isLocal: boolean
  /** does it hold only for its owners, not for their kin in other states? */
  ownOnly: boolean
  /** where its words begin in the index's lists by position, and how many they are */
  from: number
  length: number
  /** position of the noun that the name is about: the last word before its first comma */
  head: number
  /** sum of its words' weights */
  weight: number
}

/** A word that stands in the names of foods. */
export interface KnownWord {
  stem: string
  isStop: boolean
  isState: boolean
  /** 0 if it stands in a food's name or bare words, 1 in an alias, 3 only in local names */
  rarity: number
  /** the positions at which it stands */
  at: number[]
}

/** The names and aliases of foods, word by word. */
export interface FoodIndex {
  foods: readonly Food[]
  entries: Entry[]
  kins: number[][]
  /** by position: which entry the word belongs to, and how much of its name it is */
  entryAt: number[]
  weightAt: number[]
  /** by stem; stop words are not among them */
  words: Map<string, KnownWord>
}

/** The local names of the Indian table begin with a capital, the aliases that cooks everywhere know do not. */
const LOCAL = 3
const NOT_YET = 9

const FIRST_PART = 1
const LATER_PARTS = [0.25, 0.15, 0.1]
const IN_BRACKETS = 0.08
/** a state is looked at by itself: the name's own mention of it hardly counts */
const STATE_WORD = 0.02

/**
 * Indexes foods by the words of their names. A one-shot command waits for this once, in code that no compiler has
 * warmed up: hence one look-up a written word, and no pattern where a character will do.
 */
export function indexFoods(foods: readonly Food[]): FoodIndex {
  const entries: Entry[] = []
  const kins: number[][] = []
  const kinByName = new Map<string, number>()
  const entryAt: number[] = []
  const weightAt: number[] = []
  const words = new Map<string, KnownWord>()
  /** a written word is nearly always one stem */
  const wordsByWritten = new Map<string, KnownWord | KnownWord[]>()
  /** by kin, then by text */
  const bearers: Map<string, Entry>[] = []

  function knownWord(stem: string): KnownWord {
    let word = words.get(stem)
    if (word === undefined) {
      const isStop = isStopWord(stem)
      word = { stem, isStop, isState: statesOf(stem) !== null, rarity: NOT_YET, at: [] }
      if (!isStop) words.set(stem, word)
    }
    return word
  }

  function knownWords(written: string): KnownWord | KnownWord[] {
    let known = wordsByWritten.get(written)
    if (known === undefined) {
      const stems = stemsOf(written)
      known = stems.length === 1 ? knownWord(stems[0]!) : stems.map(knownWord)
      wordsByWritten.set(written, known)
    }
    return known
  }

  function addWord(entry: Entry, place: number, word: KnownWord, partWeight: number, rarity: number): void {
    const { at } = word
    if (word.isStop || (at.length > 0 && at[at.length - 1]! >= entry.from)) return
    const position = entryAt.length
    at.push(position)
    if (rarity < word.rarity) word.rarity = rarity
    if (word.isState && entry.kind === 'alias') entry.ownOnly = true
    if (partWeight === FIRST_PART) entry.head = position
    const weight = word.isState && partWeight !== FIRST_PART ? STATE_WORD : partWeight
    entryAt.push(place)
    weightAt.push(weight)
    entry.weight += weight
    entry.length++
  }

  /** Adds the words of one part of a name: the first, a later one, or what is in brackets. */
  function addPart(entry: Entry, place: number, part: string, partWeight: number, rarity: number): void {
    for (const written of writtenWords(part)) {
      const known = knownWords(written)
      if (Array.isArray(known)) for (const word of known) addWord(entry, place, word, partWeight, rarity)
      else addWord(entry, place, known, partWeight, rarity)
    }
  }

  function add(kind: Entry['kind'], text: string, food: number, kin: number): void {
    const isLocal = kind === 'alias' && beginsWithCapital(text)
    // names are each food's own, and the table gives local names to one state of a kin only
    const isShared = kind !== 'name' && !isLocal
    const present = isShared ? bearers[kin]!.get(text) : undefined
    if (present !== undefined && present.kind === kind) {
      if (!present.owners.includes(food)) present.owners.push(food)
      return
    }
    const rarity = kind !== 'alias' ? 0 : isLocal ? LOCAL : 1
    const from = entryAt.length
    const ownOnly = kind === 'name'
    const entry: Entry = {
      kind,
      owners: [food],
      kin,
      isLocal,
      ownOnly,
      from,
      length: 0,
      head: from,
      weight: 0,
    }
    const place = entries.length
    if (!text.includes(',') && !text.includes('(')) addPart(entry, place, text, FIRST_PART, rarity)
    else for (const part of partsOf(text)) addPart(entry, place, part.text, part.weight, rarity)
    if (entry.length === 0) return
    entries.push(entry)
    if (isShared) bearers[kin]!.set(text, entry)
  }

  for (const [place, food] of foods.entries()) {
    let kin = kinByName.get(food.kin)
    if (kin === undefined) {
      kin = kins.length
      kinByName.set(food.kin, kin)
      kins.push([])
      bearers.push(new Map())
    }
    kins[kin]!.push(place)
    add('name', food.name, place, kin)
    for (const alias of food.aliases) add('alias', alias, place, kin)
    for (const bare of food.firstFor) add('firstFor', bare, place, kin)
  }
  return { foods, entries, kins, entryAt, weightAt, words }
}

function beginsWithCapital(text: string): boolean {
  const code = text.charCodeAt(0)
  return code > 127 ? /^\p{Lu}/u.test(text) : code >= 65 && code <= 90
}

/** The parts of a name between its commas and what it says in brackets, with what a word in each weighs. */
function partsOf(text: string): { text: string; weight: number }[] {
  const parts: { text: string; weight: number }[] = []
  for (const match of text.matchAll(/\(([^)]*)\)?|([^,(]+)/g)) {
    const place = parts.length
    const later = LATER_PARTS[place - 1] ?? LATER_PARTS.at(-1)!
    const isBracketed = match[1] !== undefined
    parts.push({
      text: match[1] ?? match[2]!,
      weight: place === 0 ? FIRST_PART : isBracketed ? IN_BRACKETS : later,
    })
  }
  return parts
}

/** The words of the index that begin with `beginning` and go on after it. */
export function wordsBeginning(index: FoodIndex, beginning: string): KnownWord[] {
  const longer: KnownWord[] = []
  for (const word of index.words.values()) {
    if (word.stem.length > beginning.length && word.stem.startsWith(beginning)) longer.push(word)
  }
  return longer
}
