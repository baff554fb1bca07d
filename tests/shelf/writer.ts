import { ShelfStore } from '../../src/shelf/store.ts'

/**
 * A process that puts 1 g of its food on the shelf, so many times, and prints each number once it is kept.
 * Run as: node --import tsx tests/shelf/writer.ts FOLDER FOOD TIMES
 */
const [folder, food, times] = process.argv.slice(2) as [string, string, string]
const store = new ShelfStore(folder)
for (let number = 1; number <= Number(times); number++) {
  const kept = await store.change([{ do: 'add', food, grams: 1 }], `add ${number}`)
  if (!kept.saved || !kept.done) throw new Error(kept.problem ?? 'not saved')
  process.stdout.write(`${number}\n`)
}
