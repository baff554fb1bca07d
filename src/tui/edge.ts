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
  private queue: Promise<void> = Promise.resolve()
  private pending = 0
  private readonly pairer = new Pairer()
  private pause: NodeJS.Timeout | undefined
  private slow: NodeJS.Timeout | undefined
  private asking = false

  constructor(of: {
    state: State
    table: Table
    today: string
    colour: boolean
    opened: Opened
    draw: () => void
    quit: () => void
  }) {
    this.state = of.state
    this.opened = of.opened
    this.draw = of.draw
    this.quit = of.quit
    this.knowledge = knowledgeOf(of.table, of.today, of.colour)
  }

  /** A food from a packet takes part at once, as a row of the table would. */
  private learn(own: OwnFood): void {
    const { table, today, colour } = this.knowledge
    this.knowledge = knowledgeOf(withOwnFoods(table, [own]).table, today, colour)
  }

  /** Events in their order, and one drawing for all of them, so that fast typing is never slower than the screen. */
  send(...events: Event[]): void {
    for (const event of events) {
      const { state, effects } = update(this.state, event, this.knowledge)
      this.state = state
      for (const effect of effects) this.carryOut(effect)
    }
    this.draw()
  }

  /** What is kept is read once the first frame stands. */
  start(): void {
    this.inTurn(async () => {
      const settings = await this.opened.settings()
      const kept = settings.read()
      this.state = { ...this.state, settings: kept.settings }
      if (kept.problem !== null) this.send({ event: 'said', message: kept.problem })
    })
    this.inTurn(async () => {
      const store = await this.opened.store()
      this.tell(await store.read(), false)
      this.carryOut({ effect: 'pair', question: this.state.question })
      // The finder is made before the first letter asks for it, once the screen stands.
      setTimeout(() => this.knowledge.finder, PAUSE_MS)
    })
  }

  /** Resolves when everything that was to be kept is. */
  settled(): Promise<void> {
    clearTimeout(this.pause)
    clearTimeout(this.slow)
    this.pairer.end()
    return this.queue
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
        this.keep(effect.sample, store => store.replace(effect.shelf, effect.label))
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

  /** Keeps something in the store; the sample shelf first, where this is the first change to it. */
  private keep(
    sample: Shelf | null,
    act: (store: ShelfStore) => Promise<Kept>,
    isUndo: boolean | null = null,
  ): void {
    this.pending++
    this.inTurn(async () => {
      const store = await this.opened.store()
      if (sample !== null) await store.replace(sample, 'keep the sample shelf')
      const kept = await act(store)
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
    const turning = setInterval(() => {
      if (this.state.slow) this.send({ event: 'tick' })
      else clearInterval(turning)
    }, SPIN_MS)
    turning.unref()
  }
}

/** The table with its finder, which is made when it is first asked for: the first frame needs none. */
function knowledgeOf(table: Table, today: string, colour: boolean): Knowledge {
  let finder: Finder | undefined
  return {
    table,
    today,
    colour,
    get finder() {
      finder ??= createFinder(table.foods)
      return finder
    },
  }
}
