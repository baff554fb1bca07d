import type { Food } from './food.ts'
import { statesOf } from './state-words.ts'
import { isStopWord, wordsOf } from './words.ts'

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

/** The names and aliases of foods, word by word. */
export interface FoodIndex {
  foods: readonly Food[]
  entries: Entry[]
  kins: number[][]
  /** by position: which entry the word belongs to, and how much of its name it is */
  entryAt: number[]
  weightAt: number[]
  /** by word: the positions at which it stands */
  positions: Map<string, number[]>
  /** every word, sorted, for finding beginnings */
  vocabulary: string[]
  /** by word: 0 if it stands in a food's name or bare words, 1 in an alias, 3 only in local names */
  rarity: Map<string, number>
}

/** The local names of the Indian table begin with a capital, the aliases that cooks everywhere know do not. */
const LOCAL = 3
const LOCAL_NAME = /^\p{Lu}/u

const FIRST_PART = 1
const LATER_PARTS = [0.25, 0.15, 0.1]
const IN_BRACKETS = 0.08
/** a state is looked at by itself: the name's own mention of it hardly counts */
const STATE_WORD = 0.02

export function indexFoods(foods: readonly Food[]): FoodIndex {
  const entries: Entry[] = []
  const kins: number[][] = []
  const kinByName = new Map<string, number>()
  const entryAt: number[] = []
  const weightAt: number[] = []
  const positions = new Map<string, number[]>()
  const rarity = new Map<string, number>()
  /** by kin, then by text */
  const aliases: Map<string, Entry>[] = []

  function add(kind: Entry['kind'], text: string, food: number, kin: number): void {
    const rare = kind !== 'alias' ? 0 : LOCAL_NAME.test(text) ? LOCAL : 1
    const present = kind === 'name' ? undefined : aliases[kin]!.get(text)
    if (present !== undefined && present.kind === kind) {
      if (!present.owners.includes(food)) present.owners.push(food)
      return
    }
    const from = entryAt.length
    const entry: Entry = {
      kind,
      owners: [food],
      kin,
      isLocal: rare === LOCAL,
      ownOnly: kind === 'name',
      from,
      length: 0,
      head: from,
      weight: 0,
    }
    const seen: string[] = []
    for (const [place, part] of partsOf(text).entries()) {
      for (const word of wordsOf(part.text)) {
        if (isStopWord(word) || seen.includes(word)) continue
        seen.push(word)
        if (rare < (rarity.get(word) ?? 9)) rarity.set(word, rare)
        const isState = statesOf(word) !== null
        const weight =
          place === 0 ? FIRST_PART : isState ? STATE_WORD : part.bracketed ? IN_BRACKETS : later(place)
        if (isState && kind === 'alias') entry.ownOnly = true
        const position = entryAt.length
        if (place === 0) entry.head = position
        entryAt.push(entries.length)
        weightAt.push(weight)
        entry.weight += weight
        entry.length++
        const known = positions.get(word)
        if (known === undefined) positions.set(word, [position])
        else known.push(position)
      }
    }
    if (entry.length === 0) return
    entries.push(entry)
    if (kind !== 'name') aliases[kin]!.set(text, entry)
  }

  for (const [place, food] of foods.entries()) {
    let kin = kinByName.get(food.kin)
    if (kin === undefined) {
      kin = kins.length
      kinByName.set(food.kin, kin)
      kins.push([])
      aliases.push(new Map())
    }
    kins[kin]!.push(place)
    add('name', food.name, place, kin)
    for (const alias of food.aliases) add('alias', alias, place, kin)
    for (const bare of food.firstFor) add('firstFor', bare, place, kin)
  }
  return {
    foods,
    entries,
    kins,
    entryAt,
    weightAt,
    positions,
    vocabulary: [...positions.keys()].sort(),
    rarity,
  }
}

function later(place: number): number {
  return LATER_PARTS[place - 1] ?? LATER_PARTS.at(-1)!
}

/** The parts of a name between its commas, and what it says in brackets. */
function partsOf(text: string): { text: string; bracketed: boolean }[] {
  if (!/[,(]/.test(text)) return [{ text, bracketed: false }]
  const parts: { text: string; bracketed: boolean }[] = []
  for (const match of text.matchAll(/\(([^)]*)\)?|([^,(]+)/g)) {
    const bracketed = match[1] !== undefined
    parts.push({ text: match[1] ?? match[2]!, bracketed })
  }
  return parts
}

/** The words of the index that begin with `beginning` and go on after it. */
export function wordsBeginning(index: FoodIndex, beginning: string): string[] {
  const { vocabulary } = index
  let low = 0
  let high = vocabulary.length
  while (low < high) {
    const middle = (low + high) >> 1
    if (vocabulary[middle]! < beginning) low = middle + 1
    else high = middle
  }
  const words: string[] = []
  for (let i = low; i < vocabulary.length && vocabulary[i]!.startsWith(beginning); i++)
    if (vocabulary[i] !== beginning) words.push(vocabulary[i]!)
  return words
}
