import { BAD_USE, type ExitCode, Refusal } from './command.ts'
import { runCommand } from './run-command.ts'
import { processWorld } from './world.ts'

/** Writes and waits until it is out, so that a pipe gets everything before the process ends. */
function write(stream: NodeJS.WriteStream, text: string): Promise<void> {
  return new Promise(resolve => {
    if (text === '') resolve()
    else stream.write(text, () => resolve())
  })
}

// A reader that closes its end early (head, less) has seen enough: that is no error.
for (const stream of [process.stdout, process.stderr]) {
  stream.on('error', (error: NodeJS.ErrnoException) => {
    process.exit(error.code === 'EPIPE' ? 0 : 1)
  })
}

let code: ExitCode
try {
  const outcome = await runCommand(process.argv.slice(2), await processWorld(process))
  await write(process.stderr, outcome.err)
  await write(process.stdout, outcome.out)
  code = outcome.code
} catch (error) {
  const line =
    error instanceof Refusal ? error.message : `something went wrong inside: ${(error as Error).message}`
  await write(process.stderr, `shortstave: ${line.replace(/\s+/g, ' ')}\n`)
  if (process.env.SHORTSTAVE_TRACE) await write(process.stderr, `${(error as Error).stack}\n`)
  code = error instanceof Refusal ? error.code : BAD_USE
}
process.exit(code)
