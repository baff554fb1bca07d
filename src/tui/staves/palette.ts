/**
 * The Okabe-Ito palette, which people with any kind of colour vision tell apart (Color Universal Design, 2008), in the
 * nearest of the 256 terminal colours. Colour only repeats what letters and fills say.
 */
const OKABE_ITO = [75, 214, 36, 175, 227, 166, 32, 250]
/** The same, a shade darker: the ground on which a food's fill is seen as a weave, on dark and on light terminals. */
const GROUNDS = [68, 172, 29, 132, 185, 130, 25, 244]
/** Letters on a food's colour. */
const INK = 16
/** Blue of the palette, for the water line. */
const WATER = 32
/** A fill of its own for each food, so that a stack reads in one colour. */
const FILLS = ['█', '▒', '▓', '░', '▚', '▞', '▤', '▥']
const ASCII_FILLS = ['#', ':', '%', '.', 'x', '+', '=', 'o']

export const fillOf = (food: number, ascii = false): string => (ascii ? ASCII_FILLS : FILLS)[food % 8]!

/** The letter by which a food of a plate is known: a, b, c ... */
export const letterOf = (food: number): string => String.fromCharCode(97 + (food % 26))

const ink = (colour: number, text: string): string => `\u001b[38;5;${colour}m${text}\u001b[39m`
const on = (colour: number, text: string): string => `\u001b[48;5;${colour}m${text}\u001b[49m`

/** A text in the colour of a food. */
export const inFoodColour = (food: number, text: string): string => ink(OKABE_ITO[food % 8]!, text)

/** A food's fill in its two shades. */
export const woven = (food: number, fill: string): string => on(GROUNDS[food % 8]!, inFoodColour(food, fill))

/** A food's letter on its colour. */
export const lettered = (food: number, text: string): string => on(OKABE_ITO[food % 8]!, ink(INK, text))

/** One food's colour below, another's above it, in the same cells. */
export const bordered = (below: number, above: number, text: string): string =>
  on(OKABE_ITO[above % 8]!, inFoodColour(below, text))

/** The colour of the water line. */
export const inWaterColour = (text: string): string => ink(WATER, text)

/** The mark of a food in a list: its letter and its fill. */
export const foodSign = (food: number, colour: boolean): string =>
  colour
    ? `${lettered(food, ` ${letterOf(food)} `)}${woven(food, fillOf(food).repeat(2))}`
    : ` ${letterOf(food)} ${fillOf(food).repeat(2)}`
