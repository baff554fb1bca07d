import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { scoreBasis } from '../../src/foods/score.ts'
import {
  AMINO_ACIDS,
  profileOf,
  STAVE_LABELS,
  STAVES,
  type Staves,
  stavesOf,
} from '../../src/nutrition/amino-acids.ts'
import type { Pattern } from '../../src/nutrition/pattern.ts'
import { scorePlate } from '../../src/nutrition/plate-score.ts'
import type { Portion, ProteinSource } from '../../src/nutrition/protein-source.ts'
import { type Cell, cellsOf } from '../../src/tui/staves/cells.ts'
import { drawStaves, stavesAsText, stavesSketch } from '../../src/tui/staves/draw-staves.ts'
import { wholePercent } from '../../src/tui/staves/figures.ts'
import { fillOf, letterOf } from '../../src/tui/staves/palette.ts'
import { rowOf, scaleOf } from '../../src/tui/staves/scale.ts'
import { stacksOf } from '../../src/tui/staves/stacks.ts'
import { wholeScore } from '../../src/tui/text/figures.ts'
import { widthOf, withoutStyles } from '../../src/tui/text/width.ts'
import { knowledge } from './helpers.ts'

/** Every stave of this pattern is 50 mg/g. */
const PATTERN = { ...knowledge.table.patterns[0]!, mgPerG: stavesOf(() => 50) } as Pattern

/** A food whose staves are these percentages of PATTERN. */
function foodOf(staves: Staves): ProteinSource {
  const half = { met: staves.saa, cys: staves.saa, phe: staves.aaa, tyr: staves.aaa }
  return {
    ...knowledge.table.foods[0]!,
    per100g: { ...knowledge.table.foods[0]!.per100g, crudeProteinG: 20 },
    aminoMgPerG: profileOf(a => (a in half ? half[a as 'met'] / 4 : staves[a as 'his'] / 2)),
    digestibility: { ...knowledge.table.foods[0]!.digestibility, ...profileOf(() => 1) },
  }
}
const portion = (staves: Staves, grams: number): Portion => ({ food: foodOf(staves), grams })
const flat = (value: number) => stavesOf(() => value)
const stack = (...parts: number[]) => ({
  stave: 'lys' as const,
  parts,
  total: parts.reduce((sum, part) => sum + part, 0),
})
const SHORT: { [K in Cell['kind']]: (cell: Extract<Cell, { kind: K }>) => string } = {
  empty: () => ' ',
  whole: ({ food, letter }) => (letter ? letterOf(food) : String(food)),
  top: ({ food, eighths }) => `^${food}:${eighths}`,
  border: ({ food, above, eighths }) => `${food}|${above}:${eighths}`,
  beyond: () => '>',
}
const short = (cells: Cell[]) => cells.map(cell => SHORT[cell.kind](cell as never)).join(',')

describe('the scale', () => {
  it('has the 100 line in the middle of a row, and reaches beyond it, at every height', () => {
    for (let height = 4; height <= 40; height++) {
      const scale = scaleOf(height)
      expect((scale.row100 + 0.5) * scale.rowValue).toBeCloseTo(100, 9)
      expect(height * scale.rowValue).toBeGreaterThanOrEqual(138)
      expect(rowOf(100, scale)).toBe(scale.row100)
    }
  })
  it('does not depend on the plate', () => {
    const rows = (value: number) =>
      drawStaves({ portions: [portion(flat(value), 100)], pattern: PATTERN, width: 80, height: 9 }).findIndex(
        line => / 100$/.test(line),
      )
    expect(new Set([20, 70, 130, 400].map(rows)).size).toBe(1)
  })
})

describe('the cells of a stave', () => {
  const scale = { height: 10, rowValue: 20, row100: 4 }

  it('end at an eighth of a row', () => {
    expect(short(cellsOf(stack(50), scale, true))).toBe('a,0,^0:4, , , , , , , ')
    expect(short(cellsOf(stack(47.5), scale, true))).toBe('a,0,^0:3, , , , , , , ')
    expect(short(cellsOf(stack(60), scale, true))).toBe('0,a,0, , , , , , , ')
    expect(short(cellsOf(stack(60.1), scale, true))).toBe('0,a,0, , , , , , , ')
    expect(short(cellsOf(stack(62.5), scale, true))).toBe('0,a,0,^0:1, , , , , , ')
  })
  it('show something where there is next to nothing, and nothing where there is none', () => {
    expect(short(cellsOf(stack(0.2), scale, true))).toBe('^0:1, , , , , , , , , ')
    expect(short(cellsOf(stack(0), scale, true))).toBe(' , , , , , , , , , ')
  })
  it('show where one food ends and the next begins to an eighth, in colour', () => {
    expect(short(cellsOf(stack(50, 50), scale, true))).toBe('a,0,0|1:4,b,1, , , , , ')
    expect(short(cellsOf(stack(45, 55), scale, true))).toBe('a,0,0|1:2,b,1, , , , , ')
    // Without colour a cell is the food's that fills most of it.
    expect(short(cellsOf(stack(45, 55), scale, false))).toBe('a,0,1,b,1, , , , , ')
    expect(short(cellsOf(stack(55, 45), scale, false))).toBe('0,a,0,b,1, , , , , ')
  })
  it('say that a stave goes on', () => {
    expect(short(cellsOf(stack(250), { height: 5, rowValue: 40, row100: 2 }, true))).toBe('0,a,0,0,>')
  })

  it('are as high as the stave, whatever the foods: to half an eighth', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0.5, max: 60, noNaN: true }), { minLength: 1, maxLength: 5 }),
        fc.integer({ min: 4, max: 24 }),
        fc.boolean(),
        (parts, height, borders) => {
          const whole = stack(...parts)
          const at = scaleOf(height)
          const cells = cellsOf(whole, at, borders)
          const eighths = cells.reduce(
            (sum, cell) => sum + (cell.kind === 'empty' ? 0 : cell.kind === 'top' ? cell.eighths : 8),
            0,
          )
          const drawn = (eighths / 8) * at.rowValue
          const most = height * at.rowValue
          const least = at.rowValue / 8
          expect(Math.abs(drawn - Math.max(least, Math.min(most, whole.total)))).toBeLessThanOrEqual(
            at.rowValue / 16 + 1e-6,
          )
        },
      ),
    )
  })
})

describe('the drawing', () => {
  const uneven: Staves = { ...flat(110), lys: 60, trp: 90 }
  const portions = [portion(uneven, 100), portion(flat(110), 50)]

  it('names the shortest stave, and stands the water at it and the 100 line at 100', () => {
    const lines = drawStaves({ portions, pattern: PATTERN, width: 80, height: 9 })
    expect(lines).toHaveLength(11)
    const stacks = stacksOf(portions, PATTERN)
    const lys = stacks.find(({ stave }) => stave === 'lys')!.total
    // 100 g at 60 and 50 g at 110 of the same protein: 76.7.
    expect(lys).toBeCloseTo((60 * 2 + 110) / 3, 9)
    const scale = scaleOf(9)
    expect(lines[9 - 1 - scale.row100]).toMatch(/^ {4}─.* 100$/)
    expect(lines[9 - 1 - rowOf(lys, scale)]).toMatch(/^ {2}77≈.*≈$/)
    expect(lines[9]!.trim().split(/\s+/)).toEqual(
      STAVES.map(stave => STAVE_LABELS[stave] + (stave === 'lys' ? '*' : '')),
    )
    expect(lines[10]!.trim().split(/\s+/)).toEqual([
      '110',
      '110',
      '110',
      '77',
      '110',
      '110',
      '110',
      '97',
      '110',
    ])
  })

  it('has a letter and a fill of its own for each food, with and without colour', () => {
    for (const colour of [false, true]) {
      const text = drawStaves({ portions, pattern: PATTERN, width: 80, height: 16, colour })
        .map(withoutStyles)
        .join('\n')
      expect(text).toContain('█a█')
      expect(text).toContain('▒b▒')
    }
    const fills = Array.from({ length: 8 }, (_, food) => fillOf(food))
    expect(new Set(fills).size).toBe(8)
    expect(new Set(fills.map((_, food) => fillOf(food, true))).size).toBe(8)
  })

  it('uses no style without colour, and closes each style that it opens with it', () => {
    expect(drawStaves({ portions, pattern: PATTERN, width: 80 }).join('')).not.toContain('\u001b')
    for (const line of drawStaves({ portions, pattern: PATTERN, width: 80, colour: true })) {
      for (const [open, close] of [
        ['38;5;', '39m'],
        ['48;5;', '49m'],
        ['[1m', '[22m'],
      ] as const) {
        expect(line.split(open).length <= line.split(close).length).toBe(true)
      }
    }
  })

  it('fits every width, upright or laid down, in ASCII too', () => {
    for (let width = 20; width <= 150; width++) {
      for (const ascii of [false, true]) {
        const lines = drawStaves({ portions, pattern: PATTERN, width, height: 7, ascii })
        for (const line of lines) expect(widthOf(line)).toBeLessThanOrEqual(width)
        // biome-ignore lint/suspicious/noControlCharactersInRegex: it looks for letters that are not ASCII
        if (ascii) expect(lines.join('')).toMatch(/^[\u0000-\u007f]*$/)
      }
    }
  })

  it('laid down: a line a stave, as long as the stave is', () => {
    const lines = drawStaves({ portions, pattern: PATTERN, width: 50 })
    expect(lines).toHaveLength(9)
    const lengthOf = (line: string) => /[█▒ab]+/.exec(line.slice(9))![0].length
    // 40 columns are 140 %.
    expect(lengthOf(lines[0]!)).toBe(Math.round((110 / 140) * 40))
    expect(lengthOf(lines[3]!)).toBe(Math.round((76.667 / 140) * 40))
    expect(lines[3]).toMatch(/^Lys\* {2}77 .*≈ +│$/)
  })

  it('draws nothing where there is no protein', () => {
    expect(drawStaves({ portions: [], pattern: PATTERN, width: 80 })).toEqual([])
  })

  it('never shows a stave as longer than it is in figures', () => {
    const lines = drawStaves({ portions: [portion(flat(99.99), 100)], pattern: PATTERN, width: 80 })
    expect(lines.at(-1)).toContain('99')
    expect(lines.at(-1)).not.toContain('100')
  })
})

describe('figures', () => {
  it('are rounded as the score is: the shortest stave is the DIAAS', () => {
    for (const food of knowledge.table.foods.slice(0, 80)) {
      const score = scorePlate([{ food, grams: 100 }], scoreBasis(knowledge.table, 'fao-2013-over-3y'))
      if (score.staves === null) continue
      expect(wholePercent(score.staves[score.limiting!])).toBe(wholeScore(score.diaas!))
    }
    expect(wholePercent(99.99)).toBe('99')
  })
})

describe('the twins', () => {
  it('say the staves in words', () => {
    expect(stavesAsText({ ...flat(110), saa: 88.9 })).toBe(
      'In % of the pattern: histidine 110, isoleucine 110, leucine 110, lysine 110, methionine + cysteine 89, phenylalanine + tyrosine 110, threonine 110, tryptophan 110, valine 110. Shortest: methionine + cysteine.',
    )
  })
  it('sketch them in nine letters, in their order', () => {
    expect(stavesSketch({ ...flat(120), lys: 60, val: 15 })).toBe('▇▇▇▄▇▇▇▇▁')
    expect(stavesSketch({ ...flat(120), lys: 60, val: 15 }, true)).toBe('777477771')
    expect(AMINO_ACIDS).toHaveLength(11)
  })
})
