import { z } from 'zod'
import { ALLERGEN_IDS } from '../../foods/allergens.ts'
import { type Food, STATES } from '../../foods/food.ts'
import type { Problems } from './problems.ts'
import type { Row } from './rows.ts'

const list = z
  .string()
  .default('')
  .transform(text => text.split(/[ |]+/).filter(word => word !== ''))

const careRuleSchema = z.object({
  kin: z.string().min(1),
  /** empty: every state of the kin */
  states: list.pipe(z.array(z.enum(STATES))),
  /** cautions that its foods always call for */
  cautions: list,
  /** cautions of the row that these replace */
  instead_of: list,
  allergens: list.pipe(z.array(z.enum(ALLERGEN_IDS))),
  /** a word that none of its aliases may hold */
  no_alias: z.string().default(''),
  why: z.string().min(1),
  source: z.string().min(1),
})

/**
 * What goes by the plant and not by the row (data/curation/care.csv): cautions and allergens that every food of a kin
 * carries whatever its own row says, and names that must not lead to it. A rule for a kin that is not in the table is
 * a problem, so that a renamed kin does not lose its care.
 */
export function withCare(foods: readonly Food[], rows: readonly Row[], problems: Problems): Food[] {
  let cared = [...foods]
  for (const { text, where } of rows) {
    const parsed = careRuleSchema.safeParse(text)
    if (!parsed.success) {
      const [issue] = parsed.error.issues
      problems.add(where, `${issue?.path.join('.')}: ${issue?.message}`)
      continue
    }
    const rule = parsed.data
    const concerned = (food: Food) =>
      food.kin === rule.kin && (rule.states.length === 0 || rule.states.includes(food.state))
    if (!cared.some(concerned))
      problems.add(where, `no food of kin "${rule.kin}" is in that state; mend the rule`)
    cared = cared.map(food => {
      if (!concerned(food)) return food
      const cautions = food.cautions.filter(id => !rule.instead_of.includes(id))
      return {
        ...food,
        cautions: [...new Set([...cautions, ...rule.cautions])],
        allergens: ALLERGEN_IDS.filter(id => food.allergens.includes(id) || rule.allergens.includes(id)),
        aliases:
          rule.no_alias === ''
            ? food.aliases
            : food.aliases.filter(alias => !alias.toLowerCase().includes(rule.no_alias.toLowerCase())),
      }
    })
  }
  return cared
}
