import type { Candidate } from './candidate.ts'
import { type Prices, worthOf } from './price-bound.ts'

/** What the proof needs of a search: its foods, how many may be chosen, what a set must reach, and how sets are weighed. */
export interface ProofSpace {
  forced: readonly Candidate[]
  open: readonly Candidate[]
  /** how many of the open foods may be chosen */
  free: number
  /** what a set must reach to be better than the best known one, a fraction */
  wanted(): number
  /** may a food join these? (places, roles, kin) */
  mayJoin(chosen: readonly number[], food: number): boolean
  /** weighs a set; the prices that show what it comes to, or null where it was weighed before or has none */
  weigh(chosen: readonly number[]): Prices | null
}

/** Prices that are kept as cuts, and steps that the proof may take; past these it ends unproven. */
const CUTS_AT_MOST = 40
const STEPS_AT_MOST = 60_000

/**
 * Goes through all sets that no known prices rule out and weighs them, so that none better than the best known one is
 * overlooked. Each set that disappoints gives prices that rule out others like it. Prices rule a set out where even
 * with each of its foods at the grams that suit them best its worth stays negative (see `priceBound`); a set still
 * open to more foods counts the worthiest that are left. True where all sets were gone through or ruled out.
 * Source: branch and bound, Econometrica 1960;28:497, doi:10.2307/1910129.
 */
export function proveBest(space: ProofSpace, prices: readonly Prices[]): boolean {
  return space.free <= 0 || new Proof(space, prices).run()
}

/** What prices say of each set of the foods in order, against what is wanted now. */
interface Cut {
  prices: Prices
  /** per food in order: the most that it adds */
  adds: Float64Array
  /** the most that q foods from place i on add: at i x (free + 1) + q */
  tops: Float64Array
  /** the sum so far, by the number of foods chosen */
  sums: Float64Array
}

class Proof {
  private readonly space: ProofSpace
  private readonly prices: Prices[]
  private readonly path: number[] = []
  private order: number[] = []
  private cuts: Cut[] = []
  private wanted = 0
  private steps = 0

  constructor(space: ProofSpace, prices: readonly Prices[]) {
    this.space = space
    this.prices = [...prices]
  }

  run(): boolean {
    // Whenever a better set is found the cuts are made anew, against the higher score.
    do {
      this.wanted = this.space.wanted()
      this.path.length = 0
      this.cuts = []
      const [first] = this.prices
      const worth = this.space.open.map(food => (first === undefined ? 0 : this.most(food, first)))
      this.order = this.space.open.map((_, i) => i).sort((a, b) => worth[b]! - worth[a]! || a - b)
      for (const prices of this.prices) this.cut(prices)
      this.extend(0)
    } while (this.space.wanted() > this.wanted && this.steps < STEPS_AT_MOST)
    return this.steps < STEPS_AT_MOST
  }

  /** The most that a food adds to the worth of a set at some prices, whatever its grams. */
  private most(food: Candidate, prices: Prices): number {
    const margin = worthOf(food, prices) - this.wanted * food.crude
    return margin * (margin > 0 ? food.mostG : food.leastG)
  }

  /** Takes prices as a cut. */
  private cut(prices: Prices): void {
    const { open, forced, free } = this.space
    const n = open.length
    const adds = new Float64Array(n)
    for (let at = 0; at < n; at++) adds[at] = this.most(open[this.order[at]!]!, prices)
    const tops = new Float64Array((n + 1) * (free + 1))
    const best: number[] = new Array(free).fill(0)
    for (let at = n - 1; at >= 0; at--) {
      let add = adds[at]!
      for (let q = 0; q < free && add > 0; q++) {
        if (add <= best[q]!) continue
        const pushed = best[q]!
        best[q] = add
        add = pushed
      }
      let sum = 0
      for (let q = 0; q < free; q++) {
        sum += best[q]!
        tops[at * (free + 1) + q + 1] = sum
      }
    }
    const sums = new Float64Array(free + 1)
    sums[0] = prices.allowance + forced.reduce((sum, food) => sum + this.most(food, prices), 0)
    const cut = { prices, adds, tops, sums }
    this.path.forEach((at, depth) => {
      sums[depth + 1] = sums[depth]! + adds[at]!
    })
    this.cuts.push(cut)
  }

  /** Extends the path by each food from place `start` on. */
  private extend(start: number): void {
    const { open, free } = this.space
    const depth = this.path.length
    const left = free - depth
    for (let at = start; at < open.length; at++) {
      if (++this.steps > STEPS_AT_MOST || this.space.wanted() > this.wanted) return
      if (this.ruledOut(depth, at, left)) return
      const whole = this.tryFood(at, depth, left - 1)
      if (whole === 'out') continue
      const chosen = this.path.map(place => this.order[place]!)
      if (!this.space.mayJoin(chosen, this.order[at]!)) continue
      this.path.push(at)
      if (whole === 'set') this.weigh([...chosen, this.order[at]!])
      if (left > 1) this.extend(at + 1)
      this.path.pop()
    }
  }

  /** Is everything that the path and `left` foods from a place on could make ruled out? */
  private ruledOut(depth: number, at: number, left: number): boolean {
    const width = this.space.free + 1
    for (const { sums, tops } of this.cuts) {
      if (sums[depth]! + tops[at * width + left]! < -MARGIN) return true
    }
    return false
  }

  /** The path with one food more: ruled out with all that may follow, or only as it stands, or worth weighing. */
  private tryFood(at: number, depth: number, left: number): 'out' | 'open' | 'set' {
    const width = this.space.free + 1
    let answer: 'open' | 'set' = 'set'
    for (let c = 0; c < this.cuts.length; c++) {
      const { sums, adds, tops } = this.cuts[c]!
      const sum = sums[depth]! + adds[at]!
      if (sum + tops[(at + 1) * width + left]! < -MARGIN) {
        if (c > 0) {
          // What ruled out this one often rules out the next.
          const cut = this.cuts[c]!
          this.cuts[c] = this.cuts[c - 1]!
          this.cuts[c - 1] = cut
        }
        return 'out'
      }
      if (sum < -MARGIN) answer = 'open'
      sums[depth + 1] = sum
    }
    return answer
  }

  private weigh(set: number[]): void {
    const prices = this.space.weigh(set.sort((a, b) => a - b))
    if (prices === null || this.cuts.length >= CUTS_AT_MOST) return
    this.prices.push(prices)
    this.cut(prices)
  }
}

/** Sums nearer to nought than this may be rounding. */
const MARGIN = 1e-9
