import { type Food, foodSchema, type Measure } from '../../foods/food.ts'
import type { TableFile } from '../../foods/table.ts'
import { AMINO_ACIDS, profileOf } from '../../nutrition/amino-acids.ts'
import { DIGESTIBILITY_TIERS } from '../../nutrition/protein-source.ts'
import { checkAliases, withLocalNames } from './aliases.ts'
import { withCare } from './care.ts'
import { findingsOf, RULE_NAMES } from './checks.ts'
import { compileCoefficients } from './coefficients.ts'
import { resolveComposition } from './compositions.ts'
import { digestibilityFromRow } from './digestibilities.ts'
import type { IfctFood } from './ifct.ts'
import { type Composition, crudeProtein, NUTRIENT_KEYS } from './nutrients.ts'
import { compilePatterns } from './patterns.ts'
import { Problems } from './problems.ts'
import { resolveProfile } from './profiles.ts'
import { indexRows, listOf, numberOf, type Row } from './rows.ts'

/** Everything that the table is compiled from, as plain data. */
export interface TableInputs {
  sr28: Map<string, Composition>
  ifct: Map<string, IfctFood>
  /** rows of data/patterns.csv */
  patterns: Row[]
  /** rows of all data/curation/foods-*.csv */
  foods: Row[]
  profiles: Row[]
  composition: Row[]
  digestibility: Row[]
  uncertainty: Row[]
  sources: Row[]
  portions: Row[]
  measures: Row[]
  phytate: Row[]
  exceptions: Row[]
  localNames: Row[]
  /** what goes by the plant and not by the row; none where a test gives none */
  care?: Row[]
}

/** Four significant digits: finer than any figure here is known. */
const rounded = (value: number): number => Number(value.toPrecision(4))
const roundedOrNull = (value: number | null): number | null => (value === null ? null : rounded(value))

/** Compiles and checks the table; `problems` is empty when every row can be believed. */
export function compileTable(inputs: TableInputs): { table: TableFile; problems: string[] } {
  const problems = new Problems()
  const byId = indexRows(inputs.foods, 'id', problems)
  const sourceRows = indexRows(inputs.sources, 'id', problems)
  const portions = indexRows(inputs.portions, 'id', problems)
  const profileRows = indexRows(inputs.profiles, 'id', problems)
  const own = indexRows(inputs.composition, 'id', problems)
  const classes = new Map(
    [...indexRows(inputs.digestibility, 'class', problems)].map(([id, row]) => [
      id,
      digestibilityFromRow(row, problems),
    ]),
  )
  const excused = excuses(inputs.exceptions, byId, problems)
  const measures = measuresByFood(inputs.measures, byId, sourceRows, problems)
  const phytate = phytateByKey(inputs.phytate, byId, problems)
  const known = { sr28: inputs.sr28, ifct: inputs.ifct, own, foods: byId }

  const compiled: Food[] = []
  for (const row of byId.values()) {
    const { text, where } = row
    const at = `${where} (${text.id})`
    const composition = resolveComposition(text.composition ?? '', known, at, problems)
    const portion = portions.get(text.portion ?? '')
    const digestibility = classes.get(text.digestibility ?? '')
    if (portion === undefined) problems.add(at, `portion "${text.portion}" is not in portions.csv`)
    if (digestibility === undefined)
      problems.add(at, `digestibility "${text.digestibility}" is not in digestibility.csv`)
    if (composition === null || portion === undefined || digestibility === undefined) continue
    const noProfile = (text.profile ?? '') === ''
    if (noProfile && composition.per100g.proteinG > 0.5)
      problems.add(at, 'a food with protein needs a profile')
    const profile = noProfile
      ? null
      : resolveProfile(text.profile!, { rows: profileRows, ifct: inputs.ifct }, at, problems)
    if (profile === null && !noProfile) continue
    const nitrogenFactor = numberOf(row, 'nitrogen_factor', problems) ?? composition.nitrogenFactor
    const tier = (text.digestibility_tier ?? '') === '' ? digestibility.tier : text.digestibility_tier
    const proteinG = profile === null ? 0 : composition.per100g.proteinG
    const weaker =
      DIGESTIBILITY_TIERS.indexOf(tier as never) < DIGESTIBILITY_TIERS.indexOf(digestibility.tier)
    if (weaker)
      problems.add(
        at,
        `digestibility_tier "${tier}" claims more than its class has ("${digestibility.tier}")`,
      )
    const phytateMg = phytate.get(text.id!) ?? phytatePerKin(phytate, text.kin!, composition)
    const draft = {
      id: text.id,
      name: text.name,
      aliases: listOf(row, 'aliases'),
      firstFor: listOf(row, 'first_for'),
      kin: text.kin,
      role: text.role,
      state: text.state,
      origin: text.origin,
      place: text.place,
      nitrogenFactor: rounded(nitrogenFactor),
      per100g: {
        ...Object.fromEntries(NUTRIENT_KEYS.map(key => [key, roundedOrNull(composition.per100g[key])])),
        proteinG: rounded(proteinG),
        crudeProteinG: rounded(crudeProtein(proteinG, nitrogenFactor)),
        phytateMg: roundedOrNull(composition.per100g.phytateMg ?? phytateMg),
      },
      aminoMgPerG: profileOf(a => (profile === null ? 0 : rounded(profile.mgPerG[a]))),
      digestibility: Object.fromEntries(
        [...AMINO_ACIDS, 'proteinFaecal' as const].map(a => [a, rounded(digestibility.fractions[a])]),
      ),
      digestibilityClass: text.digestibility,
      profileTier: text.profile_tier,
      digestibilityTier: tier,
      doubts: listOf(row, 'doubts'),
      portionG: {
        least: numberOf(portion, 'least_g', problems),
        usual: numberOf(portion, 'usual_g', problems),
        most: numberOf(portion, 'most_g', problems),
      },
      stepG: numberOf(row, 'step_g', problems) ?? 5,
      measures: mergedMeasures(composition.measures, measures.get(text.id!) ?? []),
      allergens: listOf(row, 'allergens'),
      cautions: listOf(row, 'cautions'),
      sources: [...new Set([...composition.sources, ...(profile?.sources ?? []), ...digestibility.sources])],
      note: [text.note ?? '', ...(profile?.notes ?? [])].filter(part => part !== '').join(' '),
    }
    const parsed = foodSchema.safeParse(draft)
    if (!parsed.success) {
      for (const issue of parsed.error.issues) problems.add(at, `${issue.path.join('.')}: ${issue.message}`)
      continue
    }
    for (const { rule, what } of findingsOf(parsed.data)) {
      if (!excused.delete(`${text.id}/${rule}`))
        problems.add(at, `${what} (${rule}; mend it, or say why in exceptions.csv)`)
    }
    for (const id of parsed.data.sources) {
      if (!sourceRows.has(id)) problems.add(at, `source "${id}" is not in sources.csv`)
    }
    compiled.push(parsed.data)
  }
  for (const left of excused)
    problems.add('data/curation/exceptions.csv', `"${left}" excuses nothing any more; remove it`)
  checkAliases(compiled, problems)
  const named = withLocalNames(compiled, localNamesByFood(inputs, byId, problems))
  const cited = new Set([
    ...named.flatMap(food => [...food.sources, ...food.measures.map(measure => measure.source)]),
  ])
  const table: TableFile = {
    patterns: compilePatterns(inputs.patterns, problems),
    coefficients: compileCoefficients(inputs.uncertainty, problems),
    sources: [...sourceRows.values()]
      .filter(({ text }) => cited.has(text.id!))
      .map(({ text }) => ({ id: text.id!, citation: text.citation ?? '', licence: text.licence ?? '' })),
    foods: withCare(named, inputs.care ?? [], problems).sort((a, b) => (a.id < b.id ? -1 : 1)),
  }
  return { table, problems: problems.lines }
}

function excuses(rows: readonly Row[], foods: Map<string, Row>, problems: Problems): Set<string> {
  const keys = new Set<string>()
  for (const { text, where } of rows) {
    if (!foods.has(text.food ?? '')) problems.add(where, `there is no food "${text.food}"`)
    if (!RULE_NAMES.includes(text.rule ?? ''))
      problems.add(where, `rule "${text.rule}" is unknown; there are ${RULE_NAMES.join(', ')}`)
    if ((text.why ?? '') === '') problems.add(where, 'an exception needs its reason in "why"')
    keys.add(`${text.food}/${text.rule}`)
  }
  return keys
}

function measuresByFood(
  rows: readonly Row[],
  foods: Map<string, Row>,
  sources: Map<string, Row>,
  problems: Problems,
): Map<string, Measure[]> {
  const byFood = new Map<string, Measure[]>()
  for (const row of rows) {
    const { food = '', measure = '', source = '' } = row.text
    const grams = numberOf(row, 'grams', problems)
    if (!foods.has(food)) problems.add(row.where, `there is no food "${food}"`)
    if (!sources.has(source)) problems.add(row.where, `source "${source}" is not in sources.csv`)
    if (!/^[\d/.]+ \S/.test(measure))
      problems.add(row.where, `measure "${measure}" needs an amount first, such as "1 cup"`)
    if (grams === null || !(grams > 0)) problems.add(row.where, 'grams must be above 0')
    else byFood.set(food, [...(byFood.get(food) ?? []), { name: measure, grams, source }])
  }
  return byFood
}

/** The dataset's measures, with curated ones of the same name in their place and further ones after. */
function mergedMeasures(dataset: readonly Measure[], curated: readonly Measure[]): Measure[] {
  const merged = new Map<string, Measure>()
  for (const measure of [...dataset, ...curated]) merged.set(measure.name, measure)
  return [...merged.values()]
}

function phytateByKey(
  rows: readonly Row[],
  foods: Map<string, Row>,
  problems: Problems,
): Map<string, number> {
  const keys = new Set([...foods.values()].flatMap(({ text }) => [text.id ?? '', `kin:${text.kin}`]))
  const byKey = new Map<string, number>()
  for (const row of rows) {
    if (!keys.has(row.text.food ?? ''))
      problems.add(row.where, `"${row.text.food}" is no food and no kin: of the table`)
    const mg = numberOf(row, 'mg_per_100g', problems)
    if (mg !== null) byKey.set(row.text.food ?? '', mg)
  }
  return byKey
}

/** Phytate known for a foodstuff dry (`kin:`), spread over the water of the state at hand: a figure on dry matter. */
function phytatePerKin(phytate: Map<string, number>, kin: string, composition: Composition): number | null {
  const perDryMatter = phytate.get(`kin:${kin}`)
  const { waterG } = composition.per100g
  return perDryMatter === undefined || waterG === null ? null : (perDryMatter * (100 - waterG)) / 100
}

/** Indian names of foods: of the codes in their composition, and of those that local-names.csv gives them. */
function localNamesByFood(
  inputs: TableInputs,
  foods: Map<string, Row>,
  problems: Problems,
): Map<string, string[]> {
  const byFood = new Map<string, string[]>()
  const add = (id: string, code: string, where: string) => {
    const names = inputs.ifct.get(code)?.localNames
    if (names === undefined) problems.add(where, `the Indian table has no code "${code}"`)
    else byFood.set(id, [...(byFood.get(id) ?? []), ...names])
  }
  for (const { text, where } of foods.values()) {
    const composition = text.composition ?? ''
    if (composition.startsWith('ifct:'))
      for (const code of composition.slice(5).split('+')) add(text.id!, code.trim(), where)
  }
  for (const { text, where } of inputs.localNames) {
    if (!foods.has(text.food ?? '')) problems.add(where, `there is no food "${text.food}"`)
    else add(text.food!, text.code ?? '', where)
  }
  return byFood
}
