import type { Food } from './food.ts'
import { fold, writtenAs } from './words.ts'

const LETTERS = 3

/**
 * The foods, with all their kin, in whose names or aliases some word may begin like one of the stems: every food that
 * a search for these could find without forgiving a mistake, and some more. Indexing these few costs a one-shot
 * command a tenth of indexing all. Null where a stem is so short that it would be nearly all.
 */
export function foodsWithSameBeginnings(foods: readonly Food[], stems: readonly string[]): Food[] | null {
  if (stems.length === 0 || stems.some(stem => stem.length < LETTERS)) return null
  const beginnings = [...new Set(stems.flatMap(writtenAs).map(word => word.slice(0, LETTERS)))]
  const mayBeMeant = (text: string): boolean => {
    const plain = isPlain(text) ? text.toLowerCase() : fold(text)
    return beginnings.some(beginning => plain.includes(beginning))
  }
  const kins = new Set<string>()
  for (const food of foods) {
    if (kins.has(food.kin)) continue
    if (mayBeMeant(food.name) || food.aliases.some(mayBeMeant) || food.firstFor.some(mayBeMeant))
      kins.add(food.kin)
  }
  return foods.filter(food => kins.has(food.kin))
}

/** Has it neither accents nor apostrophes, so that small letters are all that folding would make of it? */
function isPlain(text: string): boolean {
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i)
    if (code > 127 || code === 39 || code === 96) return false
  }
  return true
}
