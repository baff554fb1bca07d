import type { Stave } from './amino-acids.ts'
import type { Pattern } from './pattern.ts'
import type { Portion } from './protein-source.ts'
import { shortestStave, stavesOfPlate } from './staves.ts'

/** DIAAS in per cent, not truncated, with the stave that sets it; both null for a plate without protein. */
export type Diaas = { diaas: number; limiting: Stave } | { diaas: null; limiting: null }

/**
 * Digestible indispensable amino acid score of a plate: 100 x the least, over the indispensable amino acids, of
 * [mg digestible in 1 g of the plate's protein / mg in 1 g of the pattern].
 * Source: FAO Food and Nutrition Paper 92 (2013), section 4.
 */
export function diaasOf(portions: readonly Portion[], pattern: Pattern): Diaas {
  const staves = stavesOfPlate(portions, pattern)
  if (staves === null) return { diaas: null, limiting: null }
  const limiting = shortestStave(staves)
  return { diaas: staves[limiting], limiting }
}
