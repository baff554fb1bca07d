import { AMINO_ACIDS } from '../../nutrition/amino-acids.ts'
import {
  DIGESTIBILITY_TIERS,
  type Digestibility,
  type DigestibilityTier,
} from '../../nutrition/protein-source.ts'
import type { Problems } from './problems.ts'
import { numberOf, type Row } from './rows.ts'

export interface DigestibilityClass {
  fractions: Digestibility
  tier: DigestibilityTier
  sources: string[]
}

/** A row of digestibility.csv: eleven fractions and that of whole protein, none outside 0.20 to 1.05. */
export function digestibilityFromRow(row: Row, problems: Problems): DigestibilityClass {
  const fraction = (column: string): number => {
    const value = numberOf(row, column, problems)
    if (value === null || value < 0.2 || value > 1.05) {
      problems.add(
        row.where,
        `${column} is "${row.text[column] ?? ''}"; a digestibility is a fraction from 0.20 to 1.05`,
      )
    }
    return value ?? 1
  }
  const tier = DIGESTIBILITY_TIERS.find(known => known === row.text.tier)
  if (tier === undefined)
    problems.add(
      row.where,
      `tier "${row.text.tier}" is unknown; give one of ${DIGESTIBILITY_TIERS.join(' | ')}`,
    )
  if ((row.text.why ?? '') === '') problems.add(row.where, 'a class needs its reason in "why"')
  const eleven = Object.fromEntries(AMINO_ACIDS.map(a => [a, fraction(a)]))
  return {
    fractions: { ...eleven, proteinFaecal: fraction('protein_faecal') } as Digestibility,
    tier: tier ?? 'class default',
    sources: [row.text.source, row.text.faecal_source]
      .flatMap(cell => (cell ?? '').split('|'))
      .map(id => id.trim())
      .filter(id => id !== ''),
  }
}
