import { parse } from 'csv-parse/sync'
import { AMINO_ACIDS, type AminoProfile, profileOf } from '../../nutrition/amino-acids.ts'
import { type Composition, crudeProtein, nutrientsOf } from './nutrients.ts'

export interface IfctFood extends Composition {
  code: string
  name: string
  group: string
  /** its names in Indian languages, in Latin letters */
  localNames: string[]
  /** mg per g crude protein, or null where the table has none */
  mgPerG: AminoProfile | null
}

/** Columns of the Indian table (g per 100 g; energy in kJ) and what to multiply them with. */
const COLUMN: Record<string, [column: string, factor: number]> = {
  proteinG: ['protcnt', 1],
  kcal: ['enerc', 1 / 4.184],
  waterG: ['water', 1],
  fatG: ['fatce', 1],
  fibreG: ['fibtg', 1],
  ashG: ['ash', 1],
  ironMg: ['fe', 1000],
  zincMg: ['zn', 1000],
  calciumMg: ['ca', 1000],
  magnesiumMg: ['mg', 1000],
  potassiumMg: ['k', 1000],
  sodiumMg: ['na', 1000],
  phytateMg: ['phytac', 1000],
}

/** The foods of the Indian Food Composition Tables 2017 by code. `factorOf` gives a food's nitrogen factor. */
export function parseIfct(
  csv: string,
  factorOf: (name: string, group: string) => number,
): Map<string, IfctFood> {
  const rows = parse(csv, {
    columns: (header: string[]) => header.map(title => title.split('; ').at(-1)!),
    skip_empty_lines: true,
  }) as Record<string, string>[]
  const foods = new Map<string, IfctFood>()
  for (const row of rows) {
    const nitrogenFactor = factorOf(row.name!, row.grup!)
    const number = (column: string) =>
      row[column] === undefined || row[column] === '' ? null : Number(row[column])
    const crudeG = crudeProtein(number('protcnt') ?? 0, nitrogenFactor)
    const hasAmino = crudeG > 0 && AMINO_ACIDS.every(a => (number(a) ?? 0) > 0)
    foods.set(row.code!, {
      code: row.code!,
      name: row.name!,
      group: row.grup!,
      nitrogenFactor,
      per100g: nutrientsOf(key => {
        // The Indian table states carbohydrate without fibre; the American one, and this table, with it.
        if (key === 'carbohydrateG') return (number('choavldf') ?? 0) + (number('fibtg') ?? 0)
        const column = COLUMN[key]
        if (column === undefined) return null
        const value = number(column[0])
        return value === null ? null : value * column[1]
      }),
      measures: [],
      sources: ['ifct-2017'],
      localNames: localNamesOf(row.lang ?? ''),
      mgPerG: hasAmino ? profileOf(a => (1000 * number(a)!) / crudeG) : null,
    })
  }
  return foods
}

/** `H. Jau; Tam. Baarli Arisi, Yavam` is Jau, Baarli Arisi, Yavam: the language marks are dropped, doubles too. */
export function localNamesOf(lang: string): string[] {
  const names = lang
    .split(';')
    .map(part => part.replace(/^\s*(?:[A-Z][a-z]{0,4}\.\s*)+/, ''))
    .flatMap(part => part.split(/[,/]/))
    .map(name =>
      name
        .replace(/\(.*?\)/g, '')
        .replace(/[.\s]+$/, '')
        .replace(/\s+/g, ' ')
        .trim(),
    )
    .filter(name => /^[\p{L}\p{M} '-]{3,40}$/u.test(name))
  const seen = new Set<string>()
  return names.filter(name => {
    const key = name.toLowerCase()
    if (seen.has(key)) return false
    seen.add(key)
    return true
  })
}

/** The nitrogen factors that the Indian table used, as its own list gives them; 6.25 for foods that it does not list. */
export function jonesFactors(csv: string): (name: string, group: string) => number {
  const rules: [pattern: RegExp, factor: number][] = [
    [/refined|maida|semolina|vermicelli/i, rowFactor(csv, 'Refined wheat flour')],
    [/wheat/i, rowFactor(csv, 'Wheat whole')],
    [/barley|\brye\b|oats/i, rowFactor(csv, 'Barley')],
    [/^rice\b/i, rowFactor(csv, 'Rice')],
    [/almond/i, rowFactor(csv, 'Almonds')],
    [/ground ?nut/i, rowFactor(csv, 'Peanuts')],
    [/soya/i, rowFactor(csv, 'Soybean')],
    [/cashew|pistachio|chestnut/i, rowFactor(csv, 'Cashew')],
    [/sunflower/i, rowFactor(csv, 'Sunflower')],
  ]
  return (name, group) => {
    if (/milk/i.test(group)) return 6.38
    return rules.find(([pattern]) => pattern.test(name))?.[1] ?? 6.25
  }
}

function rowFactor(csv: string, start: string): number {
  const row = csv.split('\n').find(line => line.replace(/^"/, '').startsWith(start))
  if (row === undefined) throw new Error(`the nitrogen factors list no "${start}"`)
  return Number(row.slice(row.lastIndexOf(',') + 1))
}
