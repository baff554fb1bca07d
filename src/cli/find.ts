import { plainText } from '../foods/plain-text.ts'
import { wholeScore } from '../tui/text/figures.ts'
import { inColumns } from '../tui/text/lines.ts'
import { readArguments, readNumber } from './arguments.ts'
import { answer, type Command, jsonText, NO_ANSWER, Refusal } from './command.ts'
import { hitJson } from './json/food-json.ts'
import { settingsOf } from './kept-settings.ts'
import { readPattern } from './options.ts'
import { styleOf } from './text/style.ts'

export const find: Command = {
  name: 'find',
  summary: 'foods by name, alias or local name; typos forgiven',
  help: `
find WORDS [--most N] [--pattern ID] [--json]

  shortstave find red lentils
  shortstave find chikpea boiled
  shortstave find rajma

Each row: id, name, protein per 100 g, the food's own DIAAS, its shortest stave, and × what your settings leave out.
  --most N      at most so many rows (10)
  --pattern ID  the scoring pattern (fao-2013-over-3y)
  --json        the rows as JSON, best first`,
  async run(argv, world) {
    const { options, words } = readArguments('find', { most: 'text', pattern: 'text', json: 'flag' }, argv)
    const query = words.join(' ')
    if (plainText(query).trim() === '')
      throw new Refusal('find needs a word, such as: shortstave find lentils')
    const limit =
      readNumber('--most', options.most, { least: 1, most: 1000, unit: 'rows', whole: true }) ?? 10
    const pattern = readPattern(world.table(), options.pattern)
    const foods = world
      .finder()
      .find(query, { limit })
      .map(hit => hit.food)
    const nothing = `no food is called "${plainText(query).slice(0, 60)}" or nearly so; try a shorter or plainer word\n`
    const code = foods.length === 0 ? NO_ANSWER : 0
    const hits = foods.map(food => hitJson(food, pattern))
    if (options.json) return { code, out: jsonText(hits), err: foods.length === 0 ? nothing : '' }
    if (foods.length === 0) return { code, out: '', err: nothing }
    const style = styleOf(world.colour)
    const { without } = await settingsOf(world)
    const avoided = foods.map(food => food.allergens.filter(id => without.includes(id)))
    const rows = hits.map((hit, i) => [
      style.bold(hit.id),
      hit.name,
      `${hit.protein_g_per_100g.toFixed(1)} g / 100 g`,
      hit.diaas === null ? 'no protein to score' : `DIAAS ${wholeScore(hit.diaas)}`,
      hit.limiting ?? '',
      avoided[i]!.length === 0 ? '' : `× ${avoided[i]!.join(', ')}`,
    ])
    return answer(`${inColumns(rows, [2]).join('\n')}\n`)
  },
}
