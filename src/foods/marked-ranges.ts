import { editDistance } from './edit-distance.ts'
import { readQuery } from './query.ts'
import { fold, placedWords } from './words.ts'

/**
 * The stretches of a food's name that a query met, end exclusive, in order and apart: whole words, the beginning of a
 * word still being typed, or a whole word that was mistyped.
 */
export function markedRanges(name: string, query: string): [start: number, end: number][] {
  const asked = readQuery(query).map(word => word.stem)
  const ranges: [number, number][] = []
  for (const { stem, start, end } of placedWords(name)) {
    const last = ranges.at(-1)
    if (last !== undefined && last[0] === start) continue
    if (asked.includes(stem)) ranges.push([start, end])
    else {
      const begun = asked.find(word => fold(name.slice(start, end)).startsWith(word))
      if (begun !== undefined) ranges.push([start, Math.min(end, start + begun.length)])
      else if (
        asked.some(word => word.length > 3 && editDistance(word, stem, 2) <= (word.length > 4 ? 2 : 1))
      )
        ranges.push([start, end])
    }
  }
  return ranges
}
