import { stepBack } from '../kitchen/conditions.ts'
import type { Settings } from '../shelf/settings.ts'

type Told = Pick<Settings, 'conditions'>

/** Are grams of protein, scores and targets shown? Not where counting them may weigh on who eats. */
export const showsNumbers = ({ conditions }: Told): boolean => stepBack(conditions).numbers

/** Why no target is worked out from body mass, or null where one may be. */
export function noBodyMassTarget({ conditions }: Told): string | null {
  const back = stepBack(conditions)
  return back.bodyMassTargets ? null : (back.notes[0]?.text ?? 'No target is set from body mass.')
}

/** What is said to those whom the settings tell of, in place of the standing note. */
export const notesTold = ({ conditions }: Told): string =>
  stepBack(conditions)
    .notes.map(({ text }) => text)
    .join(' ')
