import type { Highs } from 'highs'
import type { Table } from '../../src/foods/table.ts'
import { seededUniform } from '../../src/nutrition/random.ts'
import { admit } from '../../src/pairing/admit.ts'
import { bestProposals, findPairings, windowOf } from '../../src/pairing/find-pairings.ts'
import type { PairingProblem } from '../../src/pairing/problem.ts'
import { highs, optimumOf } from './optimum.ts'
import { hardProblem, randomProblem, randomProblems } from './random-shelves.ts'
import { median, quantile } from './statistics.ts'

const SEED = 20261201

interface Gap {
  /** the true optimum, truncated DIAAS */
  optimum: number
  /** DIAAS points below the true optimum, with continuous grams */
  continuous: number
  /** what serving costs on top: grams that can be weighed, no food that adds next to nothing */
  practical: number
  ownMs: number
  solverMs: number
}

/** The combiner and the solver on one problem; null where both find it infeasible. */
function gapOf(problem: PairingProblem, solver: Highs): Gap | null {
  const start = performance.now()
  const best = bestProposals({ ...problem, pairings: 1 }, admit(problem), windowOf(problem))[0]
  const ownMs = performance.now() - start
  const again = performance.now()
  const optimum = optimumOf(problem, solver)
  const solverMs = performance.now() - again
  if ((best === undefined) !== (optimum === null)) {
    throw new Error(
      `the combiner and the solver disagree whether a plate is feasible (${problem.shelf.length} foods)`,
    )
  }
  if (best === undefined || optimum === null) return null
  const own = Math.min(100, 100 * best.quality)
  const plate = findPairings(problem).pairings[0]!
  return {
    optimum,
    continuous: optimum - own,
    practical: own - Math.min(100, plate.score.diaas ?? 0),
    ownMs,
    solverMs,
  }
}

function gapLines(title: string, problems: readonly PairingProblem[], solver: Highs): string[] {
  const gaps = problems.map(problem => gapOf(problem, solver))
  const feasible = gaps.filter(gap => gap !== null)
  const row = (figures: number[]) =>
    `median ${median(figures).toFixed(3)}, 95th percentile ${quantile(figures, 0.95).toFixed(3)}, worst ${Math.max(...figures).toFixed(3)}`
  const below = feasible.filter(({ optimum }) => optimum < 100 - 1e-4)
  return [
    `${title}: ${problems.length} shelves, ${gaps.length - feasible.length} infeasible for both, ${below.length} with an optimum below 100`,
    `  gap to the optimum (continuous grams), DIAAS points: ${row(feasible.map(gap => gap.continuous))}`,
    `  the same where the optimum is below 100: ${row(below.map(gap => gap.continuous))}`,
    `  what practical grams cost on top: ${row(feasible.map(gap => Math.max(0, gap.practical)))}`,
  ]
}

/** One pairing asked for, times of the combiner and the solver; `belowOnly`: where the optimum is below 100. */
function ratioLine(
  title: string,
  problems: readonly PairingProblem[],
  solver: Highs,
  belowOnly = false,
): string {
  for (const problem of problems.slice(0, 3)) gapOf(problem, solver)
  const all = problems.map(problem => gapOf(problem, solver)).filter(gap => gap !== null)
  const gaps = belowOnly ? all.filter(({ optimum }) => optimum < 100 - 1e-4) : all
  const own = median(gaps.map(gap => gap.ownMs))
  const theirs = median(gaps.map(gap => gap.solverMs))
  const ratios = gaps.map(gap => gap.solverMs / gap.ownMs)
  return `${title} (${gaps.length}): combiner median ${own.toFixed(2)} ms, highs median ${theirs.toFixed(1)} ms; ratio median ${median(ratios).toFixed(0)}, 5th percentile ${quantile(ratios, 0.05).toFixed(0)}`
}

/** Times of whole answers (three pairings with reasons) as the shelf grows to the whole table, as much as one likes. */
function growthLines(table: Table, repeat: number): string[] {
  const uniform = seededUniform(SEED)
  const whole = table.foods.filter(food => food.place === 'protein' && food.origin === 'plant')
  const sizes = [10, 20, 40, 80, 160, whole.length]
  return sizes.map(size => {
    const times: number[] = []
    for (let i = 0; i < repeat; i++) {
      const problem = randomProblem(table, uniform, size, 4)
      const shop = { ...problem, shelf: problem.shelf.map(item => ({ ...item, onHandG: null })), servings: 1 }
      const start = performance.now()
      findPairings(shop)
      times.push(performance.now() - start)
    }
    return `  ${size} foods: median ${median(times).toFixed(1)} ms, worst ${Math.max(...times).toFixed(0)} ms`
  })
}

/** The gap to the true optimum, the time against a general-purpose solver, and how it grows. */
export async function pairBench(table: Table, { quick }: { quick: boolean }): Promise<string[]> {
  const solver = await highs()
  const uniform = seededUniform(SEED + 1)
  const count = quick ? 40 : 500
  const hard = Array.from({ length: quick ? 20 : 100 }, () =>
    hardProblem(table, uniform, 10 + Math.floor(31 * uniform()), 2 + Math.floor(4 * uniform())),
  )
  const timed = Array.from({ length: quick ? 12 : 40 }, () => randomProblem(table, uniform, 40, 4))
  const timedHard = Array.from({ length: quick ? 12 : 40 }, () => hardProblem(table, uniform, 40, 4))
  return [
    ...gapLines('random shelves, 10-60 foods, k = 2-5', randomProblems(table, count, SEED), solver),
    ...gapLines('hard shelves (grains, nuts, few pulses; few reach 100)', hard, solver),
    ratioLine('40 foods, k = 4', timed, solver),
    ratioLine('40 hard foods, k = 4, optimum below 100', timedHard, solver, true),
    'three pairings with their reasons, k = 4, as the shelf grows:',
    ...growthLines(table, quick ? 5 : 15),
  ]
}
