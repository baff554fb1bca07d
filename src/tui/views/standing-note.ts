import { STANDING_NOTE } from '../../kitchen/cautions.ts'
import type { State } from '../state.ts'
import { notesTold } from '../stepping-back.ts'
import { widthOf } from '../text/width.ts'

const NOTES = [
  STANDING_NOTE,
  'For information, for healthy people over three; not medical advice.',
  'For healthy people over three; not medical advice.',
]

/** The standing note, as much of it as fits a line; or what is to be said to those whom the settings tell of. */
export function standingNote({ columns, settings }: State): string {
  const told = notesTold(settings)
  if (told !== '') return told
  return NOTES.find(note => widthOf(note) <= columns - 2) ?? NOTES.at(-1)!
}
