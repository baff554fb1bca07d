import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { additionsOf, applyChange, applyChanges, type ShelfChange } from '../../src/shelf/changes.ts'
import { EMPTY_SHELF, type Shelf, type ShelfItem, shelfSchema } from '../../src/shelf/shelf.ts'
import { change, shelf } from './shelves.ts'

const tofu: ShelfItem = {
  food: 'tofu-firm',
  grams: 350,
  mark: 'use-up',
  useBy: '2026-12-05',
  note: 'cold box',
}
const tahini: ShelfItem = { food: 'tahini', grams: 450, mark: '', useBy: null, note: '' }
const galley: Shelf = { items: [tofu, tahini] }

function after(change: ShelfChange, before: Shelf = galley): Shelf {
  const result = applyChange(before, change)
  if (!result.ok) throw new Error(result.problem)
  return result.shelf
}

describe('a change of the shelf', () => {
  it('adds grams to a food that is there and keeps what is not named', () => {
    expect(after({ do: 'add', food: 'tofu-firm', grams: 150 }).items).toEqual([
      { ...tofu, grams: 500 },
      tahini,
    ])
    expect(
      after({ do: 'add', food: 'tofu-firm', grams: 1, mark: undefined, note: undefined }).items[0],
    ).toEqual({
      ...tofu,
      grams: 351,
    })
  })

  it('adds a food that is not there at the end, with its mark, date and note', () => {
    const added = {
      food: 'soy-milk',
      grams: 1000,
      mark: 'hold-back' as const,
      useBy: '2026-12-24',
      note: 'for porridge',
    }
    expect(after({ do: 'add', ...added }).items).toEqual([tofu, tahini, added])
  })

  it('adds tenths to tenths', () => {
    expect(
      after({ do: 'add', food: 'tahini', grams: 0.2 }, { items: [{ ...tahini, grams: 0.1 }] }).items[0]
        ?.grams,
    ).toBe(0.3)
  })

  it('sets what is named and leaves the rest', () => {
    expect(after({ do: 'set', food: 'tofu-firm', grams: 200 }).items[0]).toEqual({ ...tofu, grams: 200 })
    expect(after({ do: 'set', food: 'tofu-firm', useBy: null }).items[0]).toEqual({ ...tofu, useBy: null })
    expect(after({ do: 'set', food: 'tofu-firm', note: '' }).items[0]).toEqual({ ...tofu, note: '' })
    expect(after({ do: 'set', food: 'tofu-firm', mark: '' }).items[0]).toEqual({ ...tofu, mark: '' })
  })

  it('sets a food that is not there, if its grams are given', () => {
    expect(after({ do: 'set', food: 'soy-milk', grams: 500 }).items[2]).toEqual({
      ...tahini,
      food: 'soy-milk',
      grams: 500,
    })
    expect(applyChange(galley, { do: 'set', food: 'soy-milk', note: 'x' })).toEqual({
      ok: false,
      problem: 'soy-milk is not on the shelf',
    })
  })

  it('takes grams, and the food with its last crumb', () => {
    expect(after({ do: 'take', food: 'tofu-firm', grams: 100 }).items[0]).toEqual({ ...tofu, grams: 250 })
    for (const grams of [350, 349.99, 900])
      expect(after({ do: 'take', food: 'tofu-firm', grams }).items).toEqual([tahini])
  })

  it('removes, marks and clears', () => {
    expect(after({ do: 'remove', food: 'tofu-firm' }).items).toEqual([tahini])
    expect(after({ do: 'mark', food: 'tahini', mark: 'hold-back' }).items[1]).toEqual({
      ...tahini,
      mark: 'hold-back',
    })
    expect(after({ do: 'clear' })).toEqual(EMPTY_SHELF)
  })

  it.each([
    { do: 'take', food: 'soy-milk', grams: 1 },
    { do: 'remove', food: 'soy-milk' },
    { do: 'mark', food: 'soy-milk', mark: 'use-up' },
  ] as const)('refuses to $do what is not there', change => {
    expect(applyChange(galley, change)).toEqual({ ok: false, problem: 'soy-milk is not on the shelf' })
  })

  it.each([Number.NaN, 0, -5, Number.POSITIVE_INFINITY, 1_000_001, '500'])(
    'refuses %s grams in one line',
    grams => {
      for (const verb of ['add', 'set', 'take'] as const) {
        const result = applyChange(galley, { do: verb, food: 'tofu-firm', grams } as ShelfChange)
        expect(result).toMatchObject({
          ok: false,
          problem: expect.stringMatching(/^this change cannot be: grams: [^\n]+$/),
        })
      }
    },
  )

  it('refuses what is no change, no id, no day, no mark', () => {
    for (const change of [
      {},
      { do: 'fry', food: 'tofu-firm' },
      { do: 'remove', food: 'Tofu, firm' },
      { do: 'set', food: 'tofu-firm', useBy: '2026-02-30' },
      { do: 'mark', food: 'tofu-firm', mark: 'eat' },
      { do: 'set', food: 'tofu-firm', note: 'x'.repeat(501) },
    ]) {
      expect(applyChange(galley, change as ShelfChange).ok).toBe(false)
    }
  })

  it('refuses more than a tonne of one food rather than dropping some', () => {
    const heap = { items: [{ ...tahini, grams: 999_999 }] }
    expect(applyChange(heap, { do: 'add', food: 'tahini', grams: 2 })).toEqual({
      ok: false,
      problem: 'tahini: more than 1000000 grams of one food cannot be kept',
    })
  })

  it('keeps a note as one line of plain text', () => {
    const note = ' \u001b[31mleft\u001b[0m\nof "the" door\u0000 '
    expect(after({ do: 'set', food: 'tahini', note }).items[1]?.note).toBe('left of "the" door')
  })

  it('does all of some changes or none', () => {
    const changes: ShelfChange[] = [
      { do: 'take', food: 'tahini', grams: 15 },
      { do: 'take', food: 'soy-milk', grams: 200 },
    ]
    expect(applyChanges(galley, changes)).toEqual({ ok: false, problem: 'soy-milk is not on the shelf' })
  })

  it('puts a file to what is there without wiping marks, dates and notes', () => {
    const file = shelfSchema.parse({
      items: [
        { food: 'tofu-firm', grams: 200 },
        { food: 'tahini', grams: 1, note: 'new jar' },
      ],
    })
    expect(applyChanges(galley, additionsOf(file))).toEqual({
      ok: true,
      shelf: {
        items: [
          { ...tofu, grams: 550 },
          { ...tahini, grams: 451, note: 'new jar' },
        ],
      },
    })
  })

  it('leaves a shelf that can be kept, and the one given as it was', () => {
    fc.assert(
      fc.property(shelf, fc.array(change, { maxLength: 30 }), (start, changes) => {
        const text = JSON.stringify(start)
        let now = start
        for (const change of changes) {
          const result = applyChange(now, change)
          if (result.ok) now = result.shelf
          else expect(result.problem).toMatch(/^[^\n]+$/)
          expect(shelfSchema.parse(now)).toEqual(now)
        }
        expect(JSON.stringify(start)).toBe(text)
      }),
    )
  })
})
