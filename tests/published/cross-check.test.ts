import { readdirSync, readFileSync } from 'node:fs'
import { parse } from 'csv-parse/sync'
import { describe, expect, it } from 'vitest'
import { food } from './lookup.ts'

/** data/curation/cross-check.csv says of each Indian row what was done; here it is held to it. */
const curation = new URL('../../data/curation/', import.meta.url)
const read = (file: string): Record<string, string>[] =>
  parse(readFileSync(new URL(file, curation), 'utf8'), { columns: true })

const foods = readdirSync(curation)
  .filter(file => /^foods-.*\.csv$/.test(file))
  .flatMap(read)
const crossCheck = read('cross-check.csv')
const taking = (column: 'profile' | 'composition', code: string) =>
  foods.filter(row => (row[column] ?? '').match(/\b[A-Z]\d{3}\b/g)?.includes(code))
const ids = (rows: Record<string, string>[]) => rows.map(({ id }) => id)

describe('Indian rows that another table contradicts', () => {
  it.each(crossCheck)('$ifct_code $ifct_name: $done', ({ ifct_code: code = '', done, why = '' }) => {
    const profiles = taking('profile', code)
    const proximates = taking('composition', code)
    switch (done) {
      case 'profile not used':
      case 'not used':
        expect(ids(profiles)).toEqual([])
        expect(ids(proximates)).toEqual([])
        break
      case 'composition used, profile not':
        expect(ids(profiles)).toEqual([])
        expect(proximates.length).toBeGreaterThan(0)
        break
      case 'profile used, marked estimated':
        expect(profiles.length).toBeGreaterThan(0)
        expect(profiles.filter(row => row.profile_tier !== 'estimated')).toEqual([])
        break
      default:
        throw new Error(`"${done}" is none of what can be done`)
    }
    const trusted = /American profile of the same species is taken for ([a-z-]+)/.exec(why)?.[1]
    if (trusted !== undefined) expect(food(trusted).sources).toContain('usda-sr26')
  })
})
