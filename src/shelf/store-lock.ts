import fs from 'node:fs'
import { dirname, resolve } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import lockfile from 'proper-lockfile'

/** A lock older than this belongs to a process that is gone. */
const STALE_MS = 2_500
/** Longer than it takes for a lock to go stale, so that a killed process never turns others away. */
const PATIENCE_MS = 6_000
/** A holder works for milliseconds; one that was stopped for this long while locking starts again. */
const LOCKING_AT_MOST_MS = 1_000

/** The locks of this process: which directory it made, and when. */
const held = new Map<string, string>()
const madeAt = new Map<string, number>()

/** Tells one lock directory from the next of the same name; inode numbers alone are used again at once. */
function identity(lockPath: string): string | null {
  try {
    const { ino, ctimeNs } = fs.statSync(lockPath, { bigint: true })
    return `${ino}:${ctimeNs}`
  } catch {
    return null
  }
}

/** May this process remove the lock: its own, or one that is stale at this very moment? */
function removable(lockPath: string): boolean {
  const own = held.get(lockPath)
  if (own !== undefined) return identity(lockPath) === own
  const stat = fs.statSync(lockPath, { throwIfNoEntry: false })
  return stat !== undefined && stat.mtimeMs < Date.now() - STALE_MS
}

/**
 * The file system as the lock sees it. A lock that another process has taken over meanwhile must not be removed: not
 * on release, and not by the second of two that found the same lock stale.
 */
const guarded = {
  ...fs,
  mkdir(path: string, done: (error: NodeJS.ErrnoException | null) => void): void {
    fs.mkdir(path, error => {
      if (error === null) madeAt.set(path, Date.now())
      done(error)
    })
  },
  rmdir(path: string, done: (error: NodeJS.ErrnoException | null) => void): void {
    try {
      guarded.rmdirSync(path)
      done(null)
    } catch (error) {
      done(error as NodeJS.ErrnoException)
    }
  },
  rmdirSync(path: string): void {
    if (removable(path)) fs.rmdirSync(path)
  },
}

const OPTIONS = {
  realpath: false,
  stale: STALE_MS,
  update: 1_000,
  fs: guarded,
  // Whether the lock is still ours is asked before each write.
  onCompromised: () => undefined,
}

/** A process that was stopped in the midst of its work starts it again; more often than this is no accident. */
const TURNS_AT_MOST = 20

/**
 * Does synchronous work on a file while no other process does. `stillHeld` is to be asked right before each write: a
 * process that was stopped for long has lost the lock, must not write, and returns null; the work is then begun anew.
 * Throws ELOCKED where another process holds the file for many seconds, and the file system's error where the folder
 * can't be written.
 */
export async function withLock<T extends object>(
  path: string,
  work: (stillHeld: () => boolean) => T | null,
): Promise<T> {
  const lockPath = `${resolve(path)}.lock`
  for (let turn = 0; turn < TURNS_AT_MOST; turn++) {
    const release = await locked(path, lockPath)
    held.set(lockPath, identity(lockPath) ?? 'gone')
    // The wall clock, because the other one stands still while the machine sleeps.
    const inTime = Math.abs(Date.now() - (madeAt.get(lockPath) ?? 0)) < LOCKING_AT_MOST_MS
    try {
      const result = work(() => inTime && identity(lockPath) === held.get(lockPath))
      if (result !== null) return result
    } finally {
      await release().catch(() => undefined)
      held.delete(lockPath)
    }
  }
  throw Object.assign(new Error('the lock is lost again and again'), { code: 'ELOCKED' })
}

async function locked(path: string, lockPath: string): Promise<() => Promise<void>> {
  let waitedMs = 0
  for (;;) {
    const begun = performance.now()
    try {
      return await lockfile.lock(path, OPTIONS)
    } catch (error) {
      // A process that was stopped while locking finds that its lock is gone, and starts again.
      const { code } = error as NodeJS.ErrnoException
      const again = code === 'ELOCKED' || (code === 'ENOENT' && fs.existsSync(dirname(lockPath)))
      if (!again) throw error
      if (waitedMs > PATIENCE_MS) {
        if (!fromTheFuture(lockPath)) throw error
        fs.rmdirSync(lockPath)
      }
      await wait(1 + Math.random() * 6)
      // Time in which this process itself was stopped is no waiting.
      waitedMs += Math.min(performance.now() - begun, 100)
    }
  }
}

/** A lock whose time is ahead (the clock was set back since) would never go stale. */
function fromTheFuture(lockPath: string): boolean {
  const stat = fs.statSync(lockPath, { throwIfNoEntry: false })
  return stat !== undefined && stat.mtimeMs > Date.now() + PATIENCE_MS
}
