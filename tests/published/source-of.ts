import { type AminoProfile, profileOf } from '../../src/nutrition/amino-acids.ts'
import type { ProteinSource } from '../../src/nutrition/protein-source.ts'

/** What a worked example prints of an ingredient; amino acids that it does not print are out of the way (ample). */
export interface Printed {
  proteinG: number
  /** mg per g protein; `saa` as one figure */
  lys: number
  saa: number
  thr: number
  trp: number
  /** fractions */
  digestibility: { lys: number; saa: number; thr: number; trp: number; protein?: number }
}

/** An ingredient of a worked example as the program's own score takes it. */
export function sourceOf(id: string, printed: Printed): ProteinSource {
  const { digestibility } = printed
  const mg: Partial<AminoProfile> = {
    lys: printed.lys,
    met: printed.saa,
    cys: 0,
    thr: printed.thr,
    trp: printed.trp,
  }
  const fractions: Partial<AminoProfile> = {
    lys: digestibility.lys,
    met: digestibility.saa,
    thr: digestibility.thr,
    trp: digestibility.trp,
  }
  return {
    id,
    per100g: { proteinG: printed.proteinG, crudeProteinG: printed.proteinG, kcal: 0, fibreG: null },
    aminoMgPerG: profileOf(a => mg[a] ?? 1000),
    digestibility: { ...profileOf(a => fractions[a] ?? 1), proteinFaecal: digestibility.protein ?? 1 },
    profileTier: 'measured',
    digestibilityTier: 'ileal, this food',
    doubts: [],
  }
}
