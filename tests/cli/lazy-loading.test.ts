import { build } from 'esbuild'
import { expect, it } from 'vitest'
import { COMMANDS, commandNames } from '../../src/cli/commands.ts'

const root = new URL('../../', import.meta.url).pathname

/** Every source file that is run when an output is imported: its own and those of its static imports. */
async function filesRunBy(entry: string): Promise<Set<string>> {
  const { metafile } = await build({
    entryPoints: [root + entry],
    bundle: true,
    splitting: true,
    format: 'esm',
    platform: 'node',
    outdir: 'unused',
    write: false,
    metafile: true,
    external: ['react-devtools-core'],
    absWorkingDir: root,
    logLevel: 'silent',
  })
  const start = Object.keys(metafile.outputs).find(path => metafile.outputs[path]!.entryPoint === entry)!
  const seen = new Set<string>()
  const files = new Set<string>()
  const visit = (output: string) => {
    if (seen.has(output) || metafile.outputs[output] === undefined) return
    seen.add(output)
    for (const file of Object.keys(metafile.outputs[output].inputs)) files.add(file)
    for (const { path, kind } of metafile.outputs[output].imports)
      if (kind === 'import-statement') visit(path)
  }
  visit(start)
  return files
}

const screenLibraries = /node_modules\/(ink|react|react-reconciler|yoga-layout)\//

it('no command that draws no screen runs ink or react', async () => {
  const entries = ['main', ...commandNames].map(name => `src/cli/${name}.ts`)
  for (const entry of entries) {
    const drawn = [...(await filesRunBy(entry))].filter(file => screenLibraries.test(file))
    expect(drawn, entry).toEqual([])
  }
  expect(COMMANDS.screens).toBeDefined()
})

it('the check sees ink where it is used', async () => {
  const files = await filesRunBy('src/tui/main.tsx')
  expect([...files].some(file => screenLibraries.test(file))).toBe(true)
})
