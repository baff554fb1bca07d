import { STAVES } from '../nutrition/amino-acids.ts'
import type { Candidate } from './candidate.ts'
import { type BestGrams, bestGrams, type Window, weighed } from './grams.ts'
import { bestGramsOfFew } from './pair-grams.ts'
import { type PricedFood, type Prices, priceBound, worthOf } from './price-bound.ts'
import { proveBest } from './proof.ts'
import { leastOf, ownStaves, raise } from './stave-bound.ts'

/** A set of foods with its best grams, as the search compares them. */
export interface Proposal {
  set: readonly Candidate[]
  /** DIAAS as a fraction, not truncated */
  quality: number
  grams: Float64Array
  /** kin of its foods, sorted: what makes two proposals the same */
  kins: readonly string[]
  places: number
  kcal: number
}

/** At most so many foods of one role stand in a pairing. */
const ONE_ROLE_AT_MOST = 2
/** Proposals whose prices a proof starts from, and proposals that are mended by swaps. */
const PRICED = 4
const MENDED = 6
const ROUNDS_OF_SWAPS = 5
/** Scores nearer than this are one score (DIAAS as a fraction). */
const SAME = 1e-7

/** What the search works on. `open` foods may be chosen, `forced` ones are in every set. */
export interface SearchSpace {
  forced: readonly Candidate[]
  open: readonly Candidate[]
  foodsAtMost: number
  window: Window
}

/** How far to search. */
export interface SearchAim {
  /** so many proposals that reach 100 end it */
  enough: number
  /** proposals within this of the best are wanted too (a fraction of DIAAS) */
  slack: number
  /** sets within this of the best are grown by further foods (a fraction) */
  growth: number
  /** the best sets of each size that are grown, and as many of those that lack only protein yet */
  seeds: number
}

/** Is one proposal better? By truncated DIAAS, then more of what is to be used up, fewer foods, less energy. */
export function better(a: Proposal, b: Proposal): boolean {
  const qualityA = Math.min(1, a.quality)
  const qualityB = Math.min(1, b.quality)
  if (Math.abs(qualityA - qualityB) > SAME) return qualityA > qualityB
  const usedMore = usedUpG(a) - usedUpG(b)
  if (Math.abs(usedMore) > 1e-6) return usedMore > 0
  if (a.places !== b.places) return a.places < b.places
  return a.kcal < b.kcal
}

function usedUpG({ set, grams }: Proposal): number {
  let sum = 0
  for (let j = 0; j < set.length; j++) if (set[j]!.useUp) sum += grams[j]!
  return sum
}

const comparator = (a: Proposal, b: Proposal): number => (better(a, b) ? -1 : better(b, a) ? 1 : 0)

/**
 * Proposals for a space, the best first: greedy construction from every single food and every pair, growing the best
 * sets (and those that lack only protein) by each food that is left, then a proof that no better set was overlooked, and
 * local search by swaps until none helps. A set whose foods could not reach what is known already, however they are
 * weighed, is not weighed at all.
 */
export class Search {
  private readonly space: SearchSpace
  private readonly aim: SearchAim
  /** what is known of each set that was looked at, by its key; null: no grams, or not worth weighing */
  private readonly seen = new Map<number | string, Proposal | null>()
  private readonly proposals: Proposal[] = []
  private readonly place = new Map<Candidate, number>()
  /** per food: each stave of its own, as a fraction of the pattern */
  private readonly own: Float64Array[]
  private readonly forcedBound: Float64Array
  private best = 0
  private slack = 0
  private reached = 0

  constructor(space: SearchSpace, aim: SearchAim) {
    this.space = space
    this.aim = aim
    space.open.forEach((food, i) => {
      this.place.set(food, i)
    })
    this.own = space.open.map(ownStaves)
    this.forcedBound = new Float64Array(STAVES.length)
    for (const food of space.forced) raise(this.forcedBound, ownStaves(food))
  }

  /** Every feasible proposal met, the best first. */
  run(): Proposal[] {
    const { forced, open, foodsAtMost } = this.space
    const free = foodsAtMost - forced.filter(({ takesPlace }) => takesPlace).length
    if (forced.length > 0) this.weigh([])
    let seeds: Seed[] = [{ chosen: [], prices: null }]
    for (let size = 1; size <= free && !this.complete(); size++) {
      // What the last size reaches need not be grown.
      this.slack = size < free ? Math.max(this.aim.slack, this.aim.growth) : this.aim.slack
      const lacking: number[][] = []
      for (const { set, reach } of this.grown(seeds)) {
        if (reach < this.wanted()) break
        if (this.weigh(set) === null) lacking.push(set)
      }
      if (size === free) break
      // Pairs are grown from every single food, reachable or not: two that fail alone may do together.
      seeds =
        size === 1
          ? open.map((_, i) => ({ chosen: [i], prices: null }))
          : [...this.bestSeeds(size), ...this.towardsProtein(lacking)]
    }
    this.slack = this.aim.slack
    if (!this.complete()) {
      const proven = this.prove(free)
      // Where the best is certain, swaps find only what comes close to it.
      if (!proven || this.slack > 0) this.mend()
    }
    return this.proposals.sort(comparator)
  }

  /** Do enough different sets reach 100 already? More foods could not better them. */
  private complete(): boolean {
    return this.reached >= this.aim.enough
  }

  /**
   * Each seed with each food that is left, once, those that could reach most first; hopeless ones, by what each stave
   * could be and by the prices of the seed, are left out.
   */
  private grown(seeds: readonly Seed[]): Bounded[] {
    const sets: Bounded[] = []
    const met = new Set<number | string>()
    const wanted = this.wanted()
    for (const { chosen, prices } of seeds) {
      const bound = this.boundOf(chosen)
      const priced = prices === null ? null : this.pricedSet(chosen, prices)
      // From single foods each pair comes twice: the second food is then the later one.
      for (let food = chosen.length === 1 ? chosen[0]! + 1 : 0; food < this.own.length; food++) {
        let reach = leastOf(bound, this.own[food]!)
        if (reach < wanted || chosen.includes(food)) continue
        if (priced !== null) {
          priced[chosen.length] = pricedFood(this.space.open[food]!, prices!)
          reach = Math.min(reach, priceBound(priced, prices!.allowance, wanted))
          if (reach < wanted) continue
        }
        const set = chosen.length < 2 ? [...chosen, food] : [...chosen, food].sort((a, b) => a - b)
        if (chosen.length > 1) {
          const key = keyOf(set)
          if (met.has(key)) continue
          met.add(key)
        }
        if (this.fits(set)) sets.push({ set, reach })
      }
    }
    return sets.sort((a, b) => b.reach - a.reach)
  }

  /** A set at some prices, with the forced foods behind and room for one food more between. */
  private pricedSet(chosen: readonly number[], prices: Prices): PricedFood[] {
    const { forced, open } = this.space
    const foods = chosen.map(i => pricedFood(open[i]!, prices))
    return [...foods, NOTHING, ...forced.map(food => pricedFood(food, prices))]
  }

  /** The best sets of a size and, so that no short stave is forgotten, the best for each food. */
  private bestSeeds(size: number): Seed[] {
    const ofSize = this.proposals
      .filter(({ set }) => set.length === size + this.space.forced.length)
      .sort(comparator)
    const seeds = new Set(ofSize.slice(0, this.aim.seeds))
    const met = new Set<Candidate>()
    for (const proposal of ofSize) {
      if (proposal.set.some(food => !met.has(food))) seeds.add(proposal)
      for (const food of proposal.set) met.add(food)
    }
    return [...seeds].map(proposal => ({ chosen: this.chosenOf(proposal), prices: this.pricesOf(proposal) }))
  }

  /** Of the sets without feasible grams, those that can bring most protein: another food may make them reach it. */
  private towardsProtein(lacking: readonly number[][]): Seed[] {
    const reach = (set: readonly number[]) =>
      set.reduce((sum, i) => sum + this.space.open[i]!.protein * this.space.open[i]!.mostG, 0)
    return lacking
      .filter(set => reach(set) < this.space.window.leastProteinG)
      .sort((a, b) => reach(b) - reach(a))
      .slice(0, this.aim.seeds)
      .map(chosen => ({ chosen, prices: null }))
  }

  /** Local search: swaps, additions and removals of one food on the best sets, until none of them helps. */
  private mend(): void {
    const mended = new Set<Proposal>()
    for (let round = 0; round < ROUNDS_OF_SWAPS; round++) {
      const next = [...this.proposals]
        .sort(comparator)
        .slice(0, MENDED)
        .filter(proposal => !mended.has(proposal))
      if (next.length === 0) return
      for (const proposal of next) {
        mended.add(proposal)
        const chosen = this.chosenOf(proposal)
        const rests = chosen.map(out => chosen.filter(i => i !== out))
        for (const rest of rests) if (rest.length > 0 && this.fits(rest)) this.weigh(rest)
        const prices = this.pricesOf(proposal)
        for (const { set, reach } of this.grown([...rests, chosen].map(seed => ({ chosen: seed, prices })))) {
          if (reach < this.wanted()) break
          this.weigh(set)
        }
      }
    }
  }

  /** Weighs what might still be better than the best, until nothing can be; false where that takes too long. */
  private prove(free: number): boolean {
    const { forced, open, window } = this.space
    const known = [...this.proposals].sort(comparator).slice(0, PRICED)
    const met = new Set<number | string>()
    return proveBest(
      {
        forced,
        open,
        free,
        wanted: () => this.best + SAME,
        mayJoin: (chosen, food) => this.fits([...chosen, food]),
        weigh: chosen => {
          const key = keyOf(chosen)
          if (met.has(key) || this.seen.get(key)) return null
          met.add(key)
          const set = this.setOf(chosen)
          const { best, prices } = weighed(set, window, this.best + SAME)
          if (best !== null && best.quality > this.best + SAME) {
            const proposal = proposalFrom(set, best)
            this.seen.set(key, proposal)
            this.keep(proposal)
          }
          return prices
        },
      },
      known.flatMap(proposal => this.pricesOf(proposal) ?? []),
    )
  }

  /** The prices that prove the grams of a proposal the best. */
  private pricesOf({ set }: Proposal): Prices | null {
    return weighed(set, this.space.window, 0).prices
  }

  private setOf(chosen: readonly number[]): Candidate[] {
    return [...this.space.forced, ...chosen.map(i => this.space.open[i]!)]
  }

  private chosenOf(proposal: Proposal): number[] {
    return proposal.set.flatMap(food => this.place.get(food) ?? []).sort((a, b) => a - b)
  }

  /** The exact grams of the forced foods and some chosen ones; null where none keep to the window, or none could help. */
  private weigh(chosen: readonly number[]): Proposal | null {
    const key = keyOf(chosen)
    const known = this.seen.get(key)
    if (known !== undefined) return known
    const proposal = proposalOf(this.setOf(chosen), this.space.window, this.wanted())
    this.seen.set(key, proposal)
    if (proposal !== null) this.keep(proposal)
    return proposal
  }

  private keep(proposal: Proposal): void {
    this.proposals.push(proposal)
    this.best = Math.max(this.best, Math.min(1, proposal.quality))
    if (proposal.quality >= 1) this.reached++
  }

  /** What a set must reach to be worth weighing, a fraction: 100 %, once nothing needs to be grown any more. */
  private wanted(): number {
    if (this.complete()) return 1 - SAME
    return this.best - this.slack - SAME
  }

  /** The most that each stave of a set could be, whatever the grams: that of its food with most of it. */
  private boundOf(chosen: readonly number[]): Float64Array {
    const bound = Float64Array.from(this.forcedBound)
    for (const i of chosen) raise(bound, this.own[i]!)
    return bound
  }

  /** Do roles, kin and places allow the set? */
  private fits(chosen: readonly number[]): boolean {
    const { forced, open, foodsAtMost } = this.space
    let places = 0
    for (const food of forced) if (food.takesPlace) places++
    for (let i = 0; i < chosen.length; i++) {
      const { food, takesPlace } = open[chosen[i]!]!
      if (takesPlace) places++
      let sameRole = 1
      for (const { food: other, takesPlace: counts } of forced) {
        if (other.kin === food.kin) return false
        // What the cook wants used up may be more of one role than is proposed otherwise.
        if (other.role === food.role && counts) sameRole++
      }
      for (let j = 0; j < i; j++) {
        const { food: other, takesPlace: counts } = open[chosen[j]!]!
        if (other.kin === food.kin) return false
        if (other.role === food.role && counts) sameRole++
      }
      if (takesPlace && sameRole > ONE_ROLE_AT_MOST) return false
    }
    return places <= foodsAtMost
  }
}

/** A set to be grown by one food, and prices that bound what may come of it. */
interface Seed {
  chosen: readonly number[]
  prices: Prices | null
}

const NOTHING: PricedFood = { worth: 0, crude: 0, leastG: 0, mostG: 0 }

const pricedFood = (food: Candidate, prices: Prices): PricedFood => ({
  worth: worthOf(food, prices),
  crude: food.crude,
  leastG: food.leastG,
  mostG: food.mostG,
})

/** A set of foods by their places, and what its shortest stave could be at the most. */
interface Bounded {
  set: number[]
  reach: number
}

/** Sets of up to five foods have a number for a key, which is quicker to look up. */
function keyOf(set: readonly number[]): number | string {
  if (set.length > 5) return set.join()
  let key = 0
  for (const i of set) key = key * 1024 + i + 1
  return key
}

/** A set with its exact best grams; null where none keep to the window, or reach what is wanted (a fraction). */
export function proposalOf(set: readonly Candidate[], window: Window, wanted = 0): Proposal | null {
  let least = 0
  let most = 0
  let plain = set.length < 3
  for (const { protein, crude, leastG, mostG } of set) {
    least += protein * leastG
    most += protein * mostG
    if (protein <= 0 || crude <= 0) plain = false
  }
  if (least > window.mostProteinG || most < window.leastProteinG) return null
  const best = plain ? bestGramsOfFew(set, window) : bestGrams(set, window, wanted)
  if (best === null || best.quality < wanted) return null
  return proposalFrom(set, best)
}

function proposalFrom(set: readonly Candidate[], best: BestGrams): Proposal {
  let kcal = 0
  for (let j = 0; j < set.length; j++) kcal += set[j]!.kcal * best.grams[j]!
  return {
    set,
    quality: best.quality,
    grams: best.grams,
    kins: set.map(({ food }) => food.kin).sort(),
    places: set.filter(({ takesPlace }) => takesPlace).length,
    kcal,
  }
}
