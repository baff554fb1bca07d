import type { Food } from '../foods/food.ts'
import { plainText } from '../foods/plain-text.ts'
import { scoreBasis } from '../foods/score.ts'
import { createFinder, foodByWords } from '../foods/search.ts'
import { planningRefusal, stepBack } from '../kitchen/conditions.ts'
import { mealTargetG } from '../nutrition/targets.ts'
import { findPairings } from '../pairing/find-pairings.ts'
import type { Mark, Pairing, PairingAnswer, PairingProblem, ShelfFood } from '../pairing/problem.ts'
import { DEFAULT_SETTINGS } from '../shelf/default-settings.ts'
import type { Settings } from '../shelf/settings.ts'
import { wrapLines } from '../tui/text/lines.ts'
import { readArguments, readNumber } from './arguments.ts'
import { careJson, careLines } from './care.ts'
import { type Command, DONE, jsonText, NO_ANSWER, type Outcome, Refusal, type World } from './command.ts'
import { scoreJson } from './json/score-json.ts'
import { settingsOf } from './kept-settings.ts'
import { readPlanningPattern, readWithout } from './options.ts'
import { chosenShelf, shelfFoods } from './shelf-source.ts'
import { liftText, plateLines } from './text/plate-lines.ts'
import { styleOf } from './text/style.ts'

export const pair: Command = {
  name: 'pair',
  summary: 'which few foods of the shelf, in what grams, make the best plate',
  help: `
pair [--protein G] [--foods K] [--servings N] [--shelf FILE] [...]

  shortstave pair --protein 35 --foods 3
  shortstave pair --shelf galley.csv --servings 6 --use-up tofu --without gluten
  shortstave shelf export --json | shortstave pair --shelf -
  shortstave pair --body-mass 70 --intake 1.6 --meals 3
  shortstave pair --whole-table --protein 40

How much
  --protein G      protein a serving, in grams (35)
  --body-mass KG   or: body mass x intake / meals;  --intake G a kg and day (1.6),  --meals N a day (3)
  --servings N     servings (1); each food's grams on hand are shared among them
From what
  --shelf FILE     a shelf file, CSV (food,grams[,mark][,use_by]) or JSON; - reads standard input
  --whole-table    from every food of the table, as much as one likes: what to buy
  --use-up FOOD    this food must be in (may be given again)
  --hold-back FOOD this food must be out (may be given again)
  --without A      leave out foods with an allergen: gluten, soy, peanut, sesame ... (may be given again)
  --eggs, --dairy  allow them; otherwise plants alone
Within what
  --foods K        protein foods at most, 1 to 6 (3)
  --energy KCAL    at most so much energy a serving
  --mass G         at most so many grams a serving
  --pairings N     how many different pairings, 1 to 9 (3)
  --pattern ID     the scoring pattern (fao-2013-over-3y)
  --age YEARS      the eater's age; nothing is planned for a child under three
  --json           the answer as JSON`,
  async run(argv, world) {
    const { options, words } = readArguments(
      'pair',
      {
        protein: 'text',
        'body-mass': 'text',
        intake: 'text',
        meals: 'text',
        servings: 'text',
        shelf: 'text',
        'whole-table': 'flag',
        'use-up': 'texts',
        'hold-back': 'texts',
        without: 'texts',
        eggs: 'flag',
        dairy: 'flag',
        foods: 'text',
        energy: 'text',
        mass: 'text',
        pairings: 'text',
        pattern: 'text',
        age: 'text',
        json: 'flag',
      },
      argv,
    )
    if (words.length > 0) {
      throw new Refusal(
        `pair takes no words, only options; to score "${plainText(words.join(' ')).slice(0, 60)}" use shortstave score`,
      )
    }
    const age = readNumber('--age', options.age, { least: 0, most: 120, unit: 'years' })
    const settings = await settingsOf(world)
    const pattern = readPlanningPattern(world.table(), options.pattern ?? settings.pattern, age)
    const refusal = planningRefusal({ conditions: settings.conditions, age, pattern })
    if (refusal !== null) throw new Refusal(refusal, NO_ANSWER)
    const back = stepBack(settings.conditions, age)
    const targetG = readTarget(options, settings, back.bodyMassTargets)
    const servings =
      readNumber('--servings', options.servings, { least: 1, most: 100, unit: 'servings', whole: true }) ??
      settings.servings
    const foodsAtMost =
      readNumber('--foods', options.foods, { least: 1, most: 6, unit: 'foods', whole: true }) ??
      settings.foodsAtMost
    if (options['whole-table'] && options.shelf !== undefined)
      throw new Refusal('choose one of --shelf and --whole-table')
    const named = options['whole-table'] ? null : await chosenShelf(options.shelf, world)
    const label = named?.label ?? 'the whole table'
    const onHand: ShelfFood[] =
      named === null
        ? world.table().foods.map(food => ({ food, onHandG: null, mark: '' }))
        : shelfFoods(named.shelf, world)
    const problem: PairingProblem = {
      shelf: marked(onHand, options['use-up'], options['hold-back'], label),
      targetG,
      servings,
      foodsAtMost,
      basis: scoreBasis(world.table(), pattern.id),
      without: [...new Set([...settings.without, ...readWithout(options.without)])],
      allow: { eggs: options.eggs || settings.eggs, dairy: options.dairy || settings.dairy },
      energyAtMostKcal:
        readNumber('--energy', options.energy, { least: 50, most: 5000, unit: 'kcal' }) ??
        settings.energyAtMostKcal,
      massAtMostG:
        readNumber('--mass', options.mass, { least: 20, most: 5000, unit: 'g' }) ?? settings.massAtMostG,
      pairings:
        readNumber('--pairings', options.pairings, { least: 1, most: 9, unit: 'pairings', whole: true }) ?? 3,
      market: () => world.table().foods,
    }
    const found = findPairings(problem)
    return options.json
      ? jsonOutcome(found, problem, back.notes)
      : textOutcome(found, problem, label, world, back.notes)
  },
}

interface TargetOptions {
  protein: string | undefined
  'body-mass': string | undefined
  intake: string | undefined
  meals: string | undefined
}

/** The protein of a serving: as the options say, else as the settings do. */
function readTarget(options: TargetOptions, settings: Settings, bodyMassTargets: boolean): number {
  const plain = readNumber('--protein', options.protein, { least: 1, most: 200, unit: 'g' })
  const bodyMassKg = readNumber('--body-mass', options['body-mass'], { least: 15, most: 300, unit: 'kg' })
  const intake = readNumber('--intake', options.intake, { least: 0.3, most: 3.5, unit: 'g per kg and day' })
  const meals = readNumber('--meals', options.meals, { least: 1, most: 10, unit: 'meals', whole: true })
  if (plain !== undefined && bodyMassKg !== undefined)
    throw new Refusal('choose one of --protein and --body-mass')
  if (plain !== undefined) return plain
  const asksMass = bodyMassKg !== undefined || intake !== undefined || meals !== undefined
  const mass = bodyMassKg ?? settings.bodyMassKg
  if (!asksMass && (settings.targetG !== null || mass === null))
    return settings.targetG ?? DEFAULT_SETTINGS.targetG!
  if (mass === null) {
    throw new Refusal('--intake and --meals need --body-mass KG; or give the grams of a meal with --protein')
  }
  if (!bodyMassTargets) {
    throw new Refusal(
      'no target is worked out from body mass with what your settings tell; give grams with --protein, as your doctor or dietitian says',
      NO_ANSWER,
    )
  }
  return mealTargetG({
    bodyMassKg: mass,
    gPerKgPerDay: intake ?? settings.gPerKgPerDay,
    mealsPerDay: meals ?? settings.mealsPerDay,
  })
}

/** The shelf with the marks of the command line set on the foods that they name. */
function marked(shelf: ShelfFood[], useUp: string[], holdBack: string[], label: string): ShelfFood[] {
  if (useUp.length + holdBack.length === 0) return shelf
  const finder = createFinder(shelf.map(({ food }) => food))
  const marks = new Map<Food, Mark>()
  for (const [words, mark] of [
    ...useUp.map(text => [text, 'use-up'] as const),
    ...holdBack.map(text => [text, 'hold-back'] as const),
  ]) {
    const reading = foodByWords(words, finder)
    if (!reading.ok)
      throw new Refusal(
        `--${mark} ${plainText(words).slice(0, 60)}: not understood on ${label}: ${reading.problem}`,
      )
    if (marks.has(reading.food) && marks.get(reading.food) !== mark) {
      throw new Refusal(`${reading.food.name} is to be used up and held back; choose one`)
    }
    marks.set(reading.food, mark)
  }
  return shelf.map(item => ({ ...item, mark: marks.get(item.food) ?? item.mark }))
}

type Notes = readonly { id: string; text: string; source: string }[]

function jsonOutcome(found: PairingAnswer, problem: PairingProblem, notes: Notes): Outcome {
  const out = jsonText({
    target_g: problem.targetG,
    servings: problem.servings,
    foods_at_most: problem.foodsAtMost,
    reached: found.reached,
    pairings: found.pairings.map(pairing => ({
      ...scoreJson(pairing.score),
      ...careJson(pairing.portions.map(({ food }) => food)),
      why: pairing.why,
      next_lift:
        pairing.nextLift === null
          ? null
          : {
              food: pairing.nextLift.food.id,
              grams: pairing.nextLift.deltaG,
              diaas: pairing.nextLift.diaas,
              on_shelf: pairing.nextLift.onShelf,
            },
    })),
    reason: found.reason,
    notes,
  })
  return { code: found.reached ? DONE : NO_ANSWER, out, err: '' }
}

function textOutcome(
  found: PairingAnswer,
  problem: PairingProblem,
  label: string,
  world: World,
  notes: Notes,
): Outcome {
  const style = styleOf(world.colour)
  const { columns } = world
  const wanted = `${Math.round(problem.targetG)} g protein a serving`
  const servings = problem.servings === 1 ? '' : ` for ${problem.servings} servings`
  const places = `up to ${problem.foodsAtMost} ${problem.foodsAtMost === 1 ? 'food' : 'foods'}`
  const heading = `From ${label}: ${wanted}${servings}, ${places}`
  const lines = [...wrapLines(heading, columns), '']
  if (found.reason !== null) lines.push(...wrapLines(found.reason, columns), '')
  if (!found.reached && found.pairings.length > 0) lines.push('The nearest plate:', '')
  found.pairings.forEach((pairing, i) => {
    lines.push(
      style.bold(`${i + 1}  ${title(pairing)}`),
      ...plateLines(pairing.score, world, problem.servings),
    )
    lines.push(...pairing.why.flatMap(reason => wrapLines(`   ${reason}`, columns, 3)))
    if (pairing.nextLift !== null) lines.push(...wrapLines(`   ${liftText(pairing.nextLift)}`, columns, 3))
    lines.push('')
  })
  const foods = found.pairings.flatMap(({ portions }) => portions.map(({ food }) => food))
  lines.push(...notes.flatMap(({ text }) => wrapLines(text, columns, 2)), ...careLines(foods, columns))
  return { code: found.reached ? DONE : NO_ANSWER, out: `${lines.join('\n')}\n`, err: '' }
}

/** `Lentils, red, dry + Rice, brown, dry`: what a pairing is called in one line. */
function title(pairing: Pairing): string {
  return pairing.portions.map(({ food }) => food.name).join(' + ')
}
