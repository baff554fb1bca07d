import { stavesOf } from '../../nutrition/amino-acids.ts'
import { PATTERN_IDS, type Pattern } from '../../nutrition/pattern.ts'
import type { Problems } from './problems.ts'
import { indexRows, numberOf, type Row } from './rows.ts'

/** The scoring patterns of data/patterns.csv, in the order of PATTERN_IDS. */
export function compilePatterns(rows: readonly Row[], problems: Problems): Pattern[] {
  const index = indexRows(rows, 'id', problems)
  return PATTERN_IDS.flatMap(id => {
    const row = index.get(id)
    if (row === undefined) {
      problems.add('data/patterns.csv', `the pattern "${id}" is missing`)
      return []
    }
    const mgPerG = stavesOf(stave => {
      const mg = numberOf(row, stave, problems)
      if (mg === null || !(mg > 0)) problems.add(row.where, `${stave} must be above 0`)
      return mg ?? 1
    })
    const { name = '', source = '', provenance = '', planning } = row.text
    if (source === '') problems.add(row.where, 'a pattern needs its source')
    return [{ id, name, mgPerG, planning: planning === 'yes', source, provenance }]
  })
}
