import type { Food, Role, State } from './food.ts'

const COOKED_FIRST: readonly State[] = [
  'boiled',
  'canned',
  'product',
  'baked',
  'dry',
  'raw',
  'roasted',
  'frozen',
]
const RAW_FIRST: readonly State[] = ['raw', 'boiled', 'product', 'dried', 'frozen', 'canned', 'roasted']
const PRODUCT_FIRST: readonly State[] = ['product', 'raw', 'fermented', 'boiled', 'dry', 'roasted', 'canned']

/** The state that is meant where none is said, by role: pulses, grains and roots as eaten, nuts and leaves raw. */
const STATE_MEANT: Readonly<Record<Role, readonly State[]>> = {
  pulse: COOKED_FIRST,
  soy: PRODUCT_FIRST,
  grain: COOKED_FIRST,
  'nut-seed': ['raw', 'dry', 'product', 'dried', 'roasted'],
  powder: ['powder', 'product', 'flour'],
  root: COOKED_FIRST,
  vegetable: RAW_FIRST,
  leaf: RAW_FIRST,
  mushroom: RAW_FIRST,
  fruit: RAW_FIRST,
  seaweed: ['dried', 'dry', 'raw', 'product'],
  yeast: PRODUCT_FIRST,
  seasoning: PRODUCT_FIRST,
  'fat-sugar': PRODUCT_FIRST,
  egg: ['raw', 'boiled', 'product'],
  dairy: PRODUCT_FIRST,
  'meat-fish': RAW_FIRST,
}
const LAST = 8

/** 0 for the state that a cook means where none is said, more for others; of a kin, that of its first answer. */
export function stateRank(food: Food): number {
  const place = placeOfState(food)
  return place < LAST && food.firstFor.length > 0 ? 0 : place
}

function placeOfState(food: Food): number {
  const place = STATE_MEANT[food.role].indexOf(food.state)
  return place < 0 ? LAST : place
}

/** Is the state one that nobody means without saying so: flour of a pulse, sprouts? */
export function isUnusualState(food: Food): boolean {
  return placeOfState(food) === LAST
}

/**
 * A little for foods that stand in every kitchen, to part equals: those that are the first answer to a bare word,
 * short names before long ones, plants before what is only for comparison. 0 to 0.06.
 */
export function everydayness(food: Food): number {
  const first = food.firstFor.length > 0 ? 0.02 : 0
  const plant = food.place === 'comparator' ? 0 : food.origin === 'plant' ? 0.015 : 0.01
  const short = 0.02 * Math.max(0, 1 - food.name.length / 60)
  return first + plant + short
}
