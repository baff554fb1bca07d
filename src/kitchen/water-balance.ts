/** What a food's two rows must tell for its yield to be worked out, per 100 g. */
export interface Balance {
  waterG: number
  crudeProteinG: number
}

/** Two ratios that differ by more than this are of samples that do not match; no yield is taken from them. */
export const RATIOS_DIFFER_AT_MOST = 0.2

/**
 * The yield (g cooked / g dry) that conserves what does not boil away: once by dry matter, once by protein. The
 * factor is their geometric mean, the two are its range. Null where they differ by more than 20 % (the two rows are
 * of different samples) or there is nothing to go by. Leaching makes the true yield a little lower (2-10 % of solids).
 *
 * @example adzuki beans, water 13.44 and 66.29 %, protein 19.87 and 7.52 g: 2.57 and 2.64, so 2.60 (USDA SR28)
 */
export function yieldByWater(
  before: Balance,
  after: Balance,
): { factor: number; low: number; high: number } | null {
  const dryMatter = (100 - before.waterG) / (100 - after.waterG)
  const protein = before.crudeProteinG / after.crudeProteinG
  if (!(Number.isFinite(dryMatter) && Number.isFinite(protein) && dryMatter > 0 && protein > 0)) return null
  const low = Math.min(dryMatter, protein)
  const high = Math.max(dryMatter, protein)
  if (high / low > 1 + RATIOS_DIFFER_AT_MOST) return null
  return { factor: Math.sqrt(low * high), low, high }
}
