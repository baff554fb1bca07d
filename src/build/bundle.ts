import { chmod, copyFile, mkdir, readFile, rm } from 'node:fs/promises'
import { build } from 'esbuild'

/**
 * Bundles the program into dist/shortstave.js, with its data beside it. Everything is inside, so that the packed
 * program has no dependencies to install and a one-shot command opens one file. The screens (ink, react) stand in
 * the bundle as a lazily initialised part: commands that draw no screen never run them.
 */
const root = new URL('../../', import.meta.url)
const at = (path: string) => new URL(path, root).pathname

const { version } = JSON.parse(await readFile(at('package.json'), 'utf8')) as { version: string }

await rm(at('dist'), { recursive: true, force: true })
await mkdir(at('dist'))
await build({
  entryPoints: [at('src/cli/main.ts')],
  outfile: at('dist/shortstave.js'),
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
      '#!/usr/bin/env node',
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
  ],
  logLevel: 'warning',
})
await chmod(at('dist/shortstave.js'), 0o755)
for (const file of ['foods.json', 'kitchen.json', 'sample-shelf.csv']) {
  await copyFile(at(`data/${file}`), at(`dist/${file}`))
}
