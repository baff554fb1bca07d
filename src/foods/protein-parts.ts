import type { Food } from './food.ts'
import type { ProteinPart } from './own-food.ts'
import { plainText } from './plain-text.ts'

/**
 * Finds the food that some words name (`sourceByWords` with the search's finder). `assumed`: the words may mean
 * others too; `unknown`: no food is called so at all, rather than too many or not in that state.
 */
export type ResolveFood = (
  words: string,
) => { ok: true; food: Food; assumed?: boolean } | { ok: false; problem: string; unknown?: boolean }

export type PartsReading =
  | {
      ok: true
      parts: ProteinPart[]
      /** were all shares said? a single part needs none */
      sharesKnown: boolean
      foods: Food[]
      /** foods taken for words that may mean others too; to be shown */
      assumed: Food[]
    }
  | { ok: false; problem: string }

/** The shares of a label are whole per cents: together within 1 of 100. */
const SUM_WITHIN = 0.011
const PARTS_AT_MOST = 12

/**
 * What the protein of a packet is made of: `80 % pea, 20 % rice`, `wheat and chickpea`, `pea 80%; rice`. Parts are
 * parted by commas, `and`, `+` or `&`; where there is a semicolon, by semicolons only (for names with commas). One
 * part without a share takes what is left; several share it alike, which is a guess. `concentrated`: try the powder
 * of each first (`pea` is then pea protein).
 */
export function readParts(text: string, resolve: ResolveFood, { concentrated = false } = {}): PartsReading {
  // A decimal comma is no separator.
  const plain = plainText(text)
    .trim()
    .replace(/(\d),(?=\d)/g, '$1.')
  const splitter = plain.includes(';') ? /;/ : /,|\+|&|\band\b/i
  const pieces = plain
    .split(splitter)
    .map(piece => piece.trim())
    .filter(piece => piece !== '')
  if (pieces.length === 0) return refused('say what its protein is made of, such as "80 % pea, 20 % rice"')
  if (pieces.length > PARTS_AT_MOST)
    return refused(`${pieces.length} parts are too many; give the ${PARTS_AT_MOST} largest`)
  const read: { food: Food; share: number | null; assumed: boolean }[] = []
  for (const piece of pieces) {
    const part =
      /^(?:(?<before>\d+(?:\.\d+)?) ?(?:%|per ?cent)\s*(?:of )?)?(?<words>.*?)(?:\s*\(?(?<after>\d+(?:\.\d+)?) ?(?:%|per ?cent)\)?)?$/i.exec(
        piece,
      )
    const words = part?.groups?.words?.trim() ?? ''
    const percent = part?.groups?.before ?? part?.groups?.after
    if (words === '') return refused(`"${piece.slice(0, 40)}" names no food`)
    const share = percent === undefined ? null : Number(percent) / 100
    if (share !== null && !(share > 0 && share <= 1))
      return refused(`"${piece.slice(0, 40)}": a share lies between 0 and 100 %`)
    const found = resolved(words, resolve, concentrated)
    if (!found.ok) return refused(`"${words.slice(0, 40)}": ${found.problem}`)
    if (found.food.id.startsWith('own-'))
      return refused(`"${words.slice(0, 40)}" is an own food; name foods of the table`)
    read.push({ food: found.food, share, assumed: found.assumed ?? false })
  }
  return shared(read)
}

function resolved(words: string, resolve: ResolveFood, concentrated: boolean): ReturnType<ResolveFood> {
  if (concentrated && !/protein|isolate|concentrate|powder|gluten/i.test(words)) {
    const powder = resolve(`${words} protein`)
    if (powder.ok && (powder.food.role === 'powder' || powder.food.state === 'powder')) return powder
  }
  return resolve(words)
}

function shared(read: { food: Food; share: number | null; assumed: boolean }[]): PartsReading {
  const said = read.reduce((total, { share }) => total + (share ?? 0), 0)
  const unsaid = read.filter(({ share }) => share === null).length
  const left = 1 - said
  if (unsaid === 0 && Math.abs(left) > SUM_WITHIN)
    return refused(`the shares come to ${Math.round(said * 100)} %, not to 100 %`)
  if (unsaid > 0 && !(left > 0))
    return refused(`the shares come to ${Math.round(said * 100)} % before the last part is counted`)
  const byFood = new Map<string, { food: Food; share: number }>()
  for (const { food, share } of read) {
    const of = share === null ? left / unsaid : unsaid === 0 ? share / said : share
    byFood.set(food.id, { food, share: of + (byFood.get(food.id)?.share ?? 0) })
  }
  const parts = [...byFood.values()]
  return {
    ok: true,
    parts: parts.map(({ food, share }) => ({ food: food.id, share })),
    sharesKnown: unsaid <= 1 && (read.length === 1 || unsaid < read.length),
    foods: parts.map(({ food }) => food),
    assumed: read.flatMap(({ food, assumed }) => (assumed ? [food] : [])),
  }
}

const refused = (problem: string): PartsReading => ({ ok: false, problem: plainText(problem) })
