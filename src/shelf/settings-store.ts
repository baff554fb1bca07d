import { existsSync, renameSync } from 'node:fs'
import { dirname, join } from 'node:path'
import Conf from 'conf'
import * as z from 'zod/mini'
import { DEFAULT_SETTINGS } from './default-settings.ts'
import { reasonOf } from './reasons.ts'
import { type Settings, settingsSchema } from './settings.ts'
import { withLock } from './store-lock.ts'
import { makeFolder } from './store-write.ts'

/** The version that this program writes; settings of a newer one are left alone. */
const SETTINGS_VERSION = 1

/** Settings as read, and one line for the cook where they could not be read or written. */
export interface KeptSettings {
  settings: Settings
  problem: string | null
}

type Reading =
  | { kind: 'sound'; settings: Settings }
  | { kind: 'mended' | 'damaged' | 'newer'; settings: Settings; problem: string }

/**
 * Keeps the settings with `conf`, beside the shelf. A setting that is damaged takes its default, and that is said; a
 * file that is damaged as a whole is set aside when settings are next kept. No method throws.
 */
export class SettingsStore {
  private readonly folder: string | undefined
  private opened: Conf<Record<string, unknown>> | null = null
  /** what the disk did not take: it holds for the session, and is kept with the next change that it takes */
  private pending: Partial<Settings> = {}

  constructor(folder?: string) {
    this.folder = folder === '' ? undefined : folder
  }

  read(): KeptSettings {
    try {
      const reading = this.reading()
      return {
        settings: { ...reading.settings, ...this.pending },
        problem: reading.kind === 'sound' ? null : reading.problem,
      }
    } catch (error) {
      return {
        settings: { ...DEFAULT_SETTINGS, ...this.pending },
        problem: `the settings cannot be read (${reasonOf(error)}); defaults are used`,
      }
    }
  }

  /**
   * Writes them whole; null where that worked, else why not. What another process changes meanwhile is lost: `change`
   * keeps it.
   */
  write(settings: Settings): string | null {
    const parsed = settingsSchema.safeParse(settings)
    if (!parsed.success) return problemOf(parsed.error)
    return this.holding(parsed.data, () => this.keep(parsed.data))
  }

  /**
   * Changes some settings of those that are kept at that moment, while no other process can. Refused, with nothing
   * changed, where a value cannot be.
   */
  async change(changes: Partial<Settings>): Promise<KeptSettings> {
    const parsed = z.partial(settingsSchema).safeParse(changes)
    if (!parsed.success) return { settings: this.read().settings, problem: problemOf(parsed.error) }
    // What is parsed has a default for each key that was not given: take only what was.
    const given = Object.keys(changes) as (keyof Settings)[]
    const chosen: Partial<Settings> = Object.fromEntries(given.map(key => [key, parsed.data[key]]))
    let problem: string | null
    try {
      makeFolder(dirname(this.conf.path))
      ;({ problem } = await withLock(this.conf.path, stillHeld => {
        if (!stillHeld()) return null
        return { problem: this.holding(chosen, () => this.keep({ ...this.read().settings, ...chosen })) }
      }))
    } catch (error) {
      problem = this.holding(chosen, () => {
        throw error
      })
    }
    return { settings: this.read().settings, problem }
  }

  /** All settings as they were at first. */
  async reset(): Promise<KeptSettings> {
    return this.change(DEFAULT_SETTINGS)
  }

  /** Keeps settings, or holds them for the session and says why. */
  private holding(chosen: Partial<Settings>, keep: () => string | null): string | null {
    let problem: string | null
    try {
      problem = keep()
    } catch (error) {
      problem = `the settings cannot be kept (${reasonOf(error)}); they hold until you leave`
    }
    this.pending = problem === null ? {} : { ...this.pending, ...chosen }
    return problem
  }

  private keep(settings: Settings): string | null {
    const reading = this.reading()
    if (reading.kind === 'newer') return `the settings are not kept: ${reading.problem}`
    if (reading.kind === 'damaged') renameSync(this.conf.path, this.asidePath())
    this.conf.store = { text: `${JSON.stringify({ version: SETTINGS_VERSION, ...settings }, null, 2)}\n` }
    return null
  }

  private reading(): Reading {
    const { text } = this.conf.store
    if (typeof text !== 'string') return { kind: 'sound', settings: DEFAULT_SETTINGS }
    let kept: Record<string, unknown>
    try {
      const value: unknown = JSON.parse(text)
      if (typeof value !== 'object' || value === null || Array.isArray(value))
        throw new SyntaxError('no settings')
      kept = value as Record<string, unknown>
    } catch {
      return {
        kind: 'damaged',
        settings: DEFAULT_SETTINGS,
        problem: `the settings in ${this.conf.path} are damaged; their defaults are used`,
      }
    }
    if (typeof kept.version === 'number' && kept.version > SETTINGS_VERSION) {
      const problem = `${this.conf.path} was written by a newer shortstave; defaults are used and the file is left alone`
      return { kind: 'newer', settings: DEFAULT_SETTINGS, problem }
    }
    const whole = settingsSchema.safeParse(kept)
    if (whole.success) return { kind: 'sound', settings: whole.data }
    const damaged = new Set(whole.error.issues.map(({ path }) => String(path[0])))
    const sound = Object.fromEntries(Object.entries(kept).filter(([key]) => !damaged.has(key)))
    const mended = settingsSchema.safeParse(sound)
    return {
      kind: 'mended',
      settings: mended.success ? mended.data : DEFAULT_SETTINGS,
      problem: `settings that cannot be: ${[...damaged].join(', ')}; their defaults are used`,
    }
  }

  private asidePath(): string {
    for (let number = 1; ; number++) {
      const path = join(dirname(this.conf.path), `settings.damaged-${number}.json`)
      if (!existsSync(path)) return path
    }
  }

  private get conf(): Conf<Record<string, unknown>> {
    if (this.opened === null && this.folder !== undefined) makeFolder(this.folder)
    this.opened ??= new Conf<Record<string, unknown>>({
      projectName: 'shortstave',
      projectSuffix: '',
      configName: 'settings',
      ...(this.folder === undefined ? {} : { cwd: this.folder }),
      // Conditions of the eater are among them: the owner's alone.
      configFileMode: 0o600,
      // The text is checked here (zod), so that a damaged file is set aside and never cleared.
      clearInvalidConfig: false,
      deserialize: text => ({ text }),
      serialize: ({ text }) => String(text),
    })
    return this.opened
  }
}

function problemOf(error: z.core.$ZodError): string {
  const [issue] = error.issues
  return `this setting cannot be: ${issue?.path.join('.')}: ${issue?.message}`
}
