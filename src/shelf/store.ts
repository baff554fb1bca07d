import { existsSync, readdirSync, readFileSync, renameSync, rmSync } from 'node:fs'
import { basename, dirname, join } from 'node:path'
import Conf from 'conf'
import * as z from 'zod/mini'
import { applyChanges, type ShelfChange } from './changes.ts'
import { type KeptDocument, NEW_DOCUMENT, readDocument, withShelf } from './document.ts'
import { redo, undo } from './history.ts'
import { reasonOf } from './reasons.ts'
import { type ServedPlate, servedPlateSchema, withoutPlate, withPlate } from './served-plate.ts'
import { type Shelf, shelfSchema } from './shelf.ts'
import { withLock } from './store-lock.ts'
import { isUnfinished, makeFolder, writeAtomically } from './store-write.ts'

/** What came of a change. `saved` false: it holds for this session only, and `problem` says why. */
export interface Kept {
  document: KeptDocument
  saved: boolean
  /** one line for the cook: why nothing was saved, or why the change was refused */
  problem: string | null
  /** false: the change itself was refused and nothing is different */
  done: boolean
  /** one line each for what happened to the store itself: a damaged file set aside, a copy restored */
  notices: string[]
  /** what was undone or redone */
  label: string | null
}

/** A change of the document, pure: it may be worked out again on a document that another process wrote meanwhile. */
type Apply = (document: KeptDocument) => Pick<Kept, 'document' | 'done' | 'problem' | 'label'>

const did = (document: KeptDocument, label: string | null = null) => ({
  document,
  done: true,
  problem: null,
  label,
})
const refused = (document: KeptDocument, problem: string) => ({ document, done: false, problem, label: null })

/** The file must be left alone: a newer program's. */
class LeaveAlone extends Error {}

/**
 * Where the shelf is kept: one JSON file in the platform's own place for a program's data (`conf`), or in `folder`.
 * Every change takes a lock, reads the file again, applies, and writes atomically, so that two processes lose nothing
 * of each other's; reading needs no lock. The last good copy stands beside the file. Where the disk refuses, the
 * session goes on in memory, on the shelf as it was last seen, and each further change tries again to keep them all.
 * No method throws.
 */
export class ShelfStore {
  private readonly folder: string | undefined
  private opened: Conf<Record<string, unknown>> | null = null
  /** the document as last read or changed */
  private memory: KeptDocument | null = null
  /** changes that the disk did not take, in their order */
  private pending: Apply[] = []
  /** calls wait for each other, so that changes are kept in the order in which they were made */
  private queue: Promise<unknown> = Promise.resolve()

  constructor(folder?: string) {
    this.folder = folder === '' ? undefined : folder
  }

  /** What is kept now. A damaged file is set aside and its copy restored, a newer one left alone. */
  async read(): Promise<Kept> {
    return this.inTurn(async () => {
      if (this.pending.length > 0) return this.commit(did)
      try {
        const reading = readDocument(this.text() ?? '')
        if (!reading.ok) return this.commit(did)
        this.memory = reading.document
        return { ...did(reading.document), saved: true, notices: [] }
      } catch {
        return this.commit(did)
      }
    })
  }

  /** Does some changes, all or none, as one step that can be undone. */
  async change(changes: readonly ShelfChange[], label: string): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const result = applyChanges(document.shelf, changes)
        return result.ok ? did(withShelf(document, result.shelf, label)) : refused(document, result.problem)
      }),
    )
  }

  /** Puts another shelf in the place of this one (an import), as one step that can be undone. */
  async replace(shelf: Shelf, label: string): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const parsed = shelfSchema.safeParse(shelf)
        if (!parsed.success)
          return refused(document, `this shelf cannot be kept: ${parsed.error.issues[0]?.message}`)
        return did(withShelf(document, parsed.data, label))
      }),
    )
  }

  /** Takes the last step back: the shelf is as it was before, and a plate that was served with it is not. */
  async undo(): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const moved = undo(document.history, document.shelf)
        if (moved === null) return refused(document, 'there is nothing to undo')
        const { shelf, history, step } = moved
        const plates = step.plate === undefined ? document.plates : withoutPlate(document.plates, step.plate)
        return did({ ...document, shelf, history, plates }, step.label)
      }),
    )
  }

  /** Does the last undone step again. */
  async redo(): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const moved = redo(document.history, document.shelf)
        if (moved === null) return refused(document, 'there is nothing to redo')
        const { shelf, history, step } = moved
        const plates = step.plate === undefined ? document.plates : withPlate(document.plates, step.plate)
        return did({ ...document, shelf, history, plates }, step.label)
      }),
    )
  }

  /**
   * Keeps foods from packets; each is checked by whoever reads them. Give a (pure) function of those that are kept
   * to add or remove one: a list read earlier may lack what another process has kept since.
   */
  async setOwnFoods(
    ownFoods: readonly unknown[] | ((kept: readonly unknown[]) => readonly unknown[]),
  ): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const foods = typeof ownFoods === 'function' ? ownFoods(document.ownFoods) : ownFoods
        return did({ ...document, begun: true, ownFoods: [...foods] })
      }),
    )
  }

  /** Keeps other served plates: a (pure) function of those that are kept. Not a step that `undo` takes back. */
  async setPlates(plates: (kept: readonly ServedPlate[]) => readonly ServedPlate[]): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const parsed = z.array(servedPlateSchema).safeParse([...plates(document.plates)])
        if (!parsed.success)
          return refused(document, `this plate cannot be kept: ${parsed.error.issues[0]?.message}`)
        return did({ ...document, plates: parsed.data })
      }),
    )
  }

  /** Takes a served plate's grams off the shelf, as one step, and keeps the plate under its day. */
  async serve(plate: ServedPlate, takes: readonly ShelfChange[]): Promise<Kept> {
    return this.inTurn(() =>
      this.commit(document => {
        const parsed = servedPlateSchema.safeParse(plate)
        if (!parsed.success)
          return refused(document, `this plate cannot be kept: ${parsed.error.issues[0]?.message}`)
        const result = applyChanges(document.shelf, takes)
        if (!result.ok) return refused(document, result.problem)
        return did(withShelf(document, result.shelf, 'serve', parsed.data))
      }),
    )
  }

  private inTurn<T>(work: () => Promise<T>): Promise<T> {
    const turn = this.queue.then(work)
    this.queue = turn.catch(() => undefined)
    return turn
  }

  /** Locks, reads, applies, writes. Where the disk refuses any of it, the same is done in memory and said. */
  private async commit(apply: Apply): Promise<Kept> {
    const notices: string[] = []
    try {
      makeFolder(dirname(this.path))
      return await withLock(this.path, stillHeld => this.commitLocked(apply, notices, stillHeld))
    } catch (error) {
      return this.inMemory(apply, this.troubleOf(error), notices)
    }
  }

  /** Null where the lock was lost before anything was written. */
  private commitLocked(apply: Apply, notices: string[], stillHeld: () => boolean): Kept | null {
    const found = this.load(notices, stillHeld)
    if (found === null) return null
    let document = found
    const lines: string[] = []
    for (const earlier of this.pending) {
      const result = earlier(document)
      document = result.document
      if (!result.done) lines.push(`a change that was not kept at once no longer fits: ${result.problem}`)
    }
    if (this.pending.length > 0) lines.push('what changed while nothing could be kept is kept now')
    const result = apply(document)
    if (result.document !== found && !this.write(result.document, notices, stillHeld)) return null
    this.memory = result.document
    this.pending = []
    return { ...result, saved: true, notices: [...notices, ...lines] }
  }

  private inMemory(apply: Apply, trouble: string, notices: string[]): Kept {
    const before = this.memory ?? this.glimpse()
    const result = apply(before)
    if (result.document !== before) this.pending.push(apply)
    this.memory = result.document
    return { ...result, problem: result.problem ?? trouble, saved: false, notices }
  }

  /** The best that can be seen without touching anything. */
  private glimpse(): KeptDocument {
    for (const text of [() => this.text(), () => readFileSync(this.copyPath, 'utf8')]) {
      try {
        const reading = readDocument(text() ?? '')
        if (reading.ok) return reading.document
        // What an older program left beside a newer one's shelf is not what is on hand.
        if (reading.newer) break
      } catch {}
    }
    return NEW_DOCUMENT
  }

  /** The document on disk, its damage mended. Null where the lock was lost meanwhile. */
  private load(notices: string[], stillHeld: () => boolean): KeptDocument | null {
    const text = this.text()
    if (text === null) return this.restore(notices, stillHeld)
    const reading = readDocument(text)
    if (reading.ok) return reading.document
    if (reading.newer) throw new LeaveAlone(`${this.path}: ${reading.problem}`)
    if (!stillHeld()) return null
    notices.push(
      `the kept shelf was damaged (${reading.problem}); it is set aside as ${this.setAside(this.path)}`,
    )
    return this.restore(notices, stillHeld)
  }

  private restore(notices: string[], stillHeld: () => boolean): KeptDocument | null {
    if (!existsSync(this.copyPath)) return NEW_DOCUMENT
    const reading = readDocument(readFileSync(this.copyPath, 'utf8'))
    if (reading.ok) {
      if (!writeAtomically(this.path, textOf(reading.document), { mayReplace: stillHeld })) return null
      notices.push('the last good copy of the shelf is restored')
      return reading.document
    }
    if (reading.newer) throw new LeaveAlone(`${this.copyPath}: ${reading.problem}`)
    if (!stillHeld()) return null
    notices.push(`its copy was damaged too; it is set aside as ${this.setAside(this.copyPath)}`)
    return NEW_DOCUMENT
  }

  /** False where the lock was lost and nothing was written. */
  private write(document: KeptDocument, notices: string[], stillHeld: () => boolean): boolean {
    const text = textOf(document)
    this.sweep()
    if (!writeAtomically(this.path, text, { mayReplace: stillHeld })) return false
    // From here on the change is kept, whatever comes of its copy.
    try {
      writeAtomically(this.copyPath, text, { durable: false, mayReplace: stillHeld })
    } catch (error) {
      notices.push(`the shelf is kept, but no copy of it could be written (${reasonOf(error)})`)
    }
    return true
  }

  /** Takes away what processes that were killed while writing left behind. */
  private sweep(): void {
    const folder = dirname(this.path)
    for (const name of readdirSync(folder)) {
      if ([this.path, this.copyPath].some(path => isUnfinished(name, basename(path)))) {
        rmSync(join(folder, name), { force: true })
      }
    }
  }

  /** Gives a damaged file a name of its own and returns it. */
  private setAside(path: string): string {
    for (let number = 1; ; number++) {
      const aside = join(dirname(path), `shelf.damaged-${number}.json`)
      if (existsSync(aside)) continue
      renameSync(path, aside)
      return aside
    }
  }

  /** The file's text; null where there is none. */
  private text(): string | null {
    const { text } = this.conf.store
    return typeof text === 'string' ? text : null
  }

  private troubleOf(error: unknown): string {
    if (error instanceof LeaveAlone) return `${error.message}; changes hold until you leave`
    const place = this.opened === null ? (this.folder ?? 'its place') : dirname(this.path)
    return `nothing can be kept in ${place} (${reasonOf(error)}); changes hold until you leave`
  }

  /** Opened when first used: where the place itself cannot be, that is trouble to be told, not an exception. */
  private get conf(): Conf<Record<string, unknown>> {
    if (this.opened === null && this.folder !== undefined) makeFolder(this.folder)
    this.opened ??= new Conf<Record<string, unknown>>({
      projectName: 'shortstave',
      projectSuffix: '',
      configName: 'shelf',
      ...(this.folder === undefined ? {} : { cwd: this.folder }),
      // The text is checked here (zod) and written here (only while the lock is held), so that a damaged file is set
      // aside and never cleared.
      clearInvalidConfig: false,
      deserialize: text => ({ text }),
    })
    return this.opened
  }

  private get path(): string {
    return this.conf.path
  }

  private get copyPath(): string {
    return join(dirname(this.path), 'shelf.last-good.json')
  }
}

const textOf = (document: KeptDocument): string => `${JSON.stringify(document)}\n`
