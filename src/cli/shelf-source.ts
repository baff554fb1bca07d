import { readFileSync } from 'node:fs'
import { dataFile } from '../foods/data-file.ts'
import type { Food } from '../foods/food.ts'
import { plainText } from '../foods/plain-text.ts'
import { foodByWords } from '../foods/search.ts'
import type { ShelfFood } from '../pairing/problem.ts'
import { readShelfFile } from '../shelf/import-export.ts'
import type { Shelf } from '../shelf/shelf.ts'
import { NO_ANSWER, Refusal, type World } from './command.ts'
import { anythingKept, openStore } from './kept.ts'

/** The shelf a command works on, and how to call it in a sentence. */
export interface NamedShelf {
  shelf: Shelf
  label: string
}

/**
 * The shelf that is asked for: a file, standard input (`-`), else what the cook keeps, else the sample: the galley
 * of a river survey boat. A file with a line that is not understood is refused whole, because a pairing that
 * silently leaves a food out misleads.
 */
export async function chosenShelf(option: string | undefined, world: World): Promise<NamedShelf> {
  if (option !== undefined) {
    const label = option === '-' ? 'standard input' : plainText(option).slice(0, 100)
    const text = option === '-' ? await world.readStdin() : await world.readFile(option)
    return { shelf: shelfFromText(text, label, world), label }
  }
  const kept = await keptShelf(world)
  return kept ?? { shelf: sampleShelf(world), label: 'the sample shelf (the galley of a river survey boat)' }
}

/** Reads a shelf file's text, or refuses it with the first line that is wrong and how many more there are. */
export function shelfFromText(text: string, label: string, world: World): Shelf {
  return readShelfText(text, label, world).shelf
}

/**
 * The same, with what the cook should be told of how lines were understood. `alongside` are foods from packets that the
 * file brings with it.
 */
export function readShelfText(
  text: string,
  label: string,
  world: World,
  alongside: readonly { id: string }[] = [],
): { shelf: Shelf; told: string[] } {
  const { shelf, problems, told } = readShelfFile(text, words => {
    const byId = world.table().foodById.get(words) ?? alongside.find(({ id }) => id === words)
    return byId === undefined ? foodByWords(words, world.finder()) : { ok: true, food: byId }
  })
  const [first, ...more] = problems
  if (first === undefined)
    return { shelf, told: told.map(({ line, problem }) => `${label}, line ${line}: ${problem}`) }
  const others = more.length === 0 ? '' : ` (and ${more.length} more ${more.length === 1 ? 'line' : 'lines'})`
  throw new Refusal(`${label}, line ${first.line}: ${first.problem}${others}`)
}

export function sampleShelf(world: World): Shelf {
  return shelfFromText(readFileSync(dataFile('sample-shelf.csv'), 'utf8'), 'sample shelf', world)
}

/** What the cook keeps, or null while nothing has been put there; refused where it is there and cannot be read. */
async function keptShelf(world: World): Promise<NamedShelf | null> {
  if (!anythingKept(world.env)) return null
  const { document, problem, notices } = await (await openStore(world.env)).read()
  if (problem !== null) throw new Refusal(problem, NO_ANSWER)
  // A damaged file without a copy: the sample would pass for what was kept.
  if (!document.begun && notices.length > 0) throw new Refusal(notices.join('; '), NO_ANSWER)
  return document.begun ? { shelf: document.shelf, label: 'your shelf' } : null
}

/** A shelf's items with their foods, for the combiner; a food that is no longer in the table is passed over. */
export function shelfFoods(shelf: Shelf, world: World): ShelfFood[] {
  return shelf.items.flatMap((item): ShelfFood[] => {
    const food = world.table().foodById.get(item.food)
    return food === undefined ? [] : [{ food, onHandG: item.grams, mark: item.mark }]
  })
}

/** A food that a command's words name, or a refusal with the nearest. */
export function namedFood(words: string, world: World): Food {
  const byId = world.table().foodById.get(words)
  if (byId !== undefined) return byId
  const reading = foodByWords(words, world.finder())
  if (reading.ok) return reading.food
  throw new Refusal(reading.problem)
}
