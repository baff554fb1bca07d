import type { Food } from '../../foods/food.ts'
import type { Problems } from './problems.ts'

/** Words as the search compares them: lower case, no accents, single blanks. */
const keyOf = (word: string): string =>
  word
    .toLowerCase()
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}]+/gu, ' ')
    .trim()

/**
 * A curated alias may be shared by the states of one foodstuff (`kin`); between foodstuffs it needs a `firstFor`
 * that says which is meant. Two foods with the same `firstFor`, or the same name, are always a problem.
 */
export function checkAliases(foods: readonly Food[], problems: Problems): void {
  const firsts = new Map<string, Food>()
  const names = new Map<string, Food>()
  const claims = new Map<string, Food[]>()
  for (const food of foods) {
    const twin = names.get(keyOf(food.name))
    if (twin !== undefined) problems.add(food.id, `has the same name as ${twin.id}: "${food.name}"`)
    names.set(keyOf(food.name), food)
    for (const word of food.firstFor) {
      const other = firsts.get(keyOf(word))
      if (other !== undefined)
        problems.add(
          food.id,
          `is first for "${word}", but so is ${other.id}; a word may stand at one food only`,
        )
      firsts.set(keyOf(word), food)
    }
    for (const alias of new Set(food.aliases.map(keyOf)))
      claims.set(alias, [...(claims.get(alias) ?? []), food])
  }
  for (const [alias, claimants] of claims) {
    const kins = new Set(claimants.map(({ kin }) => kin))
    if (kins.size > 1 && !firsts.has(alias)) {
      problems.add(
        claimants.map(({ id }) => id).join(', '),
        `all claim the alias "${alias}"; give the word to one of them in first_for`,
      )
    }
  }
}

/**
 * Names in other languages, each given to the first foodstuff that has it and to no name or alias that is taken, so
 * that a local name never makes a curated one ambiguous. `localNames` are by food id.
 */
export function withLocalNames(foods: readonly Food[], localNames: ReadonlyMap<string, string[]>): Food[] {
  const owner = new Map<string, string>()
  for (const food of foods) {
    for (const word of [food.name, ...food.aliases, ...food.firstFor]) owner.set(keyOf(word), food.kin)
  }
  return foods.map(food => {
    const own = new Set([food.name, ...food.aliases].map(keyOf))
    const added: string[] = []
    for (const name of localNames.get(food.id) ?? []) {
      const key = keyOf(name)
      const holder = owner.get(key)
      if (own.has(key) || (holder !== undefined && holder !== food.kin)) continue
      owner.set(key, food.kin)
      own.add(key)
      added.push(name)
    }
    return { ...food, aliases: [...food.aliases, ...added] }
  })
}
