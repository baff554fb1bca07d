import type { Food } from '../foods/food.ts'
import { ML_PER_CUP, massText, type Units, waterText } from './amounts.ts'
import type { CookingMethod } from './kitchen-file.ts'
import { cupOf } from './measures.ts'

/**
 * When to begin what, counted back from the meal, so that everything is ready together.
 *
 *     timeline([{ food: kidneyBeansDry, grams: 300, method }], 'metric')
 *     // [{ minutesBefore: 620, ... soak }, { minutesBefore: 140, ... put on }, { minutesBefore: 130, ... boil hard }]
 */
export interface Step {
  /** minutes before the meal at which it begins, at the latest */
  minutesBefore: number
  /** minutes before the meal at which it may begin at the earliest; null: then */
  earliestBefore: number | null
  kind: 'soak' | 'put on' | 'boil hard' | 'cook' | 'rest'
  foodId: string
  food: string
  text: string
}

export interface ToCook {
  food: Food
  /** for all servings together */
  grams: number
  method: CookingMethod
}

/** Minutes that a pot for a few servings takes to come to the boil, and to rinse what goes in: common practice. */
const TO_THE_BOIL_MIN = 10
const RINSE_MIN = 5
/** ml water for soaking, as parts of the food's volume: common practice */
const SOAK_PARTS = 3
/** g in a cup of dry pulses or grain where the food has no cup of its own: the middle of USDA SR28's, 160-207 g */
const USUAL_CUP_G = 190

/** The steps of all foods, the earliest first. */
export function timeline(toCook: readonly ToCook[], units: Units): Step[] {
  return toCook
    .flatMap(cook => stepsOf(cook, units))
    .sort(
      (a, b) => b.minutesBefore - a.minutesBefore || (a.foodId < b.foodId ? -1 : a.foodId > b.foodId ? 1 : 0),
    )
}

function stepsOf({ food, grams, method }: ToCook, units: Units): Step[] {
  const steps: Step[] = []
  const add = (
    kind: Step['kind'],
    minutesBefore: number,
    text: string,
    earliestBefore: number | null = null,
  ) => steps.push({ kind, minutesBefore, earliestBefore, foodId: food.id, food: food.name, text })
  const amount = massText(grams, units, food.stepG)
  const cookAt = method.restMin + method.cookMinMost
  const wet = method.heat === 'simmer' || method.heat === 'soak'
  const putOnAt = cookAt + (wet ? TO_THE_BOIL_MIN : 0)
  const soaked = method.soakHLeast > 0

  if (soaked) {
    const rinsedAt = putOnAt + RINSE_MIN
    const fridge = method.soakHMost > 8 ? '; longer than 8 h in the fridge' : ''
    add(
      'soak',
      rinsedAt + method.soakHLeast * 60,
      `soak ${amount} in ${waterFor(SOAK_PARTS, food, grams, units)} of water, ${range(method.soakHLeast, method.soakHMost, 'h')}${fridge}`,
      rinsedAt + method.soakHMost * 60,
    )
  }
  if (wet && method.cookMinMost + method.restMin > 0) {
    const first = soaked ? 'throw the soaking water away, rinse, ' : method.rinse ? 'rinse, ' : ''
    const at = putOnAt + (first === '' ? 0 : RINSE_MIN)
    add('put on', at, `${first}${putOn(food, grams, method, amount, units)}`)
  }
  if (method.hardBoilMin > 0) {
    add('boil hard', cookAt, `boil hard for ${method.hardBoilMin} min, lid off; then let it simmer`)
    const pressure =
      method.pressureMin === null
        ? ''
        : `; or ${method.pressureMin} min in a pressure cooker after the soak, the pressure falling by itself`
    add('cook', cookAt - method.hardBoilMin, cooking(method, 'simmer on') + pressure + sentence(method.note))
  } else if (method.heat === 'soak' && method.cookMinMost === 0) {
    add('rest', method.restMin, `off the heat, covered, ${method.restMin} min${sentence(method.note)}`)
    return steps
  } else if (method.cookMinMost > 0) {
    const words = {
      simmer: 'simmer',
      soak: 'simmer',
      warm: `warm ${amount}`,
      bake: `bake ${amount}`,
      fry: `cook ${amount}`,
      none: '',
    }
    const pressure =
      method.pressureMin === null
        ? ''
        : `; or ${method.pressureMin} min in a pressure cooker${soaked ? ' after the soak' : ''}`
    const sooner =
      !soaked && method.soakHMost > 0 ? `; sooner after a soak of up to ${hoursText(method.soakHMost)}` : ''
    add('cook', cookAt, cooking(method, words[method.heat]) + pressure + sooner + sentence(method.note))
  }
  if (method.restMin > 0) {
    const drained = method.water === 'drain' ? 'drain; ' : ''
    add('rest', method.restMin, `${drained}off the heat, covered, ${method.restMin} min`)
  }
  return steps
}

function putOn(food: Food, grams: number, method: CookingMethod, amount: string, units: Units): string {
  if (method.heat === 'soak')
    return method.waterRatio === null
      ? `boil water to cover ${amount}`
      : `boil ${waterFor(method.waterRatio, food, grams, units)} of water for ${amount}`
  if (method.waterRatio === null) return `bring plenty of water to the boil for ${amount}`
  const fresh = method.soakHLeast > 0 ? ' fresh' : ''
  return `put ${amount} on in ${waterFor(method.waterRatio, food, grams, units)} of${fresh} water (1 to ${method.waterRatio} by volume)`
}

/** `simmer, 60-120 min in all; drain`. */
function cooking(method: CookingMethod, word: string): string {
  const whole = method.hardBoilMin > 0 ? ' in all' : ''
  const taken = method.water === 'absorb' && method.heat === 'simmer' ? ', until the water is taken up' : ''
  const drained = method.water === 'drain' && method.restMin === 0 ? ', then drain' : ''
  return `${word}, ${range(method.cookMinLeast, method.cookMinMost, 'min')}${whole}${taken}${drained}`
}

const hoursText = (hours: number): string => (hours < 1 ? `${hours * 60} min` : `${hours} h`)

const sentence = (note: string): string => (note === '' ? '' : `; ${note}`)

const range = (least: number, most: number, unit: string): string =>
  least === most || least === 0 ? `${most} ${unit}` : `${least}-${most} ${unit}`

function waterFor(parts: number, food: Food, grams: number, units: Units): string {
  return waterText((parts * grams * ML_PER_CUP) / (cupOf(food) ?? USUAL_CUP_G), units)
}

/** The whole minutes of a clock time `HH:MM` since midnight, or null for what is none. */
export function minutesOfDay(clock: string): number | null {
  const match = /^\s*([01]?\d|2[0-3])[:.h]([0-5]\d)\s*$/.exec(clock)
  return match === null ? null : Number(match[1]) * 60 + Number(match[2])
}

/**
 * The clock time so many minutes before the meal, to the 5 minutes before; a day earlier is said. Without a time for
 * the meal: how long before it.
 *
 * @example clockText(620, 19 * 60) is `08:40`; clockText(1200, 19 * 60) is `23:00 the day before`
 */
export function clockText(minutesBefore: number, eatAtMin: number | null): string {
  if (eatAtMin === null) return minutesBefore === 0 ? 'the meal' : `${durationText(minutesBefore)} before`
  const at = Math.floor((eatAtMin - minutesBefore) / 5) * 5
  const days = Math.floor(at / 1440)
  const inDay = at - days * 1440
  const text = `${String(Math.floor(inDay / 60)).padStart(2, '0')}:${String(inDay % 60).padStart(2, '0')}`
  if (days === 0) return text
  return days === -1 ? `${text} the day before` : `${text}, ${-days} days before`
}

/** `1 h 35 min`. */
export function durationText(minutes: number): string {
  const rounded = Math.ceil(minutes / 5) * 5
  const [hours, rest] = [Math.floor(rounded / 60), rounded % 60]
  if (hours === 0) return `${rest} min`
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`
}
