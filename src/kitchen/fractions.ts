/** A kitchen number: a whole part and one of a few fractions. */
export interface Fraction {
  whole: number
  part: number
  value: number
}

/** The nearest number with one of the given fractions (0 among them, each below 1). Ties go to the smaller. */
export function roundToOneOf(value: number, parts: readonly number[]): Fraction {
  const floor = Math.max(0, Math.floor(value))
  let best: Fraction = { whole: floor, part: 0, value: floor }
  for (const whole of [floor, floor + 1]) {
    for (const part of whole === floor ? parts : [0]) {
      if (Math.abs(whole + part - value) < Math.abs(best.value - value) - 1e-9)
        best = { whole, part, value: whole + part }
    }
  }
  return best
}

const WORDS: [number, string][] = [
  [1 / 4, '1/4'],
  [1 / 3, '1/3'],
  [1 / 2, '1/2'],
  [2 / 3, '2/3'],
  [3 / 4, '3/4'],
]

/** `1 1/2`, `3/4`, `2`. */
export function fractionText({ whole, part }: Fraction): string {
  const words = WORDS.find(([value]) => Math.abs(value - part) < 1e-9)?.[1]
  if (words === undefined) return String(whole)
  return whole === 0 ? words : `${whole} ${words}`
}

/** `about x` where it is only near. */
export const approximate = (text: string, near: boolean): string => (near ? `about ${text}` : text)
