import { STAVES, type Staves, stavesOf } from '../../nutrition/amino-acids.ts'
import { DIGESTIBILITY_TIERS, DOUBTS, PROFILE_TIERS } from '../../nutrition/protein-source.ts'
import type { Coefficients } from '../../nutrition/uncertainty.ts'
import type { Problems } from './problems.ts'
import { numberOf, type Row } from './rows.ts'

/** The coefficients of variation from uncertainty.csv; a row for one stave wins over the row for `all`. */
export function compileCoefficients(rows: readonly Row[], problems: Problems): Coefficients {
  const file = 'data/curation/uncertainty.csv'
  const cvs = new Map<string, number>()
  for (const row of rows) {
    const { kind, key, stave } = row.text
    const cv = numberOf(row, 'cv', problems)
    if (cv === null || cv < 0 || cv > 1) problems.add(row.where, 'cv must be a fraction from 0 to 1')
    if (stave !== 'all' && !STAVES.some(known => known === stave))
      problems.add(row.where, `stave "${stave}" is unknown`)
    if ((row.text.reason ?? '') === '') problems.add(row.where, 'a coefficient needs its reason')
    cvs.set(`${kind}/${key}/${stave}`, cv ?? 0)
  }
  const one = (kind: string, key: string): number => {
    const cv = cvs.get(`${kind}/${key}/all`)
    if (cv === undefined) problems.add(file, `there is no row ${kind}, ${key}, all`)
    return cv ?? 0
  }
  const nine = (kind: string, key: string): Staves =>
    stavesOf(stave => cvs.get(`${kind}/${key}/${stave}`) ?? one(kind, key))
  const record = <K extends string, V>(keys: readonly K[], value: (key: K) => V) =>
    Object.fromEntries(keys.map(key => [key, value(key)])) as Record<K, V>
  return {
    profile: record(PROFILE_TIERS, key => nine('profile', key)),
    doubt: record(DOUBTS, key => nine('doubt', key)),
    digestibility: record(DIGESTIBILITY_TIERS, key => one('digestibility', key)),
    protein: one('protein', 'protein'),
  }
}
