import { z } from 'zod'
import { AMINO_ACIDS } from '../nutrition/amino-acids.ts'
import { DIGESTIBILITY_TIERS, DOUBTS, PROFILE_TIERS } from '../nutrition/protein-source.ts'
import { ALLERGEN_IDS } from './allergens.ts'

/** What part a food plays in a meal; at most two foods of one role stand in a pairing. */
export const ROLES = [
  'pulse',
  'soy',
  'grain',
  'nut-seed',
  'powder',
  'root',
  'vegetable',
  'leaf',
  'mushroom',
  'fruit',
  'seaweed',
  'yeast',
  'seasoning',
  'fat-sugar',
  'egg',
  'dairy',
  'meat-fish',
] as const
export type Role = (typeof ROLES)[number]

/** The state in which the food is weighed. */
export const STATES = [
  'dry',
  'raw',
  'boiled',
  'canned',
  'sprouted',
  'roasted',
  'fried',
  'baked',
  'fermented',
  'flour',
  'powder',
  'rehydrated',
  'product',
  'dried',
  'frozen',
] as const
export type State = (typeof STATES)[number]

/** Where the food comes from; only `plant` foods (fungi, algae and yeasts among them) are paired unless allowed. */
export const ORIGINS = ['plant', 'egg', 'dairy', 'animal'] as const
export type Origin = (typeof ORIGINS)[number]

/**
 * How the combiner may use the food: `protein` takes one of the places of a pairing, `seasoning` only where the
 * cook asks to use it up, `side` (oil, fruit, most vegetables) and `comparator` (meat, fish) only by the cook's hand.
 */
export const PLACES = ['protein', 'seasoning', 'side', 'comparator'] as const
export type Place = (typeof PLACES)[number]

const id = z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
const grams = z.number().positive()
const amount = z.number().nonnegative()
const known = amount.nullable()

const eleven = <T extends z.ZodType>(value: T) =>
  z.object(Object.fromEntries(AMINO_ACIDS.map(a => [a, value])) as Record<(typeof AMINO_ACIDS)[number], T>)

export const measureSchema = z.object({
  /** as people say it, amount first: `1 cup`, `1 tbsp`, `1 slice`, `1 can, drained` */
  name: z.string().min(1),
  grams,
  source: z.string(),
})
export type Measure = z.infer<typeof measureSchema>

export const foodSchema = z.object({
  id,
  /** what a cook would say, state last: `Lentils, brown, boiled` */
  name: z.string().min(1),
  aliases: z.array(z.string()),
  /** bare words for which this food is the first answer: `lentils`, `dal` */
  firstFor: z.array(z.string()),
  /** the same food in its other states shares this: `lentil-brown` */
  kin: id,
  role: z.enum(ROLES),
  state: z.enum(STATES),
  origin: z.enum(ORIGINS),
  place: z.enum(PLACES),
  nitrogenFactor: z.number().min(4).max(6.5),
  per100g: z.object({
    proteinG: amount,
    /** nitrogen x 6.25 */
    crudeProteinG: amount,
    kcal: amount,
    waterG: known,
    fatG: known,
    carbohydrateG: known,
    fibreG: known,
    ashG: known,
    ironMg: known,
    zincMg: known,
    calciumMg: known,
    magnesiumMg: known,
    potassiumMg: known,
    sodiumMg: known,
    phytateMg: known,
    vitaminB12Ug: known,
  }),
  /** mg in 1 g of crude protein */
  aminoMgPerG: eleven(amount),
  digestibility: eleven(z.number().min(0.2).max(1.05)).extend({
    proteinFaecal: z.number().min(0.2).max(1.05),
  }),
  /** the row of data/curation/digestibility.csv */
  digestibilityClass: z.string(),
  profileTier: z.enum(PROFILE_TIERS),
  digestibilityTier: z.enum(DIGESTIBILITY_TIERS),
  doubts: z.array(z.enum(DOUBTS)),
  /** in one adult meal, in the state named */
  portionG: z.object({ least: grams, usual: grams, most: grams }),
  /** the step in which the combiner weighs it: 5 g, or 1 g for seasonings and powders */
  stepG: z.union([z.literal(1), z.literal(5)]),
  measures: z.array(measureSchema),
  allergens: z.array(z.enum(ALLERGEN_IDS)),
  /** ids of the cautions that it calls for */
  cautions: z.array(z.string()),
  /** ids in the table's `sources` */
  sources: z.array(z.string()).min(1),
  /** anything a reader should know of its figures */
  note: z.string(),
})

/** One row of the composition table. Grams and kcal are per 100 g of the food in the state that its name says. */
export type Food = z.infer<typeof foodSchema>
