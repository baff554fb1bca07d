import type { Food } from '../foods/food.ts'
import { plainText } from '../foods/plain-text.ts'
import { planningRefusal } from '../kitchen/conditions.ts'
import { cookedFrom } from '../kitchen/yields.ts'
import { STAVE_NAMES } from '../nutrition/amino-acids.ts'
import { diaasOf } from '../nutrition/diaas.ts'
import { type Complement, complementsOf, inParts } from '../pairing/complement.ts'
import { grams, signed, wholeScore } from '../tui/text/figures.ts'
import { inColumns, wrapLines } from '../tui/text/lines.ts'
import { readArguments, readNumber } from './arguments.ts'
import { careJson, careLines } from './care.ts'
import { answer, type Command, jsonText, NO_ANSWER, Refusal } from './command.ts'
import { settingsOf } from './kept-settings.ts'
import { readPlanningPattern, readWithout } from './options.ts'
import { chosenShelf, namedFood, shelfFoods } from './shelf-source.ts'
import { styleOf } from './text/style.ts'

export const complement: Command = {
  name: 'complement',
  summary: 'what mends one food best, and in what proportion',
  help: `
complement ID [--shelf FILE] [--without A] [...]

  shortstave complement lentils-red-boiled
  shortstave complement "white rice" --shelf galley.csv

The partners that raise a food's DIAAS most, the best of each kind first, in the proportion by cooked weight that does
it in portions a person eats; the grams are as the names say, so a dry food's are dry. From the whole table, or a shelf.
  --shelf FILE     only from this shelf (- reads standard input; "mine" is the shelf you keep)
  --without A      leave out foods with an allergen (may be given again)
  --eggs, --dairy  allow them; otherwise plants alone
  --most N         at most so many partners (8)
  --pattern ID     the scoring pattern (fao-2013-over-3y)
  --age YEARS      the eater's age; nothing is planned for a child under three
  --json           the answer as JSON`,
  async run(argv, world) {
    const kinds = {
      shelf: 'text',
      without: 'texts',
      eggs: 'flag',
      dairy: 'flag',
      most: 'text',
      pattern: 'text',
      age: 'text',
      json: 'flag',
    } as const
    const { options, words } = readArguments('complement', kinds, argv)
    if (words.length === 0)
      throw new Refusal('complement needs a food, such as: shortstave complement lentils-red-boiled')
    const food = namedFood(words.join(' '), world)
    const age = readNumber('--age', options.age, { least: 0, most: 120, unit: 'years' })
    const settings = await settingsOf(world)
    const pattern = readPlanningPattern(world.table(), options.pattern ?? settings.pattern, age)
    const refusal = planningRefusal({ conditions: settings.conditions, age, pattern })
    if (refusal !== null) throw new Refusal(refusal, NO_ANSWER)
    const count =
      readNumber('--most', options.most, { least: 1, most: 50, unit: 'partners', whole: true }) ?? 8
    const shelf =
      options.shelf === undefined
        ? null
        : await chosenShelf(options.shelf === 'mine' ? undefined : options.shelf, world)
    const label = shelf?.label ?? 'the whole table'
    const partners =
      shelf === null
        ? world.table().foods
        : shelfFoods(shelf.shelf, world)
            .filter(({ mark }) => mark !== 'hold-back')
            .map(item => item.food)
    const found = complementsOf(food, partners, {
      pattern,
      without: [...new Set([...settings.without, ...readWithout(options.without)])],
      allow: { eggs: options.eggs || settings.eggs, dairy: options.dairy || settings.dairy },
      count,
      perRole: 2,
    })
    const own = diaasOf([{ food, grams: 100 }], pattern)
    const foods = [food, ...found.map(partner => partner.food)]
    if (options.json) {
      const out = jsonText({
        food: food.id,
        name: food.name,
        pattern: pattern.id,
        diaas_alone: own.diaas,
        limiting: own.limiting,
        complements: found.map(partner => complementJson(food, partner)),
        ...careJson(foods),
      })
      return { code: found.length === 0 ? NO_ANSWER : 0, out, err: '' }
    }
    const style = styleOf(world.colour)
    const short =
      own.limiting === null
        ? 'It has no protein to score.'
        : `Alone: DIAAS ${wholeScore(own.diaas)}, short of ${STAVE_NAMES[own.limiting]}.`
    const lines = [style.bold(food.name), ...wrapLines(short, world.columns)]
    if (found.length === 0) {
      const reason =
        own.diaas !== null && own.diaas >= 100
          ? 'Nothing is short in it, so nothing mends it.'
          : `Nothing from ${plainText(label)} raises it.`
      return { code: NO_ANSWER, out: `${lines.join('\n')}\n${reason}\n`, err: '' }
    }
    lines.push(`From ${plainText(label)}, by cooked weight:`, '')
    const rows = found.map(partner => [
      partner.food.name,
      partsText(food, partner),
      `${grams(partner.example.foodG)} + ${grams(partner.example.partnerG)}`,
      `DIAAS ${wholeScore(partner.diaas)}`,
      signed(partner.mends),
      Math.round(partner.diaas) >= 100 ? 'nothing short' : `short of ${partner.limiting}`,
    ])
    lines.push(...inColumns(rows, [4]), '')
    lines.push(
      ...wrapLines(
        `"3 : 1" is three parts of ${plainText(food.name)} to one of the partner, weighed as eaten: a dry food once cooked. The grams are an example as the names say${dryAmong(found, food) ? ', so dry foods dry' : ''}. The last columns: what the mixture scores, by how much that is above the food alone, and which stave is its shortest.`,
        world.columns,
      ),
      ...careLines(foods, world.columns),
    )
    return answer(`${lines.join('\n')}\n`)
  },
}

/** What 1 g of a food weighs on the plate: more than 1 g for one that takes up water when cooked. */
const cookedG = (food: Food): number => cookedFrom(food, 1)?.grams ?? 1

const cookedRatio = (food: Food, partner: Complement): number =>
  (partner.ratio * cookedG(partner.food)) / cookedG(food)

const dryAmong = (found: readonly Complement[], food: Food): boolean =>
  [food, ...found.map(partner => partner.food)].some(of => cookedG(of) !== 1)

function partsText(food: Food, partner: Complement): string {
  const parts = inParts(cookedRatio(food, partner))
  return `${parts.food} : ${parts.partner}`
}

function complementJson(food: Food, partner: Complement) {
  return {
    food: partner.food.id,
    name: partner.food.name,
    grams_per_gram: partner.ratio,
    cooked_grams_per_gram: cookedRatio(food, partner),
    example_food_g: partner.example.foodG,
    example_partner_g: partner.example.partnerG,
    diaas: partner.diaas,
    limiting: partner.limiting,
    lift: partner.lift,
    mends: partner.mends,
  }
}
