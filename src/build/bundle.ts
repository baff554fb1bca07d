import { chmod, copyFile, mkdir, readFile, rm, writeFile } from 'node:fs/promises'
import { build } from 'esbuild'

/**
 * Bundles the program into dist/: shortstave.js, which every command starts from, the parts that commands load when
 * they need them, and the data. Everything is inside, so that the packed program has no dependencies to install. The
 * parts stand in files of their own because Node compiles a module whole before it runs: with the screens and the
 * checks in the first file, each one-shot command would start at twice the time.
 */
const root = new URL('../../', import.meta.url)
const at = (path: string) => new URL(path, root).pathname

const { version } = JSON.parse(await readFile(at('package.json'), 'utf8')) as { version: string }

await rm(at('dist'), { recursive: true, force: true })
await mkdir(at('dist'))
await build({
  entryPoints: { shortstave: at('src/cli/main.ts') },
  outdir: at('dist'),
  chunkNames: 'part-[hash]',
  bundle: true,
  splitting: true,
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
})
const program = at('dist/shortstave.js')
await writeFile(program, `#!/usr/bin/env node\n${await readFile(program, 'utf8')}`)
await chmod(program, 0o755)
for (const file of ['foods.json', 'kitchen.json', 'sample-shelf.csv']) {
  await copyFile(at(`data/${file}`), at(`dist/${file}`))
}
