import type { State } from './food.ts'

/** States that a word asks for, best first; the later ones only where the food has none of the earlier. */
const STATES_BY_WORD: Readonly<Record<string, readonly State[]>> = {
  boiled: ['boiled'],
  simmered: ['boiled'],
  steamed: ['boiled'],
  stewed: ['boiled'],
  poached: ['boiled'],
  cooked: ['boiled', 'baked', 'roasted', 'rehydrated', 'fried', 'canned'],
  prepared: ['boiled', 'rehydrated', 'baked'],
  dry: ['dry', 'dried'],
  dried: ['dried', 'dry'],
  uncooked: ['dry', 'raw', 'frozen', 'dried', 'product'],
  unboiled: ['dry', 'raw'],
  raw: ['raw', 'dry', 'product', 'fermented'],
  canned: ['canned'],
  bottled: ['canned'],
  sprout: ['sprouted'],
  roasted: ['roasted', 'baked'],
  roast: ['roasted', 'baked'],
  toasted: ['roasted', 'baked'],
  baked: ['baked', 'roasted'],
  fried: ['fried'],
  fermented: ['fermented'],
  flour: ['flour'],
  meal: ['flour'],
  ground: ['flour', 'powder'],
  milled: ['flour'],
  powder: ['powder', 'flour'],
  powdered: ['powder', 'flour'],
  frozen: ['frozen'],
  rehydrated: ['rehydrated'],
  reconstituted: ['rehydrated'],
  soaked: ['rehydrated'],
}
const BY_WORD = new Map(Object.entries(STATES_BY_WORD))

/** The states that a (singular) word asks for, best first, or null where it is no word of state. */
export function statesOf(stem: string): readonly State[] | null {
  return BY_WORD.get(stem) ?? null
}

/** How well a food in `state` answers the word: 1 as asked, less for a state further down, 0 not at all. */
export function stateGrade(asked: readonly State[], state: State): number {
  const place = asked.indexOf(state)
  return place < 0 ? 0 : 1 - 0.1 * place
}
