import { closeSync, fsyncSync, openSync, realpathSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'

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
