import type { Food } from '../foods/food.ts'
import { scoreBasis } from '../foods/score.ts'
import { type Card, cardOf, cardProblem } from '../kitchen/card.ts'
import { cardHtml } from '../kitchen/card-html.ts'
import { cardJson } from '../kitchen/card-json.ts'
import { cardMarkdown } from '../kitchen/card-markdown.ts'
import { cardText } from '../kitchen/card-text.ts'
import { planningRefusal } from '../kitchen/conditions.ts'
import { b12NoteFor } from '../kitchen/vitamin-b12.ts'
import type { Pattern } from '../nutrition/pattern.ts'
import { type PlateScore, scorePlate } from '../nutrition/plate-score.ts'
import { findPairings } from '../pairing/find-pairings.ts'
import { readArguments, readNumber } from './arguments.ts'
import { answer, type Command, jsonText, NO_ANSWER, Refusal, type World } from './command.ts'
import { rememberB12, settingsOf } from './kept-settings.ts'
import { readPlanningPattern } from './options.ts'
import { portionTexts, readPortions } from './score.ts'
import { chosenShelf, shelfFoods } from './shelf-source.ts'

const FORMS = ['text', 'markdown', 'html'] as const

export const card: Command = {
  name: 'card',
  summary: 'the sheet for the kitchen: what to weigh out, when to start which pot, what to mind',
  help: `
card [PORTION ...] [--servings N] [--eat-at HH:MM] [--form text|markdown|html | --json] [...]

  shortstave card "70 g dry red lentils" "85 g dry brown rice" "15 g sesame seeds" --servings 6 --eat-at 19:00
  shortstave card --pairing 2 --servings 6 --eat-at 19:00      the second pairing of the shelf
  shortstave card --form html > card.html                      to print

Portions are those of one serving, read as score reads them. Without portions: a pairing of the shelf, as pair finds it
with your settings. It is no recipe: it says how to prepare each food and how to bring them together.
  --servings N    how many (1)
  --eat-at HH:MM  when it is to be on the table; without it times are counted back from the meal
  --boxed         it goes into boxes for later: cooling and reheating come first
  --pairing N     which pairing of the shelf (1)
  --shelf FILE    from this shelf
  --units U       metric or us (your setting)
  --form F        text, markdown or html (a page of its own, to print)
  --pattern ID    the scoring pattern
  --json          the card as JSON`,
  async run(argv, world) {
    const kinds = {
      servings: 'text',
      'eat-at': 'text',
      boxed: 'flag',
      pairing: 'text',
      shelf: 'text',
      units: 'text',
      form: 'text',
      pattern: 'text',
      age: 'text',
      json: 'flag',
    } as const
    const { options, words } = readArguments('card', kinds, argv)
    const age = readNumber('--age', options.age, { least: 0, most: 120, unit: 'years' })
    const form = FORMS.find(known => known === (options.form ?? 'text').toLowerCase())
    if (form === undefined) throw new Refusal(`--form: give one of ${FORMS.join(', ')}`)
    const units = (options.units ?? '').toLowerCase()
    if (!['', 'metric', 'us'].includes(units)) throw new Refusal('--units: give metric or us')
    const settings = await settingsOf(world)
    const pattern = readPlanningPattern(world.table(), options.pattern ?? settings.pattern, age)
    const refusal = planningRefusal({ conditions: settings.conditions, age, pattern })
    if (refusal !== null) throw new Refusal(refusal, NO_ANSWER)
    const servings =
      readNumber('--servings', options.servings, { least: 1, most: 1000, unit: 'servings', whole: true }) ??
      settings.servings
    const { score, err } = await plateOf(words, options, pattern, servings, world)
    const eatAt = options['eat-at'] ?? null
    const problem = cardProblem({ score, servings, eatAt })
    if (problem !== null) throw new Refusal(problem)
    const today = world.now().toISOString().slice(0, 10)
    const b12 = b12NoteFor(
      score.items.map(({ food }) => food),
      { lastDay: settings.lastB12Day, today },
    )
    if (b12 !== null) await rememberB12(world, today)
    const sheet = cardOf({
      score,
      servings,
      eatAt,
      settings: {
        units: units === 'us' || units === 'metric' ? units : settings.units,
        conditions: settings.conditions,
      },
      boxed: options.boxed,
      b12,
    })
    return answer(options.json ? jsonText(cardJson(sheet)) : rendered(sheet, form, world), err)
  },
}

function rendered(sheet: Card, form: (typeof FORMS)[number], world: World): string {
  const text = { text: cardText(sheet, world.columns), markdown: cardMarkdown(sheet), html: cardHtml(sheet) }[
    form
  ]
  return text.endsWith('\n') ? text : `${text}\n`
}

/** The plate of the portions given, or of a pairing of the shelf. */
async function plateOf(
  words: string[],
  options: { pairing: string | undefined; shelf: string | undefined },
  pattern: Pattern,
  servings: number,
  world: World,
): Promise<{ score: PlateScore<Food>; err: string }> {
  const basis = scoreBasis(world.table(), pattern.id)
  if (words.length > 0) {
    if (options.pairing !== undefined || options.shelf !== undefined) {
      throw new Refusal('give portions, or --pairing and --shelf, not both')
    }
    const { portions, echoes } = readPortions(await portionTexts(words, world), world)
    return { score: scorePlate(portions, basis), err: echoes.map(echo => `${echo}\n`).join('') }
  }
  const which = readNumber('--pairing', options.pairing, { least: 1, most: 9, unit: '', whole: true }) ?? 1
  const { shelf, label } = await chosenShelf(options.shelf, world)
  const settings = await settingsOf(world)
  const found = findPairings({
    shelf: shelfFoods(shelf, world),
    targetG: settings.targetG ?? 35,
    servings,
    foodsAtMost: settings.foodsAtMost,
    basis,
    without: settings.without,
    allow: { eggs: settings.eggs, dairy: settings.dairy },
    energyAtMostKcal: settings.energyAtMostKcal,
    massAtMostG: settings.massAtMostG,
    pairings: Math.max(3, which),
  })
  const pairing = found.pairings[which - 1]
  if (!found.reached || pairing === undefined) {
    throw new Refusal(
      found.reason ?? `${label} gives ${found.pairings.length} pairings; there is no number ${which}`,
      NO_ANSWER,
    )
  }
  return { score: pairing.score, err: `pairing ${which} from ${label}\n` }
}
