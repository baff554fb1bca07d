import type { Food } from '../foods/food.ts'
import { scorePlate } from '../nutrition/plate-score.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import { type Admitted, admit } from './admit.ts'
import type { Candidate } from './candidate.ts'
import { differentProposals } from './different.ts'
import { byServing, type Finished, finished } from './finish.ts'
import type { Window } from './grams.ts'
import { liftContext, nextLift } from './lift.ts'
import { nearestPlate, type Reach } from './nearest.ts'
import { practicalGrams } from './practical.ts'
import type { Pairing, PairingAnswer, PairingProblem } from './problem.ts'
import { whyOf } from './reasons.ts'
import { type Proposal, Search } from './search.ts'

/** Where several pairings are asked for, more than those are met, so that different ones are among them. */
const SEVERAL = { slack: 0.12, growth: 0.12, seeds: 16 }
const ONE = { slack: 0, growth: 0.02, seeds: 4 }
/** Proposals that reach 100, for each pairing that is asked for, before the search ends. */
const CHOICE = 5
/** So many of the best proposals are put in order by their practical grams. */
const FRONT = 12
/** Protein may be over its target by this share. */
const WINDOW_SHARE = 0.05

/**
 * Solves the pairing problem: the few foods of a shelf, in practical grams a serving, that reach the protein target
 * with the greatest min(DIAAS, 100); several different ones, the best first, each with its reason. Where the target
 * cannot be reached, or marks contradict each other, `reason` says so in words and numbers and the nearest plate is
 * given. Deterministic; throws nothing.
 */
export function findPairings(problem: PairingProblem): PairingAnswer {
  const admitted = admit(problem)
  if (admitted.contradictions.length > 0) return unanswered(`${admitted.contradictions.join('; ')}.`)
  if (problem.shelf.length === 0) return unanswered('The shelf is empty; put foods on it first.')
  if (admitted.forced.length + admitted.open.length === 0) return unanswered(nothingOpen(admitted))
  const window = windowOf(problem)
  const found = searched(problem, admitted, window)
  if (found.length === 0) return nearest(problem, admitted, window)
  return {
    reached: true,
    pairings: served(found, problem, admitted, window).map(proposal => pairingOf(proposal, problem)),
    reason: null,
  }
}

/** As many different proposals as are asked for, in practical grams, the best first. */
function served(
  found: readonly Proposal[],
  { pairings }: PairingProblem,
  { forced }: Admitted,
  window: Window,
): Proposal[] {
  const done = new Map<Proposal, Finished>()
  const finish = (proposal: Proposal): Finished => {
    const known = done.get(proposal) ?? finished(proposal, window)
    done.set(proposal, known)
    done.set(known, known)
    return known
  }
  // What rounding to steps costs differs from set to set, so that the front is put in order anew.
  const front = found.slice(0, FRONT).map(finish).sort(byServing)
  const chosen = differentProposals([...front, ...found.slice(FRONT)], pairings, kinsOf(forced), finish)
  return chosen.map(finish).sort(byServing)
}

const kinsOf = (foods: readonly Candidate[]): Set<string> => new Set(foods.map(({ food }) => food.kin))

/** The protein window and ceilings of a problem. */
export function windowOf(problem: PairingProblem): Window {
  return {
    leastProteinG: problem.targetG,
    mostProteinG: problem.targetG * (1 + WINDOW_SHARE),
    energyAtMostKcal: problem.energyAtMostKcal,
    massAtMostG: problem.massAtMostG,
  }
}

/** The different proposals with their exact (continuous) grams, the best first; empty where none is feasible. */
export function bestProposals(problem: PairingProblem, admitted: Admitted, window: Window): Proposal[] {
  const { forced } = admitted
  return differentProposals(searched(problem, admitted, window), problem.pairings, kinsOf(forced))
}

/** All proposals that the search met, the best first. */
function searched(problem: PairingProblem, { forced, open }: Admitted, window: Window): Proposal[] {
  const aim =
    problem.pairings === 1 ? { ...ONE, enough: 1 } : { ...SEVERAL, enough: CHOICE * problem.pairings }
  return new Search({ forced, open, foodsAtMost: problem.foodsAtMost, window }, aim).run()
}
function pairingOf(proposal: Proposal, problem: PairingProblem): Pairing {
  const portions = proposal.set
    .map(({ food }, j): Portion<Food> => ({ food, grams: proposal.grams[j]! }))
    .sort((a, b) => b.grams * b.food.per100g.proteinG - a.grams * a.food.per100g.proteinG)
  const score = scorePlate(portions, problem.basis)
  const lift = nextLift(portions, liftContext(problem))
  return { portions, score, why: whyOf(score), nextLift: lift }
}

function unanswered(reason: string): PairingAnswer {
  return { reached: false, pairings: [], reason }
}

function nothingOpen({ keptOut }: Admitted): string {
  const reasons = [
    [keptOut.animal, 'animal foods (allow eggs or dairy to use them)'],
    [keptOut.allergen, 'foods with an allergen that is to be left out'],
    [keptOut.heldBack, 'foods that are held back'],
    [keptOut.noPlace, 'foods that bring no protein to speak of'],
    [keptOut.tooLittle, 'foods of which there is less than a portion for each serving'],
  ].flatMap(([count, what]) => (count === 0 ? [] : [`${count} ${what}`]))
  return `Nothing on the shelf can be paired: it holds ${reasons.join(', ')}.`
}

function nearest(problem: PairingProblem, { forced, open }: Admitted, window: Window): PairingAnswer {
  const reach = nearestPlate(forced, open, problem.foodsAtMost, window)
  const reason = reasonFor(reach, problem)
  if (reach.proposal === null) return unanswered(reason)
  const proteinG = reach.proposal.set.reduce(
    (sum, food, j) => sum + food.protein * reach.proposal!.grams[j]!,
    0,
  )
  const slack = { ...window, leastProteinG: proteinG * 0.97, mostProteinG: proteinG * 1.001 }
  const rounded = practicalGrams(reach.proposal.set, [reach.proposal.grams], slack)
  const proposal = { ...reach.proposal, grams: Float64Array.from(rounded.grams) }
  return { reached: false, pairings: [pairingOf(proposal, problem)], reason }
}

function reasonFor({ proteinG, tooLittle, proposal, over }: Reach, problem: PairingProblem): string {
  const target = `${figure(problem.targetG)} g protein a serving`
  if (!tooLittle) {
    return `${target} cannot be kept to: the least portions of what must be in already bring ${figure(proteinG)} g. Raise the target, or take a mark off.`
  }
  const ceilings = [
    ...(problem.energyAtMostKcal === null ? [] : [`${figure(problem.energyAtMostKcal)} kcal`]),
    ...(problem.massAtMostG === null ? [] : [`${figure(problem.massAtMostG)} g`]),
  ]
  const within = ceilings.length === 0 ? '' : ` and at most ${ceilings.join(' and ')}`
  if (over !== undefined) {
    const least = `${figure(over.massG)} g and ${figure(over.energyKcal)} kcal`
    return `What must be in does not fit within ${ceilings.join(' and ')}: its least portions come to ${least} already. Raise the ceiling, or take a mark off.`
  }
  const limits = `with at most ${problem.foodsAtMost} ${problem.foodsAtMost === 1 ? 'food' : 'foods'}${within}`
  if (proposal === null) return `${target} cannot be reached: nothing fits ${limits}.`
  const servings = problem.servings === 1 ? '' : ` shared among ${problem.servings} servings`
  return `${target} cannot be reached from this shelf${servings}: ${limits}, in portions that a person eats, it gives ${figure(proteinG)} g at most. Put more protein foods on the shelf, allow more foods, or lower the target.`
}

const figure = (value: number): string => String(Number(value.toFixed(1)))
