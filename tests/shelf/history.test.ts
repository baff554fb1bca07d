import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { applyChange } from '../../src/shelf/changes.ts'
import { NO_HISTORY, REMEMBERED_CHANGES, redo, remember, undo } from '../../src/shelf/history.ts'
import { EMPTY_SHELF, type Shelf } from '../../src/shelf/shelf.ts'
import { change, foods, shelf } from './shelves.ts'

describe('undo and redo', () => {
  it('go back and forth through exactly the shelves that were, with the order of their foods', () => {
    const step = fc.oneof({ weight: 5, arbitrary: change }, { weight: 1, arbitrary: shelf })
    fc.assert(
      fc.property(shelf, fc.array(step, { maxLength: 25 }), (start, steps) => {
        const shelves: Shelf[] = [start]
        let history = NO_HISTORY
        for (const step of steps) {
          const before = shelves.at(-1)!
          const result = 'do' in step ? applyChange(before, step) : { ok: true as const, shelf: step }
          if (!result.ok) continue
          history = remember(history, 'step', before, result.shelf)
          shelves.push(result.shelf)
        }
        let now = shelves.at(-1)!
        for (let at = shelves.length - 2; at >= 0; at--) {
          const moved = undo(history, now)!
          ;({ history, shelf: now } = moved)
          expect(now).toEqual(shelves[at])
        }
        expect(undo(history, now)).toBeNull()
        for (let at = 1; at < shelves.length; at++) {
          const moved = redo(history, now)!
          ;({ history, shelf: now } = moved)
          expect(now).toEqual(shelves[at])
        }
        expect(redo(history, now)).toBeNull()
      }),
    )
  })

  it('bring back the order of foods that only changed their places', () => {
    const item = (food: string) => ({ food, grams: 5, mark: '' as const, useBy: null, note: '' })
    fc.assert(
      fc.property(fc.shuffledSubarray([...foods]), fc.shuffledSubarray([...foods]), (a, b) => {
        const [from, to] = [{ items: a.map(item) }, { items: b.map(item) }]
        const undone = undo(remember(NO_HISTORY, 'import', from, to), to)!
        expect(undone.shelf).toEqual(from)
        expect(redo(undone.history, undone.shelf)?.shelf).toEqual(to)
      }),
    )
  })

  it('hold the last fifty changes', () => {
    let history = NO_HISTORY
    let now = EMPTY_SHELF
    for (let n = 1; n <= 60; n++) {
      const result = applyChange(now, { do: 'add', food: 'tahini', grams: 1 })
      if (!result.ok) throw new Error(result.problem)
      history = remember(history, `add ${n}`, now, result.shelf)
      now = result.shelf
    }
    const labels: string[] = []
    for (let moved = undo(history, now); moved !== null; moved = undo(moved.history, moved.shelf)) {
      labels.push(moved.step.label)
      now = moved.shelf
    }
    expect(labels).toHaveLength(REMEMBERED_CHANGES)
    expect([labels[0], labels.at(-1)]).toEqual(['add 60', 'add 11'])
    expect(now.items[0]?.grams).toBe(10)
  })

  it('a new change ends what could be done again', () => {
    const one: Shelf = { items: [{ food: 'tahini', grams: 1, mark: '', useBy: null, note: '' }] }
    const undone = undo(remember(NO_HISTORY, 'one', EMPTY_SHELF, one), one)!
    expect(undone.history.redo).toHaveLength(1)
    expect(remember(undone.history, 'other', undone.shelf, one).redo).toEqual([])
  })

  it('hold only the foods that a change touched', () => {
    const items = Array.from({ length: 200 }, (_, i) => ({
      food: `food-${i}`,
      grams: 100,
      mark: '' as const,
      useBy: null,
      note: '',
    }))
    const result = applyChange({ items }, { do: 'take', food: 'food-7', grams: 10 })
    if (!result.ok) throw new Error(result.problem)
    const [step] = remember(NO_HISTORY, 'take', { items }, result.shelf).undo
    expect(step?.before.map(({ food }) => food)).toEqual(['food-7'])
  })
})
