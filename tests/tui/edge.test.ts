import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, describe, expect, it } from 'vitest'
import { findPairings } from '../../src/pairing/find-pairings.ts'
import { DEFAULT_SETTINGS } from '../../src/shelf/default-settings.ts'
import { SettingsStore } from '../../src/shelf/settings-store.ts'
import type { Shelf } from '../../src/shelf/shelf.ts'
import { ShelfStore } from '../../src/shelf/store.ts'
import { Edge } from '../../src/tui/edge.ts'
import type { Key } from '../../src/tui/keys.ts'
import { packed, unpacked } from '../../src/tui/pairings/packed.ts'
import { problemOf } from '../../src/tui/problem-of.ts'
import { firstState } from '../../src/tui/state.ts'
import { GALLEY, knowledge, opened } from './helpers.ts'

const homes: string[] = []
afterEach(() => {
  for (const home of homes.splice(0)) rmSync(home, { recursive: true, force: true })
})

function started(
  home = mkdtempSync(join(tmpdir(), 'shortstave-edge-')),
  sample: Shelf = GALLEY,
  today = () => '2026-06-01',
) {
  homes.push(home)
  const state = firstState({
    columns: 80,
    rows: 24,
    shelf: sample,
    sample: true,
    settings: DEFAULT_SETTINGS,
    spoken: false,
    message: '',
  })
  const edge = new Edge({
    state,
    table: knowledge.table,
    today,
    colour: false,
    opened: {
      store: async () => new ShelfStore(home),
      settings: async () => new SettingsStore(home),
    },
    draw: () => undefined,
    quit: () => undefined,
  })
  edge.start()
  const press = (...keys: string[]) => {
    for (const key of keys) {
      const named = key.length > 1 ? ({ key } as Key) : ({ key: 'text', text: key } as const)
      edge.send({ event: 'key', key: named })
    }
  }
  return { edge, press, home }
}

const until = async (holds: () => boolean) => {
  for (let i = 0; i < 500 && !holds(); i++) await new Promise(resolve => setTimeout(resolve, 10))
  expect(holds()).toBe(true)
}

describe('the edge', () => {
  it('answers with the pairings of the shelf as it is now, after the keys that waited', async () => {
    const { edge, press } = started()
    await until(() => edge.state.answer !== null && !edge.state.stale)
    press('#')
    press('tab', 'e', 'd')
    expect(edge.state.stale).toBe(true)
    await until(() => !edge.state.stale)
    expect(edge.state.answer).toEqual(findPairings(problemOf(edge.state, knowledge)))
    await edge.settled()
  })

  it('keeps the sample with the first change, each change after it, and takes them back in their order', async () => {
    const { edge, press, home } = started()
    press('!', 'down', '#')
    await edge.settled()
    const kept = (await new ShelfStore(home).read()).document.shelf
    expect(kept).toEqual(edge.state.shelf)
    expect(kept.items).toHaveLength(GALLEY.items.length - 1)
    press('<')
    await edge.settled()
    expect(edge.state.shelf.items).toHaveLength(GALLEY.items.length)
    press('<')
    await edge.settled()
    expect(edge.state.shelf).toEqual(GALLEY)
  })

  it('brings the sample back where an empty shelf was started by mistake', async () => {
    const { edge, press } = started()
    press('0')
    await edge.settled()
    expect(edge.state.shelf.items).toEqual([])
    press('<')
    await edge.settled()
    expect(edge.state.shelf).toEqual(GALLEY)
  })

  it('keeps the sample where the first thing done is a food from a packet, which can then be found', async () => {
    const { edge, press, home } = started()
    press('+')
    for (const answer of ['Galley bar', '20', '380', 'soy', '']) press(...answer, 'enter')
    await edge.settled()
    expect(edge.state.shelf).toEqual(GALLEY)
    expect(edge.state.sample).toBe(false)
    const { document } = await new ShelfStore(home).read()
    expect(document.shelf).toEqual(GALLEY)
    expect(document.ownFoods).toHaveLength(1)
    expect(edge.knowledge.finder.find('galley bar')[0]!.food.id).toBe('own-galley-bar')
  })

  it('keeps settings over a restart', async () => {
    const { edge, press, home } = started()
    await until(() => edge.state.answer !== null)
    press('tab', 't', '4', '2', 'enter', 'a', 's', 'o', 'y', 'enter')
    await edge.settled()
    const again = started(home)
    await until(() => again.edge.state.settings.targetG === 42)
    expect(again.edge.state.settings.without).toEqual(['soy'])
    await again.edge.settled()
  })

  it('goes on, and says why, where nothing can be kept', async () => {
    const { edge, press } = started('/dev/null/nowhere')
    homes.length = 0
    press('!')
    await edge.settled()
    expect(edge.state.shelf.items[0]!.mark).toBe('use-up')
    expect(edge.state.message).not.toBe('')
  })
})

describe('keys that are typed while what is kept is still read', () => {
  it('act on the shelf that is kept, never on the sample', async () => {
    const first = started()
    first.press('0')
    await first.edge.settled()
    await new ShelfStore(first.home).change([{ do: 'add', food: 'tofu-firm', grams: 777 }], 'add tofu')
    const again = started(first.home)
    again.press('!')
    expect(again.edge.state.shelf).toEqual(GALLEY)
    await again.edge.settled()
    const { document } = await new ShelfStore(first.home).read()
    expect(document.shelf.items.map(({ food, grams, mark }) => [food, grams, mark])).toEqual([
      ['tofu-firm', 777, 'use-up'],
    ])
    expect(again.edge.state.shelf).toEqual(document.shelf)
  })

  it('change one setting, and leave the others as they are kept', async () => {
    const home = mkdtempSync(join(tmpdir(), 'shortstave-edge-'))
    new SettingsStore(home).write({ ...DEFAULT_SETTINGS, servings: 7, without: ['peanut'] })
    const { edge, press } = started(home)
    press('tab', 'e')
    await edge.settled()
    const { settings } = new SettingsStore(home).read()
    expect(settings).toEqual({ ...DEFAULT_SETTINGS, servings: 7, without: ['peanut'], eggs: true })
  })

  it('are kept where Ctrl+C follows them at once', async () => {
    const { edge, press, home } = started()
    press('!', 'interrupt')
    await edge.settled()
    const { document } = await new ShelfStore(home).read()
    expect(document.shelf.items[0]!.mark).toBe('use-up')
  })
})

describe('a shelf that another process begins while the sample is shown', () => {
  const begun = async () => {
    const screens = started()
    await until(() => !screens.edge.state.stale)
    await new ShelfStore(screens.home).change([{ do: 'add', food: 'tofu-firm', grams: 777 }], 'add tofu')
    return screens
  }
  it.each(['!', '0', '#'])('is not overwritten by %s', async key => {
    const { edge, press, home } = await begun()
    press(key)
    await edge.settled()
    const { document } = await new ShelfStore(home).read()
    expect(document.shelf.items.map(({ food, grams }) => [food, grams])).toEqual([['tofu-firm', 777]])
    expect(edge.state.shelf).toEqual(document.shelf)
    expect(edge.state.sample).toBe(false)
  })
})

describe('what the settings tell', () => {
  it('refuses planning on the sample shelf too', async () => {
    const home = mkdtempSync(join(tmpdir(), 'shortstave-edge-'))
    new SettingsStore(home).write({ ...DEFAULT_SETTINGS, conditions: ['phenylketonuria'] })
    const { edge } = started(home)
    await edge.settled()
    expect(edge.state.sample).toBe(true)
    expect(edge.state.refusal).not.toBeNull()
    expect(edge.state.answer).toBeNull()
  })
})

describe('past midnight', () => {
  it('a plate is kept under the new day', async () => {
    let day = '2026-06-01'
    const { edge, press, home } = started(undefined, GALLEY, () => day)
    await until(() => edge.state.answer !== null)
    press('tab', 'enter')
    day = '2026-06-02'
    press('s', 'y')
    await edge.settled()
    const { document } = await new ShelfStore(home).read()
    expect(document.plates.map(plate => plate.day)).toEqual(['2026-06-02'])
  })
})

describe('an answer from another thread', () => {
  it('is the same answer, over a message that only data can cross', () => {
    const state = opened()
    const answer = findPairings(problemOf(state, knowledge))
    expect(answer.pairings.length).toBeGreaterThan(0)
    const crossed = structuredClone(packed(answer))
    expect(unpacked(crossed, knowledge.table, state.settings)).toEqual(answer)
  })
  it('with a food that is in no table is refused', () => {
    const answer = {
      reached: true,
      reason: null,
      pairings: [{ portions: [{ food: 'nowhere', grams: 1 }], why: [], nextLift: null }],
    }
    expect(() => unpacked(answer, knowledge.table, DEFAULT_SETTINGS)).toThrow('nowhere')
  })
})
