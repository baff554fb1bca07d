import { z } from 'zod'
import { MARKS } from './marks.ts'

export { MARKS } from './marks.ts'

/** A calendar day, YYYY-MM-DD. */
export const daySchema = z.iso.date()

export const shelfItemSchema = z.object({
  /** id of a food in the table, or of an own food */
  food: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/),
  /** grams on hand, in the state that the food's name says */
  grams: z.number().positive().max(1_000_000),
  mark: z.enum(MARKS).default(''),
  useBy: daySchema.nullable().default(null),
  note: z.string().max(500).default(''),
})
export type ShelfItem = z.infer<typeof shelfItemSchema>

export const shelfSchema = z.object({ items: z.array(shelfItemSchema) })
/** What is on hand: at most one item a food, in the order in which the cook put them there. */
export type Shelf = z.infer<typeof shelfSchema>

export const EMPTY_SHELF: Shelf = { items: [] }
