/**
 * A small seeded generator (mulberry32, public domain algorithm): the same seed gives the same draws everywhere,
 * so that a band can be checked again. Returns numbers in [0, 1).
 */
export function seededUniform(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

/** Rational approximations of the normal quantile: near the middle, and in the tails. */
const MIDDLE = {
  above: [
    -39.69683028665376, 220.9460984245205, -275.9285104469687, 138.357751867269, -30.66479806614716,
    2.506628277459239,
  ],
  below: [
    -54.47609879822406, 161.5858368580409, -155.6989798598866, 66.80131188771972, -13.28068155288572, 1,
  ],
}
const TAIL = {
  above: [
    -0.007784894002430293, -0.3223964580411365, -2.400758277161838, -2.549732539343734, 4.374664141464968,
    2.938163982698783,
  ],
  below: [0.007784695709041462, 0.3224671290700398, 2.445134137142996, 3.754408661907416, 1],
}
const TAIL_BELOW = 0.02425

const polynomial = (coefficients: readonly number[], x: number): number =>
  coefficients.reduce((sum, coefficient) => sum * x + coefficient, 0)

/**
 * The standard normal value below which a share `p` (0 to 1) of draws lies, to a relative error under 1.2e-9.
 * Method: rational approximation of the inverse normal distribution in three regions (published algorithm, 2003).
 *
 * @example normalQuantile(0.975) is 1.95996
 */
export function normalQuantile(p: number): number {
  if (p < TAIL_BELOW) {
    const q = Math.sqrt(-2 * Math.log(p))
    return polynomial(TAIL.above, q) / polynomial(TAIL.below, q)
  }
  if (p > 1 - TAIL_BELOW) return -normalQuantile(1 - p)
  const q = p - 0.5
  return (q * polynomial(MIDDLE.above, q * q)) / polynomial(MIDDLE.below, q * q)
}

/** A 32-bit seed from a text (FNV-1a). */
export function seedOf(text: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193)
  return hash >>> 0
}
