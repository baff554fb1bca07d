import Fuse from 'fuse.js/basic'
import { editDistance } from './edit-distance.ts'

/** A known word that a mistyped one may stand for. */
export interface NearWord {
  word: string
  /** letters put in, left out, changed or swapped */
  distance: number
  /** 0-0.8: how far the known word may stand for the typed one */
  quality: number
}

/** The most letters that may be wrong in a word of so many letters. */
function mostWrong(length: number): number {
  if (length <= 2) return 0
  if (length <= 4) return 1
  return length <= 8 ? 2 : 3
}

/**
 * Finds known words for mistyped ones. fuse.js proposes, the edit distance decides: fuse.js counts two swapped
 * letters as two faults and likes a word that merely contains the typed one.
 */
export function createNearWords(vocabulary: readonly string[]): (typed: string) => readonly NearWord[] {
  let fuse: Fuse<string> | null = null
  const known = new Map<string, readonly NearWord[]>()

  return typed => {
    const before = known.get(typed)
    if (before !== undefined) return before
    const most = mostWrong(typed.length)
    if (most === 0 || typed.length > 24) return []
    fuse ??= new Fuse(
      vocabulary.filter(word => word.length > 2 && word.length < 25),
      { threshold: 0.5, distance: 100, includeScore: false, shouldSort: false },
    )
    const proposed: NearWord[] = []
    for (const { item } of fuse.search(typed)) {
      const whole = editDistance(typed, item, most)
      const begun = typed.length >= 4 ? editDistance(typed, item, most - 1, true) : most + 1
      const distance = Math.min(whole, begun + 0.5)
      if (distance > most) continue
      const firstLetter = typed[0] === item[0] ? 0.05 : 0
      proposed.push({ word: item, distance, quality: 0.8 - 0.12 * distance + firstLetter })
    }
    proposed.sort((a, b) => b.quality - a.quality || (a.word < b.word ? -1 : 1))
    const near = proposed.slice(0, 40)
    if (known.size > 500) known.clear()
    known.set(typed, near)
    return near
  }
}
