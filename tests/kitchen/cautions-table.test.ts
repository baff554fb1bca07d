import { describe, expect, test } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { cautionsFor } from '../../src/kitchen/cautions.ts'
import { loadKitchen } from '../../src/kitchen/load.ts'

const { foods } = loadTable()
const named = (pattern: RegExp) => foods.filter(({ id }) => pattern.test(id))
const each = (pattern: RegExp, cautions: string[]) => {
  const found = named(pattern)
  expect(found.length, String(pattern)).toBeGreaterThan(0)
  for (const food of found)
    expect(
      food.cautions.some(id => cautions.includes(id)),
      food.id,
    ).toBe(true)
}

/** What is harmful if it is not said: pulses and roots raw, and what hurts some people. */
const RULES: [string, RegExp, string[]][] = [
  ['broad beans in every form', /^broad-beans/, ['favism']],
  [
    'dry beans of the kidney-bean kin',
    /^(kidney|cannellini|black|pinto|navy|great-northern|borlotti|pink|lima)-beans-dry$/,
    ['kidney-bean-raw', 'bean-raw'],
  ],
  ['dry broad and hyacinth beans', /^(broad|hyacinth)-beans-dry$/, ['bean-raw']],
  ['fresh beans of that kin', /^green-beans-raw$/, ['green-bean-raw']],
  ['dry soybeans and raw soy flour', /^(soybeans-dry|soy-flour-full-fat)$/, ['soy-raw']],
  ['sprouts', /sprout(ed|s-raw)/, ['sprouts']],
  ['cassava', /^cassava-raw$/, ['cassava-raw']],
  ['dry lupins', /^lupins-dry$/, ['lupin-bitter']],
  ['raw potatoes', /^potatoes-raw$/, ['potato-green']],
  [
    'whole nuts',
    /^(almonds|cashews|hazelnuts|walnuts|pecans|macadamias|brazil-nuts|peanuts-(raw|roasted))$/,
    ['choking-nuts'],
  ],
  ['Brazil nuts', /^brazil-nuts/, ['brazil-nut-selenium']],
  ['kelp', /^kelp/, ['kelp-iodine']],
  ['nori and wakame', /^(nori|wakame)/, ['seaweed-iodine']],
  ['rice, dry and boiled', /^rice-(white|brown)-(dry|boiled)$/, ['cooked-grain-cooling']],
  ['boiled pulses', /^(lentils-(brown|red|green)|chickpeas|kidney-beans)-boiled$/, ['cooked-pulse-cooling']],
  ['natto', /^natto$/, ['natto-vitamin-k']],
  ['kale and spinach', /^(kale|spinach)-(raw|boiled)$/, ['vitamin-k']],
  ['spinach', /^spinach-(raw|boiled)$/, ['oxalate']],
  ['flours of grain', /^(wheat|rye|barley|rice)-flour/, ['uncooked-flour']],
  ['poppy seed', /^poppy-seeds$/, ['poppy']],
  ['flaxseed', /^flax-seeds$/, ['flax-cyanide']],
]

describe('cautions over the whole table', () => {
  test.each(RULES)('%s', (_, pattern, cautions) => {
    each(pattern, cautions)
  })

  test('no grass pea, bitter almond, apricot kernel or hijiki in the table', () => {
    for (const { id, name, aliases } of foods) {
      expect([id, name, ...aliases].join(' ')).not.toMatch(
        /grass pea|khesari|bitter almond|apricot kernel|hijiki/i,
      )
    }
  })

  test('every caution that a food names has its text, and each food gives each once', () => {
    const known = new Set(loadKitchen().cautions.map(({ id }) => id))
    for (const food of foods) {
      for (const id of food.cautions) expect(known, `${food.id}: ${id}`).toContain(id)
      const said = cautionsFor([food, food]).map(({ id }) => id)
      expect(new Set(said).size).toBe(said.length)
    }
  })

  test('every dry pulse, soy food and grain has a way to cook it: none is left "as it is"', () => {
    const { cookingOf, cooking } = loadKitchen()
    for (const food of foods) {
      if (!['pulse', 'soy', 'grain'].includes(food.role) || food.state !== 'dry') continue
      expect(
        cooking.find(({ id }) => id === cookingOf[food.id]),
        food.id,
      ).toBeDefined()
    }
  })

  test('what calls for a hard boil gets one from its cooking method', () => {
    const { cookingOf, cooking } = loadKitchen()
    for (const food of foods) {
      if (!food.cautions.some(id => id === 'kidney-bean-raw' || id === 'bean-raw')) continue
      expect(
        cooking.find(({ id }) => id === cookingOf[food.id])!.hardBoilMin,
        food.id,
      ).toBeGreaterThanOrEqual(30)
    }
  })
})
