import highsLoader, { type Highs } from 'highs'
import { STAVES } from '../../src/nutrition/amino-acids.ts'
import { admit } from '../../src/pairing/admit.ts'
import type { Candidate } from '../../src/pairing/candidate.ts'
import { windowOf } from '../../src/pairing/find-pairings.ts'
import type { PairingProblem } from '../../src/pairing/problem.ts'

let solver: Promise<Highs> | undefined

/** The general-purpose solver (npm `highs`), loaded once. */
export function highs(): Promise<Highs> {
  solver ??= (highsLoader as unknown as () => Promise<Highs>)()
  return solver
}

/**
 * The true optimum of a pairing problem with continuous grams: the greatest min(DIAAS, 100), per cent, or null where
 * no plate is feasible. One mixed-integer programme: after Charnes and Cooper's substitution y = t g (crude protein
 * of the plate scaled to 1) the score is linear, and a binary for each food says whether it is in. The bounds
 * m z <= g <= M z become m (t - T (1 - z)) <= y <= M t and y <= M T z, with T the largest t that can occur.
 */
export function optimumOf(problem: PairingProblem, solver: Highs): number | null {
  const { forced, open } = admit(problem)
  const foods = [...forced, ...open]
  const window = windowOf(problem)
  const result = solver.solve(programmeOf(foods, problem, window), {
    output_flag: false,
    mip_rel_gap: 1e-7,
    mip_abs_gap: 1e-7,
  } as never)
  if (result.Status === 'Infeasible') return null
  if (result.Status !== 'Optimal') throw new Error(`the solver ended with "${result.Status}"`)
  return 100 * result.ObjectiveValue
}

function programmeOf(
  foods: readonly Candidate[],
  problem: PairingProblem,
  window: ReturnType<typeof windowOf>,
): string {
  // t = 1 / crude protein; crude protein is least where table protein is least and the factor highest.
  const leastCrude = Math.min(...foods.map(food => (food.crude / food.protein) * window.leastProteinG))
  const T = 1 / leastCrude
  const terms = (parts: [number, string][]) =>
    parts
      .filter(([value]) => value !== 0)
      .map(([value, name]) => `${value < 0 ? '-' : '+'} ${Math.abs(value).toPrecision(15)} ${name}`)
      .join(' ')
  const lines: string[] = ['Maximize', ' obj: q', 'Subject To']
  lines.push(` scale: ${terms(foods.map((food, j) => [food.crude, `y${j}`]))} = 1`)
  STAVES.forEach((stave, i) => {
    lines.push(
      ` ${stave}: ${terms([[-1, 'q'], ...foods.map((food, j): [number, string] => [food.staves[i]!, `y${j}`])])} >= 0`,
    )
  })
  const protein = foods.map((food, j): [number, string] => [food.protein, `y${j}`])
  lines.push(` low: ${terms([...protein, [-window.leastProteinG, 't']])} >= 0`)
  lines.push(` high: ${terms([...protein, [-window.mostProteinG, 't']])} <= 0`)
  foods.forEach((food, j) => {
    lines.push(
      ` up${j}: ${terms([
        [1, `y${j}`],
        [-food.mostG, 't'],
      ])} <= 0`,
    )
    lines.push(
      ` on${j}: ${terms([
        [1, `y${j}`],
        [-food.mostG * T, `z${j}`],
      ])} <= 0`,
    )
    lines.push(
      ` least${j}: ${terms([
        [1, `y${j}`],
        [-food.leastG, 't'],
        [-food.leastG * T, `z${j}`],
      ])} >= -${(food.leastG * T).toPrecision(15)}`,
    )
  })
  lines.push(` places: ${terms(foods.map((_, j) => [1, `z${j}`]))} <= ${problem.foodsAtMost}`)
  const group = (key: (food: Candidate) => string, most: number, label: string) => {
    const groups = new Map<string, number[]>()
    for (const [j, food] of foods.entries()) groups.set(key(food), [...(groups.get(key(food)) ?? []), j])
    let number = 0
    for (const members of groups.values()) {
      if (members.length > most)
        lines.push(` ${label}${number++}: ${terms(members.map(j => [1, `z${j}`]))} <= ${most}`)
    }
  }
  group(({ food }) => food.role, 2, 'role')
  group(({ food }) => food.kin, 1, 'kin')
  lines.push('Bounds', ' 0 <= q <= 1', ` 0 <= t <= ${T.toPrecision(15)}`)
  lines.push('Binary', ` ${foods.map((_, j) => `z${j}`).join(' ')}`, 'End')
  return lines.join('\n')
}
