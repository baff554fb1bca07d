import { spawnSync } from 'node:child_process'
import { median } from './statistics.ts'

/** One-shot commands whose whole-process time is held against bare node. */
const COMMANDS: string[][] = [
  ['--version'],
  ['find', 'lentils'],
  ['food', 'lentils-red-dry'],
  ['score', '200 g boiled lentils', '1 cup boiled brown rice'],
  ['complement', 'lentils-red-dry'],
  ['pair'],
  ['pair', '--whole-table'],
]

function millisecondsOf(args: string[], env: NodeJS.ProcessEnv): number {
  const start = performance.now()
  spawnSync(process.execPath, args, { stdio: ['ignore', 'pipe', 'pipe'], env })
  return performance.now() - start
}

/**
 * Times whole processes, command and bare node in turn so that both meet the same machine. Returns a line a command:
 * the median in ms and the ratio to the median of `node -e 0`.
 */
export function startBench(program: string, home: string, runs: number): string[] {
  const env = { ...process.env, SHORTSTAVE_HOME: home }
  const bare: number[] = []
  const times = new Map(COMMANDS.map(command => [command, [] as number[]]))
  for (let run = 0; run < runs; run++) {
    bare.push(millisecondsOf(['-e', '0'], env))
    for (const [command, figures] of times) figures.push(millisecondsOf([program, ...command], env))
  }
  const base = median(bare)
  return [
    `bare node: median ${base.toFixed(0)} ms of ${runs} runs`,
    ...[...times].map(
      ([command, figures]) =>
        `shortstave ${command.join(' ')}: median ${median(figures).toFixed(0)} ms, ${(median(figures) / base).toFixed(2)} x bare node`,
    ),
  ]
}
