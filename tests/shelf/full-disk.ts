import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { ShelfStore } from '../../src/shelf/store.ts'

/**
 * A process for which the disk takes no more than a few kilobytes: the note makes the shelf larger than that. Prints a
 * line of JSON for each change. Run as: sh -c 'ulimit -f 8; exec node full-disk.mjs FOLDER'
 */
// The limit's signal would end the process; as long as somebody listens, the write fails instead, as on a full disk.
process.on('SIGXFSZ', () => undefined)
const folder = process.argv[2]!
const store = new ShelfStore(folder)
const say = (value: unknown) => process.stdout.write(`${JSON.stringify(value)}\n`)

for (let number = 1; number <= 40; number++) {
  const kept = await store.change(
    [{ do: 'add', food: `food-${number}`, grams: 5, note: 'x'.repeat(400) }],
    `add ${number}`,
  )
  const { items } = kept.document.shelf
  say({
    saved: kept.saved,
    done: kept.done,
    problem: kept.problem,
    notices: kept.notices,
    foods: items.length,
  })
}
const onDisk = JSON.parse(readFileSync(join(folder, 'shelf.json'), 'utf8'))
say({ foodsOnDisk: onDisk.shelf.items.length })
