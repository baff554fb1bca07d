import { scoreBasis } from '../../foods/score.ts'
import type { Table } from '../../foods/table.ts'
import { scorePlate } from '../../nutrition/plate-score.ts'
import type { PairingAnswer } from '../../pairing/problem.ts'
import type { Settings } from '../../shelf/settings.ts'

/** An answer as it goes from one thread to another: foods by their ids, scores left out, because both can score. */
export interface PackedAnswer {
  reached: boolean
  reason: string | null
  pairings: {
    portions: { food: string; grams: number }[]
    why: string[]
    nextLift: { food: string; deltaG: number; diaas: number; onShelf: boolean } | null
  }[]
}

export const packed = ({ reached, reason, pairings }: PairingAnswer): PackedAnswer => ({
  reached,
  reason,
  pairings: pairings.map(({ portions, why, nextLift }) => ({
    portions: portions.map(({ food, grams }) => ({ food: food.id, grams })),
    why,
    nextLift: nextLift === null ? null : { ...nextLift, food: nextLift.food.id },
  })),
})

/** The answer again, with the table's foods and the scores. Throws where a food is not in the table. */
export function unpacked(answer: PackedAnswer, table: Table, settings: Settings): PairingAnswer {
  const foodOf = (id: string) => {
    const food = table.foodById.get(id)
    if (food === undefined) throw new Error(`${id} is not in the table`)
    return food
  }
  const basis = scoreBasis(table, settings.pattern)
  return {
    reached: answer.reached,
    reason: answer.reason,
    pairings: answer.pairings.map(({ portions, why, nextLift }) => {
      const found = portions.map(({ food, grams }) => ({ food: foodOf(food), grams }))
      return {
        portions: found,
        score: scorePlate(found, basis),
        why,
        nextLift: nextLift === null ? null : { ...nextLift, food: foodOf(nextLift.food) },
      }
    }),
  }
}
