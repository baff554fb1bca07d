import type { Food } from '../foods/food.ts'
import { scoreBasis } from '../foods/score.ts'
import { AMINO_ACIDS } from '../nutrition/amino-acids.ts'
import { scorePlate } from '../nutrition/plate-score.ts'
import { grams } from '../tui/text/figures.ts'
import { inColumns, wrapLines } from '../tui/text/lines.ts'
import { readArguments } from './arguments.ts'
import { allergensOf } from './care.ts'
import { answer, type Command, jsonText, Refusal, type World } from './command.ts'
import { foodJson } from './json/food-json.ts'
import { readPattern } from './options.ts'
import { namedFood } from './shelf-source.ts'
import { plateLines } from './text/plate-lines.ts'
import { styleOf } from './text/style.ts'

export const food: Command = {
  name: 'food',
  summary: 'one food: staves, tiers, measures, sources',
  help: `
food ID [--pattern ID] [--json]

  shortstave food lentils-red-dry
  shortstave food "soy milk" --json

ID is a food's id, or words that name just one food.

Your own foods, from the label in your hand:
  shortstave food add "Galley bar" --protein 20 --energy 380 --made-of "80 % pea, 20 % rice"
  shortstave food add "Crew mix" --per 30 --protein 21 --energy 115 --made-of soy --measure "1 scoop = 30"
  shortstave food edit own-galley-bar --protein 21
  shortstave food remove own-galley-bar --yes
  --per G          the grams that the label's figures are of (100)
  --protein G, --energy KCAL, --fat G, --carbohydrate G, --fibre G, --salt G
  --made-of TEXT   which food or mixture its protein is made of, with shares if the label gives them
  --measure TEXT   such as "1 scoop = 30" (may be given again)
  --contains A     allergens beyond those of its parts (may be given again)
  --name TEXT      a new name (edit);  --yes  remove it although something uses it

  --pattern ID  the scoring pattern (fao-2013-over-3y)
  --json        all of the food as JSON`,
  async run(argv, world) {
    const [verb] = argv
    if (verb === 'add' || verb === 'edit' || verb === 'remove') {
      return (await import('./own-food.ts')).changeOwnFoods(verb, argv.slice(1), world)
    }
    const { options, words } = readArguments('food', { pattern: 'text', json: 'flag' }, argv)
    if (words.length === 0)
      throw new Refusal('food needs an id or words, such as: shortstave food lentils-red-dry')
    const found = namedFood(words.join(' '), world)
    const pattern = readPattern(world.table(), options.pattern)
    if (options.json) return answer(jsonText(foodJson(found, pattern)))
    const plate = scorePlate([{ food: found, grams: 100 }], scoreBasis(world.table(), pattern.id))
    const lines = [
      `${styleOf(world.colour).bold(found.name)}  ${found.id}`,
      ...plateLines(plate, world, 1),
      ...factLines(found, world),
    ]
    return answer(`${lines.join('\n')}\n`)
  },
}

const known = (value: number | null, unit: string): string =>
  value === null ? 'not known' : `${Number(value.toPrecision(3))} ${unit}`

function factLines(food: Food, world: World): string[] {
  const { per100g, portionG } = food
  const facts: [string, string][] = [
    [
      'role, state',
      `${food.role}, ${food.state}${food.origin === 'plant' ? '' : ` (${food.origin}: only where allowed)`}`,
    ],
    ['also called', food.aliases.slice(0, 24).join(', ')],
    [
      'protein',
      `${known(per100g.proteinG, 'g')} / 100 g (nitrogen x ${food.nitrogenFactor}); crude protein (x 6.25) ${known(per100g.crudeProteinG, 'g')}`,
    ],
    [
      'per 100 g',
      `${known(per100g.kcal, 'kcal')}, fat ${known(per100g.fatG, 'g')}, carbohydrate ${known(per100g.carbohydrateG, 'g')}, fibre ${known(per100g.fibreG, 'g')}, water ${known(per100g.waterG, 'g')}`,
    ],
    [
      'minerals',
      `iron ${known(per100g.ironMg, 'mg')}, zinc ${known(per100g.zincMg, 'mg')}, calcium ${known(per100g.calciumMg, 'mg')}, sodium ${known(per100g.sodiumMg, 'mg')}, phytate ${known(per100g.phytateMg, 'mg')}`,
    ],
    [
      'one meal',
      `${grams(portionG.least)} at least, usually ${grams(portionG.usual)}, at most ${grams(portionG.most)}`,
    ],
    ['measures', food.measures.map(measure => `${measure.name} = ${grams(measure.grams)}`).join('; ')],
    [
      'profile',
      `${food.profileTier}${food.doubts.length === 0 ? '' : ` (wider band: ${food.doubts.join(', ')})`}`,
    ],
    ['digestibility', `${food.digestibilityTier} (${food.digestibilityClass})`],
    ['allergens', allergensOf([food]).join(', ') || 'none of the listed ones'],
    ['note', food.note],
    ['sources', food.sources.map(id => world.table().sourceById.get(id)?.citation ?? id).join('; ')],
  ]
  const wide = Math.max(...facts.map(([label]) => label.length)) + 2
  const lines = facts
    .filter(([, value]) => value !== '')
    .flatMap(([label, value]) => wrapLines(`${label.padEnd(wide)}${value}`, world.columns, wide))
  const amino = [
    ['', ...AMINO_ACIDS],
    ['mg/g crude protein', ...AMINO_ACIDS.map(a => food.aminoMgPerG[a].toFixed(1))],
    ['digestible, %', ...AMINO_ACIDS.map(a => (100 * food.digestibility[a]).toFixed(0))],
  ]
  return [
    ...lines,
    '',
    ...inColumns(
      amino,
      AMINO_ACIDS.map((_, i) => i + 1),
      1,
    ),
  ]
}
