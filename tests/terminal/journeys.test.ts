import { readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, describe, expect, it } from 'vitest'
import { KEYS, Screen } from './screen.ts'

const opened: Screen[] = []
function start(options: ConstructorParameters<typeof Screen>[0] = {}): Screen {
  const screen = new Screen(options)
  opened.push(screen)
  return screen
}
afterEach(() => {
  for (const screen of opened.splice(0)) screen.close()
})

describe('in a real terminal', () => {
  it('first start: the sample shelf, said so, and the pairings a key away', async () => {
    const screen = start()
    await screen.shows('the sample shelf')
    await screen.shows('Lentils, red, dry')
    await screen.shows('0 starts an empty shelf')
    expect(screen.lines().at(-2)).toContain('? all keys')
    screen.type(KEYS.tab)
    await screen.shows(/DIAAS \d+ \(\d+-\d+\)/)
    screen.type('?')
    await screen.shows('letters find, signs act')
    screen.type(KEYS.escape)
    await screen.shows('target 35 g')
  })

  it('from an empty shelf to a served plate, by the keys that the screen shows', async () => {
    const screen = start({ columns: 120, rows: 40 })
    await screen.shows('the sample shelf')
    screen.type('0')
    await screen.shows('An empty shelf')
    for (const [find, name, amount] of [
      ['red lentils dry', 'Lentils, red, dry', '2 cups'],
      ['brown rice dry', 'Rice, brown, dry', '1 kg'],
      ['tofu firm', 'Tofu, firm', '600 g'],
      ['sesame', 'Sesame seeds', '100'],
    ] as const) {
      screen.type(find)
      await screen.shows(`▸ ${name}`)
      screen.type(KEYS.enter)
      await screen.shows(`${name}: how much`)
      screen.type(amount)
      screen.type(KEYS.enter)
      await screen.shows(`${name}: `)
      await screen.shows('put on the shelf')
    }
    screen.type(KEYS.tab)
    await screen.shows(/▸ 1 .* g/)
    screen.type('n')
    await screen.shows('Servings')
    screen.type(`2${KEYS.enter}`)
    await screen.shows('2 servings')
    await screen.shows(/▸ 1 .* g/)
    screen.type('w')
    await screen.shows(/shortest|short of|needs no partner/)
    screen.type(KEYS.enter)
    await screen.shows('35 g wanted')
    await screen.shows('His')
    screen.type('c')
    await screen.shows('Eat at')
    screen.type(`19:00${KEYS.enter}`)
    await screen.shows('Card for 2 servings')
    screen.type(KEYS.escape)
    await screen.shows('35 g wanted')
    screen.type('s')
    await screen.shows('Serve: take 2 of these plates off the shelf?')
    screen.type('y')
    await screen.shows('Served: 2 servings')
    // What was served is off the shelf that is kept, and can be undone.
    screen.type(KEYS.tab)
    await screen.shows('your shelf')
    screen.type('<')
    await screen.shows('Undone: serve')
    screen.type(KEYS.ctrlC)
    expect(await screen.ends()).toBe(0)
    const kept = JSON.parse(readFileSync(join(screen.home, 'kept', 'shelf.json'), 'utf8'))
    expect(kept.shelf.items.map((item: { food: string }) => item.food).sort()).toEqual([
      'lentils-red-dry',
      'rice-brown-dry',
      'sesame-seeds',
      'tofu-firm',
    ])
    expect(kept.shelf.items.find((item: { food: string }) => item.food === 'tofu-firm').grams).toBe(600)
  })

  it('takes a pasted, messy list, and shows what is to be mended', async () => {
    const screen = start({ columns: 100, rows: 30 })
    await screen.shows('the sample shelf')
    screen.type('0')
    await screen.shows('An empty shelf')
    screen.paste('* 2 cups dry red lentils\n* 1 can chickpeas\n* xyzzy 200 g\n* half a kilo of rolled oats\n')
    await screen.shows('pasted: 4 lines')
    await screen.shows('✗ xyzzy 200 g')
    screen.type(KEYS.enter)
    await screen.shows('to be mended')
    screen.type(KEYS.enter)
    await screen.shows('How should this line read?')
    screen.type(`${KEYS.ctrlU}200 g tahini${KEYS.enter}`)
    await screen.shows('✓')
    screen.type(`${KEYS.up}${KEYS.enter}`)
    await screen.shows('Tahini')
    await screen.hides('pasted:')
  })

  it('keeps changes, undoes them, and undoes them after a restart too', async () => {
    const first = start()
    await first.shows('the sample shelf')
    first.type('!')
    await first.shows('to be used up')
    await first.shows('your shelf')
    first.type('#')
    await first.shows('is off the shelf')
    first.type(KEYS.ctrlC)
    expect(await first.ends()).toBe(0)
    const second = start({ home: first.home })
    await second.shows('your shelf')
    await second.shows('▸ Lentils, brown, dry')
    second.type('<')
    await second.shows('Undone')
    await second.shows('▸ Lentils, red, dry')
    second.type('>')
    await second.shows('Done again')
    await second.shows('▸ Lentils, brown, dry')
  })

  it('opens a kept shelf without the sample, and takes keys typed before it is read for that shelf', async () => {
    const first = start()
    await first.shows('the sample shelf')
    first.type('0')
    await first.shows('An empty shelf')
    first.type(`tofu firm${KEYS.enter}777${KEYS.enter}`)
    await first.shows(/Tofu, firm +777 g/)
    first.type(KEYS.ctrlC)
    expect(await first.ends()).toBe(0)
    const second = start({ home: first.home })
    second.type('!')
    await second.shows(/Tofu, firm +use up +777 g/)
    second.type(KEYS.ctrlC)
    expect(await second.ends()).toBe(0)
    expect(second.written).not.toContain('sample')
    const { shelf } = JSON.parse(readFileSync(join(first.home, 'kept', 'shelf.json'), 'utf8'))
    expect(shelf.items).toMatchObject([{ food: 'tofu-firm', grams: 777, mark: 'use-up' }])
  })

  it('draws anew when the window changes in the middle, and says kindly when it is too small', async () => {
    const screen = start({ columns: 120, rows: 40 })
    await screen.shows('the sample shelf')
    screen.type(KEYS.tab)
    await screen.shows(/DIAAS/)
    screen.type(KEYS.enter)
    await screen.shows('35 g wanted')
    screen.resize(80, 24)
    await screen.fits(80)
    await screen.shows('His')
    screen.resize(50, 12)
    await screen.shows('needs 60 by')
    screen.resize(100, 30)
    await screen.shows('35 g wanted')
    expect(screen.lines().filter(line => line.includes('shelf ···'))).toHaveLength(1)
  })

  it('leaves the terminal as it was on Ctrl+C: its screen, its cursor, its pastes', async () => {
    const screen = start()
    await screen.shows('the sample shelf')
    expect(screen.isAlternate()).toBe(true)
    screen.type('len')
    await screen.shows('> len')
    screen.type(KEYS.ctrlC)
    expect(await screen.ends()).toBe(0)
    await new Promise(resolve => setTimeout(resolve, 100))
    expect(screen.isAlternate()).toBe(false)
    const after = screen.written.slice(screen.written.lastIndexOf('\u001b[?1049l') - 40)
    expect(after).toContain('\u001b[?25h')
    expect(after).toContain('\u001b[?2004l')
  })

  it.each(['SIGINT', 'SIGTERM', 'SIGHUP'] as const)(
    'leaves the terminal as it was on %s too',
    async signal => {
      const screen = start()
      await screen.shows('the sample shelf')
      screen.kill(signal)
      await screen.ends()
      await screen.leaves()
      const after = screen.written.slice(screen.written.lastIndexOf('\u001b[?1049l') - 40)
      expect(after).toContain('\u001b[?25h')
      expect(after).toContain('\u001b[?2004l')
    },
  )

  it('types a line, mends it at the caret, and takes Escape alone for back', async () => {
    const screen = start()
    await screen.shows('the sample shelf')
    screen.type('2 cups red lentils')
    await screen.shows('▸ Lentils, red, dry')
    screen.type(KEYS.enter)
    await screen.shows('> 2 cups')
    screen.type(`${KEYS.left.repeat(5)}5${KEYS.enter}`)
    await screen.shows('4800 g put on the shelf')
    screen.type('tofu')
    await screen.shows('> tofu')
    screen.type(KEYS.escape)
    await screen.shows('type to find a food')
  })

  it('takes a burst of keys with Return in it for keys', async () => {
    const screen = start({ columns: 100, rows: 30 })
    await screen.shows('the sample shelf')
    screen.type('0')
    await screen.shows('An empty shelf')
    screen.type(`red lentils dry${KEYS.enter}500${KEYS.enter}brown rice dry${KEYS.enter}1 kg${KEYS.enter}`)
    await screen.shows(/Lentils, red, dry +500 g/)
    await screen.shows(/Rice, brown, dry +1000 g/)
  })

  it('answers keys on a shelf of 200 foods while its pairings are worked out', async () => {
    const screen = start({ columns: 100, rows: 30 })
    await screen.shows('the sample shelf')
    const { foods } = JSON.parse(readFileSync('data/foods.json', 'utf8')) as {
      foods: { id: string; name: string }[]
    }
    screen.type('0')
    await screen.shows('An empty shelf')
    const lines = foods.slice(0, 200).map(({ id }) => `500 g ${id}`)
    screen.paste(lines.join('\n'))
    await screen.shows('pasted: 200 lines, 200 understood')
    screen.type(KEYS.enter)
    await screen.shows('your shelf · 200 foods')
    screen.type(KEYS.tab)
    await screen.shows(/▸ 1 .* g/)
    for (const key of ['e', 'd', 'e', 'd', 'p', 'p']) screen.type(key)
    await screen.hides('working it out')
    await screen.shows(/▸ 1 .* g/)
    expect(screen.text()).not.toContain('· eggs')
  })

  it('is drawn where the environment says CI, and at 140 by 45 with the staves beside the list', async () => {
    const screen = start({ columns: 140, rows: 45, env: { CI: 'true' } })
    await screen.shows('the sample shelf')
    await screen.shows(/His +Ile +Leu/)
    screen.type(KEYS.tab)
    await screen.shows(/▸ 1 .* g/)
    await screen.shows(/His +Ile +Leu/)
    screen.type(KEYS.enter)
    await screen.shows('Allergens:')
    await screen.shows(/lifts it|nothing need be lifted|No small change/)
    await screen.fits(140)
  })

  it('sets a damaged shelf aside by its name, says so, and goes on', async () => {
    const first = start()
    await first.shows('the sample shelf')
    first.type('#')
    await first.shows('your shelf · 26 foods')
    first.type(KEYS.ctrlC)
    await first.ends()
    const folder = join(first.home, 'kept')
    writeFileSync(join(folder, 'shelf.json'), '{"version":1,"shelf":{"items":[{"food"')
    const second = start({ home: first.home, columns: 100 })
    await second.shows(/damaged|set aside/)
    await second.shows('26 foods')
    expect(readdirSync(folder).some(name => name.includes('damaged'))).toBe(true)
    second.type('!')
    await second.shows('to be used up')
  })

  it('uses no colour under NO_COLOR, and the letters still tell foods apart', async () => {
    const screen = start({ env: { NO_COLOR: '1' } })
    await screen.shows('the sample shelf')
    screen.type(KEYS.tab)
    await screen.shows(/DIAAS/)
    screen.type(KEYS.enter)
    await screen.shows(/█a█/)
    await screen.shows(/▒b▒/)
    // biome-ignore lint/suspicious/noControlCharactersInRegex: colours begin with an escape
    expect(screen.written).not.toMatch(/\u001b\[[0-9;]*(3[0-7]|38;|4[0-7]|48;|9[0-7])[0-9;]*m/)
  })

  it('speaks in words to a screen reader', async () => {
    const screen = start({ env: { INK_SCREEN_READER: 'true' } })
    await screen.shows('Lentils, red, dry')
    screen.type(KEYS.tab)
    await screen.shows('In % of the pattern')
  })

  it('loses no key of 120 at 60 a second', async () => {
    const screen = start({ columns: 140, rows: 30 })
    await screen.shows('the sample shelf')
    const text = 'lentils red dry brown rice tofu oats barley '.repeat(3).slice(0, 78)
    for (const letter of text) {
      screen.type(letter)
      await new Promise(resolve => setTimeout(resolve, 1000 / 60))
    }
    await screen.shows(`> ${text.trimEnd()}`)
    screen.type(KEYS.backspace.repeat(text.length))
    await screen.shows('type to find a food')
    screen.type(KEYS.down.repeat(5))
    await screen.shows(/▸ (?!Lentils, red)/)
  })
})
