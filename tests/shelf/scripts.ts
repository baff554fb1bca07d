import { type ChildProcessByStdio, spawn } from 'node:child_process'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Readable } from 'node:stream'
import { build } from 'esbuild'
import { afterAll } from 'vitest'

const root = mkdtempSync(join(tmpdir(), 'shelf-test-'))
afterAll(() => rmSync(root, { recursive: true, force: true }))

/** A folder of its own for one test. */
export const freshFolder = (): string => mkdtempSync(join(root, 'home-'))

/** Bundles a script that stands beside this file, so that a hundred processes of it start fast. Returns its path. */
export async function bundled(name: string): Promise<string> {
  const outfile = join(freshFolder(), `${name}.mjs`)
  await build({
    entryPoints: [new URL(`${name}.ts`, import.meta.url).pathname],
    outfile,
    bundle: true,
    format: 'esm',
    platform: 'node',
    banner: { js: "import{createRequire as c}from'node:module';const require=c(import.meta.url);" },
  })
  return outfile
}

/** A script's process, with the numbers that it has printed: those changes were kept. */
export class Running {
  readonly process: ChildProcessByStdio<null, Readable, Readable>
  readonly ended: Promise<{ code: number | null; signal: NodeJS.Signals | null }>
  errors = ''
  private printed = ''
  private readonly waiting: { count: number; go: () => void }[] = []

  constructor(command: string, args: readonly string[]) {
    this.process = spawn(command, args, { stdio: ['ignore', 'pipe', 'pipe'] })
    this.process.stderr.on('data', chunk => {
      this.errors += chunk
    })
    this.process.stdout.on('data', chunk => {
      this.printed += chunk
      for (const { count, go } of this.waiting) if (this.count >= count) go()
    })
    this.ended = new Promise(done => this.process.on('close', (code, signal) => done({ code, signal })))
  }

  /** Whole lines printed so far. */
  get count(): number {
    return this.printed.split('\n').length - 1
  }

  get lines(): string[] {
    return this.printed.split('\n').slice(0, -1)
  }

  /** Until so many lines are printed, or the process has ended. */
  async until(count: number): Promise<void> {
    const printed = new Promise<void>(go => {
      if (this.count >= count) go()
      else this.waiting.push({ count, go })
    })
    await Promise.race([printed, this.ended])
  }

  kill(signal: NodeJS.Signals): void {
    this.process.kill(signal)
  }
}

export const running = (script: string, ...args: readonly (string | number)[]): Running =>
  new Running(process.execPath, [script, ...args.map(String)])

/** Does some things, so many at a time. */
export async function atATime<T, R>(
  n: number,
  things: readonly T[],
  work: (thing: T) => Promise<R>,
): Promise<R[]> {
  const results: R[] = []
  const queue = things.entries()
  await Promise.all(
    Array.from({ length: n }, async () => {
      for (const [i, thing] of queue) results[i] = await work(thing)
    }),
  )
  return results
}
