import { keyboardSigns, type Scanned, scanAmount } from './scan-amount.ts'
import { unitOf } from './units.ts'

/** The text parted into an amount (or none) and the food's words. */
export interface Parted {
  amount: Scanned | null
  /** the amount as written */
  amountText: string
  foodText: string
}

const EDGES = /^[\s,;:.)=/*-]+|[\s,;:.(=*-]+$/g
const LEADING_WORDS = /^(?:of\s+(?:the\s+|my\s+)?|the\s+|de\s+)/i

/** Parts a plain text into an amount, wherever it stands, and the words of the food. */
export function partPortion(plain: string): Parted {
  const written = keyboardSigns(plain)
    .replace(/^\s*[-*•]\s+/, '')
    .trim()
  const text = withoutArticle(written) ? `a ${written}` : written
  const leading = scanAmount(text)
  if (leading !== null) {
    const foodText = cleaned(text.slice(leading.end))
    // "2 cloves" is two of the food cloves
    const term = leading.terms[0]
    const unit = term?.unit
    if (foodText === '' && leading.terms.length === 1 && unit?.kind === 'piece') {
      const amount = { ...leading, terms: [{ ...term!, unit: null }] }
      const amountText = text.slice(0, leading.end).replace(/\s*\S+\s*$/, '')
      return { amount, amountText, foodText: unit.name }
    }
    return withLabel({ amount: leading, amountText: text.slice(0, leading.end).trim(), foodText })
  }
  let inside: Parted | null = null
  for (const match of text.matchAll(/[\s,:;(=]+(?:-|x\s+(?=\d))?\s*/gi)) {
    const start = match.index + match[0].length
    if (match.index === 0 || start >= text.length) continue
    // a minus sign that stands at its number is no dash
    const signed = match[0].endsWith('-') ? start - 1 : start
    const amount = scanAmount(text, signed)
    if (amount === null) continue
    const after = text.slice(amount.end)
    const amountText = text.slice(signed, amount.end).trim()
    if (/^[\s.,;)]*$/.test(after) || /^\s*each[\s.]*$/i.test(after)) {
      return { amount, amountText, foodText: cleaned(text.slice(0, match.index)) }
    }
    const { unit } = amount.terms[0]!
    if (inside === null && unit !== null && unit.kind !== 'piece') {
      inside = { amount, amountText, foodText: cleaned(`${text.slice(0, match.index)} ${after}`) }
    }
  }
  return inside ?? { amount: null, amountText: '', foodText: cleaned(text) }
}

/** `1 can of chickpeas (400 g)`: the label in brackets at the end belongs to the amount. */
function withLabel(parted: Parted): Parted {
  const match = /^(.*\S)\s*(\([^()]*\))$/.exec(parted.foodText)
  if (match === null) return parted
  const amountText = `${parted.amountText} ${match[2]}`
  const amount = scanAmount(amountText)
  return amount?.end === amountText.length ? { amount, amountText, foodText: match[1]! } : parted
}

/** `handful of almonds`, `heaped tbsp tahini`: one of them, though no "a" stands before it. */
function withoutArticle(text: string): boolean {
  const match = /^(heaped|heaping|rounded|scant|level|small|large)?\s*([a-z]+)\b\.?\s+(of\b)?/i.exec(text)
  const unit = match === null ? null : unitOf(match[2]!.toLowerCase())
  return unit !== null && unit.kind !== 'mass' && (match![1] !== undefined || match![3] !== undefined)
}

/** A food's words without what joins them to the amount. */
export function cleaned(text: string): string {
  let clean = text.replace(EDGES, '').replace(LEADING_WORDS, '')
  // a lone bracket is left by an amount in brackets
  if (clean.includes('(') !== clean.includes(')')) clean = clean.replace(/[()]/g, ' ')
  return clean.replace(/\s+/g, ' ').trim()
}
