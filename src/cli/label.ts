import { readLabel } from '../foods/ingredient-list.ts'
import { plainText } from '../foods/plain-text.ts'
import { sourceByWords } from '../foods/source-by-words.ts'
import { STAVE_NAMES } from '../nutrition/amino-acids.ts'
import { labelRange } from '../pairing/label-range.ts'
import { wholeScore } from '../tui/text/figures.ts'
import { wrapLines } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { careJson, careLines } from './care.ts'
import { answer, type Command, jsonText, NO_ANSWER, Refusal } from './command.ts'
import { readPattern } from './options.ts'

export const label: Command = {
  name: 'label',
  summary: 'the range of scores that a label allows, from its order of ingredients alone',
  help: `
label "INGREDIENT, INGREDIENT, ..." [--pattern ID] [--json]

  shortstave label "wheat flour, soy protein, oats"

A label lists ingredients by mass, the most first, but not how much of each. This gives the least and the greatest
DIAAS over all compositions that keep to the order: an honest range instead of a guess.
  --pattern ID  the scoring pattern (fao-2013-over-3y)
  --json        the range as JSON`,
  async run(argv, world) {
    const { options, words } = readArguments('label', { pattern: 'text', json: 'flag' }, argv)
    if (words.length === 0)
      throw new Refusal(
        'label needs the ingredients, such as: shortstave label "wheat flour, soy protein, oats"',
      )
    const pattern = readPattern(world.table(), options.pattern)
    const reading = readLabel(words.join(', '), sourceByWords(world.finder()))
    if (!reading.ok) throw new Refusal(reading.problem)
    const { foods, leftOut, assumed } = reading
    const range = labelRange(foods, pattern)
    if (range === null) {
      return {
        code: NO_ANSWER,
        out: '',
        err: 'none of these ingredients brings protein that could be scored\n',
      }
    }
    const words2 = [
      `taken for: ${foods.map(({ name }) => name).join('; ')}`,
      ...(assumed.length === 0
        ? []
        : [`words that may mean others too were taken for: ${assumed.map(({ name }) => name).join('; ')}`]),
      ...(leftOut.length === 0
        ? []
        : [`left out, as bringing no protein or not known: ${leftOut.map(plainText).join(', ')}`]),
    ]
    const err = words2.map(line => `${line}\n`).join('')
    if (options.json) {
      const out = {
        pattern: pattern.id,
        ingredients: foods.map(({ id, name }) => ({ food: id, name })),
        left_out: leftOut,
        diaas_low: range.low,
        diaas_high: range.high,
        limiting_at_low: range.limitingAtLow,
        limiting_at_high: range.limitingAtHigh,
        shares_at_low: range.atLow,
        shares_at_high: range.atHigh,
        ...careJson(foods),
      }
      return answer(jsonText(out), err)
    }
    const shares = (at: readonly number[]) =>
      foods.map(({ name }, i) => `${Math.round(100 * at[i]!)} % ${name}`).join(', ')
    const lines = [
      `DIAAS from ${wholeScore(range.low)} to ${wholeScore(range.high)}, whatever the amounts, as long as they keep to this order.`,
      `Least: ${shares(range.atLow)}; short of ${STAVE_NAMES[range.limitingAtLow]}.`,
      `Greatest: ${shares(range.atHigh)}; short of ${STAVE_NAMES[range.limitingAtHigh]}.`,
    ]
    return answer(
      `${[...lines.flatMap(line => wrapLines(line, world.columns, 2)), '', ...careLines(foods, world.columns)].join('\n')}\n`,
      err,
    )
  },
}
