import * as z from 'zod/mini'
import { plainText } from '../foods/plain-text.ts'
import { MARKS } from './marks.ts'

export { MARKS } from './marks.ts'

/** A calendar day, YYYY-MM-DD. */
export const daySchema = z.iso.date('a day is written 2026-12-31')

/** The most of one food that is kept, in grams: a tonne. */
export const GRAMS_AT_MOST = 1_000_000

export const gramsSchema = z
  .number({ error: 'grams must be a number' })
  .check(
    z.positive('grams must be above 0'),
    z.maximum(GRAMS_AT_MOST, `grams must be at most ${GRAMS_AT_MOST}`),
  )

export const markSchema = z.enum(MARKS, { error: 'a mark is use-up, hold-back or empty' })

/** One line of plain text, so that a note can be shown anywhere and survives every file. */
export const noteSchema = z.pipe(
  z.pipe(
    z.string({ error: 'a note must be text' }),
    z.transform((note: string) => plainText(note).trim()),
  ),
  z.string().check(z.maxLength(500, 'a note has at most 500 characters')),
)

export const shelfItemSchema = z.object({
  /** id of a food in the table, or of an own food */
  food: z
    .string({ error: 'a food is named by its id' })
    .check(z.regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'a food is named by its id, such as lentils-red-dry')),
  /** grams on hand, in the state that the food's name says */
  grams: gramsSchema,
  mark: z._default(markSchema, ''),
  useBy: z._default(z.nullable(daySchema), null),
  note: z._default(noteSchema, ''),
})
export type ShelfItem = z.infer<typeof shelfItemSchema>

export const shelfSchema = z.object({
  items: z
    .array(shelfItemSchema)
    .check(
      z.refine(
        items => new Set(items.map(({ food }) => food)).size === items.length,
        'a food stands there twice',
      ),
    ),
})
/** What is on hand: at most one item a food, in the order in which the cook put them there. */
export type Shelf = z.infer<typeof shelfSchema>

export const EMPTY_SHELF: Shelf = { items: [] }
