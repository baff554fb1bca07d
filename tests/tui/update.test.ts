import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { EMPTY_SHELF } from '../../src/shelf/shelf.ts'
import { update } from '../../src/tui/update.ts'
import { view } from '../../src/tui/view.ts'
import { answered, GALLEY, knowledge, opened, plain, typed } from './helpers.ts'

describe('shelf: letters find, signs act', () => {
  it('adds a food of the table in a measure that people write', () => {
    const { state, effects } = typed(opened(EMPTY_SHELF), 'chickpeas canned', 'enter', '2 cans', 'enter')
    expect(state.shelf.items).toHaveLength(1)
    expect(state.shelf.items[0]!.food).toBe('chickpeas-canned')
    expect(state.shelf.items[0]!.grams).toBeGreaterThan(400)
    expect(state.find).toBe('')
    expect(effects.map(({ effect }) => effect)).toEqual(['change', 'pair'])
  })

  it('takes a bare number for grams, and proposes the usual amount', () => {
    const asked = typed(opened(EMPTY_SHELF), 'tofu', 'enter').state
    expect(asked.prompt!.text).toBe('170 g')
    expect(typed(asked, 'enter').state.shelf.items[0]).toMatchObject({ food: 'tofu-firm', grams: 170 })
    expect(typed(asked, '350', 'enter').state.shelf.items[0]).toMatchObject({ grams: 350 })
  })

  it.each(['lots', '-5 g', '0 g', '100 kg', '3 bananas'])(
    'keeps the line open, with the reason, for the amount "%s"',
    text => {
      const { state } = typed(opened(EMPTY_SHELF), 'tofu', 'enter', 'clear-line', text, 'enter')
      expect(state.prompt?.problem).toBeTruthy()
      expect(state.shelf.items).toEqual([])
      expect(typed(state, 'escape').state.prompt).toBeNull()
    },
  )

  it('marks by one key, and takes the mark off by the same', () => {
    const once = typed(opened(), '!').state
    expect(once.shelf.items[0]!.mark).toBe('use-up')
    expect(typed(once, '!').state.shelf.items[0]!.mark).toBe('')
    expect(typed(once, '.').state.shelf.items[0]!.mark).toBe('hold-back')
  })

  it('takes off, and asks the store to undo', () => {
    const { state, effects } = typed(opened(), 'down', '#', '<')
    expect(state.shelf.items.map(({ food }) => food)).not.toContain('rice-brown-dry')
    expect(effects.map(({ effect }) => effect)).toEqual(['change', 'pair', 'undo'])
    const back = update(
      state,
      {
        event: 'kept',
        shelf: GALLEY,
        begun: true,
        served: [],
        problem: null,
        label: 'take off rice',
        restored: true,
      },
      knowledge,
    )
    expect(back.state.shelf).toEqual(GALLEY)
    expect(back.state.message).toContain('Undone: take off rice')
  })

  it('keeps the sample with the first change, and can start an empty shelf instead', () => {
    const sample = opened(GALLEY, { sample: true })
    const [change] = typed(sample, '!').effects
    expect(change).toMatchObject({ effect: 'change', sample: GALLEY })
    const empty = typed(sample, '0')
    expect(empty.state.shelf).toEqual(EMPTY_SHELF)
    expect(empty.effects[0]).toMatchObject({ effect: 'replace', shelf: EMPTY_SHELF })
  })

  it('orders by use-by, protein and name', () => {
    const first = (state: ReturnType<typeof opened>) =>
      plain(view(state, knowledge))
        .split('\n')
        .find(line => line.startsWith(' ▸ ') && !line.includes('bench'))
    const byDay = typed(opened(), '/').state
    expect(first(byDay)).toContain('Tofu')
    expect(first(typed(byDay, '/').state)).toContain('Lentils')
    expect(first(typed(byDay, '//').state)).toContain('Lentils')
    expect(first(byDay)).toContain('2 d')
  })

  it('reads a pasted list, shows what it could not understand, and guesses nothing', () => {
    const text = '- 2 cups dry red lentils\n- one can chickpeas\nsome rice\nxyzzy 200 g\n1 kg potatoes'
    const pasted = typed(opened(EMPTY_SHELF), { key: 'paste', text }).state
    expect(pasted.pasted!.map(({ reading }) => reading.ok)).toEqual([true, true, false, false, true])
    const screen = plain(view(pasted, knowledge))
    expect(screen).toContain('5 lines, 3 understood')
    expect(screen).toContain('✗ some rice')
    // Enter on the first row puts the three there; the other two stay to be mended.
    const put = typed(pasted, 'enter').state
    expect(put.shelf.items).toHaveLength(3)
    expect(put.pasted).toHaveLength(2)
    const mended = typed(
      put,
      'enter',
      'clear-line',
      '300 g dry brown rice',
      'enter',
      'down',
      '#',
      'up',
      'up',
      'enter',
    ).state
    expect(mended.pasted).toBeNull()
    expect(mended.shelf.items.map(({ food }) => food)).toContain('rice-brown-dry')
  })
})

describe('amounts in the find line', () => {
  it('are proposed for the food under the cursor, and put to what is there', () => {
    const asks = typed(opened(), '2 cups red lentils', 'enter').state
    expect(asks.prompt).toMatchObject({ text: '2 cups', for: { food: 'lentils-red-dry', adds: true } })
    const { state } = typed(asks, 'enter')
    const cup = knowledge.table.foodById
      .get('lentils-red-dry')!
      .measures.find(({ name }) => name === '1 cup')!
    expect(state.shelf.items[0]!.grams).toBeCloseTo(900 + 2 * cup.grams, 6)
  })

  it('may hold a point or a slash, which else are signs', () => {
    expect(typed(opened(), '1.5 cups oats').state.find).toBe('1.5 cups oats')
    expect(typed(opened(), '1/2 cup oats').state.find).toBe('1/2 cup oats')
    expect(typed(opened(), '.').state.shelf.items[0]!.mark).toBe('hold-back')
  })

  it('counted in pieces, are told in grams', () => {
    const asks = typed(opened(EMPTY_SHELF), '3 eggs', 'enter').state
    expect(asks.prompt!.text).toMatch(/^\d+ g$/)
    expect(typed(asks, 'enter').state.shelf.items[0]!.grams).toBeGreaterThan(100)
  })
})

describe('use-by days', () => {
  it('are told in words, or taken off', () => {
    const told = typed(opened(), '@', '3 days', 'enter').state
    expect(told.shelf.items[0]!.useBy).toBe('2026-06-04')
    expect(typed(told, '@', 'clear-line', 'none', 'enter').state.shelf.items[0]!.useBy).toBeNull()
  })
  it('that are none keep the line open, with what would do', () => {
    const asks = typed(opened(), '@', '3/4', 'enter').state
    expect(asks.prompt!.problem).toContain('2026-12-31')
    expect(asks.shelf).toEqual(GALLEY)
  })
})

describe('pastes', () => {
  it('belong to the shelf, wherever they are made', () => {
    for (const screen of ['bench', 'plate'] as const) {
      const { state } = typed(opened(GALLEY, { screen }), { key: 'paste', text: '200 g tofu\n1 cup oats' })
      expect(state.screen).toBe('shelf')
      expect(state.pasted).toHaveLength(2)
    }
  })
  it('of nothing are no list', () => {
    const { state } = typed(opened(), { key: 'paste', text: ' \n \n' })
    expect(state.pasted).toBeNull()
    expect(state.message).not.toBe('')
  })
  it('of one line go to the find line', () => {
    expect(typed(opened(), { key: 'paste', text: '2 cups oats\n' }).state.find).toBe('2 cups oats')
  })
  it('that are too long say how many lines are left', () => {
    const text = Array.from({ length: 305 }, () => '100 g oats').join('\n')
    const { state } = typed(opened(), { key: 'paste', text })
    expect(state.pasted).toHaveLength(300)
    expect(state.message).toContain('other 5')
  })
})

describe('a food from a packet', () => {
  it('is asked for step by step, and kept', () => {
    const { state, effects } = typed(
      opened(EMPTY_SHELF),
      '+',
      'Galley bar',
      'enter',
      '20',
      'enter',
      '380',
      'enter',
      '80 % pea, 20 % rice',
      'enter',
      'peanut',
      'enter',
    )
    expect(state.prompt).toBeNull()
    expect(effects).toHaveLength(1)
    expect(effects[0]).toMatchObject({
      effect: 'own-food',
      own: {
        id: 'own-galley-bar',
        proteinG: 20,
        perG: 100,
        kcal: 380,
        sharesKnown: true,
        allergens: ['peanut'],
      },
    })
  })

  it.each([
    [['+', 'Bar', 'enter', '120', 'enter'], '120 g of protein cannot be in 100 g'],
    [['+', 'Bar', 'enter', 'much', 'enter'], 'Give grams of protein'],
    [['+', 'Bar', 'enter', '20', 'enter', '380', 'enter', 'kryptonite', 'enter'], 'kryptonite'],
    [['+', 'Bar', 'enter', '20', 'enter', '5', 'enter', 'soy', 'enter', 'enter'], 'kcal'],
  ])('is refused with the reason where it cannot be: %j', (keys, reason) => {
    const { state, effects } = typed(opened(EMPTY_SHELF), ...keys)
    expect(state.prompt!.problem).toContain(reason)
    expect(effects).toEqual([])
  })

  it('foods with an allergen that is left out are marked where they are found', () => {
    const state = opened(EMPTY_SHELF, { settings: { ...opened().settings, without: ['soy'] } })
    expect(plain(view(typed(state, 'tofu').state, knowledge))).toMatch(/Tofu, firm +× soy/)
  })
})

describe('bench', () => {
  const bench = answered(opened(GALLEY, { screen: 'bench' }))

  it('asks for pairings with every change, and drops an answer to an old question', () => {
    const { state, effects } = typed(bench, 'e')
    expect(effects).toEqual([
      { effect: 'settings', settings: state.settings },
      { effect: 'pair', question: state.question },
    ])
    expect(state.stale).toBe(true)
    const late = update(
      state,
      { event: 'paired', question: bench.question, answer: { reached: false, pairings: [], reason: 'old' } },
      knowledge,
    )
    expect(late.state.answer).toBe(bench.answer)
  })

  it('waits in sight for a late answer: the last one dimmed, the spinner turning', () => {
    const asks = typed(bench, 'e').state
    const at = (state: typeof asks) => view(state, knowledge)
    expect(plain(at(asks))).not.toContain('working it out')
    const late = update(asks, { event: 'slow', question: asks.question }, knowledge).state
    expect(plain(at(late))).toContain('working it out')
    const food = bench.answer!.pairings[0]!.portions[0]!.food.name
    expect(at(late).find(line => line.includes(food))).toSatisfy((line: string) =>
      line.startsWith('\u001b[2m'),
    )
    const turned = update(late, { event: 'tick' }, knowledge).state
    expect(plain(at(turned))).not.toBe(plain(at(late)))
    // An old question's lateness is none of the new one's.
    expect(update(asks, { event: 'slow', question: asks.question - 1 }, knowledge).state).toBe(asks)
    expect(update(bench, { event: 'tick' }, knowledge).state).toBe(bench)
  })

  it('keeps settings within bounds, with the reason', () => {
    expect(typed(bench, 't', '40', 'enter').state.settings.targetG).toBe(40)
    expect(typed(bench, 't', '4000', 'enter').state.prompt!.problem).toContain('from 1 to 200')
    expect(typed(bench, 'b', '70', 'enter').state.settings).toMatchObject({ bodyMassKg: 70, targetG: null })
    expect(typed(bench, 'a', 'gluten, soya', 'enter').state.settings.without).toEqual(['gluten', 'soy'])
    expect(typed(bench, 'a', 'kryptonite', 'enter').state.prompt!.problem).toContain('kryptonite')
    expect(typed(bench, 'n', '2.5', 'enter').state.prompt!.problem).toContain('whole number')
  })

  it('never offers a pattern of young children', () => {
    let state = bench
    for (let i = 0; i < 6; i++) {
      state = typed(state, 'p').state
      expect(knowledge.table.patternById.get(state.settings.pattern)!.planning).toBe(true)
    }
  })

  it('gives a reason instead of pairings where nothing may be planned', () => {
    const { state } = typed(
      { ...bench, settings: { ...bench.settings, conditions: ['phenylketonuria'] } },
      'e',
    )
    expect(state.answer).toBeNull()
    expect(plain(view(state, knowledge))).toMatch(/phenylketonuria/i)
  })

  it('steps back from targets by body mass where the settings tell of a condition, with the note', () => {
    const pregnant = {
      ...bench,
      settings: { ...bench.settings, bodyMassKg: 70, targetG: null, conditions: ['pregnancy'] },
    }
    for (const key of ['b', 'i', 'm']) {
      const { state } = typed(pregnant as typeof bench, key)
      expect(state.prompt).toBeNull()
      expect(state.message).toMatch(/midwife|doctor/)
    }
    const screen = plain(view(pregnant as typeof bench, knowledge))
    expect(screen).toContain('target 35 g')
    expect(screen.replace(/\s+/g, ' ')).toMatch(/Ask your midwife, doctor or dietitian/)
    expect(plain(typed(pregnant as typeof bench, 'u').state.page!.lines)).not.toContain('people who train')
  })

  it('says where a target by body mass comes from', () => {
    const { state } = typed(bench, 'b', '70', 'enter')
    expect(plain(view(state, knowledge))).toContain('70 kg x 1.6 g/kg/day, 3 meals')
    expect(plain(view(state, knowledge))).toContain('target 37 g')
  })

  it('hides numbers from whom they may weigh on, and keeps the grams that cooking needs', () => {
    const settings = { ...bench.settings, conditions: ['eating-disorder-history' as const] }
    const plate = typed({ ...bench, settings }, 'enter').state
    for (const state of [{ ...bench, settings, why: true }, plate, opened(GALLEY, { settings })]) {
      for (const columns of [80, 140]) {
        const screen = plain(view({ ...state, columns, rows: 40 }, knowledge))
        expect(screen).not.toMatch(/kcal|DIAAS|g protein|wanted|target \d|His +Ile/)
        expect(screen).toMatch(/\d+ g/)
      }
    }
  })

  it('takes a pairing to the plate, and compares two', () => {
    const plate = typed(bench, 'enter').state
    expect(plate.screen).toBe('plate')
    expect(plate.plate).toEqual(bench.answer!.pairings[0]!.portions)
    const two = typed(bench, 'c', 'down').state
    expect(plain(view(two, knowledge))).toContain('│')
  })
})

describe('plate', () => {
  const plate = typed(answered(opened(GALLEY, { screen: 'bench' })), 'enter').state

  it('changes amounts by steps and by typing, and goes back', () => {
    const first = plate.plate[0]!
    const more = typed(plate, 'right').state
    expect(more.plate[0]!.grams).toBeGreaterThan(first.grams)
    expect(typed(more, 'z').state.plate).toEqual(plate.plate)
    expect(typed(plate, 'enter', '100', 'enter').state.plate[0]!.grams).toBe(100)
  })

  it('adds a food in words and takes one off', () => {
    const added = typed(plate, 'a', '20 g tahini', 'enter').state
    expect(added.plate.at(-1)).toMatchObject({ grams: 20 })
    expect(added.plate.at(-1)!.food.id).toBe('tahini')
    expect(typed(added, 'x').state.plate).toHaveLength(plate.plate.length)
  })

  it('tries a lift that scores what it says, and goes back', () => {
    const lentils = { food: knowledge.table.foodById.get('lentils-red-dry')!, grams: 80 }
    const alone = { ...plate, plate: [lentils] }
    const screen = plain(view(alone, knowledge))
    const [, gain, said] = /lifts it 1 {2}\+(\d+) to (\d+)/.exec(screen)!.map(Number)
    const before = Number(/DIAAS (\d+)/.exec(screen)![1])
    expect(before + gain!).toBe(said)
    const tried = typed(alone, '1').state
    expect(tried.plate).not.toEqual([lentils])
    expect(plain(view(tried, knowledge))).toContain(`DIAAS ${said} `)
    expect(typed(tried, 'z').state.plate).toEqual([lentils])
  })

  it('serves once asked: grams off the shelf, the plate under today', () => {
    const asks = typed(plate, 's').state
    expect(asks.asksServe).toBe(true)
    expect(typed(asks, 'n').effects).toEqual([])
    const { state, effects } = typed(asks, 'y')
    expect(effects[0]).toMatchObject({ effect: 'serve', plate: { day: '2026-06-01', servings: 1 } })
    const used = plate.plate[0]!
    const before = GALLEY.items.find(({ food }) => food === used.food.id)!.grams
    expect(state.shelf.items.find(({ food }) => food === used.food.id)?.grams ?? 0).toBeCloseTo(
      before - used.grams,
      6,
    )
  })

  it('once served is cleared, shows what was served today, and can be had back', () => {
    const { state } = typed(plate, 's', 'y')
    expect(state.plate).toEqual([])
    expect(plain(view(state, knowledge))).toMatch(/Served today:\n +1 x .* g /)
    expect(typed(state, 'z').state.plate).toEqual(plate.plate)
  })

  it('says before serving what the shelf has too little of', () => {
    const much = { ...plate, settings: { ...plate.settings, servings: 50 } }
    expect(plain(view(typed(much, 's').state, knowledge))).toMatch(/The shelf has only \d+ g of /)
    expect(plain(view(typed(plate, 's').state, knowledge))).not.toContain('The shelf has')
    const bought = typed(plate, 'a', '100 g tempeh', 'enter', 's').state
    expect(plain(view(bought, knowledge))).toContain('The shelf has no Tempeh')
  })

  it('undoes and does again from every screen', () => {
    for (const screen of ['shelf', 'bench', 'plate'] as const) {
      const { effects } = typed({ ...plate, screen }, '<', '>')
      expect(effects.map(({ effect }) => effect)).toEqual(['undo', 'redo'])
    }
    expect(typed(typed(plate, 's').state, '<').effects).toEqual([])
  })

  it('makes a card, and refuses a time that is none', () => {
    expect(typed(plate, 'c', '19:00', 'enter').state.page!.title).toBe('Card')
    expect(typed(plate, 'c', '27:99', 'enter').state.prompt!.problem).toContain('no time of day')
  })
})

describe('any keys at all', () => {
  const keys = fc.oneof(
    fc.constantFrom(
      'enter',
      'escape',
      'tab',
      'back-tab',
      'backspace',
      'delete',
      'up',
      'down',
      'left',
      'right',
      'home',
      'end',
      'page-down',
    ),
    fc.string({ minLength: 1, maxLength: 1, unit: 'grapheme' }),
    fc.constantFrom('l', 'e', '1', 'a', 's', 'y', '#', '!', '=', '?', '0', 'c', 'w', 'x'),
  )
  it('never throw, never leave the screen wider or higher than the terminal, never lose the shelf by themselves', () => {
    fc.assert(
      fc.property(
        fc.array(keys, { maxLength: 25 }),
        fc.constantFrom([80, 24], [60, 16], [140, 45], [40, 10]),
        (pressed, [columns, rows]) => {
          const state = typed(opened(GALLEY, { columns: columns!, rows: rows! }), ...pressed).state
          const lines = view(state, knowledge)
          expect(lines.length).toBeLessThanOrEqual(rows!)
          for (const line of plain(lines).split('\n')) expect([...line].length).toBeLessThanOrEqual(columns!)
          expect(state.shelf.items.every(({ grams }) => grams > 0)).toBe(true)
        },
      ),
      { numRuns: 300 },
    )
  })
})
