import type { Food } from '../foods/food.ts'
import { plainText } from '../foods/plain-text.ts'
import { readPortion } from '../foods/read-portion.ts'
import { scoreBasis } from '../foods/score.ts'
import { scorePlate } from '../nutrition/plate-score.ts'
import type { Portion } from '../nutrition/protein-source.ts'
import { wrapLines } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { careJson, careLines } from './care.ts'
import { answer, type Command, jsonText, Refusal, type World } from './command.ts'
import { scoreJson } from './json/score-json.ts'
import { readPattern } from './options.ts'
import { plateLines } from './text/plate-lines.ts'

export const score: Command = {
  name: 'score',
  summary: 'the protein quality of a plate that you already have in mind',
  help: `
score PORTION [PORTION ...] [--pattern ID] [--json]

  shortstave score "200 g lentils, boiled" "1 cup brown rice, boiled"
  shortstave score "½ cup dry red lentils" "2 tbsp tahini" "3 slices whole wheat bread"
  printf '200 g tofu\\n1 cup boiled bulgur\\n' | shortstave score -

A portion is an amount and a food, in grams or in a measure that the food has. What was understood is said on
stderr. "-" reads portions from standard input, one a line.
  --pattern ID  fao-2013-over-3y (default), who-2007-adult, fao-who-1991, fao-2013-child
  --json        the score as JSON`,
  async run(argv, world) {
    const { options, words } = readArguments('score', { pattern: 'text', json: 'flag' }, argv)
    const pattern = readPattern(world.table(), options.pattern)
    const texts = await portionTexts(words, world)
    const { portions, echoes } = readPortions(texts, world)
    const plate = scorePlate(portions, scoreBasis(world.table(), pattern.id))
    const foods = portions.map(({ food }) => food)
    const err = echoes.map(echo => `${echo}\n`).join('')
    if (options.json) return answer(jsonText({ ...scoreJson(plate), ...careJson(foods) }), err)
    const lines = [...plateLines(plate, world, 1), '', ...careLines(foods, world.columns)]
    if (plate.diaas === null)
      lines.unshift(...wrapLines('There is no protein on this plate to score.', world.columns), '')
    return answer(`${lines.join('\n')}\n`, err)
  },
}

/** The portions as the arguments give them; `-` stands for standard input, one a line. */
export async function portionTexts(words: string[], world: World): Promise<string[]> {
  const texts: string[] = []
  for (const word of words) {
    if (word === '-')
      texts.push(...(await world.readStdin()).split(/\r\n|\r|\n/).filter(line => line.trim() !== ''))
    else texts.push(word)
  }
  if (texts.length === 0)
    throw new Refusal('score needs a portion, such as: shortstave score "200 g boiled lentils"')
  if (texts.length > 100)
    throw new Refusal(`${texts.length} portions are more than a plate holds; give at most 100`)
  return texts
}

/** What the texts mean, or a refusal of the first that is not understood. */
export function readPortions(texts: string[], world: World): { portions: Portion<Food>[]; echoes: string[] } {
  const portions: Portion<Food>[] = []
  const echoes: string[] = []
  for (const text of texts) {
    const reading = readPortion(text, world.finder())
    if (!reading.ok) {
      const near = reading.nearest.map(({ text }) => `"${plainText(text)}"`).join(', ')
      throw new Refusal(`${reading.problem}${near === '' ? '' : `; nearest: ${near}`}`)
    }
    portions.push({ food: reading.food, grams: reading.grams })
    echoes.push(reading.echo)
  }
  return { portions, echoes }
}
