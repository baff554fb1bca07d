import { z } from 'zod'
import { plainText } from '../foods/plain-text.ts'
import { MARKS } from './marks.ts'

export { MARKS } from './marks.ts'

/** A calendar day, YYYY-MM-DD. */
export const daySchema = z.iso.date()

/** The most of one food that is kept, in grams: a tonne. */
export const GRAMS_AT_MOST = 1_000_000

export const gramsSchema = z
  .number({ error: 'grams must be a number' })
  .positive('grams must be above 0')
  .max(GRAMS_AT_MOST, `grams must be at most ${GRAMS_AT_MOST}`)

/** One line of plain text, so that a note can be shown anywhere and survives every file. */
export const noteSchema = z
  .string()
  .transform(note => plainText(note).trim())
  .pipe(z.string().max(500, 'a note has at most 500 characters'))

export const shelfItemSchema = z.object({
  /** id of a food in the table, or of an own food */
  food: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/, 'a food is named by its id, such as lentils-red-dry'),
  /** grams on hand, in the state that the food's name says */
  grams: gramsSchema,
  mark: z.enum(MARKS).default(''),
  useBy: daySchema.nullable().default(null),
  note: noteSchema.default(''),
})
export type ShelfItem = z.infer<typeof shelfItemSchema>

export const shelfSchema = z.object({
  items: z
    .array(shelfItemSchema)
    .refine(
      items => new Set(items.map(({ food }) => food)).size === items.length,
      'a food stands there twice',
    ),
})
/** What is on hand: at most one item a food, in the order in which the cook put them there. */
export type Shelf = z.infer<typeof shelfSchema>

export const EMPTY_SHELF: Shelf = { items: [] }
