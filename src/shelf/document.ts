import * as z from 'zod/mini'
import { historySchema, NO_HISTORY, remember } from './history.ts'
import { type ServedPlate, servedPlateSchema, withPlate } from './served-plate.ts'
import { EMPTY_SHELF, type Shelf, shelfSchema } from './shelf.ts'

export { type ServedPlate, servedPlateSchema }

/** The version that this program writes; documents of a newer one are refused and left alone. */
export const DOCUMENT_VERSION = 1

/**
 * All that is kept: the shelf with its history, foods from a packet (checked by their own schema), served plates.
 * Loose: sections that this program doesn't know go through it unchanged.
 */
export const documentSchema = z.looseObject({
  shortstave: z.literal('kept'),
  version: z.literal(DOCUMENT_VERSION),
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

/** The document with another shelf, as a step that can be undone; a plate served with it is kept under its day. */
export function withShelf(
  document: KeptDocument,
  shelf: Shelf,
  label: string,
  plate?: ServedPlate,
): KeptDocument {
  return {
    ...document,
    begun: true,
    shelf,
    history: remember(document.history, label, document.shelf, shelf, plate),
    plates: plate === undefined ? document.plates : withPlate(document.plates, plate),
  }
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
