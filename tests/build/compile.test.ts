import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { checkAliases, withLocalNames } from '../../src/build/compile/aliases.ts'
import { findingsOf, RULE_NAMES } from '../../src/build/compile/checks.ts'
import { resolveComposition } from '../../src/build/compile/compositions.ts'
import { compileTable } from '../../src/build/compile/foods.ts'
import { localNamesOf } from '../../src/build/compile/ifct.ts'
import { readInputs } from '../../src/build/compile/inputs.ts'
import { type Composition, nutrientsOf } from '../../src/build/compile/nutrients.ts'
import { Problems } from '../../src/build/compile/problems.ts'
import { profileFromRow } from '../../src/build/compile/profiles.ts'
import { rowsOf } from '../../src/build/compile/rows.ts'
import { measureOf, parseSr28 } from '../../src/build/compile/sr28.ts'
import type { Food } from '../../src/foods/food.ts'
import { loadTable } from '../../src/foods/load.ts'

const inputs = readInputs()
const { foods } = loadTable()
const sound = foods.find(({ id }) => id === 'lentils-brown-dry')!

/** What the build says of the real inputs with one row of a file changed. */
function problemsWith(
  file: 'foods' | 'exceptions' | 'digestibility' | 'uncertainty' | 'patterns' | 'measures' | 'phytate',
  at: number,
  changes: Record<string, string>,
): string[] {
  const rows = inputs[file].map((row, i) => (i === at ? { ...row, text: { ...row.text, ...changes } } : row))
  return compileTable({ ...inputs, [file]: rows }).problems
}
const rowOf = (id: string) => inputs.foods.findIndex(({ text }) => text.id === id)

describe('a row that cannot be is refused, with where it stands', () => {
  it('the real rows are not', () => {
    expect(compileTable(inputs).problems).toEqual([])
  })

  it.each([
    ['an unknown number of SR28', { composition: 'sr28:99999' }, /SR28 has no such number/],
    ['an unknown code of the Indian table', { composition: 'ifct:Z999' }, /no such code/],
    ['a kind of composition that there is not', { composition: 'guess:1' }, /give sr28:/],
    ['an unknown profile', { profile: 'sr26:99999' }, /is not in profiles\.csv/],
    ['no profile for a food with protein', { profile: '' }, /needs a profile/],
    ['an unknown digestibility class', { digestibility: 'moonbeam' }, /not in digestibility\.csv/],
    ['an unknown portion', { portion: 'heap' }, /not in portions\.csv/],
    ['an unknown role', { role: 'sweet' }, /role/],
    ['an unknown allergen', { allergens: 'dust' }, /allergens/],
    ['an id that stands twice', { id: 'tofu-firm' }, /stands already/],
    [
      'a tier that claims more than its class',
      { digestibility: 'seed', digestibility_tier: 'ileal, this food' },
      /claims more/,
    ],
    ['a profile of another species without a note', { doubts: 'related-species', note: '' }, /needs a note/],
    ['an estimate without a note', { profile_tier: 'estimated', note: '' }, /needs a note/],
    ['an alias that another foodstuff has', { aliases: 'doufu' }, /all claim the alias "doufu"/],
    ['a word that another food is first for', { first_for: 'tofu' }, /is first for "tofu"/],
    ['itself as its own composition', { composition: 'mix:lentils-brown-dry*1' }, /refers to itself/],
    ['shares that do not add up', { composition: 'mix:tofu-firm*0.5+okara*0.2' }, /add up to 1/],
  ])('%s', (_, changes, message) => {
    const problems = problemsWith('foods', rowOf('lentils-brown-dry'), changes)
    expect(problems.join('\n')).toMatch(message)
  })

  it('a digestibility outside 0.20 to 1.05, and a class without its reason', () => {
    expect(problemsWith('digestibility', 0, { lys: '1.2' }).join()).toMatch(/lys is "1\.2".*0\.20 to 1\.05/)
    expect(problemsWith('digestibility', 0, { why: '' }).join()).toMatch(/needs its reason/)
  })

  it('a measure of an unknown source or without an amount, and phytate of no food', () => {
    expect(problemsWith('measures', 0, { source: 'hearsay' }).join()).toMatch(/"hearsay" is not in sources/)
    expect(problemsWith('measures', 0, { measure: 'cup' }).join()).toMatch(/needs an amount first/)
    expect(problemsWith('phytate', 0, { food: 'kin:moonbeam' }).join()).toMatch(/no food and no kin/)
  })

  it('a mixed profile without a share, which would drop the food without a word', () => {
    const changes = { profile: 'mix:sr26:16069*0.5+sr26:16052' }
    expect(problemsWith('foods', rowOf('lentils-brown-dry'), changes).join()).toMatch(/has no share/)
  })

  it('a file that is no CSV, by its name and line', () => {
    expect(() => rowsOf('id,name\na,b,c\n', 'foods-x.csv')).toThrow(/foods-x\.csv: .*line 2/)
  })

  it('an exception that excuses nothing, a coefficient without a reason, a measure of no weight, a pattern without lysine', () => {
    expect(problemsWith('exceptions', 0, { food: 'tofu-firm', rule: 'energy' }).join('\n')).toMatch(
      /excuses nothing/,
    )
    expect(problemsWith('uncertainty', 0, { reason: '' }).join()).toMatch(/needs its reason/)
    expect(problemsWith('measures', 0, { grams: '0' }).join()).toMatch(/above 0/)
    expect(problemsWith('patterns', 0, { lys: '' }).join()).toMatch(/lys must be above 0/)
  })
})

describe('every rule fires on a food that breaks it, and on no other', () => {
  const broken: Record<string, (food: Food) => Food> = {
    'protein-in-dry-matter': food => ({ ...food, per100g: { ...food.per100g, proteinG: 95 } }),
    'amino-sum': food => ({ ...food, aminoMgPerG: { ...food.aminoMgPerG, leu: 700 } }),
    'proximate-sum': food => ({ ...food, per100g: { ...food.per100g, waterG: 40 } }),
    energy: food => ({ ...food, per100g: { ...food.per100g, kcal: 900 } }),
    minerals: food => ({ ...food, per100g: { ...food.per100g, potassiumMg: 9000 } }),
    'vitamin-b12': food => ({ ...food, per100g: { ...food.per100g, vitaminB12Ug: 540 } }),
    brand: food => ({ ...food, aliases: ['LENTILCO red'] }),
    portion: food => ({ ...food, portionG: { least: 50, usual: 20, most: 100 } }),
    'related-species-note': food => ({ ...food, doubts: ['related-species'], note: '' }),
    'estimated-note': food => ({ ...food, profileTier: 'estimated', note: '' }),
    text: food => ({ ...food, name: 'Lentils\u0007, brown' }),
  }
  it('all rules are tried here', () => {
    expect(Object.keys(broken).sort()).toEqual([...RULE_NAMES].sort())
    expect(findingsOf(sound)).toEqual([])
  })
  it.each(Object.keys(broken))('%s', rule => {
    expect(findingsOf(broken[rule]!(sound)).map(finding => finding.rule)).toContain(rule)
  })
})

describe('profiles on one basis', () => {
  const header =
    'id,source,unit,protein_g_per_100g,nitrogen_factor,his,ile,leu,lys,met,cys,phe,tyr,thr,trp,val,trp_from,note'
  const profile = (line: string, others = '') => {
    const problems = new Problems()
    const rows = rowsOf(`${header}\n${line}\n${others}`, 'profiles.csv')
    const index = new Map(rows.map(row => [row.text.id!, row]))
    return { profile: profileFromRow(rows[0]!, index, problems), problems: problems.lines }
  }
  it('brings g per 100 g, with a factor of 5.7, to mg per g of nitrogen x 6.25', () => {
    // 0.285 g lysine in 10 g protein (N x 5.7): 10 x 6.25/5.7 = 10.965 g crude protein, 25.99 mg/g.
    const { profile: read } = profile('a,x,g_per_100g,10,5.7,.2,.4,.7,.285,.2,.2,.5,.3,.3,.1,.5,,')
    expect(read!.mgPerG.lys).toBeCloseTo(285 / ((10 * 6.25) / 5.7), 9)
  })
  it('brings mg per g protein, and mg per g nitrogen, to the same', () => {
    expect(
      profile('a,x,mg_per_g_protein,,5.3,20,40,70,30,20,20,50,30,30,10,50,,').profile!.mgPerG.lys,
    ).toBeCloseTo((30 * 5.3) / 6.25, 9)
    // FAO/INFOODS Guidelines for Converting Units (2012): per g nitrogen / 6.25 is per g crude protein.
    expect(
      profile('a,x,mg_per_g_n,,,125,250,440,187.5,125,125,300,190,190,62.5,310,,').profile!.mgPerG.lys,
    ).toBeCloseTo(30, 9)
  })
  it('takes a missing tryptophan from the profile that is named, and nothing else', () => {
    const donor = 'b,x,mg_per_g_protein,,,20,40,70,30,20,20,50,30,30,11,50,,'
    expect(
      profile('a,x,mg_per_g_protein,,,20,40,70,30,20,20,50,30,30,,50,b,', donor).profile!.mgPerG.trp,
    ).toBeCloseTo(11, 9)
    expect(
      profile('a,x,mg_per_g_protein,,,20,40,70,,20,20,50,30,30,11,50,b,', donor).problems.join(),
    ).toMatch(/lys is missing/)
    const asking = 'b,x,mg_per_g_protein,,,20,40,70,30,20,20,50,30,30,,50,a,'
    expect(
      profile('a,x,mg_per_g_protein,,,20,40,70,30,20,20,50,30,30,,50,b,', asking).problems.join(),
    ).toMatch(/trp is missing/)
    expect(profile('a,x,pounds,,,20,40,70,30,20,20,50,30,30,11,50,,').problems.join()).toMatch(
      /unit is "pounds"/,
    )
  })
})

describe('compositions', () => {
  const dry: Composition = {
    nitrogenFactor: 6.25,
    per100g: nutrientsOf(key => ({ proteinG: 25, kcal: 350, waterG: 10, fatG: 2 })[key as 'kcal'] ?? null),
    measures: [],
    sources: ['x'],
  }
  it('a boiled food holds what its dry one held, and water', () => {
    const rows = rowsOf('id,composition\nbeans-dry,sr28:00001', 'foods.csv')
    const known = {
      sr28: new Map([['00001', dry]]),
      ifct: new Map(),
      own: new Map(),
      foods: new Map([['beans-dry', rows[0]!]]),
    }
    const boiled = resolveComposition('dry:beans-dry*2.5', known, 'here', new Problems())!
    expect(boiled.per100g.proteinG).toBeCloseTo(10, 9)
    expect(boiled.per100g.waterG).toBeCloseTo(100 - 90 / 2.5, 9)
    expect(boiled.per100g.zincMg).toBeNull()
  })
  // Figures as printed in USDA SR28; a slipped column would show in some of them.
  it.each([
    ['01077', { vitaminB12Ug: 0.45, calciumMg: 113, sodiumMg: 43, potassiumMg: 132, fatG: 3.25 }],
    ['01123', { vitaminB12Ug: 0.89, proteinG: 12.56, ironMg: 1.75, zincMg: 1.29, fibreG: 0 }],
    ['11124', { vitaminB12Ug: 0, carbohydrateG: 9.58, fibreG: 2.8, potassiumMg: 320, ashG: 0.97 }],
    ['12220', { kcal: 534, waterG: 6.96, magnesiumMg: 392, fibreG: 27.3, phytateMg: null }],
  ])('takes each figure of %s from its own column', (number, figures) => {
    expect(inputs.sr28.get(number)!.per100g).toMatchObject(figures)
  })
  it('reads a line of the American files', () => {
    const abbrev = `~00001~^~BEANS~^${['10', '350', '25', '2', '4', '59', '15', '2', '100', '5', '120', '300', '1200', '8', '3'].join('^')}${'^'.repeat(31)}^~.25 cup~^${''}`
    const foods = parseSr28(abbrev, '~00001~^~1600~^~Beans, dry~^~~^~~^~~^~~^~~^0^~~^6.25^^^')
    expect(foods.get('00001')).toMatchObject({ nitrogenFactor: 6.25, description: 'Beans, dry' })
    expect(foods.get('00001')!.per100g).toMatchObject({
      proteinG: 25,
      waterG: 10,
      ironMg: 5,
      zincMg: 3,
      sodiumMg: 8,
    })
  })
  it.each([
    ['28', '.25 cup', '1 cup', 112],
    ['30', '1 oz', undefined, 0],
    ['60', '4 spears,', '1 spear', 15],
    ['150', '1 cup, chopped', '1 cup, chopped', 150],
    ['14.2', '1 tablespoon', '1 tbsp', 14.2],
    ['114', '1 sweetpotato, 5" long', '1 sweetpotato', 114],
    ['9', '10 leaves', '1 leaf', 0.9],
    ['24.5', '5 grapes', '1 grape', 4.9],
    ['13', '1 floweret', '1 floret', 13],
    ['52', '1 unit', undefined, 0],
    ['', '1 cup', undefined, 0],
  ])('%s g as "%s"', (grams, description, name, g) => {
    expect(measureOf(grams, description)).toEqual(
      name === undefined ? [] : [{ name, grams: g, source: 'usda-sr28' }],
    )
  })
})

describe('names', () => {
  it('reads local names without their language marks, each once', () => {
    expect(localNamesOf('A. Barli; B. Barley; H. Jau; Kan. Barley; Tam. Baarli Arisi.')).toEqual([
      'Barli',
      'Barley',
      'Jau',
      'Baarli Arisi',
    ])
  })
  it('gives a local name to nobody who would make it ambiguous', () => {
    const [a, b] = [
      { ...sound, id: 'a', kin: 'a', aliases: ['dal'] },
      { ...sound, id: 'b', kin: 'b', name: 'Other', aliases: [], firstFor: [] },
    ]
    const named = withLocalNames([a, b], new Map([['b', ['Dal', 'Urad']]]))
    expect(named[1]!.aliases).toEqual(['Urad'])
    const problems = new Problems()
    checkAliases(
      [
        { ...a, firstFor: [] },
        { ...b, aliases: ['dal'] },
      ],
      problems,
    )
    expect(problems.lines.join()).toMatch(/all claim the alias "dal"/)
  })
})

describe('data/foods.json', () => {
  it('is the same, to the byte, however often and in whatever order of rows it is built', () => {
    const once = JSON.stringify(compileTable(inputs).table)
    expect(JSON.stringify(compileTable(readInputs()).table)).toBe(once)
    // Local names go to the first food that claims one, so only the ids are free of the order.
    const reversed = compileTable({ ...inputs, foods: [...inputs.foods].reverse() })
    expect(reversed.table.foods.map(({ id }) => id)).toEqual(
      compileTable(inputs).table.foods.map(({ id }) => id),
    )
  })
  it('is read lazily as it stands', () => {
    const whole = JSON.parse(readFileSync(new URL('../../data/foods.json', import.meta.url), 'utf8'))
    const table = loadTable()
    expect(table.foods).toEqual(whole.foods)
    expect(table.foodById.size).toBe(whole.foods.length)
    expect(loadTable().foodById.get('tofu-firm')).toEqual(
      whole.foods.find((food: Food) => food.id === 'tofu-firm'),
    )
    expect(loadTable().foodById.get('no-such-food')).toBeUndefined()
  })
})
