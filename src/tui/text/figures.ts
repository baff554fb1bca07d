import type { PlateScore } from '../../nutrition/plate-score.ts'

/** Figures as a person reads them; JSON carries them unrounded. */
export const grams = (g: number): string => `${g < 10 ? Number(g.toFixed(1)) : Math.round(g)} g`
export const proteinG = (g: number): string => `${g < 10 ? g.toFixed(1) : Math.round(g)} g protein`
export const kcal = (value: number): string => `${Math.round(value)} kcal`
export const percent = (value: number): string => String(Math.round(value))
export const signed = (value: number): string =>
  Math.round(value) >= 0 ? `+${Math.round(value)}` : `−${-Math.round(value)}`

/** `DIAAS 97 (89-104), good`, or why there is none. Rounded down at the class borders, so that 99.7 is not shown as 100. */
export function diaasText(score: Pick<PlateScore, 'diaas' | 'band' | 'class'>): string {
  if (score.diaas === null || score.band === null) return 'no protein to score'
  const words = score.class === 'no claim' ? 'below 75: no quality claim' : score.class
  return `DIAAS ${wholeScore(score.diaas)} (${percent(score.band.low)}-${percent(score.band.high)}), ${words}`
}

/** `DIAAS 97 (89-104)`: the score with its band alone. */
export const shortDiaas = ({ diaas, band }: Pick<PlateScore, 'diaas' | 'band'>): string =>
  diaas === null || band === null
    ? 'no protein to score'
    : `DIAAS ${wholeScore(diaas)} (${percent(band.low)}-${percent(band.high)})`

/** A score as a whole number that never rounds up into a better class. */
export function wholeScore(diaas: number): string {
  const rounded = Math.round(diaas)
  return String((rounded === 100 || rounded === 75) && diaas < rounded ? rounded - 1 : rounded)
}
