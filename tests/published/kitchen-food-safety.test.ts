import { describe, expect, test } from 'vitest'
import { loadKitchen } from '../../src/kitchen/load.ts'

const { cautions, cooking, storage, conditions } = loadKitchen()
const caution = (id: string) => cautions.find(row => row.id === id)!.text
const kept = (id: string) => storage.find(row => row.id === id)!.text

/** Beans with phytohaemagglutinin, for which the rule of red kidney beans is followed. */
const HARD_BOILED = [
  'kidney-beans',
  'white-beans',
  'black-beans',
  'pinto-beans',
  'navy-beans',
  'great-northern-beans',
  'lima-beans',
  'borlotti-beans',
  'runner-beans',
  'broad-beans',
]

describe('kidney beans: US Food and Drug Administration, Bad Bug Book (soak 5 h or more, fresh water, boil 30 min)', () => {
  test.each(HARD_BOILED)('%s', id => {
    const method = cooking.find(row => row.id === id)!
    expect(method.soakHLeast).toBeGreaterThanOrEqual(5)
    expect(method.hardBoilMin).toBeGreaterThanOrEqual(30)
    expect(method.cookMinLeast).toBeGreaterThanOrEqual(method.hardBoilMin)
    expect(method.water).toBe('drain')
    // 10 min at 100 C destroys the lectin (the same source); makers' timetables that go down to 1-3 min are not followed.
    if (method.pressureMin !== null) expect(method.pressureMin).toBeGreaterThanOrEqual(10)
  })

  test('the caution says all of it', () => {
    const text = caution('kidney-bean-raw')
    expect(text).toMatch(/soak 5 h or more/)
    expect(text).toMatch(/throw that water away/)
    expect(text).toMatch(/boil hard in fresh water for 30 min/)
    expect(text).toMatch(/Never from dry in a slow cooker/)
  })
})

describe('temperatures and times against the guidance named beside them', () => {
  test('rice: UK Food Standards Agency: cool within 1 h, eat within 24 h, reheat once', () => {
    expect(caution('cooked-grain-cooling')).toMatch(/within 1 h .*within 1 day.*once/)
    expect(kept('grain')).toMatch(/1 day/)
    expect(kept('cool')).toMatch(/within 1 h/)
  })

  test('pulses: USDA FSIS: fridge within 2 h, 1 h above 32 C; shallow boxes of 5 cm; two days: New Zealand', () => {
    expect(caution('cooked-pulse-cooling')).toMatch(/within 2 h \(1 h in a hot room\).*within 2 days/)
    expect(kept('cool')).toMatch(/5 cm \(2 inches\)/)
    expect(kept('pulse')).toMatch(/2 days/)
  })

  test('reheating: USDA FSIS: 165 F, 74 C, not in a slow cooker', () => {
    expect(kept('reheat')).toMatch(/74 C \(165 F\).*not in a slow cooker/)
    expect(cooking.find(({ id }) => id === 'warm-cooked')!.note).toMatch(/74 C \/ 165 F/)
  })

  test('every temperature is the same in both scales, to a degree', () => {
    const texts = [...cautions, ...storage, ...conditions]
      .map(({ text }) => text)
      .concat(cooking.map(({ note }) => note))
    const pairs = texts.flatMap(text => [...text.matchAll(/(\d+) C(?: \/ | \()(\d+) F/g)])
    expect(pairs.length).toBeGreaterThanOrEqual(3)
    for (const [, celsius, fahrenheit] of pairs)
      expect(Math.abs((Number(fahrenheit) - 32) / 1.8 - Number(celsius))).toBeLessThan(1)
  })

  test('Brazil nuts: two a day keep below 255 ug selenium (EFSA 2023): 5 g a nut, 1917 ug in 100 g (USDA SR28)', () => {
    const ugPerNut = (1917 * 5) / 100
    expect(caution('brazil-nut-selenium')).toMatch(/two a day/)
    expect(caution('brazil-nut-selenium')).toContain(`${Math.round(ugPerNut)} ug`)
    expect(2 * ugPerNut).toBeLessThan(255)
    expect(3 * ugPerNut).toBeGreaterThan(255)
  })

  // Growers' guides of the United States and Canada (read): chickpeas 8-24 h and 90-120 min; brown lentils no soak, 20-45 min;
  // split red lentils 10-20 min; University of California, Davis, grains chart (read): brown rice 45-55 min, quinoa 15-20.
  test.each([
    ['chickpeas', 8, 90, 120],
    ['lentils', 0, 20, 45],
    ['lentils-red', 0, 10, 20],
    ['rice-brown', 0, 45, 55],
    ['quinoa', 0, 15, 20],
    ['bulgur', 0, 12, 15],
  ])('%s: soaked %d h, on the heat %d-%d min', (id, soak, least, most) => {
    expect(cooking.find(row => row.id === id)).toMatchObject({
      soakHLeast: soak,
      cookMinLeast: least,
      cookMinMost: most,
    })
  })

  test("split peas never go into a pressure cooker (makers' manuals)", () => {
    expect(cooking.find(({ id }) => id === 'split-peas')!.pressureMin).toBeNull()
  })
})
