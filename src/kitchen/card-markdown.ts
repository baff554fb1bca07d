import { plainText } from '../foods/plain-text.ts'
import type { Card } from './card.ts'
import { cardTitle, figuresOf } from './card-figures.ts'
import { allergensText, stepText, takenText } from './card-text.ts'

/** A card as Markdown (CommonMark, with one table). */
export function cardMarkdown(card: Card): string {
  const lines: string[] = [`# ${md(cardTitle(card))}`, '', '## Take from the shelf', '']
  for (const taken of card.take) lines.push(`- **${md(taken.food.name)}**: ${md(takenText(taken, card))}`)
  lines.push('', card.eatAt === null ? '## When (before the meal)' : '## When', '')
  for (const step of card.steps) lines.push(`- **${md(step.when)}** ${md(stepText(step))}`)
  for (const food of card.asItIs) lines.push(`- ${md(food.name)}: as it is`)
  lines.push(`- **${md(card.eatAt ?? 'the meal')}** bring together on the plates`)
  if (card.numbers) {
    lines.push('', '## One serving', '', '| | |', '|---|---|')
    for (const [label, value] of figuresOf(card)) lines.push(`| ${md(label)} | ${md(value)} |`)
    lines.push('', md(card.staveWords))
  }
  lines.push('', '## Take care', '', `- Allergens: ${md(allergensText(card))}`)
  for (const { text, source } of [...card.cautions, ...card.notes])
    lines.push(`- ${md(text)} (${md(source)})`)
  lines.push('', '## Left over', '')
  for (const { text } of card.storage) lines.push(`- ${md(text)}`)
  lines.push('', md(card.standingNote))
  return `${lines.join('\n')}\n`
}

/** Text that Markdown takes as it is: one line, with its signs escaped. */
function md(text: string): string {
  return plainText(text)
    .replace(/[\\`*_{}[\]<>#|~!]/g, sign => `\\${sign}`)
    .replace(/^([-+]|\d+[.)])(?= )/, '\\$1')
}
