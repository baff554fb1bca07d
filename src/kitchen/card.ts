import type { AllergenId } from '../foods/allergens.ts'
import type { Food } from '../foods/food.ts'
import { plainText } from '../foods/plain-text.ts'
import { STAVE_NAMES, STAVES, type Stave } from '../nutrition/amino-acids.ts'
import type { PlateScore } from '../nutrition/plate-score.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import { aboutMass, formatAmount, type Units } from './amounts.ts'
import { type Caution, cautionsFor, FULL_NOTE } from './cautions.ts'
import { stepBack } from './conditions.ts'
import type { CookingMethod, KitchenFile, StorageText } from './kitchen-file.ts'
import { loadKitchen } from './load.ts'
import { type KnownSum, mineralsOf } from './minerals.ts'
import { clockText, minutesOfDay, type Step, type ToCook, timeline } from './timeline.ts'
import { dryFor } from './yields.ts'

/**
 * The sheet for the kitchen: from a scored plate to what to weigh out, when to begin what, and what to mind. Pure;
 * the renderers (card-text, card-markdown, card-json, card-html) take the card.
 *
 *     const card = cardOf({ score, servings: 6, eatAt: '19:00', settings: { units: 'metric', conditions: [] } })
 */
export interface CardRequest {
  /** the plate of one serving */
  score: PlateScore<Food>
  servings: number
  /** clock time of the meal, HH:MM, or null: then times are counted back from the meal */
  eatAt: string | null
  settings: { units: Units; conditions?: readonly string[] }
  /** the meal goes into boxes for later */
  boxed?: boolean
  /** the line on vitamin B12, where it is due today (vitamin-b12.ts) */
  b12?: { text: string; source: string } | null
}

export interface TakenFood {
  food: Food
  gramsPerServing: number
  gramsInAll: number
  /** the amount for all servings, as the cook has the food */
  amount: string
  /** for a food weighed cooked: how much to boil for it */
  fromDry: string | null
  proteinG: number
}

export interface TimedStep extends Step {
  /** when, as a clock time or as a time before the meal */
  when: string
  /** the earliest that it may begin, or null */
  notBefore: string | null
}

export interface Card {
  servings: number
  eatAt: string | null
  units: Units
  take: TakenFood[]
  steps: TimedStep[]
  /** foods that need no cooking, or that no method is known for */
  asItIs: Food[]
  score: PlateScore<Food>
  /** false: the person prefers to see no figures; renderers leave them out */
  numbers: boolean
  staveWords: string
  iron: KnownSum
  zinc: KnownSum
  phytate: KnownSum
  /** mol phytate to 1 mol zinc; null where it cannot be told */
  phytateZincRatio: number | null
  /** the phytate of some food is not known, so the ratio is that much or more */
  phytateZincAtLeast: boolean
  allergens: AllergenId[]
  cautions: Caution[]
  /** notes by what the settings tell of the person */
  notes: { id: string; text: string; source: string }[]
  storage: StorageText[]
  standingNote: string
}

/** Works the card out. `servings` is at least 1; a clock time that is none is refused by `cardProblem`. */
export function cardOf(request: CardRequest, kitchen: KitchenFile = loadKitchen()): Card {
  const { score, servings, settings } = request
  const eatAtMin = request.eatAt === null ? null : minutesOfDay(request.eatAt)
  const portions: Portion<Food>[] = score.items.filter(({ grams }) => grams > 0)
  const foods = portions.map(({ food }) => food)
  const conditions = settings.conditions ?? []
  const back = stepBack(conditions, undefined, kitchen.conditions)
  const toCook = portions.flatMap(({ food, grams }): ToCook[] => {
    const method = methodOf(food, kitchen)
    return method === null ? [] : [{ food, grams: grams * servings, method }]
  })
  const steps = timeline(toCook, settings.units).map(step => ({
    ...step,
    when: clockText(step.minutesBefore, eatAtMin),
    notBefore: step.earliestBefore === null ? null : clockText(step.earliestBefore, eatAtMin),
  }))
  return {
    servings,
    eatAt: eatAtMin === null ? null : clockText(0, eatAtMin),
    units: settings.units,
    take: score.items
      .filter(({ grams }) => grams > 0)
      .map(({ food, grams, proteinG }) => ({
        food,
        gramsPerServing: grams,
        gramsInAll: grams * servings,
        amount: formatAmount(food, grams * servings, settings.units, kitchen.yields),
        fromDry: fromDry(food, grams * servings, settings.units, kitchen),
        proteinG,
      })),
    steps,
    asItIs: foods.filter(food => !toCook.some(cook => cook.food.id === food.id)),
    score,
    numbers: back.numbers,
    staveWords: stavesInWords(score),
    ...mineralsOf(portions),
    allergens: [...new Set(foods.flatMap(({ allergens }) => allergens))],
    cautions: cautionsFor(foods, { conditions, boxed: request.boxed ?? false, portions }, kitchen.cautions),
    notes: [...back.notes, ...(request.b12 ? [{ id: 'vitamin-b12', ...request.b12 }] : [])],
    storage: storageOf(foods, kitchen),
    standingNote: FULL_NOTE,
  }
}

/** Why no card can be made of a request, in one line, or null. */
export function cardProblem(
  request: Pick<CardRequest, 'servings' | 'eatAt'> & { score: Pick<PlateScore<Food>, 'items'> },
): string | null {
  if (!request.score.items.some(({ grams }) => grams > 0)) return 'the plate is empty; put a food on it first'
  const { servings, eatAt } = request
  if (!(Number.isInteger(servings) && servings >= 1 && servings <= 1000))
    return `${plainText(String(servings)).slice(0, 20)} servings: give a whole number from 1 to 1000`
  if (eatAt !== null && minutesOfDay(eatAt) === null)
    return `"${plainText(eatAt).slice(0, 20)}" is no time of day; write it as 19:30`
  return null
}

function methodOf(food: Food, kitchen: KitchenFile): CookingMethod | null {
  const id = kitchen.cookingOf[food.id]
  const method = id === undefined ? undefined : kitchen.cooking.find(row => row.id === id)
  return method === undefined || method.heat === 'none' ? null : method
}

function fromDry(food: Food, grams: number, units: Units, kitchen: KitchenFile): string | null {
  const dry = dryFor(food, grams, kitchen.yields)
  return dry === null ? null : `${aboutMass(dry.grams, units)} ${dry.state}`
}

/** The shortest staves in a sentence, and that the others reach the pattern where they do. */
export function stavesInWords({ staves, pattern }: Pick<PlateScore<Food>, 'staves' | 'pattern'>): string {
  if (staves === null) return 'There is no protein on this plate to score.'
  const short = STAVES.filter(stave => staves[stave] < 100).sort((a, b) => staves[a] - staves[b])
  const say = (stave: Stave) => `${STAVE_NAMES[stave]} (${Math.floor(staves[stave])} %)`
  const against = `Pattern: ${pattern.name}.`
  const [first, ...more] = short
  if (first === undefined) {
    const least = STAVES.reduce((a, b) => (staves[b] < staves[a] ? b : a))
    return `Every amino acid reaches the pattern; ${say(least)} has the least to spare. ${against}`
  }
  const shortest = `Shortest: ${STAVE_NAMES[first]}, ${Math.floor(staves[first])} % of the pattern`
  const also = more.length === 0 ? '' : `; also short: ${more.map(say).join(', ')}`
  const others = more.length === STAVES.length - 1 ? '' : '; the others reach it'
  return `${shortest}${also}${others}. ${against}`
}

/** How to keep what is left, by what is on the plate: the strictest first. */
function storageOf(foods: readonly Food[], { storage }: KitchenFile): StorageText[] {
  const wanted = [
    foods.some(({ role, state }) => role === 'grain' && state !== 'product' && state !== 'baked')
      ? 'grain'
      : null,
    foods.some(({ role }) => role === 'pulse' || role === 'soy') ? 'pulse' : 'other',
    'cool',
    'reheat',
    foods.some(({ state }) => state === 'canned') ? 'can' : null,
  ]
  return wanted.flatMap(id => storage.filter(text => text.id === id))
}
