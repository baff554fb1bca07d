import { AMINO_ACIDS, profileOf } from '../../nutrition/amino-acids.ts'
import type { IfctFood } from './ifct.ts'
import { crudeProtein, mixProfiles, type Profile } from './nutrients.ts'
import type { Problems } from './problems.ts'
import { numberOf, type Row } from './rows.ts'

const UNITS = ['g_per_100g', 'mg_per_g_protein', 'g_per_100g_protein', 'mg_per_g_n'] as const

/**
 * A row of profiles.csv on the common basis: mg per g crude protein. What its unit rests on (protein with the factor
 * of the same release, or nitrogen) is in the row, so that no release's figures meet another's protein.
 * Source of the conversions: FAO/INFOODS Guidelines for Converting Units, Denominators and Expressions (2012).
 */
export function profileFromRow(row: Row, rows: Map<string, Row>, problems: Problems): Profile | null {
  const { text, where } = row
  const unit = UNITS.find(known => known === text.unit)
  if (unit === undefined) {
    problems.add(where, `unit is "${text.unit}"; give one of ${UNITS.join(', ')}`)
    return null
  }
  const factor = numberOf(row, 'nitrogen_factor', problems) ?? 6.25
  const proteinG = numberOf(row, 'protein_g_per_100g', problems)
  if (unit === 'g_per_100g' && !(proteinG !== null && proteinG > 0)) {
    problems.add(where, 'g_per_100g needs protein_g_per_100g above 0')
    return null
  }
  const toMgPerG = {
    g_per_100g: 1000 / crudeProtein(proteinG ?? 1, factor),
    mg_per_g_protein: factor / 6.25,
    g_per_100g_protein: (10 * factor) / 6.25,
    mg_per_g_n: 1 / 6.25,
  }[unit]
  const notes = text.note === undefined || text.note === '' ? [] : [text.note]
  const trpFrom = text.trp_from ?? ''
  const mgPerG = profileOf(a => {
    const value = numberOf(row, a, problems)
    if (value !== null && value > 0) return value * toMgPerG
    const donor = a === 'trp' && trpFrom !== '' ? rows.get(trpFrom) : undefined
    // A donor must hold its own, so that two rows cannot ask each other for ever.
    const holdsOwn = donor !== undefined && (donor.text.trp ?? '') !== ''
    const donated = holdsOwn ? profileFromRow(donor, rows, problems) : null
    if (donated !== null) return donated.mgPerG.trp
    problems.add(where, `${a} is missing; give it, or for tryptophan name a profile in trp_from`)
    return 0
  })
  return { mgPerG, sources: [text.source ?? ''], notes }
}

/**
 * The profile that a food names: `sr26:16069` or any id of profiles.csv, `ifct:B014`, `ifct:D010+D011` (their mean),
 * or `mix:ID*SHARE+...` over profile ids with shares of crude protein.
 */
export function resolveProfile(
  expression: string,
  known: { rows: Map<string, Row>; ifct: Map<string, IfctFood> },
  where: string,
  problems: Problems,
): Profile | null {
  const row = known.rows.get(expression)
  if (row !== undefined) return profileFromRow(row, known.rows, problems)
  const [kind, rest = ''] = splitOnce(expression, ':')
  if (kind === 'ifct') {
    const profiles = rest.split('+').map((code): Profile | null => {
      const mgPerG = known.ifct.get(code.trim())?.mgPerG ?? null
      return mgPerG === null ? null : { mgPerG, sources: ['ifct-2017'], notes: [] }
    })
    if (profiles.every(profile => profile !== null))
      return mixProfiles(profiles.map(profile => ({ profile, crudeG: 1 })))
  }
  if (kind === 'mix') {
    const parts = rest.split('+').map(part => {
      const [id = '', share = ''] = splitOnce(part.trim(), '*')
      if (!(Number(share) > 0))
        problems.add(where, `profile "${expression}": "${part}" has no share; give ID*SHARE`)
      return { profile: resolveProfile(id.trim(), known, where, problems), crudeG: Number(share) }
    })
    const complete = parts.flatMap(({ profile, crudeG }) =>
      profile !== null && crudeG > 0 ? [{ profile, crudeG }] : [],
    )
    if (complete.length === parts.length) return mixProfiles(complete)
    return null
  }
  problems.add(
    where,
    `profile "${expression}" is not in profiles.csv and no row of the Indian table with all of ${AMINO_ACIDS.length} amino acids`,
  )
  return null
}

export function splitOnce(text: string, separator: string): [string, string | undefined] {
  const at = text.lastIndexOf(separator)
  const first = separator === ':' ? text.indexOf(separator) : at
  return first === -1 ? [text, undefined] : [text.slice(0, first), text.slice(first + 1)]
}
