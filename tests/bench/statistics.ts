/** The p-quantile (0 to 1) of some figures, by linear interpolation between order statistics. */
export function quantile(figures: readonly number[], p: number): number {
  const sorted = [...figures].sort((a, b) => a - b)
  const at = p * (sorted.length - 1)
  const below = Math.floor(at)
  const above = Math.min(below + 1, sorted.length - 1)
  return sorted[below]! + (at - below) * (sorted[above]! - sorted[below]!)
}

export const median = (figures: readonly number[]): number => quantile(figures, 0.5)
