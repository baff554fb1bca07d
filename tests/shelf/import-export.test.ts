import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { loadTable } from '../../src/foods/load.ts'
import { createFinder, foodByWords } from '../../src/foods/search.ts'
import {
  type ReadShelf,
  type Resolve,
  readShelfFile,
  SHELF_FILE_AT_MOST_BYTES,
  writeShelfCsv,
  writeShelfJson,
} from '../../src/shelf/import-export.ts'
import { type ShelfItem, shelfSchema } from '../../src/shelf/shelf.ts'
import { note, shelf } from './shelves.ts'

/** Words that look like an id are one; others are made one; `???` is no food. */
const resolve: Resolve = words =>
  words.includes('?')
    ? { ok: false, problem: 'no food is called that' }
    : { ok: true, food: { id: words.toLowerCase().replace(/[^a-z0-9]+/g, '-') } }

const read = (text: string): ReadShelf => readShelfFile(text, resolve)
const item = (food: string, grams: number, more: Partial<ShelfItem> = {}): ShelfItem => ({
  food,
  grams,
  mark: '',
  useBy: null,
  note: '',
  ...more,
})
const itemsOf = (text: string): ShelfItem[] => {
  const { shelf, problems } = read(text)
  expect(problems).toEqual([])
  return shelf.items
}
const problemOf = (text: string): string => {
  const { shelf, problems } = read(text)
  expect(shelf.items).toEqual([])
  expect(problems).toHaveLength(1)
  expect(problems[0]?.problem).toMatch(/^[^\n]+$/)
  return problems[0]!.problem
}

describe('export and import', () => {
  it('lose nothing through CSV', () => {
    fc.assert(
      fc.property(shelf, shelf => {
        if (shelf.items.length === 0) return
        expect(read(writeShelfCsv(shelf))).toEqual({ shelf, problems: [], told: [] })
      }),
      { numRuns: 500 },
    )
  })

  it('lose nothing through JSON', () => {
    fc.assert(
      fc.property(shelf, shelf => {
        if (shelf.items.length === 0) return
        expect(read(writeShelfJson(shelf))).toEqual({ shelf, problems: [], told: [] })
      }),
      { numRuns: 500 },
    )
  })

  it('lose nothing when CRLF and a byte order mark are put in on the way', () => {
    fc.assert(
      fc.property(shelf, shelf => {
        if (shelf.items.length === 0) return
        const text = `\ufeff${writeShelfCsv(shelf).replaceAll('\n', '\r\n')}`
        expect(read(text)).toEqual({ shelf, problems: [], told: [] })
      }),
    )
  })

  it('write CSV that any reader of CSV understands', () => {
    const items = [
      item('tahini', 450, { mark: 'use-up', useBy: '2026-12-05', note: 'the "good" one, opened' }),
    ]
    expect(writeShelfCsv({ items })).toBe(
      'food,grams,mark,use_by,note\ntahini,450,use-up,2026-12-05,"the ""good"" one, opened"\n',
    )
  })

  it('carry foods from packets along in JSON', () => {
    const text = writeShelfJson({ items: [item('my-bar', 40)] }, [{ id: 'my-bar' }])
    expect(JSON.parse(text)).toMatchObject({ shortstave: 'shelf', version: 1, own_foods: [{ id: 'my-bar' }] })
    expect(itemsOf(text)).toEqual([item('my-bar', 40)])
  })
})

describe('a shelf file by other hands', () => {
  it.each([
    [
      'columns in another order',
      'note,grams,food\nred,500,lentils\n',
      [item('lentils', 500, { note: 'red' })],
    ],
    ['no newline at the end', 'food,grams\nlentils,500', [item('lentils', 500)]],
    [
      'headings in capitals with spaces',
      ' Food , GRAMS ,Use by, Mark\nlentils,500,2026-12-05,Use Up\n',
      [item('lentils', 500, { mark: 'use-up', useBy: '2026-12-05' })],
    ],
    ['quoted headings', '"food","grams"\n"lentils","500"\n', [item('lentils', 500)]],
    ['semicolons and a decimal comma', 'food;grams\nlentils;12,5\n', [item('lentils', 12.5)]],
    ['tabs', 'food\tgrams\tnote\nlentils\t500\ta, b\n', [item('lentils', 500, { note: 'a, b' })]],
    ['old line ends', 'food,grams\rlentils,500\rtahini,450\r', [item('lentils', 500), item('tahini', 450)]],
    [
      'blank lines everywhere',
      '\n \nfood,grams\n\nlentils,500\n ,\n\n\ntahini,450\n\n',
      [item('lentils', 500), item('tahini', 450)],
    ],
    [
      'a byte order mark and the separator named',
      '\ufeffsep=;\r\nfood;grams\r\nlentils;500\r\n',
      [item('lentils', 500)],
    ],
    ['words with commas in quotes', 'food,grams\n"lentils, red, dry",500\n', [item('lentils-red-dry', 500)]],
    [
      'grams with their unit',
      'food,grams\nlentils,500 g\ntahini,0.45 kg\n',
      [item('lentils', 500), item('tahini', 450)],
    ],
    [
      'a line break in a quoted note',
      'food,grams,note\nlentils,500,"top\nshelf"\n',
      [item('lentils', 500, { note: 'top shelf' })],
    ],
    [
      'escape sequences and control characters',
      'food,grams,note\nlentils,500,\u001b[31mred\u001b[0m\u0007\n',
      [item('lentils', 500, { note: 'red' })],
    ],
    ['short lines', 'food,grams,mark,use_by,note\nlentils,500\n', [item('lentils', 500)]],
  ])('is read with %s', (_, text, items) => {
    expect(itemsOf(text)).toEqual(items)
  })

  it('adds up a food that stands twice, loses nothing of either line, and says so', () => {
    const { shelf, problems, told } = read(
      'food,grams,mark,use_by,note\ntofu,0.1,use-up,2026-12-09,cold box\noats,5,,,\nTofu,0.2,,2026-12-05,new\n',
    )
    expect(problems).toEqual([])
    expect(shelf.items).toEqual([
      item('tofu', 0.3, { mark: 'use-up', useBy: '2026-12-05', note: 'cold box; new' }),
      item('oats', 5),
    ])
    expect(told).toEqual([
      {
        line: 4,
        text: 'Tofu,0.2,,2026-12-05,new',
        problem: 'tofu stands in line 2 too; together they are 0.3 g',
      },
    ])
  })

  it('tells of a column that it passes over', () => {
    const { shelf, told } = read('food,grams,best before\nlentils,500,soon\n')
    expect(shelf.items).toEqual([item('lentils', 500)])
    expect(told[0]?.problem).toContain('best_before')
  })
})

describe('what is wrong with a shelf file is said in one line', () => {
  it.each([
    ['nothing', '', 'the file is empty'],
    ['only blanks', ' \n\t\n\ufeff', 'the file is empty'],
    ['only a header', 'food,grams\n', 'no food'],
    ['no header', 'lentils-red-dry,500\n', 'no column "food"'],
    ['no grams', 'food,amount\nlentils,500\n', 'no column "grams"'],
    ['two columns of grams', 'food,grams,grams\nlentils,500,5\n', 'two columns "grams"'],
    ['two columns of notes', 'food,grams,note,Note\nlentils,500,a,b\n', 'two columns "note"'],
    ['a quote that is never closed', 'food,grams\n"lentils,500\ntahini,450\n', 'never closed'],
    ['zero bytes', 'PK\u0003\u0004\u0000\u0000food,grams', 'no text in UTF-8'],
    ['broken JSON', '{"shortstave":"shelf","version":1,"items":[', 'JSON is broken'],
    ['other JSON', '[{"food":"lentils","grams":500}]', 'no shelf'],
    ['a newer shelf', '{"shortstave":"shelf","version":2,"items":[]}', 'newer'],
    ['an empty JSON shelf', '{"shortstave":"shelf","version":1,"items":[]}', 'empty'],
    ['deep JSON', '['.repeat(200_000), 'JSON is broken'],
    ['no food in a line', 'food,grams\n,500\n', 'no food in this line'],
    ['no grams in a line', 'food,grams\nlentils,\n', 'no grams in this line'],
    ['an unknown food', 'food,grams\n???,500\n', 'no food is called that'],
    ['another mark', 'food,grams,mark\nlentils,500,eat\n', 'mark is "eat"'],
    ['a day that is none', 'food,grams,use_by\nlentils,500,2026-02-30\n', 'use_by is "2026-02-30"'],
    ['another way to write a day', 'food,grams,use_by\nlentils,500,5.12.2026\n', 'use_by is "5.12.2026"'],
    ['a comma that needs quotes', 'food,grams\nlentils, red,500\n', 'more cells than the header'],
    ['an endless name', `food,grams\n${'x'.repeat(1000)},500\n`, 'too long'],
    ['an endless note', `food,grams,note\nlentils,500,${'x'.repeat(501)}\n`, 'longer than 500'],
  ])('%s', (_, text, said) => {
    expect(problemOf(text)).toContain(said)
  })

  it.each([
    '0',
    '-5',
    'NaN',
    'Infinity',
    '1e9',
    '1000001',
    '100kg kg',
    'a lot',
    '5 lb',
    '1,500',
    '0x10',
    '1_000',
    '５００',
  ])('grams are %s', grams => {
    expect(problemOf(`food,grams\nlentils,"${grams}"\n`)).toContain('grams are')
  })

  it('thousands or decimals are not guessed', () => {
    for (const grams of ['1,500', '1.500', '12.345']) {
      expect(problemOf(`food;grams\nlentils;${grams}\n`)).toContain(`grams are "${grams}"`)
    }
    expect(itemsOf('food;grams\nlentils;0,125\ntahini;1500\n')).toEqual([
      item('lentils', 0.125),
      item('tahini', 1500),
    ])
  })

  it('a food that two lines mark otherwise, or that is too much together', () => {
    const marks = read('food,grams,mark\ntofu,5,use-up\ntofu,5,hold-back\n')
    expect(marks.problems).toMatchObject([{ line: 3, problem: expect.stringContaining('use-up') }])
    const heap = read('food,grams\ntofu,600000\ntofu,600000\n')
    expect(heap.problems).toMatchObject([{ line: 3, problem: expect.stringContaining('1000000') }])
  })

  it('names the line, and keeps the lines that are right', () => {
    const { shelf, problems } = read('\nfood,grams\nlentils,500\n\ntahini,lots\noats,40\n')
    expect(shelf.items).toEqual([item('lentils', 500), item('oats', 40)])
    expect(problems).toMatchObject([{ line: 5, text: 'tahini,lots' }])
  })

  it('stops after a hundred lines that are not understood', () => {
    const { problems } = read(`food,grams\n${'lentils,lots\n'.repeat(5000)}`)
    expect(problems).toHaveLength(101)
    expect(problems.at(-1)?.problem).toBe('the rest of the file is not read')
  })

  it('shows nothing of a line that could move the cursor', () => {
    const { problems } = read(
      'food,grams\n\u001b]0;title\u0007\u001b[2Jlentils\u0000?,lots\n'.replace('\u0000', '\u0001'),
    )
    expect(problems[0]?.text).toBe('lentils?,lots')
  })

  it('refuses what is larger than 5 MB or longer than any shelf', () => {
    expect(problemOf('x'.repeat(SHELF_FILE_AT_MOST_BYTES + 1))).toContain('larger than 5 MB')
    expect(problemOf(`food,grams\n${'lentils,5\n'.repeat(10_000)}`)).toContain('more than 10000 lines')
  })

  // Each of these takes minutes where reading is not linear in the size of the file.
  it.each([
    ['blanks', ' '.repeat(4_000_000)],
    ['newlines', '\n'.repeat(4_000_000)],
    ['quotes', '"'.repeat(4_000_000)],
    ['separators', ',;\t'.repeat(1_300_000)],
    ['open escape sequences', '\u001b]'.repeat(2_000_000)],
  ])('answers noise at once: %s', (_, noise) => {
    for (const text of [`${noise}x`, `food,grams\n${noise}x`, `food,grams\nx,1${noise}x`]) {
      const { problems } = read(text)
      expect(problems.length).toBeGreaterThan(0)
      expect(problems[0]!.problem.length).toBeLessThan(200)
    }
  })

  it('never throws, and puts only what can be kept on the shelf', () => {
    const cell = fc.oneof(
      note,
      fc.constantFrom('food', 'grams', 'mark', 'use_by', 'note', 'lentils', '5', '1e-7', 'use-up', '?'),
    )
    const table = fc
      .tuple(
        fc.constantFrom(
          'food,grams',
          'grams;food',
          'food\tgrams\tnote',
          'food,grams,mark,use_by,note',
          '',
          '{',
        ),
        fc.array(fc.array(cell, { maxLength: 6 }), { maxLength: 8 }),
        fc.constantFrom(',', ';', '\t'),
        fc.constantFrom('\n', '\r\n', '\r'),
      )
      .map(([header, rows, mark, end]) => [header, ...rows.map(row => row.join(mark))].join(end))
    fc.assert(
      fc.property(fc.oneof(table, note), text => {
        const { shelf, problems } = read(text)
        const kept = shelf.items.filter(({ food }) => /^[a-z0-9]+(-[a-z0-9]+)*$/.test(food))
        expect(shelfSchema.parse({ items: kept })).toEqual({ items: kept })
        expect(shelf.items.length + problems.length).toBeGreaterThan(0)
        for (const { problem, text } of problems) expect(`${problem}${text}`).not.toMatch(/\p{Cc}/u)
      }),
      { numRuns: 2000 },
    )
  })
})

describe('the sample shelf', () => {
  it('names only foods of the table, each once, nothing that goes stale', () => {
    const finder = createFinder(loadTable().foods)
    const { shelf, problems, told } = readShelfFile(
      readFileSync(new URL('../../data/sample-shelf.csv', import.meta.url), 'utf8'),
      words => foodByWords(words, finder),
    )
    expect({ problems, told }).toEqual({ problems: [], told: [] })
    expect(shelf.items.length).toBeGreaterThanOrEqual(20)
    expect(shelf.items.every(({ useBy }) => useBy === null)).toBe(true)
    expect(new Set(shelf.items.map(({ mark }) => mark))).toEqual(new Set(['', 'hold-back']))
  })
})
