import { describe, expect, test } from 'vitest'
import { phytateZincRatio, zincUptake } from '../../src/kitchen/minerals.ts'

describe('phytate to zinc against published figures', () => {
  // A diet survey in rural Bangladesh prints 12.77 for 1036 mg phytate and 8.0 mg zinc (rounded inputs; read).
  test('1036 mg phytate and 8.0 mg zinc: 12.83, within 0.1 of the printed 12.77', () => {
    expect(phytateZincRatio(1036, 8)).toBeCloseTo(12.83, 2)
    expect(Math.abs(phytateZincRatio(1036, 8)! - 12.77)).toBeLessThan(0.1)
  })

  // C6H18O24P6 and Zn from standard atomic masses: C 12.011, H 1.008, O 15.999, P 30.974, Zn 65.38 (IUPAC).
  test('the molar masses are those of phytic acid and zinc', () => {
    const phytic = 6 * 12.011 + 18 * 1.008 + 24 * 15.999 + 6 * 30.974
    expect(phytateZincRatio(phytic, 65.38)).toBeCloseTo(1, 4)
  })

  // WHO, Trace elements in human nutrition and health (1996); table 14-3 of Dietary Reference Intakes, The National
  // Academies Press (read): below 5 high, 5-15 moderate, above 15 low.
  test.each([
    [0, 'high'],
    [4.99, 'high'],
    [5, 'moderate'],
    [15, 'moderate'],
    [15.01, 'low'],
  ] as const)('a ratio of %d: %s', (ratio, uptake) => {
    expect(zincUptake(ratio)).toBe(uptake)
  })

  test('without zinc there is no ratio', () => {
    expect(phytateZincRatio(100, 0)).toBeNull()
    expect(phytateZincRatio(0, 5)).toBe(0)
  })
})
