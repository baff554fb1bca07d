import Fuse from 'fuse.js/basic'
import { editDistance } from './edit-distance.ts'

/** A known word that a mistyped one may stand for. */
export interface NearWord {
  word: string
  /** letters put in, left out, changed or swapped; a half more where the word is not yet typed to its end */
  distance: number
  /** below 0.6: how far the known word may stand for the typed one; from 0.38 up it is hardly another word */
  quality: number
}

const SHORTEST = 3
const LONGEST = 24
const REMEMBERED = 500

/** The most letters that may be wrong in a word of so many letters. */
function mostWrong(length: number): number {
  if (length < SHORTEST) return 0
  if (length <= 4) return 1
  return length <= 8 ? 2 : 3
}

/**
 * Finds known words for mistyped ones. fuse.js proposes, the edit distance decides: fuse.js counts two swapped
 * letters as two faults and likes a word that merely contains the typed one. The first letter is seldom mistyped, so
 * words that share it are tried by themselves, and the others only where none of these is one letter away.
 *
 * @param rarity 0 for a word of a food's name, 1 for one of an alias, 3 for one of the many local names
 */
export function createNearWords(
  vocabulary: () => readonly string[],
  rarity: (word: string) => number,
): (typed: string) => readonly NearWord[] {
  const known = new Map<string, readonly NearWord[]>()
  const byFirstLetter = new Map<string, Fuse<string>>()
  let all: Fuse<string> | null = null

  function fuseOf(words: readonly string[]): Fuse<string> {
    const usable = words.filter(word => word.length >= SHORTEST && word.length <= LONGEST)
    return new Fuse(usable, { threshold: 0.5, shouldSort: false })
  }

  function sharingFirstLetter(letter: string): Fuse<string> {
    let fuse = byFirstLetter.get(letter)
    if (fuse === undefined) {
      fuse = fuseOf(vocabulary().filter(word => word[0] === letter))
      byFirstLetter.set(letter, fuse)
    }
    return fuse
  }

  function propose(typed: string, most: number, fuse: Fuse<string>): NearWord[] {
    const near: NearWord[] = []
    for (const { item: word } of fuse.search(typed)) {
      const whole = editDistance(typed, word, most)
      const begun = typed.length >= 4 ? editDistance(typed, word, most - 1, true) : most + 1
      const distance = Math.min(whole, begun + 0.5)
      if (distance > most) continue
      let quality = 0.59 - 0.1 * distance
      // mistakes stand seldom at the beginning, and local names lie so close together that anything is like one
      if (typed[0] !== word[0]) quality -= 0.12
      if (distance >= 2 && typed.slice(0, 2) !== word.slice(0, 2)) quality -= 0.1
      quality -= 0.05 * rarity(word)
      near.push({ word, distance, quality })
    }
    return near
  }

  return typed => {
    const before = known.get(typed)
    if (before !== undefined) return before
    const most = mostWrong(typed.length)
    if (most === 0 || typed.length > LONGEST) return []
    let near = propose(typed, most, sharingFirstLetter(typed[0]!))
    if (!near.some(({ distance }) => distance <= 1.5)) {
      all ??= fuseOf(vocabulary())
      near = propose(typed, most, all)
    }
    near = near.sort((a, b) => b.quality - a.quality || (a.word < b.word ? -1 : 1)).slice(0, 40)
    // what is typed is anyone's text: the memory must not grow with it
    if (known.size >= REMEMBERED) known.clear()
    known.set(typed, near)
    return near
  }
}
