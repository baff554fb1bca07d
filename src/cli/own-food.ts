import type { AllergenId } from '../foods/allergens.ts'
import type { Food } from '../foods/food.ts'
import {
  editOwnFood,
  madeOf,
  type OwnFood,
  type OwnFoodInput,
  ownFoodOf,
  ownFoodToFood,
  usesOfOwnFood,
} from '../foods/own-food.ts'
import { plainText } from '../foods/plain-text.ts'
import { readParts } from '../foods/protein-parts.ts'
import { sourceByWords } from '../foods/source-by-words.ts'
import { readArguments, readNumber } from './arguments.ts'
import { NO_ANSWER, type Outcome, Refusal, type World } from './command.ts'
import { openStore } from './kept.ts'
import { readWithout } from './options.ts'
import { idOf, ownFoodsIn } from './own-foods.ts'

const KINDS = {
  per: 'text',
  protein: 'text',
  energy: 'text',
  fat: 'text',
  carbohydrate: 'text',
  fibre: 'text',
  salt: 'text',
  'made-of': 'text',
  measure: 'texts',
  contains: 'texts',
  name: 'text',
  yes: 'flag',
  json: 'flag',
} as const
type Options = ReturnType<typeof readArguments<typeof KINDS>>['options']

/** Sodium in 1 g of salt, mg (Regulation (EU) No 1169/2011: salt = sodium x 2.5, by the other way the pure salt's 393). */
const SODIUM_MG_PER_G_SALT = 393

/** `food add`, `food edit` and `food remove`. */
export async function changeOwnFoods(
  verb: 'add' | 'edit' | 'remove',
  argv: string[],
  world: World,
): Promise<Outcome> {
  const { options, words } = readArguments('food', KINDS, argv)
  const name = words.join(' ')
  if (name.trim() === '')
    throw new Refusal(
      `food ${verb} needs ${verb === 'add' ? 'a name' : 'the id of an own food'}; see shortstave food --help`,
    )
  const store = await openStore(world.env)
  const { document } = await store.read()
  const own = ownFoodsIn(document.ownFoods)
  if (verb === 'add') {
    const { input, words: assumed } = inputOf(options, world)
    const missing = (['protein', 'energy', 'made-of'] as const).filter(
      option => options[option] === undefined,
    )
    if (missing.length > 0)
      throw new Refusal(
        `food add needs ${missing.map(option => `--${option}`).join(' and ')}, as the label says`,
      )
    const reading = ownFoodOf(
      { ...(input as OwnFoodInput), name },
      world.table(),
      own.map(({ id }) => id),
    )
    return keep(reading, (food, kept) => [...kept, food], assumed)
  }
  const known = own.find(({ id, name: called }) => id === name || called.toLowerCase() === name.toLowerCase())
  if (known === undefined) {
    const there = own.length === 0 ? 'you keep none' : `you keep ${own.map(({ id }) => id).join(', ')}`
    throw new Refusal(`there is no own food "${plainText(name).slice(0, 60)}"; ${there}`)
  }
  const uses = usesOfOwnFood(
    known.id,
    document.shelf.items,
    document.plates.map(({ day, portions }) => ({
      name: `the plate of ${day}`,
      foods: portions.map(({ food }) => food),
    })),
  )
  if (verb === 'edit') {
    const { input, words: assumed } = inputOf(options, world)
    const changes = options.name === undefined ? input : { ...input, name: options.name }
    const reading = editOwnFood(known, changes, world.table())
    return keep(
      reading,
      (food, kept) => kept.map(other => (idOf(other) === food.id ? food : other)),
      uses === null ? assumed : [...assumed, `note: ${uses}`],
    )
  }
  if (uses !== null && !options.yes)
    throw new Refusal(`${known.name}: ${uses}; add --yes to remove it all the same`)
  const kept = await store.setOwnFoods(before => before.filter(other => idOf(other) !== known.id))
  return {
    code: kept.saved ? 0 : NO_ANSWER,
    out: '',
    err: `${plainText(kept.problem ?? `${known.name} is removed`)}\n`,
  }

  async function keep(
    reading: ReturnType<typeof ownFoodOf>,
    withFood: (food: OwnFood, kept: readonly unknown[]) => unknown[],
    assumed: string[],
  ): Promise<Outcome> {
    if (!reading.ok) throw new Refusal(reading.problems.join('; '))
    const kept = await store.setOwnFoods(before => withFood(reading.own, before))
    const food: Food = ownFoodToFood(reading.own, world.table())
    const lines = [
      ...assumed,
      `${food.name} is kept as ${food.id}: ${food.per100g.proteinG.toFixed(1)} g protein / 100 g. ${madeOf(reading.own, world.table())}`,
      ...(kept.problem === null ? [] : [kept.problem]),
    ]
    return { code: kept.saved ? 0 : NO_ANSWER, out: '', err: `${lines.map(plainText).join('\n')}\n` }
  }
}

/** What the options say of a food, with words on what was assumed. */
function inputOf(options: Options, world: World): { input: Partial<OwnFoodInput>; words: string[] } {
  const figure = (
    option: 'per' | 'protein' | 'energy' | 'fat' | 'carbohydrate' | 'fibre' | 'salt',
    most: number,
    unit: string,
  ) => readNumber(`--${option}`, options[option], { least: option === 'per' ? 0.1 : 0, most, unit })
  const perG = figure('per', 2000, 'g')
  const proteinG = figure('protein', 2000, 'g')
  const salt = figure('salt', 1000, 'g')
  const input: Record<string, unknown> = {
    perG: perG ?? (proteinG === undefined ? undefined : 100),
    proteinG,
    kcal: figure('energy', 20_000, 'kcal'),
    fatG: figure('fat', 2000, 'g'),
    carbohydrateG: figure('carbohydrate', 2000, 'g'),
    fibreG: figure('fibre', 2000, 'g'),
    sodiumMg: salt === undefined ? undefined : salt * SODIUM_MG_PER_G_SALT,
    allergens:
      options.contains.length === 0 ? undefined : (readWithout(options.contains) satisfies AllergenId[]),
    measures: options.measure.length === 0 ? undefined : options.measure.map(measureOf),
  }
  const words: string[] = []
  if (options['made-of'] !== undefined) {
    const concentrated = proteinG !== undefined && proteinG / (perG ?? 100) >= 0.5
    const parts = readParts(options['made-of'], sourceByWords(world.finder()), { concentrated })
    if (!parts.ok) throw new Refusal(`--made-of: ${parts.problem}`)
    input.parts = parts.parts
    input.sharesKnown = parts.sharesKnown
    if (parts.assumed.length > 0)
      words.push(
        `words that may mean others too were taken for: ${parts.assumed.map(({ name }) => name).join('; ')}`,
      )
    if (!parts.sharesKnown)
      words.push('the label gives no shares: they are taken as equal, and the band is wider')
  }
  return {
    input: Object.fromEntries(Object.entries(input).filter(([, value]) => value !== undefined)),
    words,
  }
}

function measureOf(text: string): { name: string; grams: number } {
  const match = /^\s*(\S.*?)\s*=\s*([\d.,]+)\s*g?\s*$/.exec(plainText(text))
  const grams = Number(match?.[2]?.replace(',', '.'))
  if (match === null || !(grams > 0))
    throw new Refusal(`--measure ${plainText(text).slice(0, 40)}: write it as "1 scoop = 30"`)
  return { name: match[1]!, grams }
}
