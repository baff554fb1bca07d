import type { OwnFood } from '../foods/own-food.ts'
import { withOwnFoods } from '../foods/own-table.ts'
import type { Finder } from '../foods/search.ts'
import { createFinder } from '../foods/search.ts'
import type { Table } from '../foods/table.ts'
import type { Settings } from '../shelf/settings.ts'
import type { Shelf } from '../shelf/shelf.ts'
import type { Kept, ShelfStore } from '../shelf/store.ts'
import { Pairer } from './pairings/pairer.ts'
import type { Effect, Event, Knowledge, State } from './state.ts'
import { update } from './update.ts'

/** What is opened for the screens; stores are opened after the first frame, because that is quicker to look at. */
export interface Opened {
  store: () => Promise<ShelfStore>
  settings: () => Promise<{
    read(): { settings: Settings; problem: string | null }
    write(settings: Settings): string | null
  }>
}

/** Typing goes on for this long before pairings are worked out anew, ms; less than a blink. */
const PAUSE_MS = 15
/** An answer that takes longer than this is waited for in sight, ms. */
const SLOW_MS = 100
/** The spinner turns a step in this time, ms. */
const SPIN_MS = 120

/**
 * The edge: holds the state, feeds events through the pure update, carries out what it asks for, and tells when there
 * is something new to draw. Effects on the store go one after another, in the order of the keys.
 */
export class Edge {
  state: State
  knowledge: Knowledge
  private readonly opened: Opened
  private readonly draw: () => void
  private readonly quit: () => void
  private readonly today: () => string
  private queue: Promise<void> = Promise.resolve()
  private pending = 0
  private readonly pairer = new Pairer()
  private pause: NodeJS.Timeout | undefined
  private slow: NodeJS.Timeout | undefined
  private asking = false
  private turning: NodeJS.Timeout | undefined
  /** keys that wait until what is kept has been read: acting on the sample, they would overwrite it */
  private held: Event[] | null = null

  constructor(of: {
    state: State
    table: Table
    today: () => string
    colour: boolean
    opened: Opened
    draw: () => void
    quit: () => void
  }) {
    this.state = of.state
    this.opened = of.opened
    this.draw = of.draw
    this.quit = of.quit
    this.today = of.today
    this.knowledge = knowledgeOf(of.table, of.today, of.colour)
  }

  /** A food from a packet takes part at once, as a row of the table would. */
  private learn(own: OwnFood): void {
    const { table, colour } = this.knowledge
    this.knowledge = knowledgeOf(withOwnFoods(table, [own]).table, this.today, colour)
  }

  /** Events in their order, and one drawing for all of them, so that fast typing is never slower than the screen. */
  send(...events: Event[]): void {
    for (const event of events) {
      if (this.held !== null && event.event === 'key' && event.key.key !== 'interrupt') {
        this.held.push(event)
        continue
      }
      const { state, effects } = update(this.state, event, this.knowledge)
      this.state = state
      for (const effect of effects) this.carryOut(effect)
    }
    this.draw()
  }

  /** What is kept is read once the first frame stands; keys that are typed meanwhile act after it, in their order. */
  start(): void {
    this.held = []
    this.inTurn(async () => {
      const settings = await this.opened.settings()
      const kept = settings.read()
      this.state = { ...this.state, settings: kept.settings }
      if (kept.problem !== null) this.send({ event: 'said', message: kept.problem })
    })
    this.inTurn(async () => {
      const store = await this.opened.store()
      this.tell(await store.read(), false)
    })
    this.inTurn(async () => {
      const keys = this.held ?? []
      this.held = null
      this.send({ event: 'opened' }, ...keys)
      // The finder is made before the first letter asks for it, once the screen stands.
      setTimeout(() => this.knowledge.finder, PAUSE_MS)
    })
  }

  /** Resolves when everything that was to be kept is. */
  async settled(): Promise<void> {
    let last: Promise<void>
    do {
      last = this.queue
      await last
    } while (last !== this.queue)
    clearTimeout(this.pause)
    clearTimeout(this.slow)
    clearInterval(this.turning)
    this.pairer.end()
  }

  private carryOut(effect: Effect): void {
    switch (effect.effect) {
      case 'quit':
        this.quit()
        return
      case 'pair':
        this.pair()
        return
      case 'settings':
        this.inTurn(async () => {
          const problem = (await this.opened.settings()).write(effect.settings)
          if (problem !== null) this.send({ event: 'said', message: problem })
        })
        return
      case 'own-food':
        this.learn(effect.own)
        this.keep(effect.sample, store => store.setOwnFoods(kept => [...kept, effect.own]))
        return
      case 'change':
        this.keep(effect.sample, store => store.change(effect.changes, effect.label))
        return
      case 'replace':
        // An empty shelf takes the place of the sample, never of one that another process has begun meanwhile.
        this.keep(effect.sample, async (store, isBegun) =>
          isBegun ? store.read() : store.replace(effect.shelf, effect.label),
        )
        return
      case 'serve':
        this.keep(effect.sample, store => store.serve(effect.plate, effect.takes))
        return
      case 'undo':
      case 'redo':
        this.keep(
          null,
          store => (effect.effect === 'undo' ? store.undo() : store.redo()),
          effect.effect === 'undo',
        )
    }
  }

  /** Keeps something in the store; the sample shelf first, where this is the first change to any. */
  private keep(
    sample: Shelf | null,
    act: (store: ShelfStore, isBegun: boolean) => Promise<Kept>,
    isUndo: boolean | null = null,
  ): void {
    this.pending++
    this.inTurn(async () => {
      const store = await this.opened.store()
      const isBegun = sample !== null && (await store.read()).document.begun
      if (sample !== null && !isBegun) await store.replace(sample, 'keep the sample shelf')
      const kept = await act(store, isBegun)
      this.pending--
      this.tell(kept, isUndo !== null, isUndo === true)
    })
  }

  /** The store's answer. While further changes wait their turn, the shelf on the screen is ahead of it and stays. */
  private tell(kept: Kept, named: boolean, restored = false): void {
    const { document, problem, notices } = kept
    const said = [...notices, ...(problem === null ? [] : [problem])].join(' ')
    this.send({
      event: 'kept',
      shelf: this.pending > 0 ? this.state.shelf : document.shelf,
      begun: document.begun,
      served: document.plates,
      problem: said === '' ? null : said,
      label: named && kept.done ? kept.label : null,
      restored,
    })
  }

  private inTurn(act: () => Promise<void>): void {
    this.queue = this.queue
      .then(act)
      .catch((error: Error) => this.send({ event: 'said', message: error.message }))
  }

  /** Works pairings out after the keys that are waiting; a question that is no longer asked is dropped unanswered. */
  private pair(): void {
    clearTimeout(this.pause)
    this.pause = setTimeout(() => this.ask(), PAUSE_MS)
    this.slow ??= setTimeout(() => this.wait(), SLOW_MS)
  }

  private async ask(): Promise<void> {
    if (this.asking) return
    this.asking = true
    const { question, shelf, settings } = this.state
    const { table } = this.knowledge
    try {
      const answer = await this.pairer.find({ shelf, settings, table })
      this.send({ event: 'paired', question, answer })
    } catch (error) {
      this.state = { ...this.state, stale: false, slow: false }
      this.send({ event: 'said', message: (error as Error).message })
    }
    this.asking = false
    if (question !== this.state.question && this.state.stale) {
      this.ask()
    } else {
      clearTimeout(this.slow)
      this.slow = undefined
    }
  }

  /** An answer is late: it is waited for in sight, and the spinner turns until it comes. */
  private wait(): void {
    this.send({ event: 'slow', question: this.state.question })
    clearInterval(this.turning)
    this.turning = setInterval(() => {
      if (this.state.slow) this.send({ event: 'tick' })
      else clearInterval(this.turning)
    }, SPIN_MS)
    this.turning.unref()
  }
}

/** The table with its finder, which is made when it is first asked for: the first frame needs none. */
function knowledgeOf(table: Table, today: () => string, colour: boolean): Knowledge {
  let finder: Finder | undefined
  return {
    table,
    colour,
    get today() {
      return today()
    },
    get finder() {
      finder ??= createFinder(table.foods)
      return finder
    },
  }
}
