import { z } from 'zod'
import { historySchema, NO_HISTORY } from './history.ts'
import { EMPTY_SHELF, shelfSchema } from './shelf.ts'

/** The version that this program writes; documents of a newer one are refused and left alone. */
export const DOCUMENT_VERSION = 1

/** A plate that was served: the day, and grams a serving by food. */
export const servedPlateSchema = z.object({
  day: z.iso.date(),
  servings: z.number().int().positive(),
  portions: z.array(z.object({ food: z.string(), grams: z.number().positive() })),
})
export type ServedPlate = z.infer<typeof servedPlateSchema>

/** All that is kept: the shelf with its history, foods from a packet (checked by their own schema), served plates. */
export const documentSchema = z.object({
  shortstave: z.literal('kept'),
  version: z.number().int(),
  /** false until the cook has changed anything: then the sample shelf may be shown */
  begun: z.boolean(),
  shelf: shelfSchema,
  history: historySchema,
  ownFoods: z.array(z.unknown()),
  plates: z.array(servedPlateSchema),
})
export type KeptDocument = z.infer<typeof documentSchema>

export const NEW_DOCUMENT: KeptDocument = {
  shortstave: 'kept',
  version: DOCUMENT_VERSION,
  begun: false,
  shelf: EMPTY_SHELF,
  history: NO_HISTORY,
  ownFoods: [],
  plates: [],
}

export type DocumentReading =
  | { ok: true; document: KeptDocument }
  | { ok: false; newer: boolean; problem: string }

/** A kept document from its text. A newer version is told apart from damage: it must not be set aside. */
export function readDocument(text: string): DocumentReading {
  let value: unknown
  try {
    value = JSON.parse(text)
  } catch {
    return { ok: false, newer: false, problem: 'it is not readable as JSON' }
  }
  const version = z.object({ version: z.number() }).safeParse(value)
  if (version.success && version.data.version > DOCUMENT_VERSION) {
    return { ok: false, newer: true, problem: 'it was written by a newer shortstave; use that one' }
  }
  const parsed = documentSchema.safeParse(value)
  if (parsed.success) return { ok: true, document: parsed.data }
  const [issue] = parsed.error.issues
  return { ok: false, newer: false, problem: `${issue?.path.join('.') || 'it'}: ${issue?.message}` }
}
