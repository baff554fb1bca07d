/**
 * The least number of letters put in, left out, changed or swapped with a neighbour that makes `text` out of
 * `typed` (optimal string alignment). With `asPrefix`, of any beginning of `text`, for a word still being typed.
 *
 * @returns the distance, or `most + 1` where it is more than `most`
 * @example editDistance('chikpea', 'chickpea', 3) // 1
 */
export function editDistance(typed: string, text: string, most: number, asPrefix = false): number {
  if (!asPrefix && Math.abs(typed.length - text.length) > most) return most + 1
  let before: number[] = []
  let last = Array.from({ length: text.length + 1 }, (_, j) => j)
  for (let i = 1; i <= typed.length; i++) {
    const row = [i]
    let least = i
    for (let j = 1; j <= text.length; j++) {
      const same = typed[i - 1] === text[j - 1]
      let best = Math.min(last[j]! + 1, row[j - 1]! + 1, last[j - 1]! + (same ? 0 : 1))
      if (i > 1 && j > 1 && typed[i - 1] === text[j - 2] && typed[i - 2] === text[j - 1])
        best = Math.min(best, before[j - 2]! + 1)
      row.push(best)
      if (best < least) least = best
    }
    if (least > most) return most + 1
    before = last
    last = row
  }
  const distance = asPrefix ? Math.min(...last) : last[text.length]!
  return Math.min(distance, most + 1)
}
