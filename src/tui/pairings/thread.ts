import { parentPort } from 'node:worker_threads'
import type { Food } from '../../foods/food.ts'
import { loadTable } from '../../foods/load.ts'
import { findPairings } from '../../pairing/find-pairings.ts'
import type { Settings } from '../../shelf/settings.ts'
import type { Shelf } from '../../shelf/shelf.ts'
import { problemOf } from '../problem-of.ts'
import { type PackedAnswer, packed } from './packed.ts'

/** What the thread is asked: the shelf, the bench, and foods that its own table lacks (those from packets). */
export interface ThreadQuestion {
  number: number
  shelf: Shelf
  settings: Settings
  ownFoods: Food[]
}

export interface ThreadAnswer {
  number: number
  answer: PackedAnswer
}

/** The thread that works pairings out for a large shelf, so that keys are answered meanwhile. */
const table = loadTable()
parentPort?.on('message', ({ number, shelf, settings, ownFoods }: ThreadQuestion) => {
  const own = new Map(ownFoods.map(food => [food.id, food]))
  const all = {
    ...table,
    foods: [...table.foods, ...ownFoods],
    foodById: { get: (id: string) => table.foodById.get(id) ?? own.get(id) } as typeof table.foodById,
  }
  const answer = packed(findPairings(problemOf({ shelf, settings }, { table: all })))
  parentPort?.postMessage({ number, answer } satisfies ThreadAnswer)
})
