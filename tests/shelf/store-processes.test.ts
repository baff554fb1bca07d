import { readdirSync } from 'node:fs'
import { setTimeout as wait } from 'node:timers/promises'
import { beforeAll, describe, expect, it } from 'vitest'
import { ShelfStore } from '../../src/shelf/store.ts'
import { atATime, bundled, freshFolder, running } from './scripts.ts'

let writer: string
beforeAll(async () => {
  writer = await bundled('writer')
})

const gramsIn = async (folder: string): Promise<Record<string, number>> => {
  const kept = await new ShelfStore(folder).read()
  expect({ saved: kept.saved, problem: kept.problem, notices: kept.notices }).toEqual({
    saved: true,
    problem: null,
    notices: [],
  })
  return Object.fromEntries(kept.document.shelf.items.map(({ food, grams }) => [food, grams]))
}

describe('processes that keep the same shelf', () => {
  it('lose nothing of each other: two writers, five hundred changes each', async () => {
    const folder = freshFolder()
    const writers = ['tahini', 'oats-rolled'].map(food => running(writer, folder, food, 500))
    const ends = await Promise.all(writers.map(({ ended }) => ended))
    expect(ends.map(({ code }) => code)).toEqual([0, 0])
    expect(await gramsIn(folder)).toEqual({ tahini: 500, 'oats-rolled': 500 })
    expect(readdirSync(folder).sort()).toEqual(['shelf.json', 'shelf.last-good.json'])
  }, 60_000)

  it('lose nothing on the same food: four writers, fifty changes each', async () => {
    const folder = freshFolder()
    const ends = await Promise.all([1, 2, 3, 4].map(() => running(writer, folder, 'tahini', 50).ended))
    expect(ends.map(({ code }) => code)).toEqual([0, 0, 0, 0])
    expect(await gramsIn(folder)).toEqual({ tahini: 200 })
  }, 60_000)
})

describe('a process that is killed', () => {
  it('leaves a shelf that can be read and changed: a hundred kills at random moments', async () => {
    const folders = Array.from({ length: 100 }, freshFolder)
    const kills = await atATime(3, folders, async folder => {
      const victim = running(writer, folder, 'tahini', 100_000)
      await victim.until(1 + Math.floor(Math.random() * 4))
      await wait(Math.random() * 8)
      victim.kill('SIGKILL')
      const { signal } = await victim.ended
      const { tahini } = await gramsIn(folder)
      return { signal, errors: victim.errors, acknowledged: victim.count, tahini: tahini ?? 0 }
    })
    for (const { signal, errors, acknowledged, tahini } of kills) {
      expect({ signal, errors }).toEqual({ signal: 'SIGKILL', errors: '' })
      // What was said to be kept is kept; the change under way may be there or not, and one more may be unheard.
      expect(tahini).toBeGreaterThanOrEqual(acknowledged)
      expect(acknowledged).toBeGreaterThan(0)
    }
    // Locks that the killed left are waited out at the same time.
    const after = await Promise.all(
      folders.map(folder => new ShelfStore(folder).change([{ do: 'add', food: 'tahini', grams: 1 }], 'add')),
    )
    expect(after.filter(({ saved, done }) => saved && done)).toHaveLength(100)
    expect(after.map(({ document }) => document.shelf.items[0]?.grams)).toEqual(
      kills.map(({ tahini }) => tahini + 1),
    )
    for (const folder of folders)
      expect(readdirSync(folder).sort()).toEqual(['shelf.json', 'shelf.last-good.json'])
  }, 120_000)

  it('does not keep another from writing on', async () => {
    const sums = await atATime(3, [1, 2, 3, 4], async () => {
      const folder = freshFolder()
      const victim = running(writer, folder, 'tahini', 100_000)
      const other = running(writer, folder, 'oats-rolled', 60)
      await Promise.all([victim.until(3), other.until(3)])
      await wait(Math.random() * 10)
      victim.kill('SIGKILL')
      const [{ code }] = await Promise.all([other.ended, victim.ended])
      const { tahini = 0, ...rest } = await gramsIn(folder)
      return { code, rest, lost: Math.max(0, victim.count - tahini) }
    })
    expect(sums).toEqual(sums.map(() => ({ code: 0, rest: { 'oats-rolled': 60 }, lost: 0 })))
  }, 120_000)
})

describe('a process that is stopped for a while', () => {
  it('writes over nothing that others kept meanwhile', async () => {
    const ends = await atATime(4, Array.from({ length: 6 }), async () => {
      const folder = freshFolder()
      const stopped = running(writer, folder, 'tahini', 120)
      await stopped.until(1 + Math.floor(Math.random() * 5))
      await wait(Math.random() * 6)
      stopped.kill('SIGSTOP')
      const other = running(writer, folder, 'oats-rolled', 20)
      const { code: otherCode } = await other.ended
      stopped.kill('SIGCONT')
      const { code } = await stopped.ended
      return { codes: [code, otherCode], errors: stopped.errors, grams: await gramsIn(folder) }
    })
    expect(ends).toEqual(
      ends.map(() => ({ codes: [0, 0], errors: '', grams: { tahini: 120, 'oats-rolled': 20 } })),
    )
  }, 120_000)
})
