import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Ran, ran } from './fake-world.ts'

/** What must hold of every answer, however bad the input. */
function expectOrderly({ code, out, err }: Ran): void {
  expect([0, 1, 2]).toContain(code)
  // biome-ignore lint/suspicious/noControlCharactersInRegex: that is what is looked for
  expect(out + err).not.toMatch(/[\u0000-\u0009\u000b-\u001f\u007f-\u009f]/)
  expect(err).not.toMatch(/\n\s+at |TypeError|RangeError|undefined|\[object/)
  if (code === 2) {
    expect(out).toBe('')
    expect(err.trim().split('\n')).toHaveLength(1)
    expect(err.length).toBeLessThan(700)
  }
}

const nasty = fc.constantFrom(
  '\u001b[31mred\u001b[0m',
  '\u001b]0;title\u0007',
  'a\u0000b',
  '-1',
  '0',
  'NaN',
  'Infinity',
  '1e999',
  '100 kg',
  '100 kg lentils',
  '-5 g lentils',
  '0 g lentils',
  'NaN g tofu',
  'lentils',
  '200 g',
  'g',
  '200 g xyzzyfood',
  '🥣 soup',
  '__proto__',
  'constructor',
  '../../etc/passwd',
  '%s%n',
  "'; drop table",
  '½',
  '1/0 cup rice',
  '1e3 g rice',
  '٣ g rice',
  '--',
  '-',
  '',
  ' ',
)
const anyText = fc.oneof(
  { weight: 3, arbitrary: nasty },
  { weight: 2, arbitrary: fc.string({ maxLength: 60 }) },
  { weight: 2, arbitrary: fc.string({ maxLength: 60, unit: 'binary' }) },
  { weight: 1, arbitrary: fc.integer().map(String) },
  { weight: 1, arbitrary: fc.double().map(String) },
)
const option = fc.constantFrom(
  '--protein',
  '--foods',
  '--servings',
  '--shelf',
  '--use-up',
  '--hold-back',
  '--without',
  '--energy',
  '--mass',
  '--pairings',
  '--pattern',
  '--age',
  '--body-mass',
  '--intake',
  '--meals',
  '--most',
  '--json',
  '--csv',
  '--eggs',
  '--nonsense',
  '--protein=-3',
  '-x',
)
const command = fc.constantFrom('find', 'food', 'score', 'pair', 'complement', 'foods', 'frobnicate')

describe('bad input', () => {
  it('every command answers 700 random argument lists in order', async () => {
    await fc.assert(
      fc.asyncProperty(command, fc.array(fc.oneof(anyText, option), { maxLength: 5 }), async (name, argv) => {
        expectOrderly(await ran([name, ...argv], { stdin: 'food,grams\nlentils-red-dry,500\n' }))
      }),
      { numRuns: 700 },
    )
  })

  it('pair answers 300 random options with values in order', async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(fc.tuple(option, anyText), { maxLength: 3 }), async pairs => {
        expectOrderly(await ran(['pair', ...pairs.flat()]))
      }),
      { numRuns: 300 },
    )
  })

  const cell = fc.oneof(
    anyText,
    fc.constantFrom('lentils-red-dry', 'rice', '500', 'use-up', '"', '"a', ';', '\t'),
  )
  const separator = fc.constantFrom(',', ';', '\t')
  const lineEnd = fc.constantFrom('\n', '\r\n', '\r')
  const header = fc.constantFrom(
    'food,grams',
    '\ufefffood,grams,mark,use_by',
    'Food;Grams',
    'grams',
    '',
    'food',
    'food,grams,food',
    '{',
    '[]',
    '{"items":1}',
    'null',
  )
  it('pair answers 400 random shelf files in order', async () => {
    await fc.assert(
      fc.asyncProperty(
        header,
        fc.array(fc.array(cell, { maxLength: 5 }), { maxLength: 8 }),
        separator,
        lineEnd,
        async (head, rows, sep, end) => {
          const file = [head, ...rows.map(row => row.join(sep))].join(end)
          expectOrderly(await ran(['pair', '--shelf', '-'], { stdin: file }))
        },
      ),
      { numRuns: 400 },
    )
  })

  it.each([
    [['pair', '--protein', '-5'], /--protein .*from 1 to 200 g/],
    [['pair', '--protein', '0'], /--protein 0: give a number from 1 to 200 g/],
    [['pair', '--protein', 'NaN'], /--protein NaN: give a number/],
    [['pair', '--protein', 'lots'], /--protein lots: give a number/],
    [['pair', '--protein'], /--protein needs a value/],
    [['pair', '--foods', '2.5'], /whole number/],
    [['pair', '--protien', '30'], /unknown option --protien; did you mean --protein\?/],
    [['pair', '--shelf', 'nowhere.csv'], /nowhere\.csv: there is no such file/],
    [['pair', 'lentils'], /takes no words/],
    [['pair', '--without', 'kryptonite'], /kryptonite/],
    [['pair', '--protein', '30', '--protein', '40'], /given twice/],
    [['pair', '--use-up', 'unobtainium'], /unobtainium/],
    [['score'], /needs a portion/],
    [['score', '100 kg lentils, boiled'], /kg/],
    [['score', '-3 g tofu'], /-3/],
    [['score', '0 g tofu'], /0/],
    [['score', '200 g unobtainium'], /unobtainium/],
    [['food', 'unobtainium'], /unobtainium/],
    [['food'], /needs an id/],
    [['find'], /needs a word/],
    [['complement', 'unobtainium'], /unobtainium/],
    [['frobnicate'], /no command "frobnicate"/],
    [['foods', '--json', '--csv'], /choose one/],
  ])('%j is bad use, in one line that names it', async (argv, line) => {
    const { code, out, err } = await ran(argv)
    expect(err).toMatch(line)
    expect(out).toBe('')
    expect(code).toBe(2)
    expect(err.trim().split('\n')).toHaveLength(1)
  })

  it.each([
    ['an empty file', ''],
    ['a header alone', 'food,grams\n'],
    ['no grams column', 'food,amount\nlentils-red-dry,500\n'],
    ['negative grams', 'food,grams\nlentils-red-dry,-5\n'],
    ['zero grams', 'food,grams\nlentils-red-dry,0\n'],
    ['absurd grams', 'food,grams\nlentils-red-dry,1e12\n'],
    ['grams in words', 'food,grams\nlentils-red-dry,plenty\n'],
    ['an unknown food', 'food,grams\nunobtainium,500\n'],
    ['an unknown mark', 'food,grams,mark\nlentils-red-dry,500,maybe\n'],
    ['an impossible day', 'food,grams,mark,use_by\nlentils-red-dry,500,,2026-02-31\n'],
    ['broken JSON', '{"items":['],
    ['noise', '\u0001\u0002\u0003\u001b[2J'.repeat(2000)],
  ])('a shelf file with %s ends in one line and no pairing', async (_, file) => {
    const { code, out, err } = await ran(['pair', '--shelf', '-'], { stdin: file })
    expectOrderly({ code, out, err })
    expect(code).not.toBe(0)
    expect(out + err).not.toBe('')
  })

  it.each([
    ['a BOM', '\ufefffood,grams\nlentils-red-dry,900\nrice-brown-dry,900\n'],
    ['CRLF', 'food,grams\r\nlentils-red-dry,900\r\nrice-brown-dry,900\r\n'],
    ['semicolons', 'food;grams\nlentils-red-dry;900\nrice-brown-dry;900\n'],
    ['quotes', '"food","grams"\n"lentils-red-dry","900"\n"rice-brown-dry","900"\n'],
    ['other columns and order', 'grams,shop,food\n900,quay,lentils-red-dry\n900,quay,rice-brown-dry\n'],
  ])('a shelf file with %s is read', async (_, file) => {
    const { code, out } = await ran(['pair', '--shelf', '-', '--json'], { stdin: file })
    expect(code).toBe(0)
    expect(JSON.parse(out).pairings[0].items.map((item: { food: string }) => item.food)).toContain(
      'lentils-red-dry',
    )
  })
})
