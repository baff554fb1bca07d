import { STAVES } from '../nutrition/amino-acids.ts'
import type { Candidate } from './candidate.ts'
import { bestGrams, type Window } from './grams.ts'
import { bestGramsOfFew } from './pair-grams.ts'

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
/** Sets of each size that are grown further, sets that reach too little protein yet, and sets that are mended by swaps. */
const GROWN = 16
const GROWN_TOWARDS_PROTEIN = 12
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

/** How far to search: `enough` proposals that reach 100 end it; proposals within `slack` of the best are wanted too. */
export interface SearchAim {
  enough: number
  slack: number
}

/** Is one proposal better than another? By truncated DIAAS, then fewer foods, then less energy. */
export function better(a: Proposal, b: Proposal): boolean {
  const qualityA = Math.min(1, a.quality)
  const qualityB = Math.min(1, b.quality)
  if (Math.abs(qualityA - qualityB) > SAME) return qualityA > qualityB
  if (a.places !== b.places) return a.places < b.places
  return a.kcal < b.kcal
}

const comparator = (a: Proposal, b: Proposal): number => (better(a, b) ? -1 : better(b, a) ? 1 : 0)

/**
 * Proposals for a space, the best first: greedy construction from every single food and every pair, growing the best
 * sets (and those that lack only protein) by each food that is left, then local search by swaps until none helps. A set
 * whose foods could not reach what is known already, however they are weighed, is not weighed at all.
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
    let seeds: number[][] = [[]]
    for (let size = 1; size <= free && !this.complete(); size++) {
      const lacking: number[][] = []
      for (const { set, reach } of this.grown(seeds)) {
        if (reach < this.wanted()) break
        if (this.weigh(set) === null) lacking.push(set)
      }
      // Pairs are grown from every single food, reachable or not: two that fail alone may do together.
      seeds =
        size === 1 ? open.map((_, i) => [i]) : [...this.bestSeeds(size), ...this.towardsProtein(lacking)]
    }
    if (!this.complete()) this.mend()
    return this.proposals.sort(comparator)
  }

  /** Do enough different sets reach 100 already? More foods could not better them. */
  private complete(): boolean {
    return this.reached >= this.aim.enough
  }

  /** Each seed with each food that is left, once, those with the highest bound first; hopeless ones are left out. */
  private grown(seeds: readonly number[][]): Bounded[] {
    const sets: Bounded[] = []
    const met = new Set<number | string>()
    const wanted = this.wanted()
    for (const seed of seeds) {
      const bound = this.boundOf(seed)
      // From single foods each pair comes twice: the second food is then the later one.
      for (let food = seed.length === 1 ? seed[0]! + 1 : 0; food < this.own.length; food++) {
        const reach = leastOf(bound, this.own[food]!)
        if (reach < wanted || seed.includes(food)) continue
        const set = seed.length < 2 ? [...seed, food] : [...seed, food].sort((a, b) => a - b)
        if (seed.length > 1) {
          const key = keyOf(set)
          if (met.has(key)) continue
          met.add(key)
        }
        if (this.fits(set)) sets.push({ set, reach })
      }
    }
    return sets.sort((a, b) => b.reach - a.reach)
  }

  /** The best sets of a size and, so that no short stave is forgotten, the best for each food. */
  private bestSeeds(size: number): number[][] {
    const ofSize = this.proposals
      .filter(({ set }) => set.length === size + this.space.forced.length)
      .sort(comparator)
    const seeds = new Set(ofSize.slice(0, GROWN))
    const met = new Set<Candidate>()
    for (const proposal of ofSize) {
      if (proposal.set.some(food => !met.has(food))) seeds.add(proposal)
      for (const food of proposal.set) met.add(food)
    }
    return [...seeds].map(proposal => this.chosenOf(proposal))
  }

  /** Of the sets without feasible grams, those that can bring most protein: another food may make them reach it. */
  private towardsProtein(lacking: readonly number[][]): number[][] {
    const reach = (set: readonly number[]) =>
      set.reduce((sum, i) => sum + this.space.open[i]!.protein * this.space.open[i]!.mostG, 0)
    return lacking
      .filter(set => reach(set) < this.space.window.leastProteinG)
      .sort((a, b) => reach(b) - reach(a))
      .slice(0, GROWN_TOWARDS_PROTEIN)
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
        for (const { set, reach } of this.grown([...rests, chosen])) {
          if (reach < this.wanted()) break
          this.weigh(set)
        }
      }
    }
  }

  private chosenOf(proposal: Proposal): number[] {
    return proposal.set.flatMap(food => this.place.get(food) ?? []).sort((a, b) => a - b)
  }

  /** The exact grams of the forced foods and some chosen ones; null where none keep to the window, or none could help. */
  private weigh(chosen: readonly number[]): Proposal | null {
    const key = keyOf(chosen)
    const known = this.seen.get(key)
    if (known !== undefined) return known
    const set = [...this.space.forced, ...chosen.map(i => this.space.open[i]!)]
    const proposal = proposalOf(set, this.space.window, this.wanted())
    this.seen.set(key, proposal)
    if (proposal !== null) {
      this.proposals.push(proposal)
      this.best = Math.max(this.best, Math.min(1, proposal.quality))
      if (proposal.quality >= 1) this.reached++
    }
    return proposal
  }

  /** What a set must reach to be worth weighing, a fraction: 100 %, once nothing needs to be grown any more. */
  private wanted(): number {
    if (this.complete()) return 1 - SAME
    return this.best - this.aim.slack - SAME
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

const ownStaves = ({ staves, crude }: Candidate): Float64Array =>
  staves.map(stave => (crude > 0 ? stave / crude : 0))

function raise(bound: Float64Array, own: Float64Array): void {
  for (let i = 0; i < bound.length; i++) if (own[i]! > bound[i]!) bound[i] = own[i]!
}

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

/** The shortest stave of a bound, raised by one more food. */
function leastOf(bound: Float64Array, own: Float64Array): number {
  let least = Number.POSITIVE_INFINITY
  for (let i = 0; i < bound.length; i++) {
    const stave = Math.max(bound[i]!, own[i]!)
    if (stave < least) least = stave
  }
  return least
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
