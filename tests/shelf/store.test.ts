import {
  existsSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmdirSync,
  rmSync,
  statSync,
  symlinkSync,
  utimesSync,
  writeFileSync,
} from 'node:fs'
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { describe, expect, it } from 'vitest'
import type { ShelfChange } from '../../src/shelf/changes.ts'
import { NEW_DOCUMENT } from '../../src/shelf/document.ts'
import type { ServedPlate } from '../../src/shelf/served-plate.ts'
import { ShelfStore } from '../../src/shelf/store.ts'
import { withLock } from '../../src/shelf/store-lock.ts'
import { bundled, freshFolder, Running } from './scripts.ts'

const add = (food: string, grams: number): ShelfChange => ({ do: 'add', food, grams })
const gramsOf = ({ document }: { document: typeof NEW_DOCUMENT }) =>
  Object.fromEntries(document.shelf.items.map(({ food, grams }) => [food, grams]))

/** A folder in which tahini, 450 g, is kept. */
async function keptFolder(): Promise<string> {
  const folder = freshFolder()
  const kept = await new ShelfStore(folder).change([add('tahini', 450)], 'add tahini')
  expect(kept).toMatchObject({ saved: true, done: true, problem: null, notices: [] })
  return folder
}
const file = (folder: string): string => join(folder, 'shelf.json')

describe('the store', () => {
  it('begins with nothing and writes nothing until something changes', async () => {
    const folder = freshFolder()
    const kept = await new ShelfStore(folder).read()
    expect(kept).toEqual({
      document: NEW_DOCUMENT,
      saved: true,
      problem: null,
      done: true,
      notices: [],
      label: null,
    })
    expect(readdirSync(folder)).toEqual([])
  })

  it('makes its folder, for the owner only to read what is in it', async () => {
    const folder = join(freshFolder(), 'deep', 'down')
    await new ShelfStore(folder).change([add('tahini', 450)], 'add')
    expect(gramsOf(await new ShelfStore(folder).read())).toEqual({ tahini: 450 })
    expect(statSync(file(folder)).mode & 0o077).toBe(0)
  })

  it('takes all of some changes or none, and says why in one line', async () => {
    const folder = await keptFolder()
    const kept = await new ShelfStore(folder).change(
      [add('oats-rolled', 5), { do: 'remove', food: 'soy-milk' }],
      'x',
    )
    expect(kept).toMatchObject({ saved: true, done: false, problem: 'soy-milk is not on the shelf' })
    expect(gramsOf(await new ShelfStore(folder).read())).toEqual({ tahini: 450 })
  })

  it('keeps calls in their order, whoever awaits them, however long they wait for another process', async () => {
    const folder = freshFolder()
    const store = new ShelfStore(folder)
    const calls = [store.change([add('tahini', 100)], 'add')]
    await calls[0]
    const lock = join(folder, 'shelf.json.lock')
    mkdirSync(lock)
    for (let n = 1; n <= 30; n++)
      calls.push(store.change([{ do: 'set', food: 'tahini', grams: n }], `set ${n}`))
    await wait(100)
    rmdirSync(lock)
    await Promise.all(calls)
    const { document } = await new ShelfStore(folder).read()
    const inOrder = Array.from({ length: 30 }, (_, i) => `set ${i + 1}`)
    expect(document.history.undo.map(({ label }) => label)).toEqual(['add', ...inOrder])
    expect(gramsOf({ document })).toEqual({ tahini: 30 })
  })

  it('undoes and redoes across restarts, fifty changes back', async () => {
    const folder = freshFolder()
    for (let n = 1; n <= 55; n++) await new ShelfStore(folder).change([add('tahini', 1)], `add ${n}`)
    for (let n = 55; n > 5; n--) {
      const undone = await new ShelfStore(folder).undo()
      expect([undone.label, gramsOf(undone).tahini]).toEqual([`add ${n}`, n - 1])
    }
    const nothing = await new ShelfStore(folder).undo()
    expect(nothing).toMatchObject({ done: false, saved: true, problem: 'there is nothing to undo' })
    for (let n = 6; n <= 55; n++) {
      const redone = await new ShelfStore(folder).redo()
      expect([redone.label, gramsOf(redone).tahini]).toEqual([`add ${n}`, n])
    }
    expect(await new ShelfStore(folder).redo()).toMatchObject({
      done: false,
      problem: 'there is nothing to redo',
    })
  })

  it('replaces the shelf as one step, and refuses one that cannot be', async () => {
    const folder = await keptFolder()
    const store = new ShelfStore(folder)
    const oats = { food: 'oats-rolled', grams: 900, mark: '' as const, useBy: null, note: '' }
    expect(gramsOf(await store.replace({ items: [oats] }, 'import'))).toEqual({ 'oats-rolled': 900 })
    expect(await store.replace({ items: [oats, oats] }, 'import')).toMatchObject({ done: false })
    expect(await store.replace({ items: [{ ...oats, grams: Number.NaN }] }, 'x')).toMatchObject({
      done: false,
    })
    expect(gramsOf(await store.undo())).toEqual({ tahini: 450 })
  })

  it('serves a plate as one step: undone, the plate is not under its day either', async () => {
    const folder = await keptFolder()
    const plate: ServedPlate = { day: '2026-12-01', servings: 6, portions: [{ food: 'tahini', grams: 15 }] }
    const served = await new ShelfStore(folder).serve(plate, [{ do: 'take', food: 'tahini', grams: 90 }])
    expect([gramsOf(served), served.document.plates]).toEqual([{ tahini: 360 }, [plate]])
    const undone = await new ShelfStore(folder).undo()
    expect([gramsOf(undone), undone.document.plates, undone.label]).toEqual([{ tahini: 450 }, [], 'serve'])
    const redone = await new ShelfStore(folder).redo()
    expect([gramsOf(redone), redone.document.plates]).toEqual([{ tahini: 360 }, [plate]])
    const refused = await new ShelfStore(folder).serve(plate, [{ do: 'take', food: 'soy-milk', grams: 90 }])
    expect([refused.done, refused.document.plates]).toEqual([false, [plate]])
    expect((await new ShelfStore(folder).setPlates(() => [])).document.plates).toEqual([])
  })

  it('keeps foods from packets that two stores add at once', async () => {
    const folder = await keptFolder()
    const ids = Array.from({ length: 20 }, (_, i) => `bar-${i}`)
    await Promise.all(ids.map(id => new ShelfStore(folder).setOwnFoods(kept => [...kept, { id }])))
    const { document } = await new ShelfStore(folder).read()
    expect(document.ownFoods.map(food => (food as { id: string }).id).sort()).toEqual(ids.sort())
  })

  it('carries sections that it does not know', async () => {
    const folder = await keptFolder()
    const document = JSON.parse(readFileSync(file(folder), 'utf8'))
    writeFileSync(file(folder), JSON.stringify({ ...document, menus: ['friday'] }))
    await new ShelfStore(folder).change([add('tahini', 1)], 'add')
    expect(JSON.parse(readFileSync(file(folder), 'utf8'))).toMatchObject({ menus: ['friday'] })
  })

  it('leaves a linked file linked', async () => {
    const real = await keptFolder()
    const folder = freshFolder()
    symlinkSync(file(real), file(folder))
    await new ShelfStore(folder).change([add('tahini', 50)], 'add')
    expect(lstatSync(file(folder)).isSymbolicLink()).toBe(true)
    expect(gramsOf(await new ShelfStore(real).read())).toEqual({ tahini: 500 })
  })
})

describe('a damaged store', () => {
  const damages: [string, (text: string) => string][] = [
    ['cut off', text => text.slice(0, text.length / 2)],
    ['empty', () => ''],
    ['noise', () => '\u0000\u0001\u0002 noise'],
    ['another JSON', () => '{"hello":"world"}'],
    ['impossible grams', text => text.replace('450', '-450')],
    ['a food twice', text => text.replace(/"items":\[(\{[^}]+\})\]/, '"items":[$1,$1]')],
    ['no version', text => text.replace('"version":1,', '')],
  ]
  it.each(damages)(
    'is set aside with its name told, and the last good copy restored: %s',
    async (_, damage) => {
      const folder = await keptFolder()
      const damaged = damage(readFileSync(file(folder), 'utf8'))
      writeFileSync(file(folder), damaged)
      const kept = await new ShelfStore(folder).read()
      const aside = join(folder, 'shelf.damaged-1.json')
      expect(kept).toMatchObject({ saved: true, done: true, problem: null })
      expect(kept.notices).toEqual([
        expect.stringContaining(aside),
        'the last good copy of the shelf is restored',
      ])
      expect(gramsOf(kept)).toEqual({ tahini: 450 })
      expect(readFileSync(aside, 'utf8')).toBe(damaged)
      // Mended once and for all, and what is changed next is kept.
      expect(await new ShelfStore(folder).change([add('tahini', 1)], 'add')).toMatchObject({
        saved: true,
        notices: [],
      })
      expect(gramsOf(await new ShelfStore(folder).read())).toEqual({ tahini: 451 })
    },
  )

  it('is mended by a change too, and each damaged file keeps a name of its own', async () => {
    const folder = await keptFolder()
    for (const n of [1, 2, 3]) {
      writeFileSync(file(folder), `damage ${n}`)
      const kept = await new ShelfStore(folder).change([add('tahini', 1)], 'add')
      expect(gramsOf(kept)).toEqual({ tahini: 450 + n })
      expect(readFileSync(join(folder, `shelf.damaged-${n}.json`), 'utf8')).toBe(`damage ${n}`)
    }
  })

  it('whose copy is damaged too: both are set aside, and the shelf begins anew', async () => {
    const folder = await keptFolder()
    writeFileSync(file(folder), 'damage')
    writeFileSync(join(folder, 'shelf.last-good.json'), 'damage of the copy')
    const kept = await new ShelfStore(folder).change([add('oats-rolled', 5)], 'add')
    expect([kept.saved, kept.notices.length, gramsOf(kept)]).toEqual([true, 2, { 'oats-rolled': 5 }])
    const aside = ['shelf.damaged-1.json', 'shelf.damaged-2.json'].map(name =>
      readFileSync(join(folder, name), 'utf8'),
    )
    expect(aside).toEqual(['damage', 'damage of the copy'])
  })

  it('that is gone is restored from its copy, and said', async () => {
    const folder = await keptFolder()
    rmSync(file(folder))
    const kept = await new ShelfStore(folder).read()
    expect([gramsOf(kept), kept.notices]).toEqual([
      { tahini: 450 },
      ['the last good copy of the shelf is restored'],
    ])
  })

  it('takes away what killed writers left unfinished, and nothing else', async () => {
    const folder = await keptFolder()
    for (const name of [
      'shelf.json.99999.part',
      'shelf.last-good.json.99999.part',
      'notes.part',
      'shelf.txt',
    ]) {
      writeFileSync(join(folder, name), 'x')
    }
    await new ShelfStore(folder).change([add('tahini', 1)], 'add')
    expect(readdirSync(folder).sort()).toEqual([
      'notes.part',
      'shelf.json',
      'shelf.last-good.json',
      'shelf.txt',
    ])
  })
})

describe('a store of a newer version', () => {
  it('is refused and not rewritten; the session goes on in memory', async () => {
    const folder = await keptFolder()
    const newer = readFileSync(file(folder), 'utf8').replace('"version":1', '"version":2')
    writeFileSync(file(folder), newer)
    const before = readdirSync(folder).sort()
    const store = new ShelfStore(folder)
    const problem = `${file(folder)}: it was written by a newer shortstave; use that one; changes hold until you leave`
    expect(await store.read()).toMatchObject({ saved: false, problem })
    expect(await store.change([add('oats-rolled', 5)], 'add')).toMatchObject({
      saved: false,
      done: true,
      problem,
    })
    const again = await store.change([add('oats-rolled', 5)], 'add')
    expect(gramsOf(again)).toEqual({ 'oats-rolled': 10 })
    expect(gramsOf(await store.undo())).toEqual({ 'oats-rolled': 5 })
    expect(readFileSync(file(folder), 'utf8')).toBe(newer)
    expect(readdirSync(folder).sort()).toEqual(before)
  })

  it('is left alone as a copy too', async () => {
    const folder = await keptFolder()
    const newer = readFileSync(file(folder), 'utf8').replace('"version":1', '"version":2')
    writeFileSync(join(folder, 'shelf.last-good.json'), newer)
    rmSync(file(folder))
    expect(await new ShelfStore(folder).change([add('tahini', 1)], 'add')).toMatchObject({ saved: false })
    expect(readdirSync(folder)).toEqual(['shelf.last-good.json'])
  })
})

describe('where nothing can be kept', () => {
  it('a folder that cannot be: one line, and the session goes on in memory', async () => {
    const wall = join(freshFolder(), 'a-file')
    writeFileSync(wall, 'in the way')
    const folder = join(wall, 'home')
    const store = new ShelfStore(folder)
    const problem = `nothing can be kept in ${folder} (part of the path is not a folder); changes hold until you leave`
    expect(await store.read()).toMatchObject({ saved: false, done: true, problem, notices: [] })
    await store.change([add('tahini', 450)], 'add tahini')
    const taken = await store.change([{ do: 'take', food: 'tahini', grams: 50 }], 'take')
    expect([taken.saved, taken.done, taken.problem, gramsOf(taken)]).toEqual([
      false,
      true,
      problem,
      { tahini: 400 },
    ])
    expect(gramsOf(await store.undo())).toEqual({ tahini: 450 })
    expect(gramsOf(await store.redo())).toEqual({ tahini: 400 })
    expect(await store.change([{ do: 'remove', food: 'soy-milk' }], 'x')).toMatchObject({
      done: false,
      problem: 'soy-milk is not on the shelf',
    })
    expect(gramsOf(await store.read())).toEqual({ tahini: 400 })
    expect(readFileSync(wall, 'utf8')).toBe('in the way')
  })

  it.runIf(existsSync('/proc/self'))(
    'a place where folders cannot be made, however often one tries',
    async () => {
      const kept = await new ShelfStore('/proc/no-such-folder/home').change([add('tahini', 5)], 'add')
      expect(kept).toMatchObject({
        saved: false,
        done: true,
        problem: expect.stringContaining('no folder can be made there'),
      })
    },
  )

  it('a folder where the file should be', async () => {
    const folder = freshFolder()
    mkdirSync(file(folder))
    const kept = await new ShelfStore(folder).change([add('tahini', 5)], 'add')
    expect(kept).toMatchObject({
      saved: false,
      done: true,
      problem: expect.stringContaining('a folder stands where'),
    })
    expect(gramsOf(kept)).toEqual({ tahini: 5 })
  })

  it('a lock that cannot be made: the shelf that is there is seen and goes on, and is kept once that is mended', async () => {
    const folder = await keptFolder()
    // A file in the lock's place: root, too, can neither make nor remove a folder there.
    const lock = join(folder, 'shelf.json.lock')
    writeFileSync(lock, '')
    utimesSync(lock, 0, 0)
    const store = new ShelfStore(folder)
    expect(gramsOf(await store.read())).toEqual({ tahini: 450 })
    const taken = await store.change([{ do: 'take', food: 'tahini', grams: 50 }], 'take')
    expect([taken.saved, taken.done, gramsOf(taken)]).toEqual([false, true, { tahini: 400 }])
    expect(taken.problem).toMatch(/^nothing can be kept in [^\n]+; changes hold until you leave$/)

    rmSync(lock)
    await new ShelfStore(folder).change([add('oats-rolled', 7), add('tahini', 50)], 'by another')
    const kept = await store.change([add('soy-milk', 9)], 'add')
    expect(kept).toMatchObject({ saved: true, done: true, problem: null })
    expect(kept.notices).toEqual(['what changed while nothing could be kept is kept now'])
    expect(gramsOf(kept)).toEqual({ tahini: 450, 'oats-rolled': 7, 'soy-milk': 9 })
    expect(gramsOf(await new ShelfStore(folder).read())).toEqual(gramsOf(kept))
  }, 60_000)

  it('a disk that is full in the midst of a write: what was kept stays, what comes is held, and each is said', async () => {
    const folder = freshFolder()
    const script = await bundled('full-disk')
    const child = new Running('sh', ['-c', 'ulimit -f 8; exec "$0" "$@"', process.execPath, script, folder])
    expect([await child.ended, child.errors]).toEqual([{ code: 0, signal: null }, ''])
    const lines = child.lines.map(line => JSON.parse(line))
    const { foodsOnDisk } = lines.pop()
    expect(lines).toHaveLength(40)
    expect(lines.map(({ done, foods }) => [done, foods])).toEqual(lines.map((_, i) => [true, i + 1]))
    const saved = lines.filter(line => line.saved)
    expect(saved.length).toBeGreaterThan(0)
    expect(saved.length).toBeLessThan(40)
    expect(foodsOnDisk).toBe(saved.length)
    for (const line of lines.slice(saved.length)) {
      expect(line).toMatchObject({
        saved: false,
        problem: expect.stringMatching(/^nothing can be kept in [^\n]+$/),
      })
    }
    expect(readdirSync(folder).sort()).toEqual(['shelf.json', 'shelf.last-good.json'])
    expect(gramsOf(await new ShelfStore(folder).read())['food-1']).toBe(5)
  }, 60_000)
})

describe('a lock', () => {
  it('that a killed process left is waited out', async () => {
    const folder = await keptFolder()
    mkdirSync(join(folder, 'shelf.json.lock'))
    expect(gramsOf(await new ShelfStore(folder).read())).toEqual({ tahini: 450 })
    const kept = await new ShelfStore(folder).change([add('tahini', 1)], 'add')
    expect([kept.saved, gramsOf(kept)]).toEqual([true, { tahini: 451 }])
    expect(existsSync(join(folder, 'shelf.json.lock'))).toBe(false)
  })

  it('whose time lies ahead, because the clock was set back, is waited out', async () => {
    const folder = await keptFolder()
    const lock = join(folder, 'shelf.json.lock')
    mkdirSync(lock)
    const tomorrow = new Date(Date.now() + 86_400_000)
    utimesSync(lock, tomorrow, tomorrow)
    const kept = await new ShelfStore(folder).change([add('tahini', 1)], 'add')
    expect([kept.saved, gramsOf(kept)]).toEqual([true, { tahini: 451 }])
  }, 60_000)

  it('that another process took over meanwhile is known to be lost, and left to it', async () => {
    const folder = freshFolder()
    const lock = join(folder, 'x.lock')
    const turns: boolean[] = []
    const done = withLock(join(folder, 'x'), stillHeld => {
      const first = turns.length === 0
      if (first) {
        expect(stillHeld()).toBe(true)
        rmdirSync(lock)
        mkdirSync(lock)
      }
      turns.push(stillHeld())
      return first ? null : { done: true }
    })
    await wait(500)
    expect([existsSync(lock), turns]).toEqual([true, [false]])
    rmdirSync(lock)
    expect(await done).toEqual({ done: true })
    expect([existsSync(lock), turns]).toEqual([false, [false, true]])
  })
})
