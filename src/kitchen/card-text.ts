import stringWidth from 'string-width'
import { plainText } from '../foods/plain-text.ts'
import { allergenName } from './allergen-names.ts'
import type { Card, TakenFood, TimedStep } from './card.ts'
import { cardTitle, figuresOf } from './card-figures.ts'

/** A card as plain text, at most `columns` wide. */
export function cardText(card: Card, columns = 80): string {
  const lines: string[] = []
  const heading = (text: string) => lines.push('', text, '-'.repeat(Math.min(columns, stringWidth(text))))
  const say = (text: string, indent = '') => lines.push(...wrap(plainText(text), columns, indent))

  say(cardTitle(card))
  heading('Take from the shelf')
  for (const taken of card.take) say(`${plainText(taken.food.name)}: ${takenText(taken, card)}`, '  ')

  heading(card.eatAt === null ? 'When (before the meal)' : 'When')
  const width = Math.min(22, Math.max(...card.steps.map(({ when }) => stringWidth(when)), 5) + 2)
  for (const step of card.steps) hang(lines, step.when, stepText(step), width, columns)
  for (const food of card.asItIs) hang(lines, '', `${food.name}: as it is`, width, columns)
  hang(lines, card.eatAt ?? 'the meal', 'bring together on the plates', width, columns)

  if (card.numbers) {
    heading('One serving')
    for (const [label, value] of figuresOf(card)) hang(lines, label, value, 17, columns)
    say(card.staveWords)
  }
  heading('Take care')
  say(`Allergens: ${allergensText(card)}.`)
  for (const { text } of [...card.cautions, ...card.notes]) say(`- ${text}`, '  ')
  heading('Left over')
  for (const { text } of card.storage) say(`- ${text}`, '  ')
  lines.push('')
  say(card.standingNote)
  return `${lines.join('\n')}\n`
}

/** `300 g dry = 1 1/2 cups, about 750 g boiled (50 g a serving)`. */
export function takenText(
  { amount, fromDry, gramsPerServing }: TakenFood,
  { servings, units }: Card,
): string {
  const dry = fromDry === null ? '' : `; ${fromDry}, if you cook it yourself`
  const each = servings === 1 || units === 'us' ? '' : ` (${Number(gramsPerServing.toFixed(1))} g a serving)`
  return `${amount}${each}${dry}`
}

/** `Kidney beans, dry: soak ... (not before 03:00)`. */
export function stepText({ food, text, notBefore }: TimedStep): string {
  return `${food}: ${text}${notBefore === null ? '' : ` (begin no earlier than ${notBefore})`}`
}

/** The allergens in full, or that none is known of. Never that a plate is safe: cross-contact stands on the label. */
export function allergensText({ allergens }: Card): string {
  if (allergens.length === 0) return 'none of the fourteen by its foods; cross-contact stands on the label'
  return `${allergens.map(allergenName).join(', ')}; cross-contact stands on the label`
}

function hang(lines: string[], label: string, text: string, width: number, columns: number): void {
  const body = wrap(plainText(text), columns - width)
  const first = plainText(label)
  if (stringWidth(first) > width - 1) {
    lines.push(first)
    lines.push(...body.map(line => ' '.repeat(width) + line))
    return
  }
  body.forEach((line, i) => {
    lines.push((i === 0 ? first : '') + ' '.repeat(width - (i === 0 ? stringWidth(first) : 0)) + line)
  })
}

function wrap(text: string, width: number, indent = ''): string[] {
  const lines: string[] = []
  let line = ''
  for (const word of text.split(/ (?!%)/)) {
    let rest = word
    if (line !== '' && stringWidth(`${line} ${rest}`) > width) {
      lines.push(line)
      line = ''
    }
    const lead = lines.length === 0 ? '' : indent
    // A word longer than a line (a food's name may be anything) is cut.
    while (stringWidth(lead + rest) > width && line === '') {
      let cut = [...rest].length
      while (cut > 1 && stringWidth(lead + [...rest].slice(0, cut).join('')) > width) cut--
      lines.push(lead + [...rest].slice(0, cut).join(''))
      rest = [...rest].slice(cut).join('')
    }
    line = line === '' ? (lines.length === 0 ? '' : indent) + rest : `${line} ${rest}`
  }
  lines.push(line)
  return lines
}
