import { mkdirSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { DEFAULT_SETTINGS } from '../../src/shelf/default-settings.ts'
import { type Settings, settingsSchema } from '../../src/shelf/settings.ts'
import { SettingsStore } from '../../src/shelf/settings-store.ts'
import { freshFolder } from './scripts.ts'

const chosen: Settings = {
  ...DEFAULT_SETTINGS,
  targetG: null,
  bodyMassKg: 72.5,
  servings: 6,
  without: ['gluten', 'sesame'],
  conditions: ['gout'],
  lastB12Day: '2026-12-01',
}
const file = (folder: string): string => join(folder, 'settings.json')

describe('the settings', () => {
  it('have defaults that can be', () => {
    expect(settingsSchema.parse({})).toEqual(DEFAULT_SETTINGS)
    expect(new SettingsStore(freshFolder()).read()).toEqual({ settings: DEFAULT_SETTINGS, problem: null })
  })

  it('are kept across restarts, for the owner only', () => {
    const folder = freshFolder()
    expect(new SettingsStore(folder).write(chosen)).toBeNull()
    expect(new SettingsStore(folder).read()).toEqual({ settings: chosen, problem: null })
    expect(statSync(file(folder)).mode & 0o077).toBe(0)
  })

  it('change one by one, keep what they are not told, and go back to what they were at first', async () => {
    const folder = freshFolder()
    new SettingsStore(folder).write(chosen)
    const changed = await new SettingsStore(folder).change({ servings: 2, without: [] })
    expect(changed).toEqual({ settings: { ...chosen, servings: 2, without: [] }, problem: null })
    expect(new SettingsStore(folder).read()).toEqual(changed)
    expect(await new SettingsStore(folder).reset()).toEqual({ settings: DEFAULT_SETTINGS, problem: null })
    expect(new SettingsStore(folder).read().settings).toEqual(DEFAULT_SETTINGS)
  })

  it('changed by several at once are all there', async () => {
    const folder = freshFolder()
    const changes: Partial<Settings>[] = [
      { servings: 6 },
      { eggs: true },
      { dairy: true },
      { units: 'us' },
      { foodsAtMost: 5 },
      { lastB12Day: '2026-12-01' },
    ]
    await Promise.all(changes.map(change => new SettingsStore(folder).change(change)))
    expect(new SettingsStore(folder).read().settings).toEqual(
      Object.assign({ ...DEFAULT_SETTINGS }, ...changes),
    )
  })

  it('that cannot be are refused, and nothing is written', async () => {
    const folder = freshFolder()
    const store = new SettingsStore(folder)
    expect(store.write({ ...chosen, servings: 0 })).toMatch(/^this setting cannot be: servings: [^\n]+$/)
    expect(store.write({ ...chosen, bodyMassKg: Number.NaN })).toMatch(/^this setting cannot be: bodyMassKg/)
    expect(await store.change({ targetG: -5 })).toMatchObject({
      settings: DEFAULT_SETTINGS,
      problem: expect.stringMatching(/^this setting cannot be: targetG/),
    })
    expect(readdirSync(folder)).toEqual([])
  })

  it('of which one is damaged: its default is used and it is named, the others stay', () => {
    const folder = freshFolder()
    writeFileSync(
      file(folder),
      JSON.stringify({ version: 1, ...chosen, servings: 'many', pattern: 'infant' }),
    )
    expect(new SettingsStore(folder).read()).toEqual({
      settings: { ...chosen, servings: DEFAULT_SETTINGS.servings, pattern: DEFAULT_SETTINGS.pattern },
      problem: 'settings that cannot be: servings, pattern; their defaults are used',
    })
  })

  it.each(['', '{"version":1,', '[1]', 'null', '\u0000'])(
    'damaged as a whole (%j): defaults, told, and set aside',
    text => {
      const folder = freshFolder()
      writeFileSync(file(folder), text)
      const store = new SettingsStore(folder)
      expect(store.read()).toEqual({
        settings: DEFAULT_SETTINGS,
        problem: `the settings in ${file(folder)} are damaged; their defaults are used`,
      })
      expect(readFileSync(file(folder), 'utf8')).toBe(text)
      expect(store.write(chosen)).toBeNull()
      expect(new SettingsStore(folder).read()).toEqual({ settings: chosen, problem: null })
      expect(readFileSync(join(folder, 'settings.damaged-1.json'), 'utf8')).toBe(text)
    },
  )

  it('of a newer version are not used and not rewritten', async () => {
    const folder = freshFolder()
    const text = JSON.stringify({ version: 2, servings: 6 })
    writeFileSync(file(folder), text)
    const store = new SettingsStore(folder)
    expect(store.read()).toMatchObject({
      settings: DEFAULT_SETTINGS,
      problem: expect.stringContaining('newer'),
    })
    expect(store.write(chosen)).toContain('newer')
    expect((await store.change({ servings: 3 })).problem).toContain('newer')
    expect(readFileSync(file(folder), 'utf8')).toBe(text)
  })

  it('where nothing can be kept hold for the session, in one line', async () => {
    const wall = join(freshFolder(), 'a-file')
    writeFileSync(wall, 'in the way')
    const store = new SettingsStore(join(wall, 'home'))
    expect(store.read()).toEqual({
      settings: DEFAULT_SETTINGS,
      problem: 'the settings cannot be read (part of the path is not a folder); defaults are used',
    })
    const problem =
      'the settings cannot be kept (part of the path is not a folder); they hold until you leave'
    expect(store.write(chosen)).toBe(problem)
    expect(await store.change({ eggs: true })).toEqual({ settings: { ...chosen, eggs: true }, problem })
    expect((await store.change({ servings: 2 })).settings).toEqual({ ...chosen, eggs: true, servings: 2 })
    // Kept after all, with the next change that can be.
    rmSync(wall)
    expect((await store.change({ units: 'us' })).problem).toBeNull()
    const all = { ...chosen, eggs: true, servings: 2, units: 'us' }
    expect(new SettingsStore(join(wall, 'home')).read()).toEqual({ settings: all, problem: null })

    const folder = freshFolder()
    mkdirSync(file(folder))
    expect(new SettingsStore(folder).write(chosen)).toContain('a folder stands where the file should')
  })
})
