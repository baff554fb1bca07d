/**
 * The Okabe-Ito palette, which people with any kind of colour vision tell apart (Color Universal Design, 2008), in the
 * nearest of the 256 terminal colours. Colour only repeats what letters and fills say.
 */
const OKABE_ITO = [75, 214, 36, 175, 227, 166, 32, 250]
/** A fill of its own for each food, so that a stack reads in one colour. */
const FILLS = ['█', '▒', '▓', '░', '▚', '▞', '▤', '▥']
const ASCII_FILLS = ['#', ':', '%', '.', 'x', '+', '=', 'o']

export const fillOf = (food: number, ascii = false): string => (ascii ? ASCII_FILLS : FILLS)[food % 8]!

/** The letter by which a food of a plate is known: a, b, c ... */
export const letterOf = (food: number): string => String.fromCharCode(97 + (food % 26))

/** A text in the colour of a food. */
export const inFoodColour = (food: number, text: string): string =>
  `\u001b[38;5;${OKABE_ITO[food % 8]}m${text}\u001b[39m`
