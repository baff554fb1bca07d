import { chmod, copyFile, mkdir, readFile, rm, writeFile } from 'node:fs/promises'
import { type BuildOptions, build } from 'esbuild'

/**
 * Bundles the program into dist/: shortstave.js, which every command starts from, pairing-thread.js, in which the
 * screens work out large shelves, the parts that commands load when
 * they need them, and the data. Everything is inside, so that the packed program has no dependencies to install. The
 * parts stand in files of their own because Node compiles a module whole before it runs: with the screens and the
 * checks in the first file, each one-shot command would start at twice the time.
 */
const root = new URL('../../', import.meta.url)
const at = (path: string) => new URL(path, root).pathname

const { version } = JSON.parse(await readFile(at('package.json'), 'utf8')) as { version: string }

await rm(at('dist'), { recursive: true, force: true })
await mkdir(at('dist'))
const options: BuildOptions = {
  outdir: at('dist'),
  chunkNames: 'part-[hash]',
  bundle: true,
  minify: true,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  legalComments: 'none',
  define: {
    BUNDLED_DATA: '"./"',
    PROGRAM_VERSION: JSON.stringify(version),
    'process.env.NODE_ENV': '"production"',
  },
  banner: {
    js: [
      // CommonJS packages in the bundle call require for Node's own modules.
      "import{createRequire as __createRequire}from'node:module';const require=__createRequire(import.meta.url);",
    ].join('\n'),
  },
  // ink imports a developer's inspector that it only uses under DEV: leave an empty module in its place.
  plugins: [
    {
      name: 'no-inspector',
      setup(bundler) {
        bundler.onResolve({ filter: /^react-devtools-core$/ }, ({ path }) => ({ path, namespace: 'empty' }))
        bundler.onLoad({ filter: /.*/, namespace: 'empty' }, () => ({ contents: 'export default {}' }))
      },
    },
    // ink's layout engine would fetch its WebAssembly from a data URL, and Node loads its whole HTTP client for that, a
    // fifth of the time to the first frame; told that there is no fetch, the engine decodes it.
    {
      name: 'no-fetch',
      setup(bundler) {
        bundler.onLoad({ filter: /yoga-wasm-base64-esm\.js$/ }, async ({ path }) => {
          const contents = await readFile(path, 'utf8')
          const told = contents.replaceAll('"function"!=typeof fetch', '!0')
          if (told === contents)
            throw new Error(`${path} no longer asks whether there is a fetch; see bundle.ts`)
          return { contents: told }
        })
      },
    },
    // ink measures each line letter by letter with tables of emoji; the screens' own measure is told at a glance for
    // nearly all lines, and both must agree on what a line takes.
    {
      name: 'one-measure',
      setup(bundler) {
        bundler.onResolve({ filter: /^string-width$/ }, () => ({ path: at('src/tui/text/width.ts') }))
        bundler.onLoad({ filter: /tui[\\/]text[\\/]width\.ts$/ }, async ({ path }) => ({
          contents: `${await readFile(path, 'utf8')}\nexport default widthOf`,
          loader: 'ts',
          resolveDir: at('src/tui/text'),
        }))
      },
    },
    // zod brings its messages in fifty languages, a quarter of the bundle; the program speaks one.
    {
      name: 'one-language',
      setup(bundler) {
        bundler.onLoad({ filter: /zod[\\/]v4[\\/]locales[\\/]index\.js$/ }, () => ({
          contents: "export { default as en } from './en.js'",
        }))
      },
    },
  ],
  logLevel: 'warning',
}
await build({ ...options, entryPoints: { shortstave: at('src/cli/main.ts') }, splitting: true })
// The thread is a program of its own: shared parts would cut the main one into more files to read at the start.
await build({ ...options, entryPoints: { 'pairing-thread': at('src/tui/pairings/thread.ts') } })
const program = at('dist/shortstave.js')
await writeFile(program, `#!/usr/bin/env node\n${await readFile(program, 'utf8')}`)
await chmod(program, 0o755)
for (const file of ['foods.json', 'kitchen.json', 'sample-shelf.csv']) {
  await copyFile(at(`data/${file}`), at(`dist/${file}`))
}
