import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { readPortion } from '../../src/foods/read-portion.ts'
import { createFinder } from '../../src/foods/search.ts'
import { SMALL_TABLE } from './small-table.ts'

const finder = createFinder(SMALL_TABLE)

function understood(text: string): [id: string, grams: number, measure: string | null] {
  const reading = readPortion(text, finder)
  if (!reading.ok)
    throw new Error(`${reading.problem} [${reading.nearest.map(near => near.text).join(' | ')}]`)
  return [reading.food.id, Number(reading.grams.toFixed(2)), reading.measure]
}

describe('what is understood', () => {
  test.each<[string, string, number, string | null]>([
    // masses
    ['200 g lentils, boiled', 'lentils-brown-boiled', 200, null],
    ['200g lentils, boiled', 'lentils-brown-boiled', 200, null],
    ['lentils 200g', 'lentils-brown-boiled', 200, null],
    ['lentils, boiled, 200 g', 'lentils-brown-boiled', 200, null],
    ['lentils: 200 g', 'lentils-brown-boiled', 200, null],
    ['lentils - 200 g', 'lentils-brown-boiled', 200, null],
    ['lentils (200 g)', 'lentils-brown-boiled', 200, null],
    ['lentils 200 g boiled', 'lentils-brown-boiled', 200, null],
    ['- 200 g lentils', 'lentils-brown-boiled', 200, null],
    ['200 g of boiled lentils', 'lentils-brown-boiled', 200, null],
    ['500 gr potatoes', 'potatoes-boiled', 500, null],
    ['1 kg potatoes', 'potatoes-boiled', 1000, null],
    ['1,5 kg potatoes', 'potatoes-boiled', 1500, null],
    ['1.5kg raw potatoes', 'potatoes-raw', 1500, null],
    ['0,125 kg quinoa', 'quinoa-boiled', 125, null],
    ['8 oz tofu', 'tofu-firm', 226.8, null],
    ['1 lb potatoes', 'potatoes-boiled', 453.59, null],
    ['1 lb 4 oz potatoes', 'potatoes-boiled', 566.99, null],
    ['half a kilo of potatoes', 'potatoes-boiled', 500, null],
    ['half a pound of tofu', 'tofu-firm', 226.8, null],
    ['about 200 grams of cooked quinoa', 'quinoa-boiled', 200, null],
    ['200 GRAMS TOFU', 'tofu-firm', 200, null],
    ['200 g lentils-red-dry', 'lentils-red-dry', 200, null],
    ['lentils-red-dry 200 g', 'lentils-red-dry', 200, null],
    ['2 x 150 g tofu', 'tofu-firm', 300, null],
    ['2x150g tofu', 'tofu-firm', 300, null],
    ['2 × 150 g tofu', 'tofu-firm', 300, null],
    ['200 g chikpeas', 'chickpeas-boiled', 200, null],
    ['0.2 kg chickpeas', 'chickpeas-boiled', 200, null],
    ['500 mg tahini', 'tahini', 0.5, null],
    ['200 g tofu (firm)', 'tofu-firm', 200, null],
    ['\u001b[1m200 g\u001b[0m tofu', 'tofu-firm', 200, null],
    // volumes, by the food's own measures
    ['1 1/2 cups cooked brown rice', 'rice-brown-boiled', 292.5, '1 cup'],
    ['1-1/2 cups cooked brown rice', 'rice-brown-boiled', 292.5, '1 cup'],
    ['1½ cups cooked brown rice', 'rice-brown-boiled', 292.5, '1 cup'],
    ['one and a half cups cooked brown rice', 'rice-brown-boiled', 292.5, '1 cup'],
    ['½ cup dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['half a cup of dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['a half cup dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['1/2 a cup of dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['0.5 cup dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['.5 cup dry red lentils', 'lentils-red-dry', 96, '1 cup'],
    ['three quarters of a cup of quinoa', 'quinoa-boiled', 138.75, '1 cup'],
    ['2/3 cup quinoa', 'quinoa-boiled', 123.33, '1 cup'],
    ['2 tbsp tahini', 'tahini', 30, '1 tbsp'],
    ['2 tablespoons of tahini', 'tahini', 30, '1 tbsp'],
    ['tahini, 2 tbsp.', 'tahini', 30, '1 tbsp'],
    ['1 tsp tahini', 'tahini', 5, '1 tbsp'],
    ['1 tbsp lentils', 'lentils-brown-boiled', 12.3, '1 tbsp'],
    ['4 tbsp soy milk', 'soy-milk', 60.75, '1 cup'],
    ['250ml soy milk', 'soy-milk', 256.78, '1 cup'],
    ['1 dl soy milk', 'soy-milk', 102.71, '1 cup'],
    ['8 fl oz soy milk', 'soy-milk', 243, '1 cup'],
    ['cup of quinoa', 'quinoa-boiled', 185, '1 cup'],
    ['1 cup almonds, sliced', 'almonds', 92, '1 cup, sliced'],
    ['1 cup whole almonds', 'almonds', 143, '1 cup, whole'],
    ['1 cup almonds', 'almonds', 143, '1 cup, whole'],
    ['1 cup chopped walnuts', 'walnuts', 117, '1 cup, chopped'],
    ['1 cup tofu', 'tofu-firm', 252, '1 cup'],
    // pieces
    ['3 slices whole wheat bread', 'bread-whole-wheat', 96, '1 slice'],
    ['2 large slices of white bread', 'bread-white', 60, '1 slice, large'],
    ['a handful of almonds', 'almonds', 30, 'handful'],
    ['two handfuls of dried apricots', 'apricots-dried', 60, 'handful'],
    ['a handful of raw peanuts', 'peanuts-raw', 28, '1 handful'],
    ['10 almonds', 'almonds', 12, '1 almond'],
    ['half a block of tofu', 'tofu-firm', 162, '1/4 block'],
    ['a block of tofu', 'tofu-firm', 324, '1/4 block'],
    ['two eggs', 'egg-raw', 88, '1 medium'],
    ['2 large eggs', 'egg-raw', 100, '1 large'],
    ['eggs x 2', 'egg-raw', 88, '1 medium'],
    ['3 egg whites', 'egg-white-raw', 99, '1 large'],
    ['a dozen eggs', 'egg-raw', 528, '1 medium'],
    ['half a dozen eggs', 'egg-raw', 264, '1 medium'],
    ['2 raw potatoes', 'potatoes-raw', 426, '1 potato, medium'],
    ['2 large raw potatoes', 'potatoes-raw', 738, '1 potato, large'],
    ['a bunch of spinach', 'spinach-raw', 340, '1 bunch'],
    ['1 scoop rice protein', 'rice-protein', 30, '1 scoop'],
    ['2 servings of tofu', 'tofu-firm', 300, 'usual portion'],
    // cans: what is in them is canned, and drained
    ['1 can chickpeas', 'chickpeas-canned', 253, '1 can, drained'],
    ['half a tin of chickpeas, drained', 'chickpeas-canned', 126.5, '1 can, drained'],
    ['2 x 400 g cans black beans', 'black-beans-canned', 480, 'can'],
    ['2 400g tins of black beans', 'black-beans-canned', 480, 'can'],
    ['1 (15 oz) can black beans', 'black-beans-canned', 255.15, 'can'],
    ['1 15-oz can black beans', 'black-beans-canned', 255.15, 'can'],
    ['1 can (400 g) black beans', 'black-beans-canned', 240, 'can'],
    ['2 cans (400 g each) black beans', 'black-beans-canned', 480, 'can'],
    ['400 g can of kidney beans', 'kidney-beans-canned', 400, 'can'],
    ['400 g can of black beans', 'black-beans-canned', 240, 'can'],
    ['a 400g tin of black beans', 'black-beans-canned', 240, 'can'],
    ['1 can of black beans (400 g)', 'black-beans-canned', 240, 'can'],
    ['half a tin (400 g) of black beans', 'black-beans-canned', 120, 'can'],
    ['1 can 400 g black beans', 'black-beans-canned', 240, 'can'],
    ['a 500 ml carton of soy milk', 'soy-milk', 513.55, '1 cup'],
    ['200 g block of tofu', 'tofu-firm', 200, 'block'],
    ['2 cups (380 g) quinoa', 'quinoa-boiled', 380, 'cup'],
    ['200 g (1 cup) quinoa', 'quinoa-boiled', 200, null],
    ['1 cup + 2 tbsp quinoa', 'quinoa-boiled', 208.13, '1 cup'],
    ['２００ g quinoa', 'quinoa-boiled', 200, null],
    ['240 g canned black beans, drained', 'black-beans-canned', 240, null],
  ])('%j', (text, id, grams, measure) => {
    expect(understood(text)).toEqual([id, grams, measure])
  })

  test.each([
    ['200 g lentils', /200 g Lentils, brown, boiled.*not dry/],
    ['250 ml soy milk', /257 g Soy milk, unsweetened.*1 cup = 243 g.*from its cup/],
    ['a handful of almonds', /30 g Almonds.*common practice/],
    ['2 x 400 g cans black beans', /480 g Black beans.*drained.*common practice/],
    ['200 g chikpea', /200 g Chickpeas, boiled/],
  ])('the echo of %j says what was taken', (text, said) => {
    const reading = readPortion(text, finder)
    expect(reading.ok && reading.echo).toMatch(said)
  })
})

describe('what is refused, in one line, with readings that would be understood', () => {
  test.each<[string, RegExp, string[]]>([
    ['', /no portion is given/, []],
    ['0.5 cup', /names no food/, []],
    ['200 g', /names no food/, []],
    ['lentils', /says no amount/, ['150 g Lentils, brown, boiled', '1 cup Lentils, brown, boiled']],
    ['lentils-red-dry', /says no amount/, ['60 g Lentils, red, split, dry']],
    ['1-2 tbsp tahini', /range/, ['1 tbsp Tahini (sesame paste)', '2 tbsp Tahini (sesame paste)']],
    ['2 or 3 eggs', /range/, []],
    ['1,500 g lentils', /1\.5 or 1500/, ['1.5 g Lentils, brown, boiled', '1500 g Lentils, brown, boiled']],
    ['heaped tbsp tahini', /heaped/, ['1 tbsp Tahini (sesame paste)']],
    ['a few almonds', /a few/, ['30 g Almonds']],
    ['some quinoa', /some/, []],
    [
      'a spoonful of tahini',
      /tablespoon or a teaspoon/,
      ['1 tbsp Tahini (sesame paste)', '1 tsp Tahini (sesame paste)'],
    ],
    ['1 pint soy milk', /473 ml/, ['473 ml Soy milk, unsweetened', '568 ml Soy milk, unsweetened']],
    [
      '2 cans (400 g) black beans',
      /each or of all/,
      ['400 g Black beans, canned, drained', '800 g Black beans, canned, drained'],
    ],
    ['1 cup tofu-silken', /no cup of Tofu, silken/, []],
    ['2 cups bread-whole-wheat', /no cup of Bread, whole wheat.*1 slice \(32 g\)/, []],
    ['a handful of spinach', /no handful/, []],
    ['3 medium slices of white bread', /no slice of Bread, white.*1 slice, large/, []],
    ['2 slices white bread', /several measures.*1 slice, large or 1 slice, small/, []],
    ['1 can quinoa', /no can of/, []],
    ['1 cup walnuts', /several measures/, ['117 g Walnuts', '80 g Walnuts']],
    ['a pinch of tahini', /no pinch/, []],
    ['200 g lentils 300 g', /two amounts/, []],
    ['1 cup lentils and 2 tbsp tahini', /two amounts/, []],
    ['200 g beans', /several foods/, ['200 g Black beans, boiled', '200 g Kidney beans, boiled']],
    ['200 g fried lentils', /not in the table in that state/, []],
    ['200 g lentil soup', /no food is called "lentil soup"/, ['200 g Lentils, brown, boiled']],
    ['200 g unobtainium', /no food is called "unobtainium"/, []],
    ['-200 g lentils', /below zero/, []],
    ['lentils -200 g', /below zero/, []],
    ['0 g lentils', /zero/, []],
    ['0 cups quinoa', /zero/, []],
    ['NaN g lentils', /no number/, []],
    ['Infinity g lentils', /no number/, []],
    ['1/0 cup quinoa', /./, []],
    [`${'9'.repeat(150)} g lentils`, /more than 10 kg/, []],
    ['100 kg lentils', /more than 10 kg/, []],
    ['0.000001 g lentils', /too little/, []],
    ['1e3 g lentils', /./, []],
    ['200 % lentils', /./, []],
    [`200 g ${'x'.repeat(5000)}`, /too long/, []],
  ])('%j', (text, problem, readings) => {
    const reading = readPortion(text, finder)
    if (reading.ok) throw new Error(`taken for ${reading.echo}`)
    expect(reading.problem).toMatch(problem)
    expect(reading.problem).not.toMatch(/\p{Cc}/u)
    expect(reading.problem.length).toBeLessThan(300)
    expect(reading.nearest.length).toBeLessThanOrEqual(3)
    for (const text of readings) expect(reading.nearest.map(near => near.text)).toContain(text)
    for (const near of reading.nearest) {
      const again = readPortion(near.text, finder)
      if (!again.ok) throw new Error(`${near.text}: ${again.problem}`)
      expect(again.food).toBe(near.food)
      if (near.grams !== null) expect(again.grams).toBeCloseTo(near.grams, 3)
    }
  })
})

test('a missing amount may be taken as the usual portion, and is said to be', () => {
  const reading = readPortion('red lentils, dry', finder, { missingAmount: 'usual portion' })
  expect(reading).toMatchObject({ ok: true, grams: 60, measure: 'usual portion' })
  expect(reading.ok && reading.echo).toMatch(/no amount given/)
})

test('every food is read by its name and its id, with an amount before or after', () => {
  for (const food of SMALL_TABLE) {
    for (const text of [`120 g ${food.name}`, `120 g ${food.id}`, `${food.name}, 120 g`, `${food.id} 120 g`])
      expect([text, readPortion(text, finder)]).toMatchObject([
        text,
        { ok: true, food: { id: food.id }, grams: 120 },
      ])
  }
})

describe('whatever is typed', () => {
  const words = fc.constantFrom(
    ...[
      '200',
      '1/2',
      '½',
      '-3',
      '1e9',
      'NaN',
      '∞',
      '0',
      '1,500',
      '99999999999',
      'g',
      'kg',
      'cups',
      'tbsp',
      'can',
      'of',
      'a',
    ],
    ...[
      'half',
      'dozen',
      'x',
      '(',
      ')',
      '-',
      'to',
      'lentils',
      'boiled',
      'tofu',
      'eggs',
      'black beans',
      'ml',
      'heaped',
    ],
    ...[
      '\u001b[31m',
      '\u0000',
      '\n',
      'é',
      '豆腐',
      '__proto__',
      'constructor',
      '%',
      ',',
      '.',
      ':',
      'large',
      'slice',
    ],
  )
  const portion = fc
    .tuple(
      fc.constantFrom(
        '200',
        '1/2',
        '1½',
        '0',
        '-2',
        'two',
        'half a',
        'a',
        '3 x',
        '1-2',
        '1,5',
        'NaN',
        '9'.repeat(40),
      ),
      fc.constantFrom(
        '',
        'g',
        'kg',
        'cups',
        'cup of',
        'tbsp',
        'can',
        'slices',
        'handful of',
        '400 g cans',
        'ml',
        'oz',
      ),
      fc.constantFrom(
        'lentils',
        'dry lentils',
        'tofu',
        'eggs',
        'chickpeas',
        'bread',
        'almonds',
        'beans',
        'potatos',
        '',
      ),
      fc.oneof(fc.constant(''), words),
    )
    .chain(parts => fc.shuffledSubarray(parts, { minLength: 2 }).map(some => some.join(' ')))
  const text = fc.oneof(
    portion,
    fc.array(words, { maxLength: 9 }).map(all => all.join(' ')),
    fc.array(words, { maxLength: 9 }).map(all => all.join('')),
    fc.string({ unit: 'binary', maxLength: 60 }),
    fc.string({ unit: 'grapheme', maxLength: 60 }),
  )

  test('it never throws; grams are finite, above zero and at most 10 kg; each line is plain', () => {
    let taken = 0
    fc.assert(
      fc.property(text, typed => {
        const reading = readPortion(typed, finder)
        const line = reading.ok ? reading.echo : reading.problem
        expect(line).not.toMatch(/\p{Cc}/u)
        expect(line.length).toBeLessThan(400)
        if (reading.ok) {
          taken++
          expect(reading.grams).toBeGreaterThan(0)
          expect(reading.grams).toBeLessThanOrEqual(10_000)
        } else {
          for (const near of reading.nearest) {
            expect(near.grams === null || near.grams > 0).toBe(true)
            expect(readPortion(near.text, finder).ok).toBe(true)
          }
        }
      }),
      { numRuns: 3000, seed: 20250101 },
    )
    // the generator must reach both ends
    expect(taken).toBeGreaterThan(10)
  })

  test('any sensible mass of any food is read as it stands', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...SMALL_TABLE),
        fc.integer({ min: 1, max: 9_999 }),
        fc.constantFrom('g', ' g', ' grams of', 'gr'),
        (food, grams, unit) => {
          const reading = readPortion(`${grams}${unit} ${food.name}`, finder)
          expect(reading).toMatchObject({ ok: true, food: { id: food.id }, grams })
        },
      ),
      { numRuns: 300 },
    )
  })
})
