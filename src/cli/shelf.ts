import type { Food } from '../foods/food.ts'
import type { OwnFood } from '../foods/own-food.ts'
import { plainText } from '../foods/plain-text.ts'
import { readPortion } from '../foods/read-portion.ts'
import { additionsOf, type ShelfChange } from '../shelf/changes.ts'
import { writeShelfCsv, writeShelfJson } from '../shelf/import-export.ts'
import { isDay, MARKS } from '../shelf/marks.ts'
import type { Shelf } from '../shelf/shelf.ts'
import type { Kept, ShelfStore } from '../shelf/store.ts'
import { grams, proteinG } from '../tui/text/figures.ts'
import { inColumns } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { answer, type Command, jsonText, NO_ANSWER, type Outcome, Refusal, type World } from './command.ts'
import { openStore } from './kept.ts'
import { namedFood, readShelfText } from './shelf-source.ts'

const KINDS = {
  mark: 'text',
  'use-by': 'text',
  note: 'text',
  csv: 'flag',
  json: 'flag',
  replace: 'flag',
} as const
type Options = ReturnType<typeof readArguments<typeof KINDS>>['options']

export const shelf: Command = {
  name: 'shelf',
  summary: 'the foods on hand that you keep: add, set, take, remove, mark, undo, import, export',
  help: `
shelf [add | set | take | remove | mark | clear | undo | redo | import | export] ...

  shortstave shelf                                        what is there
  shortstave shelf add "2 cups dry red lentils" "1 can chickpeas" --use-by 2026-12-31
  shortstave shelf set "500 g tofu"                       so much is there now
  shortstave shelf set tofu-firm --use-by 2026-12-05 --note "in the cold box"
  shortstave shelf take "250 g rolled oats"
  shortstave shelf remove tofu-firm
  shortstave shelf mark tofu-firm use-up                  or hold-back, or none
  shortstave shelf undo                                   the last 50 changes; redo does it again
  shortstave shelf import galley.csv                      adds; --replace puts it in the shelf's place
  shortstave shelf export > shelf.csv                     --json for JSON; both read back without loss

  --mark M, --use-by DAY, --note TEXT   with add and set
  --json                                the shelf as JSON`,
  async run(argv, world) {
    const { options, words } = readArguments('shelf', KINDS, argv)
    const [verb, ...rest] = words
    const store = await openStore(world.env)
    switch (verb) {
      case undefined:
        return shown(await store.read(), options, world)
      case 'export':
        refuseWords(verb, rest)
        return exported(await store.read(), options)
      case 'undo':
      case 'redo':
        refuseWords(verb, rest)
        return said(verb === 'undo' ? await store.undo() : await store.redo(), kept =>
          verb === 'undo' ? `undone: ${kept.label}` : `done again: ${kept.label}`,
        )
      case 'clear':
        refuseWords(verb, rest)
        return said(
          await store.change([{ do: 'clear' }], 'clear the shelf'),
          () => 'the shelf is empty; shelf undo brings it back',
        )
      case 'import':
        return imported(rest, options, store, world)
      case 'add':
      case 'set':
      case 'take':
      case 'remove':
      case 'mark':
        return edited(verb, rest, options, store, world)
      default:
        throw new Refusal(
          `there is no "shelf ${plainText(verb).slice(0, 30)}"; there are add, set, take, remove, mark, clear, undo, redo, import, export`,
        )
    }
  },
}

function refuseWords(verb: string, rest: string[]): void {
  if (rest.length > 0) throw new Refusal(`shelf ${verb} takes no further words`)
}

/** What came of a change, as an outcome: words to stderr; 1 where it was not done or could not be kept. */
function said(kept: Kept, done: (kept: Kept) => string): Outcome {
  const lines = [...kept.notices]
  if (kept.done) lines.push(done(kept))
  if (kept.problem !== null) lines.push(kept.problem)
  return {
    code: kept.done && kept.saved ? 0 : NO_ANSWER,
    out: '',
    err: `${lines.map(plainText).join('\n')}\n`,
  }
}

type EditVerb = 'add' | 'set' | 'take' | 'remove' | 'mark'

async function edited(
  verb: EditVerb,
  rest: string[],
  options: Options,
  store: ShelfStore,
  world: World,
): Promise<Outcome> {
  if (rest.length === 0) throw new Refusal(`shelf ${verb} needs a food; see shortstave shelf --help`)
  const extras = readExtras(options)
  const echoes: string[] = []
  let changes: ShelfChange[]
  if (verb === 'mark') {
    const marked = rest.at(-1)!.toLowerCase()
    const mark = marked === 'none' ? '' : MARKS.find(known => known === marked)
    if (rest.length < 2 || mark === undefined) {
      throw new Refusal(
        'shelf mark needs a food and use-up, hold-back or none, such as: shortstave shelf mark tofu-firm use-up',
      )
    }
    changes = rest.slice(0, -1).map(words => ({ do: 'mark', food: namedFood(words, world).id, mark }))
  } else if (verb === 'remove') {
    changes = rest.map(words => ({ do: 'remove', food: namedFood(words, world).id }))
  } else {
    changes = rest.map((text): ShelfChange => {
      const bare = verb === 'set' && Object.keys(extras).length > 0 && !/\d|[¼½¾⅓⅔]/.test(text)
      if (bare) return { do: 'set', food: namedFood(text, world).id, ...extras }
      const reading = readPortion(text, world.finder())
      if (!reading.ok) {
        const near = reading.nearest.map(({ text }) => `"${plainText(text)}"`).join(', ')
        throw new Refusal(`${reading.problem}${near === '' ? '' : `; nearest: ${near}`}`)
      }
      echoes.push(reading.echo)
      const of = { food: reading.food.id, grams: reading.grams }
      return verb === 'take' ? { do: 'take', ...of } : { do: verb, ...of, ...extras }
    })
  }
  const label = `${verb} ${rest.join(', ').slice(0, 80)}`
  return said(await store.change(changes, plainText(label)), ({ document }) => {
    const names = [...new Set(changes.flatMap(change => ('food' in change ? [change.food] : [])))]
    const now = names.map(id => {
      const item = document.shelf.items.find(({ food }) => food === id)
      return `${nameOf(id, world)}: ${item === undefined ? 'off the shelf' : `${grams(item.grams)} on the shelf${item.mark === '' ? '' : `, ${item.mark}`}`}`
    })
    return [...echoes, ...now].join('\n')
  })
}

function readExtras(options: Options) {
  const useBy = options['use-by']
  if (useBy !== undefined && useBy !== 'none' && !isDay(useBy)) {
    throw new Refusal(`--use-by ${plainText(useBy).slice(0, 30)}: give a day such as 2026-12-31, or none`)
  }
  const mark = options.mark === 'none' ? '' : options.mark
  if (mark !== undefined && !MARKS.some(known => known === mark)) {
    throw new Refusal(`--mark ${plainText(mark).slice(0, 30)}: give use-up, hold-back or none`)
  }
  return {
    ...(mark === undefined ? {} : { mark: mark as (typeof MARKS)[number] }),
    ...(useBy === undefined ? {} : { useBy: useBy === 'none' ? null : useBy }),
    ...(options.note === undefined ? {} : { note: plainText(options.note).slice(0, 500) }),
  }
}

async function imported(rest: string[], options: Options, store: ShelfStore, world: World): Promise<Outcome> {
  const [path, ...more] = rest
  if (path === undefined || more.length > 0)
    throw new Refusal('shelf import needs one file, or - for standard input')
  const label = path === '-' ? 'standard input' : plainText(path).slice(0, 100)
  const text = path === '-' ? await world.readStdin() : await world.readFile(path)
  const own = await ownFoodsInText(text)
  const { shelf: read, told } = readShelfText(text, label, world, own)
  const fresh = await keepOwnFoods(own, store)
  const kept = options.replace
    ? await store.replace(read, `import ${label}`)
    : await store.change(additionsOf(read), `import ${label}`)
  return said(kept, () =>
    [
      ...told,
      `${counted(read.items.length, 'food')} ${options.replace ? (read.items.length === 1 ? 'is the shelf now' : 'are the shelf now') : 'added'}${fresh === 0 ? '' : `, and ${counted(fresh, 'own food')} kept`}`,
    ].join('\n'),
  )
}

const counted = (n: number, one: string): string => `${n} ${one}${n === 1 ? '' : 's'}`

/** Foods from packets travel with an exported shelf: those in a file's text that are sound. */
async function ownFoodsInText(text: string): Promise<OwnFood[]> {
  if (!text.includes('"own_foods"')) return []
  try {
    const { own_foods: given } = JSON.parse(text.replace(/^\ufeff/, '')) as { own_foods?: unknown }
    return Array.isArray(given) ? (await import('./own-foods.ts')).ownFoodsIn(given) : []
  } catch {
    // No JSON: reading the shelf says so.
    return []
  }
}

/** Keeps those that are not kept yet, and says how many those were. */
async function keepOwnFoods(given: readonly OwnFood[], store: ShelfStore): Promise<number> {
  if (given.length === 0) return 0
  const { idOf } = await import('./own-foods.ts')
  const { document } = await store.read()
  const known = new Set(document.ownFoods.map(idOf))
  const fresh = given.filter(({ id }) => !known.has(id))
  if (fresh.length === 0) return 0
  await store.setOwnFoods(kept => {
    const there = new Set(kept.map(idOf))
    return [...kept, ...fresh.filter(({ id }) => !there.has(id))]
  })
  return fresh.length
}

async function exported(kept: Kept, options: Options): Promise<Outcome> {
  const { shelf: items, ownFoods } = kept.document
  const out = options.json ? writeShelfJson(items, ownFoods) : writeShelfCsv(items)
  return { code: 0, out, err: wordsOf(kept) }
}

const wordsOf = (kept: Kept): string =>
  [...kept.notices, ...(kept.problem === null ? [] : [kept.problem])]
    .map(line => `${plainText(line)}\n`)
    .join('')

function shown(kept: Kept, options: Options, world: World): Outcome {
  const { shelf: current } = kept.document
  if (options.csv || options.json) {
    return {
      code: 0,
      out: options.csv ? writeShelfCsv(current) : jsonText(rowsOf(current, world)),
      err: wordsOf(kept),
    }
  }
  if (current.items.length === 0) {
    return {
      code: 0,
      out: '',
      err: `${wordsOf(kept)}your shelf is empty; put a food on it: shortstave shelf add "1 kg red lentils, dry"\n`,
    }
  }
  const rows = rowsOf(current, world).map(row => [
    row.food,
    row.name,
    grams(row.grams),
    row.mark,
    row.use_by === '' ? '' : `use by ${row.use_by}`,
    row.protein_g === null ? '' : proteinG(row.protein_g),
    row.note,
  ])
  return answer(`${inColumns(rows, [2, 5]).join('\n')}\n`, wordsOf(kept))
}

function rowsOf({ items }: Shelf, world: World) {
  return items.map(item => {
    const food: Food | undefined = world.table().foodById.get(item.food)
    return {
      food: item.food,
      name: food?.name ?? `${item.food} (not in the table)`,
      grams: item.grams,
      mark: item.mark,
      use_by: item.useBy ?? '',
      protein_g: food === undefined ? null : (item.grams / 100) * food.per100g.proteinG,
      note: item.note,
    }
  })
}

const nameOf = (id: string, world: World): string => world.table().foodById.get(id)?.name ?? id
