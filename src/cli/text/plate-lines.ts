import type { Food } from '../../foods/food.ts'
import { STAVE_NAMES } from '../../nutrition/amino-acids.ts'
import type { PlateScore } from '../../nutrition/plate-score.ts'
import type { LiftOption } from '../../pairing/problem.ts'
import { drawStaves } from '../../tui/staves/draw-staves.ts'
import { diaasText, grams, kcal, proteinG, signed, wholeScore } from '../../tui/text/figures.ts'
import { inColumns, wrapLines } from '../../tui/text/lines.ts'
import type { World } from '../command.ts'
import { styleOf } from './style.ts'

/** A scored plate as text: its foods with grams, the figures, and the staves as a chart. */
export function plateLines(score: PlateScore<Food>, world: World, servings: number): string[] {
  const style = styleOf(world.colour)
  const rows = score.items.map((item, i) => [
    `   ${letter(i)}`,
    item.food.name,
    grams(item.grams),
    servings === 1 ? '' : `(${grams(item.grams * servings)} in all)`,
    proteinG(item.proteinG),
    item.diaasAlone === null ? '' : style.dim(`alone ${wholeScore(item.diaasAlone)}`),
  ])
  const lines = inColumns(rows, [2, 4])
  const facts = [proteinG(score.proteinG), diaasText(score)]
  if (score.limiting !== null) facts.push(`shortest stave: ${STAVE_NAMES[score.limiting]}`)
  if (score.lift !== null && score.items.length > 1)
    facts.push(`lift ${signed(score.lift)}, gain ${signed(score.gain!)}`)
  facts.push(
    `${proteinG(score.adjustedProteinG).replace(' protein', '')} adjusted protein`,
    ...(score.pdcaas === null ? [] : [`PDCAAS ${Math.round(score.pdcaas)}`]),
    kcal(score.kcal),
    `leucine ${score.leucineG.toFixed(1)} g`,
    `fibre ${Math.round(score.fibreG)} g`,
  )
  lines.push(...wrapLines(`   ${facts.join(' · ')}`, world.columns, 3))
  if (score.staves !== null) {
    lines.push('')
    const drawing = drawStaves({
      portions: score.items.map(({ food, grams: g }) => ({ food, grams: g })),
      pattern: score.pattern,
      width: Math.min(world.columns, 80) - 3,
      colour: world.colour,
    })
    lines.push(...drawing.map(line => `   ${line}`), '')
  }
  return lines
}

/** The letter by which a food of the plate is known in the chart. */
export function letter(index: number): string {
  return String.fromCharCode('a'.charCodeAt(0) + (index % 26))
}

/** `Would lift it: 10 g more of Lentils, red, dry: DIAAS 98.` */
export function liftText(option: LiftOption): string {
  const amount = grams(Math.abs(option.deltaG))
  const change = option.deltaG < 0 ? `${amount} less ${option.food.name}` : `${amount} ${option.food.name}`
  const where = option.onShelf ? '' : ' (not on your shelf)'
  return `Would lift it: ${change}${where}, to DIAAS ${wholeScore(option.diaas)}.`
}
