import type { State } from './food.ts'
import { plainText } from './plain-text.ts'
import { statesOf } from './state-words.ts'
import { isStopWord, isWeakWord, wordsOf } from './words.ts'

/** One word of a query. */
export interface QueryWord {
  stem: string
  /** the states that it asks for, or null */
  states: readonly State[] | null
  /** may be left unanswered: `chopped`, `organic` */
  weak: boolean
}

const LONGEST_QUERY = 200
const MOST_WORDS = 12

/**
 * The words of a query that tell foods apart. Where nothing else is left, words of state, weak words and stop words
 * count as any other (`flour`, `seeds`).
 */
export function readQuery(text: string): QueryWord[] {
  const plain = plainText(text.slice(0, 4 * LONGEST_QUERY)).slice(0, LONGEST_QUERY)
  const all = wordsOf(plain).slice(0, 2 * MOST_WORDS)
  const words = all
    .filter((word, i) => {
      if (isStopWord(word)) return false
      const next = all[i + 1]
      // dry-roasted is roasted; cooked from dry is cooked
      if (word === 'dry' && (next === 'roasted' || next === 'roast' || next === 'toasted')) return false
      return !(
        (word === 'dry' || word === 'dried' || word === 'frozen' || word === 'raw') &&
        all[i - 1] === 'from'
      )
    })
    .slice(0, MOST_WORDS)
    .map(stem => ({ stem, states: statesOf(stem), weak: isWeakWord(stem) }))
  if (words.length === 0) return all.slice(0, MOST_WORDS).map(stem => ({ stem, states: null, weak: false }))
  if (words.some(word => word.states === null && !word.weak)) return words
  if (words.every(word => word.states !== null))
    return words.map(word => ({ ...word, states: null, weak: false }))
  return words.map(word => ({ ...word, weak: false }))
}

/**
 * The same query with neighbours written as one word (`chick peas`) or one word taken apart (`soymilk`), where the
 * vocabulary knows the outcome and not the word as it stands.
 */
export function otherSpellings(words: QueryWord[], isKnown: (stem: string) => boolean): QueryWord[][] {
  const plain = (stem: string): QueryWord => ({ stem, states: statesOf(stem), weak: isWeakWord(stem) })
  const others: QueryWord[][] = []
  for (let i = 0; i < words.length; i++) {
    const { stem } = words[i]!
    const next = words[i + 1]
    if (next !== undefined && isKnown(stem + next.stem)) {
      others.push([...words.slice(0, i), plain(stem + next.stem), ...words.slice(i + 2)])
    }
    if (isKnown(stem) || words[i]!.states !== null) continue
    for (let cut = stem.length - 3; cut >= 3; cut--) {
      const [front, back] = [stem.slice(0, cut), stem.slice(cut)]
      if (isKnown(front) && isKnown(back)) {
        others.push([...words.slice(0, i), plain(front), plain(back), ...words.slice(i + 1)])
        break
      }
    }
  }
  return others.slice(0, 4)
}
