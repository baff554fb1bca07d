import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import envPaths from 'env-paths'
import type { ShelfStore } from '../shelf/store.ts'

type Env = Readonly<Record<string, string | undefined>>

/** The folder that SHORTSTAVE_HOME names, or undefined for the platform's own place. */
export const homeOf = (env: Env): string | undefined => env.SHORTSTAVE_HOME || undefined

/** Where the store keeps its file: known here without loading the store, so that most commands never load it. */
export function keptFile(env: Env): string {
  return join(homeOf(env) ?? envPaths('shortstave', { suffix: '' }).config, 'shelf.json')
}

/** Has the cook kept anything? */
export const anythingKept = (env: Env): boolean => existsSync(keptFile(env))

/** Are foods from packets kept? A look at the text spares the others the cost of checking it. */
export function ownFoodsKept(env: Env): boolean {
  try {
    return readFileSync(keptFile(env), 'utf8').includes('"ownFoods":[{')
  } catch {
    return false
  }
}

export async function openStore(env: Env): Promise<ShelfStore> {
  const { ShelfStore } = await import('../shelf/store.ts')
  return new ShelfStore(homeOf(env))
}
