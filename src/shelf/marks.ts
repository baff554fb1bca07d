/** Marks a cook puts on a shelf food: to be used up soon, or held back from pairings. */
export const MARKS = ['', 'use-up', 'hold-back'] as const

/** Is a text a day that there is, written YYYY-MM-DD? */
export function isDay(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false
  const time = Date.parse(`${text}T00:00:00Z`)
  return !Number.isNaN(time) && new Date(time).toISOString().startsWith(text)
}
