import fc from 'fast-check'
import type { ShelfChange } from '../../src/shelf/changes.ts'
import { MARKS, type Shelf, shelfSchema } from '../../src/shelf/shelf.ts'

/** Few foods, so that changes meet each other. */
export const foods = ['lentils-red-dry', 'rice-white-dry', 'tofu-firm', 'tahini', 'oats-rolled'] as const

const grams = fc.oneof(
  fc.integer({ min: 1, max: 5000 }),
  fc.double({ min: 1e-9, max: 199_999, noNaN: true }),
  fc.constantFrom(0.1, 0.2, 1e-7, 12.5),
)
const mark = fc.constantFrom(...MARKS)
const day = fc
  .date({ min: new Date('2000-01-01'), max: new Date('2099-12-31'), noInvalidDate: true })
  .map(date => date.toISOString().slice(0, 10))
const useBy = fc.option(day, { nil: null })

/** Notes as cruel as they come: quotes, commas, line breaks, formulas, scripts, escape sequences, lone surrogates. */
export const note = fc.oneof(
  fc.string({ unit: 'binary', maxLength: 60 }),
  fc.string({ unit: 'grapheme', maxLength: 60 }),
  fc.string({
    unit: fc.constantFrom('"', ',', ';', '\t', '\n', '\r', ' ', 'a', '=', '\u001b[31m', '\ud83d'),
    maxLength: 20,
  }),
  fc.constantFrom(
    '=1+1',
    '@SUM(A1)',
    ' in the cold box ',
    '"',
    '""',
    'मसूर दाल',
    '冷蔵庫',
    '-',
    '0',
    'sep=;',
    '{',
    '\ufeff',
  ),
)

/** Shelves as the store keeps them: whatever is given goes through the schema. */
export const shelf: fc.Arbitrary<Shelf> = fc
  .uniqueArray(
    fc.record({
      food: fc.oneof(fc.constantFrom(...foods), fc.stringMatching(/^[a-z0-9]{1,8}(-[a-z0-9]{1,8}){0,3}$/)),
      grams,
      mark,
      useBy,
      note,
    }),
    { selector: ({ food }) => food, maxLength: 12 },
  )
  .map(items => shelfSchema.parse({ items }))

const food = fc.constantFrom(...foods)
const extras = {
  mark: fc.option(mark, { nil: undefined }),
  useBy: fc.option(useBy, { nil: undefined }),
  note: fc.option(note, { nil: undefined }),
}
export const change: fc.Arbitrary<ShelfChange> = fc.oneof(
  { weight: 4, arbitrary: fc.record({ do: fc.constant('add' as const), food, grams, ...extras }) },
  {
    weight: 3,
    arbitrary: fc.record({
      do: fc.constant('set' as const),
      food,
      grams: fc.option(grams, { nil: undefined }),
      ...extras,
    }),
  },
  { weight: 3, arbitrary: fc.record({ do: fc.constant('take' as const), food, grams }) },
  { weight: 2, arbitrary: fc.record({ do: fc.constant('remove' as const), food }) },
  { weight: 2, arbitrary: fc.record({ do: fc.constant('mark' as const), food, mark }) },
  { weight: 1, arbitrary: fc.constant({ do: 'clear' as const }) },
)
