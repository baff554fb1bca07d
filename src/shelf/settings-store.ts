import Conf from 'conf'
import { DEFAULT_SETTINGS } from './default-settings.ts'
import { type Settings, settingsSchema } from './settings.ts'

/** Settings as read, and one line for the cook where they could not be read or written. */
export interface KeptSettings {
  settings: Settings
  problem: string | null
}

/** Keeps the settings with `conf`, beside the shelf. A setting that is damaged takes its default, and that is said. */
export class SettingsStore {
  private readonly folder: string | undefined

  constructor(folder?: string) {
    this.folder = folder === '' ? undefined : folder
  }

  read(): KeptSettings {
    try {
      const kept = this.open().store
      const whole = settingsSchema.safeParse(kept)
      if (whole.success) return { settings: whole.data, problem: null }
      const damaged = new Set(whole.error.issues.map(({ path }) => String(path[0])))
      const sound = Object.fromEntries(Object.entries(kept).filter(([key]) => !damaged.has(key)))
      const mended = settingsSchema.safeParse(sound)
      return {
        settings: mended.success ? mended.data : DEFAULT_SETTINGS,
        problem: `settings that cannot be: ${[...damaged].join(', ')}; their defaults are used`,
      }
    } catch (error) {
      return {
        settings: DEFAULT_SETTINGS,
        problem: `the settings cannot be read (${(error as Error).message}); defaults are used`,
      }
    }
  }

  /** Writes them whole; null where that worked, else why not. */
  write(settings: Settings): string | null {
    try {
      this.open().store = settings
      return null
    } catch (error) {
      return `the settings cannot be kept (${(error as NodeJS.ErrnoException).code ?? (error as Error).message}); they hold until you leave`
    }
  }

  private open(): Conf<Record<string, unknown>> {
    return new Conf<Record<string, unknown>>({
      projectName: 'shortstave',
      projectSuffix: '',
      configName: 'settings',
      ...(this.folder === undefined ? {} : { cwd: this.folder }),
      clearInvalidConfig: false,
    })
  }
}
