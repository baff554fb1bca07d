/** Grams in a unit of mass; the avoirdupois pound is 453.59237 g exactly (international yard and pound agreement, 1959). */
export const GRAMS_IN: Readonly<Record<string, number>> = {
  mg: 0.001,
  g: 1,
  kg: 1000,
  oz: 28.349523125,
  lb: 453.59237,
}

/** Millilitres in a unit of volume: the US customary cup (half a US pint) and its parts (NIST Handbook 44, appendix C). */
export const MILLILITRES_IN: Readonly<Record<string, number>> = {
  ml: 1,
  cl: 10,
  dl: 100,
  l: 1000,
  tsp: 4.92892159375,
  tbsp: 14.78676478125,
  'fl oz': 29.5735295625,
  cup: 236.5882365,
}

export type Unit =
  | { kind: 'mass'; name: string; grams: number }
  | { kind: 'volume'; name: string; millilitres: number }
  /** a measure of the food's own (`slice`, `can`), as one noun in the singular */
  | { kind: 'piece'; name: string }

/** Written words by the unit that they stand for: the first of each line. */
const SPELLED = `
mg milligram milligrams milligramme milligrammes
g gr gm gms grs gram grams gramme grammes grm grms
kg kgs kilo kilos kilogram kilograms kilogramme kilogrammes
oz ozs ounce ounces
lb lbs pound pounds
ml mls millilitre millilitres milliliter milliliters
cl centilitre centilitres centiliter centiliters
dl decilitre decilitres deciliter deciliters
l litre litres liter liters ltr ltrs
tsp tsps teaspoon teaspoons teaspoonful teaspoonfuls
tbsp tbsps tbs tbl tbls tblsp tablespoon tablespoons tablespoonful tablespoonfuls
cup cups cupful cupfuls cupsful`

/** Nouns by which foods are counted out; what a food weighs by them is the food's own measure. */
const PIECES = `
can cans tin tins
jar jars
bottle bottles
carton cartons
package packages packet packets pack packs pkg
bag bags
box boxes
tub tubs
pot pots
slice slices
handful handfuls handsful
block blocks
piece pieces pcs
cube cubes
clove cloves
stalk stalks rib ribs
stick sticks
ear ears
head heads
leaf leaves
bunch bunches
sheet sheets
scoop scoops
patty patties
spear spears
floret florets
sprig sprigs
pod pods
wedge wedges
glass glasses
bowl bowls
loaf loaves
bar bars
kernel kernels
serving servings portion portions helping helpings
pinch pinches
dash dashes
knob knobs
drizzle drizzles
splash splashes
spoon spoons spoonful spoonfuls
pint pints
quart quarts
gallon gallons`

function byWord(lines: string, unit: (name: string) => Unit): [string, Unit][] {
  return lines
    .trim()
    .split('\n')
    .flatMap(line => {
      const words = line.split(' ')
      return words.map((word): [string, Unit] => [word, unit(words[0]!)])
    })
}

const UNITS = new Map([
  ...byWord(SPELLED, name => {
    const grams = GRAMS_IN[name]
    if (grams !== undefined) return { kind: 'mass', name, grams }
    return { kind: 'volume', name, millilitres: MILLILITRES_IN[name]! }
  }),
  ...byWord(PIECES, name => ({ kind: 'piece', name })),
])

/** The unit that a written word stands for (in small letters), or null. */
export function unitOf(word: string): Unit | null {
  return UNITS.get(word) ?? null
}

/** The unit of `fl oz`, which is two words. */
export const FLUID_OUNCE: Unit = { kind: 'volume', name: 'fl oz', millilitres: MILLILITRES_IN['fl oz']! }
