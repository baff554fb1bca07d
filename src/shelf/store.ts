import { copyFileSync, existsSync, mkdirSync, readFileSync, renameSync } from 'node:fs'
import { dirname, join } from 'node:path'
import Conf from 'conf'
import lockfile from 'proper-lockfile'
import { applyChanges, type ShelfChange } from './changes.ts'
import { type KeptDocument, NEW_DOCUMENT, readDocument, type ServedPlate } from './document.ts'
import { redo, remember, undo } from './history.ts'
import type { Shelf } from './shelf.ts'

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

/** A lock older than this belongs to a process that is gone. */
const STALE_LOCK_MS = 2_500
const LOCK = {
  realpath: false,
  stale: STALE_LOCK_MS,
  update: 1_000,
  retries: { retries: 400, minTimeout: 2, maxTimeout: 25, factor: 1.3, randomize: true },
}

const PLATES_KEPT = 400

/**
 * Where the shelf is kept: one JSON file in the platform's own place for a program's data (`conf`), or in `folder`.
 * Every change takes a lock, reads the file again, applies, and writes atomically, so that two processes lose nothing
 * of each other's. The last good copy stands beside it. Where the disk refuses, the session goes on in memory.
 */
export class ShelfStore {
  private readonly folder: string | undefined
  private opened: Conf<Record<string, unknown>> | null = null
  private memory: KeptDocument | null = null
  private trouble: string | null = null

  constructor(folder?: string) {
    this.folder = folder === '' ? undefined : folder
  }

  /** Opened when first used: where the place itself cannot be, that is trouble to be told, not an exception. */
  private get conf(): Conf<Record<string, unknown>> {
    this.opened ??= new Conf<Record<string, unknown>>({
      projectName: 'shortstave',
      projectSuffix: '',
      configName: 'shelf',
      ...(this.folder === undefined ? {} : { cwd: this.folder }),
      // The file is read and checked here (zod), so that a damaged one is set aside and never cleared.
      clearInvalidConfig: false,
      deserialize: text => ({ text }),
      serialize: value => `${JSON.stringify(value.document)}\n`,
    })
    return this.opened
  }

  private get path(): string {
    return this.conf.path
  }

  /** What is kept now. Never throws: a damaged file is set aside and its copy restored, a newer one left alone. */
  async read(): Promise<Kept> {
    return this.with(document => ({ document, done: true, problem: null, label: null }), false)
  }

  /** Does some changes, all or none, as one step that can be undone. */
  async change(changes: readonly ShelfChange[], label: string): Promise<Kept> {
    return this.with(document => {
      const result = applyChanges(document.shelf, changes)
      if (!result.ok) return { document, done: false, problem: result.problem, label: null }
      return { document: withShelf(document, result.shelf, label), done: true, problem: null, label: null }
    }, true)
  }

  /** Puts another shelf in the place of this one (an import), as one step that can be undone. */
  async replace(shelf: Shelf, label: string): Promise<Kept> {
    return this.with(
      document => ({ document: withShelf(document, shelf, label), done: true, problem: null, label: null }),
      true,
    )
  }

  async undo(): Promise<Kept> {
    return this.step(undo, 'there is nothing to undo')
  }

  async redo(): Promise<Kept> {
    return this.step(redo, 'there is nothing to redo')
  }

  /** Keeps foods from packets; each is checked by whoever reads them. */
  async setOwnFoods(ownFoods: readonly unknown[]): Promise<Kept> {
    return this.with(
      document => ({
        document: { ...document, begun: true, ownFoods: [...ownFoods] },
        done: true,
        problem: null,
        label: null,
      }),
      true,
    )
  }

  /** Takes a served plate's grams off the shelf, as one step, and keeps the plate under its day. */
  async serve(plate: ServedPlate, takes: readonly ShelfChange[]): Promise<Kept> {
    return this.with(document => {
      const result = applyChanges(document.shelf, takes)
      if (!result.ok) return { document, done: false, problem: result.problem, label: null }
      const served = withShelf(document, result.shelf, 'serve')
      return {
        document: { ...served, plates: [...served.plates, plate].slice(-PLATES_KEPT) },
        done: true,
        problem: null,
        label: null,
      }
    }, true)
  }

  private step(move: typeof undo, nothing: string): Promise<Kept> {
    return this.with(document => {
      const moved = move(document.history, document.shelf)
      if (moved === null) return { document, done: false, problem: nothing, label: null }
      return {
        document: { ...document, shelf: moved.shelf, history: moved.history },
        done: true,
        problem: null,
        label: moved.label,
      }
    }, true)
  }

  /** Locks, reads, applies, writes. Where the disk refuses any of it, the same is done in memory and said. */
  private async with(
    apply: (document: KeptDocument) => Pick<Kept, 'document' | 'done' | 'problem' | 'label'>,
    writes: boolean,
  ): Promise<Kept> {
    const notices: string[] = []
    if (this.trouble !== null) return this.inMemory(apply, notices)
    let release: (() => Promise<void>) | null = null
    try {
      mkdirSync(dirname(this.path), { recursive: true })
      release = await lockfile.lock(this.path, LOCK)
      const document = this.load(notices)
      if (document === null) return this.inMemory(apply, notices)
      const result = apply(document)
      this.memory = result.document
      if (writes && result.done) {
        this.keepCopy()
        this.conf.store = { document: result.document }
      }
      return { ...result, saved: true, notices }
    } catch (error) {
      const place = this.opened === null ? (this.folder ?? 'its place') : dirname(this.path)
      this.trouble = `nothing can be kept in ${place} (${reasonOf(error)}); changes hold until you leave`
      return this.inMemory(apply, notices)
    } finally {
      await release?.().catch(() => undefined)
    }
  }

  private inMemory(
    apply: (document: KeptDocument) => Pick<Kept, 'document' | 'done' | 'problem' | 'label'>,
    notices: string[],
  ): Kept {
    const result = apply(this.memory ?? NEW_DOCUMENT)
    this.memory = result.document
    return { ...result, problem: result.problem ?? this.trouble, saved: false, notices }
  }

  /** The document on disk; null (with the trouble named) where it must not be touched. */
  private load(notices: string[]): KeptDocument | null {
    if (!existsSync(this.path)) return existsSync(this.copyPath) ? this.restore(notices) : NEW_DOCUMENT
    const reading = readDocument(readFileSync(this.path, 'utf8'))
    if (reading.ok) return reading.document
    if (reading.newer) {
      this.trouble = `${this.path}: ${reading.problem}; changes hold until you leave`
      return null
    }
    const aside = this.asidePath()
    renameSync(this.path, aside)
    notices.push(`the kept shelf was damaged (${reading.problem}); it is set aside as ${aside}`)
    return this.restore(notices)
  }

  private restore(notices: string[]): KeptDocument {
    if (!existsSync(this.copyPath)) return NEW_DOCUMENT
    const reading = readDocument(readFileSync(this.copyPath, 'utf8'))
    if (!reading.ok) return NEW_DOCUMENT
    notices.push('the last good copy of the shelf is restored')
    this.conf.store = { document: reading.document }
    return reading.document
  }

  /** The file as it stands, if it can be read, is the last good copy before it is written anew. */
  private keepCopy(): void {
    if (!existsSync(this.path)) return
    const part = `${this.copyPath}.part`
    copyFileSync(this.path, part)
    renameSync(part, this.copyPath)
  }

  private get copyPath(): string {
    return join(dirname(this.path), 'shelf.last-good.json')
  }

  private asidePath(): string {
    for (let number = 1; ; number++) {
      const path = join(dirname(this.path), `shelf.damaged-${number}.json`)
      if (!existsSync(path)) return path
    }
  }
}

function withShelf(document: KeptDocument, shelf: Shelf, label: string): KeptDocument {
  return {
    ...document,
    begun: true,
    shelf,
    history: remember(document.history, label, document.shelf, shelf),
  }
}

const REASONS: Record<string, string> = {
  ENOSPC: 'the disk is full',
  EROFS: 'the disk can only be read',
  EACCES: 'no permission',
  EPERM: 'no permission',
  ENOTDIR: 'part of the path is not a folder',
  EEXIST: 'part of the path is not a folder',
  ELOCKED: 'another shortstave holds it',
}

function reasonOf(error: unknown): string {
  const { code, message } = error as NodeJS.ErrnoException
  return REASONS[code ?? ''] ?? message
}
