/** The quality classes of FAO Food and Nutrition Paper 92 (2013). */
export type QualityClass = 'excellent' | 'good' | 'no claim'

/**
 * The class of a DIAAS in per cent: excellent at 100 or more, good from 75 to 99, no quality claim below 75.
 * Scores between the printed whole numbers take the class of the lower bound (99.6 is good, 74.9 makes no claim).
 */
export function qualityClass(diaas: number | null): QualityClass {
  if (diaas === null || diaas < 75) return 'no claim'
  return diaas >= 100 ? 'excellent' : 'good'
}
