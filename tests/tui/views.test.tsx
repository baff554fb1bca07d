import { render } from 'ink-testing-library'
import { describe, expect, it } from 'vitest'
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
        expect(plain(lines.slice(-1))).toContain('? all keys')
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
  })

  it('gives words instead of drawings to a screen reader', () => {
    const words = plain(view({ ...plate, spoken: true }, knowledge))
    expect(words).toContain('In % of the pattern: histidine')
    expect(words).not.toContain('█a')
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
