import { ALLERGEN_IDS, type AllergenId } from '../foods/allergens.ts'
import { editDistance } from '../foods/edit-distance.ts'

/**
 * The EU fourteen and the US nine by name.
 *
 *     readAllergens('dairy')      // { ok: true, allergens: ['milk'] }
 *     readAllergens('shellfish')  // crustaceans and molluscs
 *     readAllergens('glutn')      // { ok: false, problem: '... nearest: gluten, ...' }
 */
const NAMES: Record<AllergenId, string> = {
  gluten: 'cereals containing gluten',
  wheat: 'wheat',
  crustaceans: 'crustaceans',
  egg: 'eggs',
  fish: 'fish',
  peanut: 'peanuts',
  soy: 'soybeans',
  milk: 'milk',
  'tree-nuts': 'tree nuts',
  celery: 'celery',
  mustard: 'mustard',
  sesame: 'sesame',
  sulphites: 'sulphur dioxide and sulphites',
  lupin: 'lupin',
  molluscs: 'molluscs',
}

/** The full name for cards and sentences. */
export const allergenName = (id: AllergenId): string => NAMES[id]

/** The fourteen of Annex II of Regulation (EU) No 1169/2011. */
export const EU_FOURTEEN: readonly AllergenId[] = ALLERGEN_IDS.filter(id => id !== 'wheat')
/** The nine of the United States (21 U.S.C. 321(qq), with sesame since 2023). */
export const US_NINE: readonly AllergenId[] = [
  'milk',
  'egg',
  'fish',
  'crustaceans',
  'tree-nuts',
  'peanut',
  'wheat',
  'soy',
  'sesame',
]

/**
 * Everyday words for each allergen, in the singular. A single nut stands for all tree nuts, because the table keeps
 * them as one; `nuts` alone takes peanuts in as well, because many who say it mean both. Those who mean one only
 * say `tree nuts` or `peanuts`. `wheat` is the American allergen: rye, barley and oats are under `gluten`.
 */
const WORDS: Record<AllergenId, string> = {
  gluten:
    'gluten, coeliac, celiac, cereals containing gluten, gluten cereal, gluten grain, rye, barley, oat, malt, seitan, triticale',
  wheat:
    'wheat, spelt, khorasan, durum, semolina, bulgur, couscous, farro, freekeh, emmer, einkorn, wheat flour',
  crustaceans:
    'crustacean, crustacea, crustacean shellfish, crab, prawn, shrimp, lobster, crayfish, shellfish, seafood',
  egg: 'egg, hen egg, egg white, albumen',
  fish: 'fish, anchovy, cod, salmon, tuna, fish sauce, seafood',
  peanut: 'peanut, groundnut, ground nut, arachis, peanut butter, monkey nut, nut',
  soy: 'soy, soya, soybean, soyabean, soy bean, soya bean, soy protein, tofu, tempeh, edamame, miso',
  milk: 'milk, dairy, lactose, casein, whey, cheese, butter, cow milk, milk protein, yogurt, yoghurt, cream',
  'tree-nuts':
    'tree nut, nut, almond, hazelnut, filbert, walnut, cashew, pecan, brazil nut, pistachio, macadamia, queensland nut, pine nut',
  celery: 'celery, celeriac, celery root',
  mustard: 'mustard, mustard seed',
  sesame: 'sesame, sesame seed, tahini, benne, gingelly, til',
  sulphites: 'sulphite, sulfite, sulphur dioxide, sulfur dioxide, sulphur dioxide and sulphite, so2, e220',
  lupin: 'lupin, lupine, lupini, lupin bean, lupin flour, tarwi',
  molluscs:
    'mollusc, mollusk, mussel, oyster, clam, squid, octopus, snail, scallop, cuttlefish, shellfish, seafood',
}

const idsByWord = new Map<string, AllergenId[]>()
for (const id of ALLERGEN_IDS) {
  for (const word of [...WORDS[id].split(', '), id, NAMES[id]]) {
    const key = keyOf(word)
    const ids = idsByWord.get(key) ?? []
    if (!ids.includes(id)) idsByWord.set(key, [...ids, id])
  }
}

/** Lower case, one blank between words, no plural endings; `-free` and `without` say nothing more. */
function keyOf(text: string): string {
  return text
    .toLowerCase()
    .normalize('NFKD')
    .replace(/[^a-z0-9 -]/g, '')
    .replace(/-/g, ' ')
    .replace(/\b(without|no|free|allergens?|products?|the|any)\b/g, ' ')
    .split(' ')
    .filter(word => word !== '')
    .map(singular)
    .join(' ')
}

function singular(word: string): string {
  if (/(ss|us)$/.test(word)) return word
  if (/ies$/.test(word) && word.length > 4) return `${word.slice(0, -3)}y`
  return word.replace(/s$/, '')
}

export type AllergenReading = { ok: true; allergens: AllergenId[] } | { ok: false; problem: string }

/** What one word or phrase of `--without` stands for, or why it is not understood, with the nearest names. */
export function readAllergens(text: string): AllergenReading {
  const key = keyOf(text)
  const allergens = idsByWord.get(key)
  if (allergens !== undefined) return { ok: true, allergens }
  if (key === '') return { ok: false, problem: `no allergen named; known: ${ALLERGEN_IDS.join(', ')}` }
  return { ok: false, problem: `not an allergen that is known here; nearest: ${nearest(key).join(', ')}` }
}

const MOST_EDITS = 40

/** The three allergens with the word nearest to the key, by edits. */
function nearest(key: string): AllergenId[] {
  return ALLERGEN_IDS.map(id => ({
    id,
    edits: Math.min(
      ...WORDS[id].split(', ').map(word => editDistance(key.slice(0, 40), keyOf(word), MOST_EDITS)),
    ),
  }))
    .sort((a, b) => a.edits - b.edits)
    .slice(0, 3)
    .map(({ id }) => id)
}
