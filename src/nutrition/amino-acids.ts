/** The eleven amino acids that the composition table carries, in the order of the IUPAC names used throughout. */
export const AMINO_ACIDS = [
  'his',
  'ile',
  'leu',
  'lys',
  'met',
  'cys',
  'phe',
  'tyr',
  'thr',
  'trp',
  'val',
] as const
export type AminoAcid = (typeof AMINO_ACIDS)[number]

/** One figure for each of the eleven amino acids (its unit is the owner's: mg per g, or a fraction). */
export type AminoProfile = Record<AminoAcid, number>

/**
 * The nine staves: the indispensable amino acids as scored. The sulphur pair (Met+Cys) and the aromatic
 * pair (Phe+Tyr) count as one each, because the body makes the second of the pair from the first.
 * Source: FAO Food and Nutrition Paper 92 (2013).
 */
export const STAVES = ['his', 'ile', 'leu', 'lys', 'saa', 'aaa', 'thr', 'trp', 'val'] as const
export type Stave = (typeof STAVES)[number]
export type Staves = Record<Stave, number>

/** The amino acids that stand in each stave. */
export const STAVE_MEMBERS: Record<Stave, readonly AminoAcid[]> = {
  his: ['his'],
  ile: ['ile'],
  leu: ['leu'],
  lys: ['lys'],
  saa: ['met', 'cys'],
  aaa: ['phe', 'tyr'],
  thr: ['thr'],
  trp: ['trp'],
  val: ['val'],
}

/** Short labels for charts. */
export const STAVE_LABELS: Record<Stave, string> = {
  his: 'His',
  ile: 'Ile',
  leu: 'Leu',
  lys: 'Lys',
  saa: 'SAA',
  aaa: 'AAA',
  thr: 'Thr',
  trp: 'Trp',
  val: 'Val',
}

/** Full names for sentences. */
export const STAVE_NAMES: Record<Stave, string> = {
  his: 'histidine',
  ile: 'isoleucine',
  leu: 'leucine',
  lys: 'lysine',
  saa: 'methionine + cysteine',
  aaa: 'phenylalanine + tyrosine',
  thr: 'threonine',
  trp: 'tryptophan',
  val: 'valine',
}

/** A record over the nine staves, one value each. */
export function stavesOf(value: (stave: Stave) => number): Staves {
  return Object.fromEntries(STAVES.map(stave => [stave, value(stave)])) as Staves
}

/** A record over the eleven amino acids, one value each. */
export function profileOf(value: (aminoAcid: AminoAcid) => number): AminoProfile {
  return Object.fromEntries(AMINO_ACIDS.map(aminoAcid => [aminoAcid, value(aminoAcid)])) as AminoProfile
}
