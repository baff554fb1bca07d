import { z } from 'zod'
import { type AminoAcid, profileOf } from '../nutrition/amino-acids.ts'
import {
  DIGESTIBILITY_TIERS,
  type DigestibilityTier,
  DOUBTS,
  type ProfileTier,
} from '../nutrition/protein-source.ts'
import { ALLERGEN_IDS } from './allergens.ts'
import { type Food, ROLES } from './food.ts'
import { plainText } from './plain-text.ts'
import type { Table } from './table.ts'

/**
 * A food from a packet: what its label says, and whose protein it holds. It takes part in everything as a food of the
 * table does, with its profile and digestibility borrowed from its parts and a wider band.
 *
 *     const reading = ownFoodOf({ name: 'Galley bar', perG: 100, proteinG: 20, kcal: 380, parts }, table, takenIds)
 *     if (reading.ok) ownFoodToFood(reading.own, table)
 */
const label = z.number().nonnegative().max(20_000).nullable().default(null)

export const OWN_PREFIX = 'own-'
export const ownIdSchema = z
  .string()
  .regex(/^own-[a-z0-9]+(-[a-z0-9]+)*$/)
  .max(80)

export const proteinPartSchema = z.object({
  /** id of a food of the table (never of another own food) */
  food: z.string().regex(/^(?!own-)[a-z0-9]+(-[a-z0-9]+)*$/),
  /** share of the protein, a fraction */
  share: z.number().positive().max(1),
})
export type ProteinPart = z.infer<typeof proteinPartSchema>

export const ownFoodSchema = z.object({
  id: ownIdSchema,
  name: z.string().min(1).max(80),
  /** the grams that the label's figures are of: 100, or one serving */
  perG: z.number().positive().max(2000),
  proteinG: z.number().nonnegative().max(2000),
  kcal: z.number().nonnegative().max(20_000),
  fatG: label,
  carbohydrateG: label,
  fibreG: label,
  sodiumMg: z.number().nonnegative().max(1_000_000).nullable().default(null),
  parts: z.array(proteinPartSchema).min(1).max(12),
  /** did the label give the shares? otherwise they are a guess */
  sharesKnown: z.boolean().default(false),
  role: z.enum(ROLES).default('powder'),
  measures: z
    .array(z.object({ name: z.string().min(1).max(40), grams: z.number().positive().max(5000) }))
    .max(12)
    .default([]),
  allergens: z.array(z.enum(ALLERGEN_IDS)).default([]),
  note: z.string().max(500).default(''),
})
export type OwnFood = z.infer<typeof ownFoodSchema>
/** What is given for a new own food: all but the id. */
export type OwnFoodInput = Omit<z.input<typeof ownFoodSchema>, 'id'>

export type OwnFoodReading = { ok: true; own: OwnFood } | { ok: false; problems: string[] }

/** An own food of what is given, with an id that is not taken, or every reason why it cannot be. */
export function ownFoodOf(
  input: OwnFoodInput,
  table: Pick<Table, 'foodById'>,
  taken: Iterable<string> = [],
): OwnFoodReading {
  const name = plainName(input.name)
  return checked(
    { ...input, name, role: input.role ?? usualRole(input, table), id: ownIdOf(name, taken) },
    table,
  )
}

/** The own food with some of it changed, its id kept, or every reason why it cannot be. */
export function editOwnFood(
  own: OwnFood,
  changes: Partial<OwnFoodInput>,
  table: Pick<Table, 'foodById'>,
): OwnFoodReading {
  return checked({ ...own, ...changes, name: plainName(changes.name ?? own.name), id: own.id }, table)
}

const plainName = (name: unknown): string =>
  plainText(String(name ?? ''))
    .replace(/ +/g, ' ')
    .trim()

function checked(given: z.input<typeof ownFoodSchema>, table: Pick<Table, 'foodById'>): OwnFoodReading {
  const parsed = ownFoodSchema.safeParse(given)
  if (!parsed.success) {
    return {
      ok: false,
      problems: parsed.error.issues.map(
        issue => `${issue.path.join('.') || 'own food'}: ${plainText(issue.message)}`,
      ),
    }
  }
  const own = {
    ...parsed.data,
    note: plainText(parsed.data.note),
    measures: parsed.data.measures.map(measure => ({ ...measure, name: plainText(measure.name) })),
  }
  const problems = ownFoodProblems(own, table)
  return problems.length === 0 ? { ok: true, own } : { ok: false, problems }
}

/**
 * What uses an own food, in one line to warn with before it is changed or removed; null: nothing does.
 *
 * @param plates the plates that are kept or open, by name
 */
export function usesOfOwnFood(
  id: string,
  shelf: readonly { food: string }[],
  plates: readonly { name: string; foods: readonly string[] }[] = [],
): string | null {
  const uses = shelf.some(({ food }) => food === id) ? ['your shelf'] : []
  for (const { name, foods } of plates) if (foods.includes(id)) uses.push(plainText(name))
  return uses.length === 0 ? null : `it is used by ${uses.join(', ')}`
}

/** A powder where half of it is protein, else what its first part is. */
function usualRole({ proteinG, perG, parts }: OwnFoodInput, table: Pick<Table, 'foodById'>): Food['role'] {
  if (proteinG / perG >= CONCENTRATED) return 'powder'
  return table.foodById.get(String(parts?.[0]?.food))?.role ?? 'powder'
}

/** From this share of protein on a food is handled as a powder. */
const CONCENTRATED = 0.5

/** `own-galley-bar`; with a number where that is taken. */
export function ownIdOf(name: string, taken: Iterable<string> = []): string {
  const slug = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-+$/, '')
  const base = OWN_PREFIX + (slug === '' ? 'food' : slug)
  const known = new Set(taken)
  let id = base
  for (let n = 2; known.has(id); n++) id = `${base}-${n}`
  return id
}

/** Energy of 1 g in kcal. Source: Regulation (EU) No 1169/2011, Annex XIV. */
const KCAL_PER_G = { protein: 4, fat: 9, carbohydrate: 4, fibre: 2 }
/** Labels may be off by a fifth (European Commission guidance on tolerances, 2012) and are rounded. */
const LABEL_TOLERANCE = 0.2
const LABEL_ROUNDING_KCAL = 15
/** The parts of 100 g may add up to a little more, each being rounded. */
const MASS_ROUNDING_G = 5
const KJ_PER_KCAL = 4.184
/** Sodium in 100 g of pure salt. */
const SALT_SODIUM_MG = 39_340

/** Every reason why such a food cannot be, in plain lines that say what, where and the mend; empty: it can. */
export function ownFoodProblems(own: OwnFood, table: Pick<Table, 'foodById'>): string[] {
  const problems: string[] = []
  const per100 = (value: number) => (value * 100) / own.perG
  const protein = per100(own.proteinG)
  const [fat, carbohydrate, fibre] = [own.fatG, own.carbohydrateG, own.fibreG].map(value =>
    value === null ? null : per100(value),
  ) as [number | null, number | null, number | null]
  const shown = (value: number) => Number(value.toFixed(1))
  if (protein > 100)
    problems.push(
      `protein: ${shown(protein)} g in 100 g is more than the food weighs; check the serving (${own.perG} g)`,
    )
  else if (protein + (fat ?? 0) + (carbohydrate ?? 0) > 100 + MASS_ROUNDING_G)
    problems.push(
      `protein, fat and carbohydrate come to ${shown(protein + (fat ?? 0) + (carbohydrate ?? 0))} g in 100 g, more than the food weighs`,
    )
  if (own.fibreG !== null && (fibre ?? 0) > 100)
    problems.push(`fibre: ${shown(fibre!)} g in 100 g is more than the food weighs`)
  if (own.sodiumMg !== null && per100(own.sodiumMg) > SALT_SODIUM_MG)
    problems.push(
      `sodium: ${shown(per100(own.sodiumMg))} mg in 100 g is more than pure salt holds; give mg, not g of salt`,
    )
  problems.push(...energyProblems(per100(own.kcal), protein, fat, carbohydrate, fibre))
  problems.push(...partProblems(own, table))
  return problems
}

function energyProblems(
  kcal: number,
  protein: number,
  fat: number | null,
  carbohydrate: number | null,
  fibre: number | null,
): string[] {
  const { protein: p, fat: f, carbohydrate: c, fibre: b } = KCAL_PER_G
  const least = (p * protein + f * (fat ?? 0)) * (1 - LABEL_TOLERANCE) - LABEL_ROUNDING_KCAL
  const rest = Math.max(0, 100 - protein)
  // What is not told may at most all be fat.
  const sum =
    fat !== null && carbohydrate !== null
      ? p * protein + f * fat + c * carbohydrate + b * (fibre ?? 0)
      : p * protein +
        f * (fat ?? rest) +
        c * (carbohydrate ?? 0) +
        (fat === null ? 0 : c * Math.max(0, rest - fat))
  const most = Math.min(f * 100, sum * (1 + LABEL_TOLERANCE)) + LABEL_ROUNDING_KCAL
  const shown = Math.round(kcal)
  if (kcal > most) {
    const asKcal = kcal / KJ_PER_KCAL
    const hint = asKcal >= least && asKcal <= most ? `; is that kJ? ${Math.round(asKcal)} kcal would fit` : ''
    return [`energy: ${shown} kcal in 100 g cannot be; its parts give ${Math.round(most)} at most${hint}`]
  }
  if (kcal < least)
    return [
      `energy: ${shown} kcal in 100 g cannot be; its protein${fat === null ? '' : ' and fat'} alone give ${Math.round(least)} at least`,
    ]
  return []
}

function partProblems({ parts }: OwnFood, table: Pick<Table, 'foodById'>): string[] {
  const problems: string[] = []
  const seen = new Set<string>()
  for (const { food: id } of parts) {
    const food = table.foodById.get(id)
    if (food === undefined) problems.push(`made of: there is no food "${id}" in the table`)
    else if (!(food.per100g.crudeProteinG > 0))
      problems.push(`made of: ${food.name} brings no protein; leave it out`)
    if (seen.has(id)) problems.push(`made of: ${food?.name ?? id} stands there twice; add the shares`)
    seen.add(id)
  }
  const sum = parts.reduce((total, { share }) => total + share, 0)
  if (Math.abs(sum - 1) > 0.011)
    problems.push(`made of: the shares come to ${Math.round(sum * 100)} %, not to 100 %`)
  return problems
}

/**
 * The own food as a food of the table. Amino acids: the mean of its parts' weighted by their shares of the protein.
 * Digestibility: of each amino acid, weighted by what each part brings of it. The label's protein is nitrogen x 6.25
 * (Regulation (EU) No 1169/2011, Annex I; 21 CFR 101.9(c)(7)), so crude protein is the same figure. Throws on a part
 * that the table does not hold; `ownFoodProblems` tells so beforehand.
 */
export function ownFoodToFood(own: OwnFood, table: Pick<Table, 'foodById'>): Food {
  const sum = own.parts.reduce((total, { share }) => total + share, 0)
  const parts = own.parts.map(({ food: id, share }) => {
    const food = table.foodById.get(id)
    if (food === undefined) throw new Error(`own food ${own.id}: there is no food "${id}" in the table`)
    return { food, share: share / sum }
  })
  const foods = parts.map(({ food }) => food)
  const mean = (value: (food: Food) => number) =>
    parts.reduce((total, { food, share }) => total + share * value(food), 0)
  const aminoMgPerG = profileOf(aminoAcid => mean(food => food.aminoMgPerG[aminoAcid]))
  const digestible = (aminoAcid: AminoAcid) => {
    const total = aminoMgPerG[aminoAcid]
    if (!(total > 0)) return mean(food => food.digestibility[aminoAcid])
    return mean(food => food.aminoMgPerG[aminoAcid] * food.digestibility[aminoAcid]) / total
  }
  const per100 = (value: number) => (value * 100) / own.perG
  const orNull = (value: number | null) => (value === null ? null : per100(value))
  const proteinG = per100(own.proteinG)
  const concentrated = proteinG / 100 >= CONCENTRATED
  const usual = own.perG !== 100 ? own.perG : concentrated ? 30 : 100
  return {
    id: own.id,
    name: own.name,
    aliases: [],
    firstFor: [],
    kin: own.id,
    role: own.role,
    state: 'product',
    origin: originOf(foods),
    place: proteinG >= 3 ? 'protein' : 'side',
    nitrogenFactor: 6.25,
    per100g: {
      proteinG,
      crudeProteinG: proteinG,
      kcal: per100(own.kcal),
      waterG: null,
      fatG: orNull(own.fatG),
      carbohydrateG: orNull(own.carbohydrateG),
      fibreG: orNull(own.fibreG),
      ashG: null,
      ironMg: null,
      zincMg: null,
      calciumMg: null,
      magnesiumMg: null,
      potassiumMg: null,
      sodiumMg: orNull(own.sodiumMg),
      phytateMg: null,
      vitaminB12Ug: null,
    },
    aminoMgPerG,
    digestibility: {
      ...profileOf(digestible),
      proteinFaecal: mean(food => food.digestibility.proteinFaecal),
    },
    digestibilityClass: parts.length === 1 ? foods[0]!.digestibilityClass : 'mixture',
    profileTier: profileTierOf(own, foods),
    digestibilityTier: weakestDigestibility(foods),
    doubts: DOUBTS.filter(doubt => doubt === 'own-food' || foods.some(food => food.doubts.includes(doubt))),
    portionG: { least: Math.max(1, usual / 2), usual, most: usual * 2 },
    stepG: concentrated || usual < 50 ? 1 : 5,
    measures: [
      ...own.measures.map(measure => ({ ...measure, source: 'own' })),
      ...(own.perG === 100 ? [] : [{ name: '1 serving', grams: own.perG, source: 'own' }]),
    ],
    allergens: ALLERGEN_IDS.filter(
      allergen => own.allergens.includes(allergen) || foods.some(food => food.allergens.includes(allergen)),
    ),
    cautions: [
      ...new Set(foods.flatMap(({ cautions }) => cautions.filter(id => CARRIED_CAUTIONS.includes(id)))),
    ],
    sources: ['own'],
    note: [own.note, madeOf(own, table)].filter(text => text !== '').join(' '),
  }
}

/** `Own food; protein as of 80 % Pea protein, 20 % Rice protein.` */
export function madeOf(own: Pick<OwnFood, 'parts' | 'sharesKnown'>, table: Pick<Table, 'foodById'>): string {
  const parts = own.parts.map(
    ({ food, share }) => `${Math.round(share * 100)} % ${table.foodById.get(food)?.name ?? food}`,
  )
  return `Own food; its protein is taken as that of ${parts.join(', ')}${own.sharesKnown || parts.length === 1 ? '' : ' (shares are a guess)'}.`
}

/** A borrowed profile at best; where shares are guessed, or a part is itself an estimate, an estimate. */
function profileTierOf({ parts, sharesKnown }: OwnFood, foods: readonly Food[]): ProfileTier {
  const guessed = parts.length > 1 && !sharesKnown
  return guessed || foods.some(({ profileTier }) => profileTier === 'estimated') ? 'estimated' : 'borrowed'
}

/** The weakest of its parts', and never that of this very food. */
function weakestDigestibility(foods: readonly Food[]): DigestibilityTier {
  const weakest = Math.max(1, ...foods.map(food => DIGESTIBILITY_TIERS.indexOf(food.digestibilityTier)))
  return DIGESTIBILITY_TIERS[weakest]!
}

/** Plant only where all parts are; egg and dairy together count as animal, so that allowing one lets neither in. */
function originOf(foods: readonly Food[]): Food['origin'] {
  const others = [...new Set(foods.map(({ origin }) => origin))].filter(origin => origin !== 'plant')
  if (others.length === 0) return 'plant'
  return others.length === 1 ? others[0]! : 'animal'
}

/** Cautions that stay with a food however it was made; those on cooking it from raw do not. */
const CARRIED_CAUTIONS: readonly string[] = [
  'favism',
  'kelp-iodine',
  'seaweed-iodine',
  'brazil-nut-selenium',
  'lupin-bitter',
  'grass-pea',
  'poppy',
  'natto-vitamin-k',
  'tyramine',
]
