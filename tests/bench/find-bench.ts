import { createFinder } from '../../src/foods/search.ts'
import type { Table } from '../../src/foods/table.ts'
import { QUERIES } from '../foods/queries.ts'
import { median, quantile } from './statistics.ts'

/**
 * Types every query of the test table letter by letter, over tables that grow from 10 foods to all of them, and
 * times each keystroke.
 */
export function findBench(table: Table): string[] {
  const sizes = [10, 50, 200, table.foods.length]
  return sizes.map(size => {
    const finder = createFinder(
      table.foods.filter((_, i) => (i * size) % table.foods.length < size).slice(0, size),
    )
    finder.find('warm up')
    const times: number[] = []
    for (const [query] of QUERIES) {
      for (let length = 1; length <= query.length; length++) {
        const start = performance.now()
        finder.find(query.slice(0, length), { limit: 20 })
        times.push(performance.now() - start)
      }
    }
    return `${size} foods: median ${median(times).toFixed(2)} ms, 95th percentile ${quantile(times, 0.95).toFixed(2)} ms, worst ${Math.max(...times).toFixed(1)} ms of ${times.length} keystrokes`
  })
}
