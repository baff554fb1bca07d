import { readdirSync, readFileSync } from 'node:fs'
import { join, relative } from 'node:path'
import { describe, expect, it } from 'vitest'

const source = new URL('../src/', import.meta.url).pathname

/** What each part of src may import from, besides itself. */
const MAY_IMPORT: Record<string, string[]> = {
  nutrition: [],
  foods: ['nutrition'],
  shelf: ['foods', 'nutrition'],
  pairing: ['foods', 'nutrition'],
  kitchen: ['pairing', 'foods', 'nutrition'],
  prep: ['pairing', 'foods', 'nutrition'],
  cli: ['tui', 'kitchen', 'prep', 'pairing', 'shelf', 'foods', 'nutrition'],
  tui: ['kitchen', 'prep', 'pairing', 'shelf', 'foods', 'nutrition'],
  build: ['tui', 'shelf', 'pairing', 'kitchen', 'foods', 'nutrition'],
}

/** Node's own modules that reach the world, and who may import them. */
const WORLDLY = /^node:(fs|fs\/promises|child_process|process|http|https|net|os|readline)$/
const MAY_TOUCH = /^(cli|tui|build)\/|^shelf\/[a-z-]*store|^(foods|kitchen)\/load\.ts$/

const files = readdirSync(source, { recursive: true, encoding: 'utf8' }).filter(path => /\.tsx?$/.test(path))

function importsOf(path: string): string[] {
  const text = readFileSync(join(source, path), 'utf8')
  return [...text.matchAll(/(?:from|import)\s*\(?\s*'([^']+)'/g)].map(match => match[1]!)
}

describe('imports run one way', () => {
  it.each(files)('%s', path => {
    const part = path.split('/')[0]!
    for (const target of importsOf(path)) {
      if (!target.startsWith('.')) continue
      const other = relative(source, join(source, path, '..', target)).split('/')[0]!
      if (other !== part) expect(MAY_IMPORT[part], `${path} imports ${target}`).toContain(other)
    }
  })
})

describe('only the edge touches the world', () => {
  it.each(files)('%s', path => {
    if (MAY_TOUCH.test(path)) return
    expect(importsOf(path).filter(target => WORLDLY.test(target))).toEqual([])
  })
})
