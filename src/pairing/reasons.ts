import type { Food } from '../foods/food.ts'
import { STAVE_NAMES, STAVES, type Stave } from '../nutrition/amino-acids.ts'
import type { PlateScore, ScoredItem } from '../nutrition/plate-score.ts'
import { shortestStave, stavesOfPlate } from '../nutrition/staves.ts'

/** A stave shorter than this (% of the pattern) is short: it would keep the food from the class "excellent". */
const FULL = 100

/**
 * Why a plate scores what it scores, in plain words, one sentence a line: what each food is short of and who brings
 * it, then which stave is the shortest now. All figures are % of the pattern.
 */
export function whyOf(score: PlateScore<Food>): string[] {
  if (score.staves === null || score.limiting === null || score.diaas === null)
    return ['There is no protein to score.']
  const proteins = score.items.filter(item => item.diaasAlone !== null && item.grams > 0)
  if (proteins.length < 2) return [aloneReason(proteins[0]!, score)]
  const lines = shortages(proteins, score)
  const now = whole(score.staves[score.limiting])
  lines.push(
    score.diaas >= FULL
      ? `No stave is short now: the shortest, ${STAVE_NAMES[score.limiting]}, is ${now} % of the pattern.`
      : `${capital(STAVE_NAMES[score.limiting])} is the shortest now, at ${now} %.`,
  )
  return lines
}

function aloneReason(item: ScoredItem<Food>, score: PlateScore<Food>): string {
  const shortest = STAVE_NAMES[score.limiting!]
  const now = whole(score.staves![score.limiting!])
  return score.diaas! >= FULL
    ? `${shortName(item.food)}: no partner needed; the shortest stave, ${shortest}, is ${now} % of the pattern.`
    : `${shortName(item.food)} alone: short of ${shortest} (${now}).`
}

/** One sentence a food that is short by itself, the greatest part of the protein first. */
function shortages(proteins: readonly ScoredItem<Food>[], score: PlateScore<Food>): string[] {
  const own = new Map(
    proteins.map(item => [item, stavesOfPlate([{ food: item.food, grams: 100 }], score.pattern)!]),
  )
  const lines: string[] = []
  for (const item of proteins) {
    const staves = own.get(item)!
    const short = shortestStave(staves)
    if (staves[short] >= FULL) continue
    const strong = strongest(staves, proteins, own, item)
    const helpers = proteins.filter(
      other => other !== item && own.get(other)![short] > score.staves![short] - 0.5,
    )
    const rich = strong === null ? '' : `rich in ${STAVE_NAMES[strong]} (${whole(staves[strong])}), `
    const mended =
      helpers.length === 0
        ? `the plate stands at ${whole(score.staves![short])}`
        : `with ${joined(helpers.map(({ food }) => lower(shortName(food))))} it comes to ${whole(score.staves![short])}`
    lines.push(
      `${shortName(item.food)}: ${rich}short of ${STAVE_NAMES[short]} (${whole(staves[short])}); ${mended}.`,
    )
  }
  return lines
}

/**
 * The stave that a food is rich in and a partner is short of, before all the one that is the partner's shortest; null
 * where it carries none.
 */
function strongest(
  staves: Record<Stave, number>,
  proteins: readonly ScoredItem<Food>[],
  own: ReadonlyMap<ScoredItem<Food>, Record<Stave, number>>,
  item: ScoredItem<Food>,
): Stave | null {
  const partners = proteins.filter(other => other !== item).map(other => own.get(other)!)
  const missing = (theirs: Record<Stave, number>, stave: Stave) =>
    theirs[stave] < FULL && staves[stave] >= FULL ? staves[stave] - theirs[stave] : 0
  const greatest = (choices: readonly { stave: Stave; margin: number }[]) =>
    choices.reduce<{ stave: Stave | null; margin: number }>(
      (best, choice) => (choice.margin > best.margin ? choice : best),
      { stave: null, margin: 0 },
    ).stave
  const shortest = partners.map(theirs => {
    const stave = shortestStave(theirs)
    return { stave, margin: missing(theirs, stave) }
  })
  const any = partners.flatMap(theirs => STAVES.map(stave => ({ stave, margin: missing(theirs, stave) })))
  return greatest(shortest) ?? greatest(any)
}

/** A food's name without its state and what is in brackets: `Lentils, red, dry` is `Red lentils`. */
export function shortName(food: Pick<Food, 'name' | 'state'>): string {
  const parts = food.name
    .replace(/ \([^)]*\)/g, '')
    .split(', ')
    .filter((part, i) => i === 0 || !STATE_WORDS.has(part))
  const [head = food.name, ...qualities] = parts
  if (qualities.length === 0) return head
  return capital(`${qualities.slice(0, 2).join(' ')} ${lower(head)}`)
}

const STATE_WORDS = new Set([
  'dry',
  'raw',
  'boiled',
  'canned',
  'drained',
  'cooked',
  'roasted',
  'dried',
  'fresh',
  'plain',
  'unsalted',
  'unsweetened',
])

/** Whole per cent, rounded down: 99.8 is not yet 100. */
const whole = (value: number): number => Math.floor(value + 1e-9)
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)
const lower = (text: string): string =>
  /^[A-Z][a-z]/.test(text) ? text.charAt(0).toLowerCase() + text.slice(1) : text
const joined = (items: readonly string[]): string =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`
