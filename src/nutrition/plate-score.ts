import type { Stave, Staves } from './amino-acids.ts'
import { diaasOf } from './diaas.ts'
import type { Pattern } from './pattern.ts'
import { pdcaasOf } from './pdcaas.ts'
import type { Portion, ProteinSource } from './protein-source.ts'
import { type QualityClass, qualityClass } from './quality-class.ts'
import { crudeProteinOf, stavesOfPlate } from './staves.ts'
import { type Band, bandOf, type Coefficients } from './uncertainty.ts'

/** One food's part of a scored plate. Grams in g, energy in kcal, `diaasAlone` in per cent (null: no protein). */
export interface ScoredItem<S extends ProteinSource = ProteinSource> {
  food: S
  grams: number
  proteinG: number
  kcal: number
  diaasAlone: number | null
}

/** A scored plate. Scores in per cent; null where there is no protein to score. */
export interface PlateScore<S extends ProteinSource = ProteinSource> {
  pattern: Pattern
  items: ScoredItem<S>[]
  grams: number
  kcal: number
  proteinG: number
  crudeProteinG: number
  /** Crude protein x min(1, DIAAS/100): what the shortest stave lets the body use. */
  adjustedProteinG: number
  /** Total (not digestible) leucine; information only. */
  leucineG: number
  /** Sum over the foods whose fibre is known. */
  fibreG: number
  diaas: number | null
  limiting: Stave | null
  band: Band | null
  class: QualityClass
  pdcaas: number | null
  staves: Staves | null
  /** DIAAS of the plate less the protein-weighted mean of its foods' own. */
  gain: number | null
  /** DIAAS of the plate less the best own DIAAS among its foods. */
  lift: number | null
}

/** What a score is worked out against. `pdcaasPattern` is that of FAO/WHO 1991. */
export interface ScoreBasis {
  pattern: Pattern
  pdcaasPattern: Pattern
  coefficients: Coefficients
}

/** Everything that the program says of a plate, from its portions alone. Grams must be finite and not negative. */
export function scorePlate<S extends ProteinSource>(
  portions: readonly Portion<S>[],
  basis: ScoreBasis,
): PlateScore<S> {
  const { pattern } = basis
  const items = portions.map(
    ({ food, grams }): ScoredItem<S> => ({
      food,
      grams,
      proteinG: (grams / 100) * food.per100g.proteinG,
      kcal: (grams / 100) * food.per100g.kcal,
      diaasAlone: diaasOf([{ food, grams: 100 }], pattern).diaas,
    }),
  )
  const sum = (value: (portion: Portion<S>) => number) =>
    portions.reduce((total, portion) => total + value(portion), 0)
  const crudeProteinG = crudeProteinOf(portions)
  const { diaas, limiting } = diaasOf(portions, pattern)
  const own = items.flatMap(({ food, grams, diaasAlone }) =>
    diaasAlone === null || grams === 0
      ? []
      : [{ diaas: diaasAlone, crudeG: (grams / 100) * food.per100g.crudeProteinG }],
  )
  const meanOwn = own.reduce((total, part) => total + part.diaas * part.crudeG, 0) / crudeProteinG
  return {
    pattern,
    items,
    grams: sum(({ grams }) => grams),
    kcal: sum(({ food, grams }) => (grams / 100) * food.per100g.kcal),
    proteinG: sum(({ food, grams }) => (grams / 100) * food.per100g.proteinG),
    crudeProteinG,
    adjustedProteinG: diaas === null ? 0 : crudeProteinG * Math.min(1, diaas / 100),
    leucineG: sum(
      ({ food, grams }) => ((grams / 100) * food.per100g.crudeProteinG * food.aminoMgPerG.leu) / 1000,
    ),
    fibreG: sum(({ food, grams }) => (grams / 100) * (food.per100g.fibreG ?? 0)),
    diaas,
    limiting,
    band: bandOf(portions, pattern, basis.coefficients),
    class: qualityClass(diaas),
    pdcaas: pdcaasOf(portions, basis.pdcaasPattern),
    staves: stavesOfPlate(portions, pattern),
    gain: diaas === null ? null : diaas - meanOwn,
    lift: diaas === null ? null : diaas - Math.max(...own.map(part => part.diaas)),
  }
}
