import type { Food } from '../foods/food.ts'
import { approximate, fractionText, roundToOneOf } from './fractions.ts'
import type { FoodYield } from './kitchen-file.ts'
import { loadKitchen } from './load.ts'
import { measureText } from './measures.ts'
import { cookedFrom } from './yields.ts'

/**
 * An amount as the cook has it in hand, rounded to what a scale or spoon can do.
 *
 *     formatAmount(lentilsBrownDry, 95, 'metric')   // '95 g dry = 1/2 cup, about 250 g boiled'
 *     formatAmount(lentilsBrownDry, 95, 'us')       // '3 1/4 oz dry = 1/2 cup, about 8 3/4 oz boiled'
 */
export type Units = 'metric' | 'us'

/** g in one avoirdupois ounce (exact). Source: international yard and pound agreement, 1959. */
export const G_PER_OZ = 28.349523125
const OZ_PER_LB = 16

/** States that are said with the grams, because the food is weighed in another state than it is eaten. */
const SAID: Partial<Record<Food['state'], string>> = { dry: 'dry', dried: 'dried' }

export function formatAmount(
  food: Pick<Food, 'id' | 'state' | 'measures' | 'stepG'>,
  grams: number,
  units: Units,
  yields: readonly FoodYield[] = loadKitchen().yields,
): string {
  const weight = massText(grams, units, food.stepG)
  const state = SAID[food.state]
  const measure = measureText(food, grams)
  let text = state === undefined ? weight : `${weight} ${state}`
  if (measure !== null) text += measure.startsWith('about') ? `, ${measure}` : ` = ${measure}`
  const cooked = cookedFrom(food, grams, yields)
  if (cooked !== null) text += `, ${aboutMass(cooked.grams, units)} ${cooked.state}`
  return text
}

/** A weight that a kitchen scale shows: grams in steps (5 g, or 1 g), kg above 1000 g; or ounces in quarters, pounds above 16. */
export function massText(grams: number, units: Units, stepG: 1 | 5 = 1): string {
  if (units === 'us') return ouncesText(grams)
  const rounded = grams < 10 ? roundTo(grams, grams < 1 ? 0.1 : 0.5) : roundTo(grams, grams < 50 ? 1 : stepG)
  if (rounded === 0) return 'under 0.1 g'
  return rounded < 1000 ? `${rounded} g` : `${Number((rounded / 1000).toFixed(rounded < 10_000 ? 2 : 1))} kg`
}

/** A weight that is only an estimate: to 5 g below 100 g, to 10 g below 1 kg, then to 50 g; with `about`. */
export function aboutMass(grams: number, units: Units): string {
  if (units === 'us') return approximate(ouncesText(grams), true)
  const step = grams < 100 ? 5 : grams < 1000 ? 10 : 50
  return approximate(massText(Math.max(step, roundTo(grams, step)), 'metric'), true)
}

function ouncesText(grams: number): string {
  const ounces = grams / G_PER_OZ
  const rounded = roundToOneOf(ounces, [0, 1 / 4, 1 / 2, 3 / 4])
  if (rounded.value === 0) return 'under 1/4 oz'
  if (rounded.value < OZ_PER_LB) return `${fractionText(rounded)} oz`
  // Above a pound a quarter ounce no longer matters.
  const whole = Math.round(ounces)
  const rest = whole % OZ_PER_LB
  return `${Math.floor(whole / OZ_PER_LB)} lb${rest === 0 ? '' : ` ${rest} oz`}`
}

/** Litres or cups of water, rounded to what a jug shows. One US cup is 236.6 ml. */
export function waterText(millilitres: number, units: Units): string {
  if (units === 'us') {
    const cups = roundToOneOf(
      millilitres / ML_PER_CUP,
      millilitres < 4 * ML_PER_CUP ? [0, 1 / 4, 1 / 2, 3 / 4] : [0, 1 / 2],
    )
    if (cups.value < 12)
      return `${fractionText(cups.value === 0 ? { whole: 0, part: 1 / 4, value: 1 / 4 } : cups)} ${cups.value > 1 ? 'cups' : 'cup'}`
    return `${Math.round(millilitres / (4 * ML_PER_CUP))} quarts`
  }
  if (millilitres < 950) return `${Math.max(50, roundTo(millilitres, millilitres < 300 ? 25 : 50))} ml`
  return `${Number(roundTo(millilitres / 1000, millilitres < 3000 ? 0.1 : 0.5).toFixed(1))} litres`.replace(
    /^1 litres/,
    '1 litre',
  )
}
/** ml in the US customary cup (half a liquid pint; exact 236.588). */
export const ML_PER_CUP = 236.5882365

const roundTo = (value: number, step: number): number => Number((Math.round(value / step) * step).toFixed(6))
