import { execFileSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { spawn } from '@lydell/node-pty'
import { build } from 'esbuild'
import type { Table } from '../../src/foods/table.ts'
import { median, quantile } from './statistics.ts'

const COLUMNS = 100
const ROWS = 30
const root = new URL('../../', import.meta.url).pathname

/** A program in a real pseudo-terminal, with what it has written since it was last asked. */
class Terminal {
  private written = ''
  private waiting: (() => void) | undefined
  readonly pty

  constructor(args: string[], env: Record<string, string>) {
    this.pty = spawn(process.execPath, args, {
      cols: COLUMNS,
      rows: ROWS,
      name: 'xterm-256color',
      env: { PATH: process.env.PATH ?? '', TERM: 'xterm-256color', LANG: 'C.UTF-8', ...env },
    })
    this.pty.onData(data => {
      this.written += data
      this.waiting?.()
    })
  }

  /** Resolves when what was written since the last call holds `text`. */
  async until(text: string | RegExp, withinMs = 10_000): Promise<void> {
    const deadline = Date.now() + withinMs
    const holds = () => (typeof text === 'string' ? this.written.includes(text) : text.test(this.written))
    while (!holds()) {
      if (Date.now() > deadline) throw new Error(`the terminal did not show ${text} within ${withinMs} ms`)
      await new Promise<void>(resolve => {
        const timer = setTimeout(resolve, 50)
        this.waiting = () => {
          clearTimeout(timer)
          resolve()
        }
      })
    }
    this.written = ''
  }

  /** Resolves when nothing has been written for a while. */
  async quiet(forMs = 250): Promise<void> {
    let length = -1
    while (length !== this.written.length) {
      length = this.written.length
      await new Promise(resolve => setTimeout(resolve, forMs))
    }
    this.written = ''
  }

  /** The most memory that the process has had in RAM so far, MB. */
  memoryMb(): number {
    const status = readFileSync(`/proc/${this.pty.pid}/status`, 'utf8')
    return Number(/VmHWM:\s+(\d+)/.exec(status)?.[1]) / 1024
  }

  close(): void {
    this.pty.kill('SIGKILL')
  }
}

/** The smallest program that the first frame is held against: one line of text drawn by the same ink, bundled alike. */
async function oneLineProgram(folder: string): Promise<string> {
  const outfile = join(folder, 'one-line.mjs')
  await build({
    stdin: {
      contents: `import { render, Text } from 'ink'; import { createElement } from 'react'
render(createElement(Text, null, 'one line')); setInterval(() => {}, 1000)`,
      resolveDir: root,
      loader: 'js',
    },
    outfile,
    bundle: true,
    minify: true,
    format: 'esm',
    platform: 'node',
    target: 'node20',
    define: { 'process.env.NODE_ENV': '"production"' },
    banner: { js: "import{createRequire as c}from'node:module';const require=c(import.meta.url);" },
    plugins: [
      {
        name: 'no-inspector',
        setup(bundler) {
          bundler.onResolve({ filter: /^react-devtools-core$/ }, ({ path }) => ({ path, namespace: 'empty' }))
          bundler.onLoad({ filter: /.*/, namespace: 'empty' }, () => ({ contents: 'export default {}' }))
        },
      },
    ],
  })
  return outfile
}

interface Start {
  ms: number
  memoryMb: number
}

async function startOf(args: string[], env: Record<string, string>, shown: string): Promise<Start> {
  const begin = performance.now()
  const terminal = new Terminal(args, env)
  try {
    await terminal.until(shown)
    const ms = performance.now() - begin
    await terminal.quiet()
    return { ms, memoryMb: terminal.memoryMb() }
  } finally {
    terminal.close()
  }
}

/** The time from a key to the screen's answer, over keys typed one at a time into the filter and taken back. */
async function keyTimes(program: string, home: string, rounds: number): Promise<number[]> {
  const terminal = new Terminal([program], { SHORTSTAVE_HOME: home })
  const times: number[] = []
  try {
    await terminal.until('shelf')
    await terminal.quiet()
    for (let round = 0; round < rounds; round++) {
      for (const key of [
        'l',
        'e',
        'n',
        '\u007f',
        '\u007f',
        '\u007f',
        '\u001b[B',
        '\u001b[B',
        '\u001b[A',
        '\t',
        '\t',
        '\t',
      ]) {
        const begin = performance.now()
        terminal.pty.write(key)
        await terminal.until(/[\s\S]/)
        times.push(performance.now() - begin)
        await terminal.quiet(60)
      }
    }
    return times
  } finally {
    terminal.close()
  }
}

/** First frame, memory and keys of the screens, as medians and ratios to the one-line ink program of the same run. */
export async function screensBench(
  program: string,
  table: Table,
  options: { quick: boolean },
): Promise<string[]> {
  const runs = options.quick ? 3 : 11
  const rounds = options.quick ? 3 : 12
  const folder = mkdtempSync(join(tmpdir(), 'shortstave-screens-'))
  try {
    const oneLine = await oneLineProgram(folder)
    const small: Start[] = []
    const whole: Start[] = []
    for (let run = 0; run < runs; run++) {
      small.push(await startOf([oneLine], {}, 'one line'))
      whole.push(await startOf([program], { SHORTSTAVE_HOME: join(folder, 'first') }, 'shelf'))
    }
    const ms = (starts: Start[]) => median(starts.map(start => start.ms))
    const mb = (starts: Start[]) => median(starts.map(start => start.memoryMb))
    const sample = await keyTimes(program, join(folder, 'sample'), rounds)

    const full = join(folder, 'full')
    const file = join(folder, 'full.csv')
    writeFileSync(
      file,
      `food,grams\n${table.foods
        .slice(0, 200)
        .map(food => `${food.id},500\n`)
        .join('')}`,
    )
    execFileSync(process.execPath, [program, 'shelf', 'import', file], {
      env: { ...process.env, SHORTSTAVE_HOME: full },
      stdio: 'ignore',
    })
    const large = await keyTimes(program, full, rounds)
    const keys = (times: number[]) =>
      `median ${median(times).toFixed(0)} ms, 95th percentile ${quantile(times, 0.95).toFixed(0)} ms of ${times.length} keys`
    return [
      `one line of ink: first frame ${ms(small).toFixed(0)} ms, memory ${mb(small).toFixed(0)} MB (medians of ${runs})`,
      `the screens: first frame ${ms(whole).toFixed(0)} ms, ${(ms(whole) / ms(small)).toFixed(2)} x; memory ${mb(whole).toFixed(0)} MB, ${(mb(whole) / mb(small)).toFixed(2)} x`,
      `a key's answer, sample shelf: ${keys(sample)}`,
      `a key's answer, 200 foods: ${keys(large)}`,
    ]
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}
