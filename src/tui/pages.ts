import type { Food } from '../foods/food.ts'
import { scoreBasis } from '../foods/score.ts'
import { allergenName } from '../kitchen/allergen-names.ts'
import { cardOf, cardProblem } from '../kitchen/card.ts'
import { cardText } from '../kitchen/card-text.ts'
import { STANDING_NOTE } from '../kitchen/cautions.ts'
import { b12NoteFor } from '../kitchen/vitamin-b12.ts'
import { AMINO_ACIDS } from '../nutrition/amino-acids.ts'
import { scorePlate } from '../nutrition/plate-score.ts'
import { INTAKE_RANGES } from '../nutrition/targets.ts'
import { targetOf } from './problem-of.ts'
import type { Knowledge, Page, State } from './state.ts'
import { drawStaves, stavesAsText } from './staves/draw-staves.ts'
import { noBodyMassTarget } from './stepping-back.ts'
import { diaasText, grams } from './text/figures.ts'
import { inColumns, wrapLines } from './text/lines.ts'

const page = (title: string, lines: string[]): Page => ({ title, lines, scroll: 0, isCard: false })

/** Everything that a key does, on one screen of 80 by 24. */
export function helpPage({ columns }: State): Page {
  const rows: (string | [key: string, what: string])[] = [
    ['Tab', 'next screen, Shift+Tab the last;  Esc back;  Ctrl+C leave'],
    'shelf: letters find, signs act',
    ['letters', 'find a food here, and in the table below; or "2 cups oats"'],
    ['Enter', 'how much there is; or put a food of the table there'],
    ['!  .', 'use up, hold back (again: no mark);  @ use-by day'],
    ['#  Del', 'take off the shelf;  <  > undo, do again (on all screens)'],
    ['=  /', 'look closer (staves, tiers, sources);  order of the list'],
    ['+  paste', 'a food from a packet;  a whole list, one food a line'],
    'bench: pairings follow every change',
    ['up down 1-5', 'choose a pairing;  Enter takes it;  w why;  c compare'],
    ['t n k', 'protein target, servings, foods at most'],
    ['b i m u', 'target from body mass, intake, meals;  u usual ranges'],
    ['a e d l p', 'allergens, eggs, dairy, energy ceiling, pattern'],
    'plate',
    ['left right', 'less, more (or - +);  Enter an amount;  a add;  x off'],
    ['1 2 3  z', 'try a lift; go back'],
    ['c s f n', 'card for the kitchen, serve, look closer, servings'],
    'DIAAS: the shortest of nine indispensable amino acids, in % of the pattern;',
    'the band behind it holds 90 % of what the figures may be. No medical advice.',
  ]
  const lines = rows.map(row => (typeof row === 'string' ? row : `  ${row[0].padEnd(12)} ${row[1]}`))
  return page(
    'All keys',
    lines.flatMap(line => wrapLines(line, columns - 2, 15)),
  )
}

const known = (value: number | null, unit: string): string =>
  value === null ? 'not known' : `${Number(value.toPrecision(3))} ${unit}`

/** One food: staves, tiers, measures and sources. */
export function foodPage(food: Food, state: State, { table, colour }: Knowledge): Page {
  const width = Math.min(state.columns - 4, 90)
  const plate = scorePlate([{ food, grams: 100 }], scoreBasis(table, state.settings.pattern))
  const { per100g } = food
  const drawing =
    plate.staves === null
      ? []
      : state.spoken
        ? wrapLines(stavesAsText(plate.staves), width)
        : drawStaves({ portions: [{ food, grams: 100 }], pattern: plate.pattern, width, height: 8, colour })
  const facts = [
    ['score', diaasText(plate)],
    [
      'protein',
      `${known(per100g.proteinG, 'g')} / 100 g (nitrogen x ${food.nitrogenFactor}); crude protein (x 6.25) ${known(per100g.crudeProteinG, 'g')}`,
    ],
    [
      'per 100 g',
      `${known(per100g.kcal, 'kcal')}, fibre ${known(per100g.fibreG, 'g')}, iron ${known(per100g.ironMg, 'mg')}, zinc ${known(per100g.zincMg, 'mg')}`,
    ],
    ['measures', food.measures.map(measure => `${measure.name} = ${grams(measure.grams)}`).join('; ')],
    [
      'profile',
      `${food.profileTier}${food.doubts.length === 0 ? '' : ` (wider band: ${food.doubts.join(', ')})`}`,
    ],
    ['digestibility', `${food.digestibilityTier} (${food.digestibilityClass})`],
    ['allergens', food.allergens.map(allergenName).join(', ') || 'none of the listed ones'],
    ['also called', food.aliases.slice(0, 12).join(', ')],
    ['note', food.note],
    ['sources', food.sources.map(id => table.sourceById.get(id)?.citation ?? id).join('; ')],
  ].filter(([, value]) => value !== '')
  const amino = inColumns(
    [
      ['', ...AMINO_ACIDS],
      ['mg/g', ...AMINO_ACIDS.map(a => food.aminoMgPerG[a].toFixed(0))],
      ['digested %', ...AMINO_ACIDS.map(a => (100 * food.digestibility[a]).toFixed(0))],
    ],
    AMINO_ACIDS.map((_, i) => i + 1),
    1,
  )
  const lines = [
    ...drawing,
    '',
    ...facts.flatMap(([label, value]) => wrapLines(`${label!.padEnd(14)}${value}`, width, 14)),
    '',
    ...amino,
  ]
  return page(`${food.name}  (${food.id})`, lines)
}

/** The usual ranges of protein intake, with their sources. */
export function rangesPage(state: State): Page {
  const width = Math.min(state.columns - 4, 90)
  const stays = noBodyMassTarget(state.settings)
  const ranges = INTAKE_RANGES.filter(({ id }) => stays === null || id === 'adult-safe-level')
  const lines = ranges.flatMap(({ label, low, high, unit, source }) => [
    ...wrapLines(`${label}: ${low === high ? low : `${low} to ${high}`} ${unit}`, width),
    ...wrapLines(`   ${source}`, width, 3),
    '',
  ])
  const now = stays ?? `The target now: ${Math.round(targetOf(state.settings))} g a serving.`
  return page('Usual ranges, for healthy adults', [
    ...lines,
    ...wrapLines(now, width),
    '',
    ...wrapLines(STANDING_NOTE, width),
  ])
}

/** The card of the plate, or why none can be made. `eatAt` is HH:MM, or null. */
export function cardPage(state: State, eatAt: string | null, { table, today }: Knowledge): Page | string {
  const { settings, plate } = state
  const score = scorePlate(plate, scoreBasis(table, settings.pattern))
  const problem = cardProblem({ score, servings: settings.servings, eatAt })
  if (problem !== null) return problem
  const card = cardOf({
    score,
    servings: settings.servings,
    eatAt,
    settings: { units: settings.units, conditions: settings.conditions },
    b12: b12NoteFor(
      plate.map(({ food }) => food),
      { lastDay: settings.lastB12Day, today },
    ),
  })
  return { ...page('Card', cardText(card, Math.min(state.columns - 4, 90)).split('\n')), isCard: true }
}
