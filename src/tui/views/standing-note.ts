import { STANDING_NOTE } from '../../kitchen/cautions.ts'
import type { State } from '../state.ts'
import { widthOf } from '../text/width.ts'

const NOTES = [
  STANDING_NOTE,
  'For information, for healthy people over three; not medical advice.',
  'For healthy people over three; not medical advice.',
]

/** The standing note, as much of it as fits the window. */
export const standingNote = ({ columns }: State): string =>
  NOTES.find(note => widthOf(note) <= columns - 2) ?? NOTES.at(-1)!
