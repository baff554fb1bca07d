import { plainText } from '../foods/plain-text.ts'
import { STAVE_NAMES, STAVES } from '../nutrition/amino-acids.ts'
import type { Card } from './card.ts'
import { cardTitle, figuresOf } from './card-figures.ts'
import { allergensText, stepText, takenText } from './card-text.ts'

/** The page's whole style: no fonts, pictures or scripts from elsewhere; black on white; any paper. */
const STYLE = `
@page { margin: 15mm }
* { box-sizing: border-box }
body { margin: 2rem auto; max-width: 46rem; padding: 0 1rem; font: 11pt/1.4 Georgia, serif; color: #000; background: #fff }
h1 { font-size: 1.5em; border-bottom: 2px solid #000; padding-bottom: .2em }
h2 { font-size: 1.1em; margin: 1.2em 0 .3em }
ul, table { margin: 0; padding: 0; width: 100%; border-collapse: collapse }
li { list-style: none; margin: .25em 0; padding-left: 1.4em; text-indent: -1.4em }
.take li::before, .steps th::before { content: "\\2610\\00a0" }
.mind li::before, .keep li::before { content: "\\2013\\00a0\\00a0" }
th { text-align: left; vertical-align: top; font-weight: bold; width: 11em; padding: .15em .8em .15em 0 }
td { vertical-align: top; padding: .15em 0 }
tr, li { break-inside: avoid }
h2 { break-after: avoid }
.bar { display: inline-block; border-top: .7em solid #000; vertical-align: baseline; margin-right: .6em }
.source { color: #444; font-size: .85em }
footer { margin-top: 1.5em; border-top: 1px solid #000; padding-top: .4em; font-size: .9em }
@media print { body { margin: 0; max-width: none; padding: 0; font-size: 10pt } }
`

/** A card as one printable page that asks for nothing from outside (A4 and Letter). All text is escaped. */
export function cardHtml(card: Card): string {
  const title = html(cardTitle(card))
  const steps = card.steps.map(step => row(step.when, stepText(step)))
  const asItIs = card.asItIs.map(food => row('', `${food.name}: as it is`))
  const staves = card.score.staves
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="Content-Security-Policy" content="default-src 'none'; style-src 'unsafe-inline'">
<title>${title}</title>
<style>${STYLE}</style>
</head>
<body>
<main>
<h1>${title}</h1>
<section class="take">
<h2>Take from the shelf</h2>
<ul>
${card.take.map(taken => `<li><strong>${html(taken.food.name)}</strong>: ${html(takenText(taken, card))}</li>`).join('\n')}
</ul>
</section>
<section class="steps">
<h2>${card.eatAt === null ? 'When (before the meal)' : 'When'}</h2>
<table>
${[...steps, ...asItIs, row(card.eatAt ?? 'the meal', 'bring together on the plates')].join('\n')}
</table>
</section>
${
  card.numbers
    ? `<section>
<h2>One serving</h2>
<table>
${figuresOf(card)
  .map(([label, value]) => row(label, value))
  .join('\n')}
</table>
<p>${html(card.staveWords)}</p>
${staves === null ? '' : `<table>\n${STAVES.map(stave => staveRow(STAVE_NAMES[stave], staves[stave])).join('\n')}\n</table>`}
</section>
`
    : ''
}<section class="mind">
<h2>Take care</h2>
<ul>
<li>Allergens: ${html(allergensText(card))}</li>
${[...card.cautions, ...card.notes].map(({ text, source }) => `<li>${html(text)} <span class="source">(${html(source)})</span></li>`).join('\n')}
</ul>
</section>
<section class="keep">
<h2>Left over</h2>
<ul>
${card.storage.map(({ text }) => `<li>${html(text)}</li>`).join('\n')}
</ul>
</section>
</main>
<footer>${html(card.standingNote)}</footer>
</body>
</html>
`
}

const row = (label: string, value: string): string =>
  `<tr><th scope="row">${html(label)}</th><td>${html(value)}</td></tr>`

function staveRow(name: string, percent: number): string {
  const whole = Math.floor(percent)
  const widthEm = (Math.min(150, whole) / 10).toFixed(1)
  return `<tr><th scope="row">${html(name)}</th><td><span class="bar" style="width:${widthEm}em"></span>${whole} % of the pattern</td></tr>`
}

const SIGNS: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' }

/** Text for an element or a quoted attribute. */
export const html = (text: string): string => plainText(text).replace(/[&<>"']/g, sign => SIGNS[sign]!)
