import type { Candidate } from './candidate.ts'
import { bestGrams, type Window } from './grams.ts'

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
/** Sets of each size that are grown further, and that are mended by swaps. */
const GROWN = 36
const MENDED = 8
const ROUNDS_OF_SWAPS = 6
/** Scores nearer than this are one score (DIAAS as a fraction). */
const SAME = 1e-7

/** What the search works on. `open` foods may be chosen, `forced` ones are in every set. */
export interface SearchSpace {
  forced: readonly Candidate[]
  open: readonly Candidate[]
  foodsAtMost: number
  window: Window
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
 * sets by each food that is left, then local search by swaps until none helps. Each set gets its exact grams.
 */
export class Search {
  private readonly found = new Map<string, Proposal | null>()
  private readonly space: SearchSpace
  /** the search ends early once so many proposals reach 100 with the foods they have */
  private readonly enough: number

  constructor(space: SearchSpace, enough: number) {
    this.space = space
    this.enough = enough
  }

  /** Every feasible proposal met, the best first. */
  run(): Proposal[] {
    const { forced, open, foodsAtMost } = this.space
    const free = foodsAtMost - forced.filter(({ takesPlace }) => takesPlace).length
    let level: Proposal[] = []
    const empty = forced.length > 0 ? this.propose([]) : null
    if (empty !== null) level = [empty]
    let seeds: readonly (readonly Candidate[])[] = [[]]
    for (let size = 1; size <= free; size++) {
      level = this.grow(seeds, open, size)
      if (this.complete()) break
      // Pairs are grown from every single food, reachable or not: two that fail alone may do together.
      seeds = size === 1 ? open.map(food => [food]) : this.seedsFrom(level)
    }
    if (!this.complete()) this.mend()
    return this.proposals()
  }

  private proposals(): Proposal[] {
    return [...this.found.values()].filter(proposal => proposal !== null).sort(comparator)
  }

  /** Do enough different sets reach 100 already? More foods could not better them. */
  private complete(): boolean {
    let reached = 0
    for (const proposal of this.found.values()) if (proposal !== null && proposal.quality >= 1) reached++
    return reached >= this.enough
  }

  private grow(
    seeds: readonly (readonly Candidate[])[],
    open: readonly Candidate[],
    size: number,
  ): Proposal[] {
    const grown: Proposal[] = []
    for (const seed of seeds) {
      for (const food of open) {
        if (size > 1 && seed.includes(food)) continue
        const proposal = this.propose([...seed, food])
        if (proposal !== null) grown.push(proposal)
      }
    }
    return grown
  }

  /** The best sets of a level and, so that no short stave is forgotten, the best for each food. */
  private seedsFrom(level: readonly Proposal[]): (readonly Candidate[])[] {
    const sorted = [...new Set(level)].sort(comparator)
    const seeds = new Set(sorted.slice(0, GROWN))
    const seen = new Map<Candidate, number>()
    for (const proposal of sorted) {
      for (const food of proposal.set) {
        const times = seen.get(food) ?? 0
        if (times < 1) seeds.add(proposal)
        seen.set(food, times + 1)
      }
    }
    return [...seeds].map(({ set }) => set.filter(food => !food.useUp))
  }

  /** Local search: swaps of one food, additions and removals on the best sets, until none of them helps. */
  private mend(): void {
    for (let round = 0; round < ROUNDS_OF_SWAPS; round++) {
      const before = this.found.size
      for (const { set } of this.proposals().slice(0, MENDED)) {
        const chosen = set.filter(food => !food.useUp)
        for (let out = 0; out < chosen.length; out++) {
          const rest = chosen.filter((_, i) => i !== out)
          this.propose(rest)
          for (const food of this.space.open) if (!chosen.includes(food)) this.propose([...rest, food])
        }
        for (const food of this.space.open) if (!chosen.includes(food)) this.propose([...chosen, food])
      }
      if (this.found.size === before) return
    }
  }

  /** The exact grams of the forced foods and some chosen ones; null where roles, kin, places or window forbid the set. */
  private propose(chosen: readonly Candidate[]): Proposal | null {
    const set = [...this.space.forced, ...chosen]
    if (set.length === 0) return null
    const key = set
      .map(({ food }) => food.id)
      .sort()
      .join('|')
    const known = this.found.get(key)
    if (known !== undefined) return known
    const proposal = this.fits(set) ? proposalOf(set, this.space.window) : null
    this.found.set(key, proposal)
    return proposal
  }

  private fits(set: readonly Candidate[]): boolean {
    let places = 0
    for (let i = 0; i < set.length; i++) {
      const { food, takesPlace, useUp } = set[i]!
      if (takesPlace) places++
      let sameRole = 1
      for (let j = 0; j < i; j++) {
        const other = set[j]!.food
        if (other.kin === food.kin) return false
        if (other.role === food.role && set[j]!.takesPlace) sameRole++
      }
      // What the cook wants used up may be more of one role than is proposed otherwise.
      if (takesPlace && !useUp && sameRole > ONE_ROLE_AT_MOST) return false
    }
    return places <= this.space.foodsAtMost
  }
}

/** A set with its exact best grams; null where none keep to the window. */
export function proposalOf(set: readonly Candidate[], window: Window): Proposal | null {
  let least = 0
  let most = 0
  for (const { protein, leastG, mostG } of set) {
    least += protein * leastG
    most += protein * mostG
  }
  if (least > window.mostProteinG || most < window.leastProteinG) return null
  const best = bestGrams(set, window)
  if (best === null) return null
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
