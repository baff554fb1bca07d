import { Worker } from 'node:worker_threads'
import { OWN_PREFIX } from '../../foods/own-food.ts'
import type { Table } from '../../foods/table.ts'
import { findPairings } from '../../pairing/find-pairings.ts'
import type { PairingAnswer } from '../../pairing/problem.ts'
import type { Settings } from '../../shelf/settings.ts'
import type { Shelf } from '../../shelf/shelf.ts'
import { problemOf } from '../problem-of.ts'
import { unpacked } from './packed.ts'
import type { ThreadAnswer, ThreadQuestion } from './thread.ts'

declare const BUNDLED_DATA: string | undefined

/** A shelf of more foods than this takes so long that a thread of its own pays for itself. */
const LARGE_SHELF = 60

export interface Asked {
  shelf: Shelf
  settings: Settings
  table: Table
}

/**
 * Works pairings out: at once where the shelf is small, in a thread where it is large. The thread is started when it is
 * first needed; where it cannot be (or ends), answers are worked out here.
 */
export class Pairer {
  private thread: Worker | null = null
  private number = 0
  private broken = typeof BUNDLED_DATA !== 'string'
  private waiting: { number: number; answered: (answer: ThreadAnswer | null) => void } | null = null

  async find(asked: Asked): Promise<PairingAnswer> {
    if (asked.shelf.items.length > LARGE_SHELF && !this.broken) {
      const answer = await this.askThread(asked)
      if (answer !== null) return unpacked(answer.answer, asked.table, asked.settings)
    }
    return findPairings(problemOf(asked, asked))
  }

  end(): void {
    this.thread?.terminate()
  }

  private askThread({ shelf, settings, table }: Asked): Promise<ThreadAnswer | null> {
    this.thread ??= this.startThread()
    this.number++
    const ownFoods = shelf.items.flatMap(({ food }) => {
      const own = food.startsWith(OWN_PREFIX) ? table.foodById.get(food) : undefined
      return own === undefined ? [] : [own]
    })
    const question: ThreadQuestion = { number: this.number, shelf, settings, ownFoods }
    return new Promise(resolve => {
      this.waiting = { number: this.number, answered: resolve }
      this.thread?.postMessage(question)
    })
  }

  private startThread(): Worker {
    // The bundle puts the thread's file beside the program.
    const thread = new Worker(new URL('./pairing-thread.js', import.meta.url))
    const lost = () => {
      this.broken = true
      this.thread = null
      this.waiting?.answered(null)
    }
    thread.on('message', (answer: ThreadAnswer) => {
      if (answer.number === this.waiting?.number) this.waiting.answered(answer)
    })
    thread.on('error', lost)
    thread.unref()
    return thread
  }
}
