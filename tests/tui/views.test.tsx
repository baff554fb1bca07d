import { render } from 'ink-testing-library'
import { describe, expect, it } from 'vitest'
import type { Settings } from '../../src/shelf/settings.ts'
import { Frame } from '../../src/tui/frame.tsx'
import { helpPage } from '../../src/tui/pages.ts'
import { widthOf } from '../../src/tui/text/width.ts'
import { view } from '../../src/tui/view.ts'
import { answered, GALLEY, item, knowledge, opened, plain, typed } from './helpers.ts'

const SIZES = [
  [60, 16],
  [80, 24],
  [100, 30],
  [140, 45],
] as const

const KEYS_AT_THE_END: Record<string, string> = { help: 'Esc back', prompt: 'Esc leave it' }

describe('every screen, at every size', () => {
  const bench = answered(opened(GALLEY, { screen: 'bench', why: true }))
  const plate = typed(bench, 'enter').state
  const screens = {
    shelf: opened(),
    found: typed(opened(), 'len').state,
    bench,
    compared: typed(bench, 'c', 'down').state,
    plate,
    help: { ...bench, page: helpPage(bench) },
    prompt: typed(bench, 't').state,
  }
  it.each(Object.keys(screens) as (keyof typeof screens)[])(
    '%s fits, with its keys on the last line',
    name => {
      for (const [columns, rows] of SIZES) {
        const lines = view({ ...screens[name], columns, rows }, knowledge)
        expect(lines.length).toBeLessThanOrEqual(rows - 1)
        for (const line of lines)
          expect(widthOf(line), `${name} ${columns}: ${plain([line])}`).toBeLessThanOrEqual(columns)
        // While a line is typed, ? is a letter of it; on a page any key goes back.
        expect(plain(lines.slice(-1))).toContain(KEYS_AT_THE_END[name] ?? '? all keys')
      }
    },
  )

  it('the help is on one screen of 80 by 24', () => {
    const lines = plain(
      view({ ...bench, columns: 80, rows: 24, page: helpPage({ ...bench, columns: 80 }) }, knowledge),
    )
    expect(lines).toContain('No medical advice')
    expect(lines).not.toContain('scroll')
  })

  it('says kindly when the window is too small', () => {
    const words = plain(view(opened(GALLEY, { columns: 50, rows: 12 }), knowledge)).replace(/\s+/g, ' ')
    expect(words).toContain('shortstave needs 60 by 16')
  })

  it('never cuts what the store has to say: the name of a file may stand at its end', () => {
    const message = `The shelf could not be read; it was set aside as ${'/home/cook/.config/shortstave/'.repeat(4)}shelf.damaged.json`
    for (const [columns, rows] of SIZES) {
      const words = plain(view({ ...opened(), columns, rows, message }, knowledge)).replace(/\s+/g, ' ')
      expect(words.replaceAll(' ', '')).toContain('shelf.damaged.json')
      const lines = view({ ...opened(), columns, rows, message }, knowledge)
      for (const line of lines) expect(widthOf(line)).toBeLessThanOrEqual(columns)
    }
  })

  it('is drawn by ink as it stands', () => {
    const { lastFrame, unmount } = render(<Frame lines={view(opened(), knowledge)} />)
    expect(plain([lastFrame()!])).toContain('Lentils, red, dry')
    unmount()
  })

  it('tells marks without colour, and keeps columns with wide names', () => {
    const lines = view(opened(), knowledge)
    expect(plain(lines)).toMatch(/Tofu, firm +use up/)
    expect(plain(lines)).not.toContain('\u001b')
    const wide = typed(opened({ items: [item('mung-beans-dry', 500)] }), '豆豆豆').state
    for (const line of view(wide, knowledge)) expect(widthOf(line)).toBeLessThanOrEqual(80)
    // Names in Chinese, Japanese, Tamil and Hindi, and one with combining marks: the columns after them stand in line.
    const names = ['鷹嘴豆,乾', 'ひよこ豆・乾燥', 'கொண்டைக்கடலை', 'काबुली चना', 'pois chiche\u0301s']
    const tofu = knowledge.table.foodById.get('tofu-firm')!
    const foods = names.map((name, i) => ({ ...tofu, id: `named-${i}`, name }))
    const foodById = new Map([...knowledge.table.foodById, ...foods.map(food => [food.id, food] as const)])
    const shelf = { items: foods.map(({ id }) => item(id, 500)) }
    const rows = view(opened(shelf), { ...knowledge, table: { ...knowledge.table, foodById } }).slice(3, 8)
    expect(rows).toHaveLength(names.length)
    expect(new Set(rows.map(line => widthOf(line.slice(0, line.indexOf('500 g'))))).size).toBe(1)
    expect(new Set(rows.map(line => widthOf(line))).size).toBe(1)
  })

  it('tells the screen and the cursor without styles', () => {
    expect(plain(view(opened(), knowledge))).toContain('▸ shelf ')
    expect(plain(view(bench, knowledge))).toContain('▸ bench ')
    expect(plain(view(plate, knowledge))).toContain('▸ plate')
  })

  it('shows every key of a screen on its key lines at 100 by 30', () => {
    for (const [state, keys] of [
      [opened(), 'Tab Enter ! . # @ = < / + ?'],
      [bench, 'Enter w c t n k a e d l b u p Tab ?'],
      [plate, '←→ Enter a x s c f n Tab ?'],
      [typed(plate, 'down', 'x').state, '←→ Enter a x 1-2 z s c f n Tab ?'],
      [{ ...bench, settings: { ...bench.settings, targetG: null, bodyMassKg: 70 } }, 'b i m u'],
    ] as const) {
      const lines = plain(view({ ...state, columns: 100, rows: 30 }, knowledge).slice(-2))
      for (const key of keys.split(' ')) expect(` ${lines}`).toContain(` ${key} `)
    }
  })

  it('shows at 80 by 24 too every key that changes what is proposed, and none that does nothing', () => {
    const keys = plain(view(bench, knowledge).slice(-2))
    for (const key of ['Enter', ...'wctnkaedlbup', 'Tab', '?']) expect(` ${keys}`).toContain(` ${key} `)
    const none = { ...bench, answer: { reached: false, reason: 'none', pairings: [] } }
    expect(plain(view(none, knowledge).slice(-2))).not.toMatch(/Enter|why|compare/)
    expect(plain(view(plate, knowledge).slice(-2))).not.toMatch(/lift|back/)
  })

  it('never cuts what is left out of the pairings', () => {
    const settings = {
      ...bench.settings,
      targetG: null,
      bodyMassKg: 70,
      without: ['peanut', 'tree-nuts'] as Settings['without'],
    }
    for (const [columns, rows] of SIZES) {
      const words = plain(view({ ...bench, settings, columns, rows }, knowledge)).replace(/\s+/g, ' ')
      expect(words).toContain('without peanuts, tree nuts')
    }
  })

  it('shows no shelf, and not the sample, while the cook’s own is read', () => {
    const screen = plain(view(opened(GALLEY, { sample: true, opening: true }), knowledge))
    expect(screen).toContain('Opening your shelf')
    expect(screen).not.toMatch(/sample|Lentils/)
  })

  it('says by which alias a food was found whose name has nothing of it', () => {
    const screen = plain(view(typed(opened(), 'masoor').state, knowledge))
    expect(screen).toMatch(/Lentils, red, dry {2}maso/)
    expect(plain(view(typed(opened(), 'lentils').state, knowledge))).toMatch(/Lentils, red, dry {3}/)
  })

  it('says of a lift that it must be bought, however long its name and small the window', () => {
    const lentils = { food: knowledge.table.foodById.get('lentils-red-dry')!, grams: 150 }
    const alone = { ...plate, plate: [lentils], shelf: { items: [item('lentils-red-dry', 900)] } }
    for (const [columns, rows] of SIZES) {
      const lines = view({ ...alone, columns, rows }, knowledge)
      expect(plain(lines)).toContain('(to buy)')
    }
  })

  it('keeps the food under the cursor in sight on a full plate in a small window', () => {
    const full = knowledge.table.foods.slice(0, 14).map(food => ({ food, grams: 50 }))
    for (const plateCursor of [0, 7, 13]) {
      const lines = view({ ...plate, plate: full, plateCursor, columns: 60, rows: 16 }, knowledge)
      expect(plain(lines)).toContain(`▸  ${'abcdefghijklmn'[plateCursor]} `)
      expect(plain(lines)).toContain('Allergens:')
    }
  })

  it('shows the staves beside the list in a wide window', () => {
    for (const state of [opened(), bench, plate]) {
      const lines = view({ ...state, columns: 140, rows: 45 }, knowledge)
      expect(plain(lines)).toMatch(/His +Ile +Leu/)
    }
    expect(plain(view({ ...opened(), columns: 100, rows: 30 }, knowledge))).not.toMatch(/His +Ile/)
  })

  it('gives words instead of drawings to a screen reader', () => {
    const words = plain(view({ ...plate, spoken: true }, knowledge))
    expect(words).toContain('In % of the pattern: histidine')
    expect(words).not.toContain('█a')
  })

  it('draws nothing for a screen reader that would be read out as boxes', () => {
    for (const state of Object.values(screens)) {
      const lines = view({ ...state, spoken: true }, knowledge)
      expect(lines.join('\n')).not.toMatch(/[\u2500-\u25ff≈·]/)
      expect(lines.join('')).not.toContain('\u001b')
      for (const line of lines) expect(line).not.toMatch(/^\s*$| {2}/)
      expect(lines.length).toBeLessThan(state.rows)
    }
    const shelf = view({ ...opened(), spoken: true }, knowledge).join('\n')
    expect(shelf).toContain('Now on: shelf')
    expect(shelf).toContain('use by: 2 d, ')
    expect(shelf).toMatch(/Here: Lentils, red, dry, 900 g, \d+ g protein, shortest \w+ \d+/)
  })

  it('never cuts a grave caution or the allergens, however small the window', () => {
    const beans = { food: knowledge.table.foodById.get('kidney-beans-dry')!, grams: 60 }
    const full = [beans, ...plate.plate.slice(0, 2)]
    for (const [columns, rows] of SIZES) {
      const words = plain(view({ ...plate, columns, rows, plate: full }, knowledge)).replace(/\s+/g, ' ')
      expect(words).toContain('Allergens:')
      // Beside the staves its words stand between other lines; there it is enough that it begins and ends.
      expect(words).toMatch(columns < 124 ? /boil hard in fresh water for 30 min/ : /kidney beans: soak/i)
    }
  })

  it('shows allergens and the caution that weighs most on the plate', () => {
    const beans = { food: knowledge.table.foodById.get('kidney-beans-dry')!, grams: 60 }
    const tofu = { food: knowledge.table.foodById.get('tofu-firm')!, grams: 100 }
    const screen = plain(view({ ...plate, columns: 100, rows: 40, plate: [beans, tofu] }, knowledge))
    expect(screen).toContain('Allergens: soybeans')
    expect(screen).toMatch(/kidney beans/i)
    expect(screen).toMatch(/boil/i)
  })
})
