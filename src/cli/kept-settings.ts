import { existsSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import type { Settings } from '../shelf/settings.ts'
import type { World } from './command.ts'
import { homeOf, keptFile } from './kept.ts'

/** The settings that the cook keeps, or the defaults. */
export async function settingsOf(world: World): Promise<Settings> {
  if (!existsSync(join(dirname(keptFile(world.env)), 'settings.json'))) {
    return DEFAULT_SETTINGS
  }
  const { SettingsStore } = await import('../shelf/settings-store.ts')
  return new SettingsStore(homeOf(world.env)).read().settings
}

/** Keeps the day on which vitamin B12 was mentioned; where nothing can be kept it is simply said again. */
export async function rememberB12(world: World, today: string): Promise<void> {
  const { SettingsStore } = await import('../shelf/settings-store.ts')
  await new SettingsStore(homeOf(world.env)).change({ lastB12Day: today })
}
