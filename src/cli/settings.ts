import { plainText } from '../foods/plain-text.ts'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import { type Settings, settingsSchema } from '../shelf/settings.ts'
import { inColumns } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { answer, type Command, jsonText, NO_ANSWER, Refusal } from './command.ts'
import { homeOf } from './kept.ts'
import { readWithout } from './options.ts'

/** Settings by the name that the command line uses, with what they are. */
const NAMES: Record<string, { key: keyof Settings; what: string }> = {
  protein: { key: 'targetG', what: 'protein a serving, g; none: from body mass' },
  'body-mass': { key: 'bodyMassKg', what: 'kg' },
  intake: { key: 'gPerKgPerDay', what: 'protein, g a kg and day' },
  meals: { key: 'mealsPerDay', what: 'a day' },
  servings: { key: 'servings', what: '' },
  foods: { key: 'foodsAtMost', what: 'protein foods at most in a pairing' },
  pattern: { key: 'pattern', what: 'the scoring pattern' },
  without: { key: 'without', what: 'allergens to leave out, comma-separated' },
  eggs: { key: 'eggs', what: 'yes or no' },
  dairy: { key: 'dairy', what: 'yes or no' },
  energy: { key: 'energyAtMostKcal', what: 'kcal a serving at most; none: no ceiling' },
  mass: { key: 'massAtMostG', what: 'g a serving at most; none: no ceiling' },
  units: { key: 'units', what: 'metric or us' },
  conditions: { key: 'conditions', what: 'what the tool should step back for, comma-separated (see below)' },
}

export const settings: Command = {
  name: 'settings',
  summary: 'what the bench is set to, and what to step back for',
  help: `
settings [NAME VALUE | reset] [--json]

  shortstave settings                       all of them
  shortstave settings without gluten,soy
  shortstave settings conditions pregnancy
  shortstave settings protein none          then: body mass x intake / meals
  shortstave settings reset

${inColumns(Object.entries(NAMES).map(([name, { what }]) => [`  ${name}`, what])).join('\n')}

Conditions: phenylketonuria, kidney-disease, pregnancy, under-18, blood-thinners, gout, eating-disorder-history.
The tool then says what it cannot judge, and steps back where it should. It informs; it does not treat.`,
  async run(argv, world) {
    const { options, words } = readArguments('settings', { json: 'flag' }, argv)
    const { SettingsStore } = await import('../shelf/settings-store.ts')
    const store = new SettingsStore(homeOf(world.env))
    const kept = store.read()
    const err = kept.problem === null ? '' : `${plainText(kept.problem)}\n`
    const [name, ...values] = words
    if (name === undefined) {
      if (options.json) return answer(jsonText(byName(kept.settings)), err)
      const rows = Object.entries(byName(kept.settings)).map(([key, value]) => [
        key,
        shownValue(value),
        NAMES[key]!.what,
      ])
      return answer(`${inColumns(rows).join('\n')}\n`, err)
    }
    const next =
      name === 'reset' && values.length === 0 ? DEFAULT_SETTINGS : changed(kept.settings, name, values)
    const key = NAMES[name]?.key
    // Only what is set, so that another process's change of another setting stays.
    const { problem } = await store.change(key === undefined ? next : { [key]: next[key] })
    if (problem !== null) return { code: NO_ANSWER, out: '', err: `${err}${plainText(problem)}\n` }
    const now =
      name === 'reset'
        ? 'all settings have their defaults again'
        : `${name} is ${shownValue(byName(next)[name])}`
    return { code: 0, out: '', err: `${err}${now}\n` }
  },
}

function byName(of: Settings): Record<string, unknown> {
  return Object.fromEntries(Object.entries(NAMES).map(([name, { key }]) => [name, of[key]]))
}

function shownValue(value: unknown): string {
  if (value === null || (Array.isArray(value) && value.length === 0)) return 'none'
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  return Array.isArray(value) ? value.join(', ') : String(value)
}

function changed(before: Settings, name: string, values: string[]): Settings {
  const known = Object.hasOwn(NAMES, name) ? NAMES[name] : undefined
  if (known === undefined) {
    throw new Refusal(
      `there is no setting "${plainText(name).slice(0, 30)}"; there are ${Object.keys(NAMES).join(', ')}`,
    )
  }
  if (values.length === 0)
    throw new Refusal(`give a value for ${name}, such as: shortstave settings ${name} none`)
  const text = values.join(',')
  const parsed = settingsSchema.safeParse({ ...before, [known.key]: settingValue(known.key, text) })
  if (parsed.success) return parsed.data
  const what = known.what === '' ? '' : ` (${known.what})`
  throw new Refusal(
    `${name}${what} cannot be "${plainText(text).slice(0, 40)}": ${parsed.error.issues[0]?.message ?? ''}`,
  )
}

function settingValue(key: keyof Settings, text: string): unknown {
  const isList = key === 'without' || key === 'conditions'
  if (text === 'none') return isList ? [] : null
  if (key === 'without') return readWithout([text])
  if (key === 'conditions') return text.split(',').map(word => word.trim().toLowerCase().replace(/\s+/g, '-'))
  if (key === 'eggs' || key === 'dairy')
    return /^(yes|on|true)$/i.test(text) ? true : /^(no|off|false)$/i.test(text) ? false : text
  if (key === 'units' || key === 'pattern') return text.toLowerCase()
  return Number(text.replace(',', '.'))
}
