import type { Food } from '../../foods/food.ts'
import { scoreBasis } from '../../foods/score.ts'
import { allergenName } from '../../kitchen/allergen-names.ts'
import { STAVE_NAMES } from '../../nutrition/amino-acids.ts'
import { scorePlate } from '../../nutrition/plate-score.ts'
import type { Knowledge, State } from '../state.ts'
import { drawStaves } from '../staves/draw-staves.ts'
import { STYLE } from '../style.ts'
import { diaasText, grams } from '../text/figures.ts'
import { clip, wrapLines } from '../text/lines.ts'

/** The food under the cursor, beside a wide list: its staves, tiers and a meal's worth. */
export function foodPanel(food: Food, state: State, knowledge: Knowledge, width: number): string[] {
  const known = panels.get(food)
  const key = `${state.settings.pattern} ${width} ${knowledge.colour}`
  if (known?.key === key) return known.lines
  const lines = drawn(food, state, knowledge, width)
  panels.set(food, { key, lines })
  return lines
}

/** Moving up and down a list draws the same few foods again and again. */
const panels = new WeakMap<Food, { key: string; lines: string[] }>()

function drawn(food: Food, state: State, { table, colour }: Knowledge, width: number): string[] {
  const portions = [{ food, grams: 100 }]
  const score = scorePlate(portions, scoreBasis(table, state.settings.pattern))
  const short =
    score.limiting === null
      ? ''
      : score.diaas! < 100
        ? `, short of ${STAVE_NAMES[score.limiting]}`
        : `, shortest ${STAVE_NAMES[score.limiting]}`
  const { usual, least, most } = food.portionG
  const facts: [string, string][] = [
    ['protein', `${food.per100g.proteinG.toFixed(1)} g in 100 g, ${Math.round(food.per100g.kcal)} kcal`],
    ['one meal', `usually ${grams(usual)} (${grams(least)} to ${grams(most)})`],
    ['profile', food.profileTier],
    ['digestibility', food.digestibilityTier],
    ['allergens', food.allergens.map(allergenName).join(', ') || 'none of the listed ones'],
  ]
  return [
    STYLE.bold(clip(food.name, width)),
    ...wrapLines(`${diaasText(score)}${short}`, width),
    '',
    ...(score.staves === null
      ? []
      : [...drawStaves({ portions, pattern: score.pattern, width, height: 10, colour }), '']),
    ...facts.flatMap(([label, value]) => {
      const [first, ...rest] = wrapLines(`${label.padEnd(14)}${value}`, width, 14)
      return [`${STYLE.dim(first!.slice(0, 14))}${first!.slice(14)}`, ...rest]
    }),
    '',
    STYLE.dim('= shows the rest: measures, amino acids, sources'),
  ]
}
