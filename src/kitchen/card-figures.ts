import type { Card } from './card.ts'
import type { KnownSum } from './minerals.ts'
import { zincUptake } from './minerals.ts'

/** The figures of a card as rows of label and value, for every renderer that people read. Rounded; a serving each. */
export function figuresOf(card: Card): [label: string, value: string][] {
  const { score } = card
  return [
    ['Protein', `${one(score.proteinG)} g`],
    ['DIAAS', diaasValue(score)],
    ['Usable protein', `${one(score.adjustedProteinG)} g (adjusted by the DIAAS)`],
    ['Energy', `${Math.round(score.kcal)} kcal`],
    ['Leucine', `${one(score.leucineG)} g`],
    ['Fibre', `${Math.round(score.fibreG)} g`],
    ['Iron', mineral(card.iron, card.take.length)],
    ['Zinc', mineral(card.zinc, card.take.length)],
    ['Phytate to zinc', ratioValue(card)],
  ]
}

const one = (value: number): string => value.toFixed(1)

function mineral({ amount, unknown }: KnownSum, foods: number): string {
  if (unknown.length === foods) return 'not known'
  const text = `${one(amount)} mg`
  return unknown.length === 0 ? text : `at least ${text} (no figure for ${unknown.length} of ${foods} foods)`
}

function ratioValue({ phytateZincRatio, phytateZincAtLeast, phytate, take }: Card): string {
  if (phytateZincRatio === null) return 'not known'
  const ratio = `${Math.round(phytateZincRatio)} mol to 1`
  const uptake = zincUptake(phytateZincRatio)
  // A ratio of 15 and more stays low whatever is not known; below that, more phytate could still change the class.
  if (phytateZincAtLeast && uptake !== 'low')
    return `at least ${ratio} (phytate not known for ${phytate.unknown.length} of ${take.length} foods)`
  const words = { high: 'well', moderate: 'moderately', low: 'poorly' }[uptake]
  const least = phytateZincAtLeast ? 'at least ' : ''
  return `${least}${ratio}: zinc taken up ${words}; a hint, meant for a whole diet`
}

/** `97 (90 % band 89-104), good`; a score never rounds up into a better class. */
function diaasValue({ diaas, band, class: of }: Card['score']): string {
  if (diaas === null || band === null) return 'no protein to score'
  const rounded = Math.round(diaas)
  const whole = (rounded === 100 || rounded === 75) && diaas < rounded ? rounded - 1 : rounded
  const words = of === 'no claim' ? 'below 75: no quality claim' : of
  return `${whole} (90 % band ${Math.round(band.low)}-${Math.round(band.high)}), ${words}`
}

export const cardTitle = ({ servings, eatAt }: Card): string =>
  `Card for ${servings} ${servings === 1 ? 'serving' : 'servings'}${eatAt === null ? '' : `, to eat at ${eatAt}`}`
