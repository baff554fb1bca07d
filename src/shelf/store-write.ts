import {
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  realpathSync,
  renameSync,
  rmSync,
  writeFileSync,
} from 'node:fs'
import { dirname, resolve } from 'node:path'

/** Unfinished writes of `path` are named so; what a killed process leaves can be told and taken away. */
export const isUnfinished = (name: string, path: string): boolean =>
  name.startsWith(`${path}.`) && name.endsWith('.part')

/**
 * Writes a file so that whoever reads it, at any moment and after any crash, finds either the old text or the new.
 * `mayReplace` is asked last; where it says no, the old file stays and false is given back. Throws where the disk
 * refuses, with the old file in place. With `durable` the text is on the disk, not only in its cache, before the
 * name points to it.
 */
export function writeAtomically(
  path: string,
  text: string,
  { durable = true, mayReplace = () => true }: { durable?: boolean; mayReplace?: () => boolean } = {},
): boolean {
  const target = realPath(path)
  const part = `${target}.${process.pid}.part`
  try {
    // The owner's alone: what somebody eats, and must not eat, is nobody else's business.
    const file = openSync(part, 'w', 0o600)
    try {
      writeFileSync(file, text)
      if (durable) fsyncSync(file)
    } finally {
      closeSync(file)
    }
    if (!mayReplace()) {
      rmSync(part, { force: true })
      return false
    }
    renameSync(part, target)
  } catch (error) {
    rmSync(part, { force: true })
    throw error
  }
  if (durable) settle(dirname(target))
  return true
}

/**
 * Makes a folder and those above it. Node's own way of doing so never ends where a file system says of a folder that
 * it makes that there is none (Linux's /proc does).
 */
export function makeFolder(folder: string): void {
  const missing: string[] = []
  for (let path = resolve(folder); !existsSync(path) && path !== dirname(path); path = dirname(path))
    missing.push(path)
  for (const path of missing.reverse()) {
    try {
      mkdirSync(path)
    } catch (error) {
      // Another process may have made it just now.
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error
    }
  }
}

/** Where a link points: a linked file stays linked. */
function realPath(path: string): string {
  try {
    return realpathSync(path)
  } catch {
    return path
  }
}

/** The folder's own entry on the disk. Some systems cannot do this; the file itself is safe by then. */
function settle(folder: string): void {
  try {
    const handle = openSync(folder, 'r')
    try {
      fsyncSync(handle)
    } finally {
      closeSync(handle)
    }
  } catch {}
}
