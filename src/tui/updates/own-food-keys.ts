import type { AllergenId } from '../../foods/allergens.ts'
import { type OwnFoodInput, ownFoodOf } from '../../foods/own-food.ts'
import { readParts } from '../../foods/protein-parts.ts'
import { sourceByWords } from '../../foods/source-by-words.ts'
import { readAllergens } from '../../kitchen/allergen-names.ts'
import {
  type Knowledge,
  OWN_STEPS,
  type OwnDraft,
  type OwnStep,
  only,
  type State,
  type Updated,
} from '../state.ts'
import { openPrompt } from './open-prompt.ts'

const QUESTIONS: Record<OwnStep, string> = {
  name: 'A food from a packet: what is it called?',
  protein: 'Protein in 100 g, as its label says (g; or "21 in 30" for a serving of 30 g)',
  energy: 'Energy in the same amount (kcal)',
  'made-of': 'What is its protein made of (80 % pea, 20 % rice; or wheat and chickpea)?',
  contains: 'Allergens beyond those of its parts (empty: none)',
}

/** Asks the next thing of a food from a packet. */
export function askOwn(state: State, step: OwnStep, draft: OwnDraft): State {
  return openPrompt(state, {
    for: { what: 'own', step, draft },
    label: `${OWN_STEPS.indexOf(step) + 1} of ${OWN_STEPS.length}  ${QUESTIONS[step]}`,
    text: draft[step] ?? '',
  })
}

/** One answer taken: the next question, or the food kept; or the reason why it cannot be, with the line left open. */
export function ownAnswered(
  state: State,
  step: OwnStep,
  before: OwnDraft,
  text: string,
  knowledge: Knowledge,
): Updated {
  const refused = (problem: string): Updated => only({ ...state, prompt: { ...state.prompt!, problem } })
  const draft = { ...before, [step]: text }
  const read = inputOf(draft, knowledge)
  if (typeof read === 'string') return refused(read)
  const next = OWN_STEPS[OWN_STEPS.indexOf(step) + 1]
  if (next !== undefined) return only(askOwn(state, next, draft))
  const reading = ownFoodOf(read as OwnFoodInput, knowledge.table, knowledge.table.foodById.keys())
  if (!reading.ok) return refused(reading.problems.join('; '))
  const { own } = reading
  const message = `${own.name} is kept; find it, and put it on the shelf.`
  return only(
    { ...state, prompt: null, sample: false, find: own.name.slice(0, 80), cursor: 0, message },
    { effect: 'own-food', own, sample: state.sample ? state.shelf : null },
  )
}

/** What the answers so far say, or what is wrong with the last. */
function inputOf(draft: OwnDraft, { finder }: Knowledge): Partial<OwnFoodInput> | string {
  const input: Partial<OwnFoodInput> = {}
  if (draft.name !== undefined) {
    if (draft.name === '') return 'Give it a name, such as: Galley bar.'
    input.name = draft.name
  }
  if (draft.protein !== undefined) {
    const match = /^([\d.,]+)\s*g?(?:\s*(?:in|per|\/)\s*([\d.,]+)\s*g?)?$/i.exec(draft.protein)
    const [proteinG, perG] = [numberOf(match?.[1]), match?.[2] === undefined ? 100 : numberOf(match[2])]
    if (match === null || proteinG === null || perG === null || perG <= 0)
      return 'Give grams of protein, such as: 20, or 21 in 30.'
    if (proteinG > perG) return `${proteinG} g of protein cannot be in ${perG} g.`
    input.proteinG = proteinG
    input.perG = perG
  }
  if (draft.energy !== undefined) {
    const kcal = numberOf(draft.energy.replace(/\s*kcal$/i, ''))
    if (kcal === null) return 'Give the energy in kcal, such as: 380.'
    input.kcal = kcal
  }
  if (draft['made-of'] !== undefined) {
    const concentrated = (input.proteinG ?? 0) / (input.perG ?? 100) >= 0.5
    const parts = readParts(draft['made-of'], sourceByWords(finder), { concentrated })
    if (!parts.ok) return parts.problem
    input.parts = parts.parts
    input.sharesKnown = parts.sharesKnown
  }
  if (draft.contains !== undefined) {
    const allergens: AllergenId[] = []
    for (const word of draft.contains.split(',').filter(part => !/^\s*(none)?\s*$/i.test(part))) {
      const reading = readAllergens(word)
      if (!reading.ok) return `${word.trim()}: ${reading.problem}`
      allergens.push(...reading.allergens)
    }
    input.allergens = [...new Set(allergens)]
  }
  return input
}

function numberOf(text: string | undefined): number | null {
  const value = Number((text ?? '').trim().replace(',', '.'))
  return text !== undefined && text.trim() !== '' && Number.isFinite(value) && value >= 0 ? value : null
}
