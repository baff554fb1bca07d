import { FLUID_OUNCE, type Unit, unitOf } from './units.ts'

/** One amount as written: `2 x 400 g cans` has count 2, unit can, each 400 g. */
export interface Term {
  count: number
  /** null: so many of the food itself (`two eggs`) */
  unit: Unit | null
  /** what each container holds by its label, g, where the text says so */
  eachG: number | null
  /** or ml */
  eachMl: number | null
  /** words of size before the unit or the food: `large` */
  sizes: string[]
}

/** What stands in the way of an amount that was otherwise read. */
export type Doubt =
  | { kind: 'range'; low: number; high: number }
  | { kind: 'heaped'; word: string }
  /** `1,500`: a decimal comma or a thousand's */
  | { kind: 'comma'; low: number; high: number }
  | { kind: 'vague'; word: string }
  | { kind: 'not-finite'; word: string }

export interface Scanned {
  /** added up: `1 lb 4 oz`; empty only with a vague or non-finite doubt */
  terms: Term[]
  doubt: Doubt | null
  /** where it ends in the text */
  end: number
}

const FRACTIONS = new Map(
  '¼ 1/4 ½ 1/2 ¾ 3/4 ⅐ 1/7 ⅑ 1/9 ⅒ 1/10 ⅓ 1/3 ⅔ 2/3 ⅕ 1/5 ⅖ 2/5 ⅗ 3/5 ⅘ 4/5 ⅙ 1/6 ⅚ 5/6 ⅛ 1/8 ⅜ 3/8 ⅝ 5/8 ⅞ 7/8'
    .match(/\S+ \S+/g)!
    .map(pair => pair.split(' ') as [string, string]),
)
const FRACTION_SIGNS = new RegExp(`[${[...FRACTIONS.keys()].join('')}]`, 'g')

/** Text with its fraction signs, dashes and multiplication signs as they are on every keyboard. */
export function keyboardSigns(text: string): string {
  return text
    .replace(/(\d)\s*(?=[¼-¾⅐-⅞])/g, '$1 ')
    .replace(FRACTION_SIGNS, sign => FRACTIONS.get(sign)!)
    .normalize('NFKC')
    .replace(/⁄/g, '/')
    .replace(/[−‐‑‒–—]/g, '-')
    .replace(/[×✕]/g, ' x ')
    .replace(/\s+/g, ' ')
}

const CARDINALS = new Map(
  'zero one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen seventeen eighteen nineteen twenty'
    .split(' ')
    .map((word, n) => [word, n]),
)
const PARTS = new Map([
  ['half', 1 / 2],
  ['halves', 1 / 2],
  ['third', 1 / 3],
  ['thirds', 1 / 3],
  ['quarter', 1 / 4],
  ['quarters', 1 / 4],
  ['fourth', 1 / 4],
  ['eighth', 1 / 8],
])
const DOZEN = /\s*dozens?\b/iy
const CARDINAL = new RegExp(`\\s*(${[...CARDINALS.keys()].join('|')})\\b`, 'iy')
const PART = new RegExp(`[\\s-]*(${[...PARTS.keys()].join('|')})\\b`, 'iy')
const AND_PART = new RegExp(`\\s+and\\s+(?:an?|one)\\s+(${[...PARTS.keys()].join('|')})\\b`, 'iy')
const ABOUT = /\s*(?:about|approx\.?|approximately|roughly|around|circa|ca\.?|nearly|almost|~|≈)\s*/iy
const VAGUE =
  /\s*(an?\s+(?:few|bit|little|lot|touch|tad|drop|dollop)\b|few\b|lots\b|some\b|several\b|many\b|plenty\b|enough\b)(?:\s+of\b)?/iy
const NOT_FINITE = /\s*([-+]?(?:nan|infinity|inf|∞|infinite|undefined|null))(?![\p{L}\p{N}])/iuy
const SIGN = /\s*([-+])(?=[\d.])/y
const MIXED = /\s*(\d+)(?:\s+and\s+|\s*&\s*|\s+|-)(\d+)\s*\/\s*(\d+)(?![\d/])/iy
const FRACTION = /\s*(\d+)\s*\/\s*(\d+)(?![\d/])/y
const THOUSANDS = /\s*(\d{1,3}),(\d{3})(?![\d.,])/y
const DECIMAL = /\s*(\d+(?:[.,]\d+)?|[.,]\d+)(?![.,]?\d)/y
/** what may not follow a number: an exponent or a percentage */
const NO_NUMBER = /\s*%|e[-+]?\d/iy
const RANGE = /\s*(?:-|to\b|or\b|\.\.+)\s*/iy
const TIMES = /\s*(?:x|\*|times)\s*(?=[\d.(])/iy
const ARTICLE_AFTER_PART = /(?:\s+of)?\s+(?:an?|one|the)(?=\s)/iy
const ARTICLE = /\s*(?:an?)(?=\s)/iy
const COUPLE = /\s*couple\b(?:\s+of(?=\s))?/iy
const AND = /\s*(?:,|\band\b|\bplus\b|\+|&)?\s*/iy
const SIZE =
  /\s*(extra[\s-]large|large|big|medium(?:[\s-]sized?)?|small|thick|thin|level|standard|average)\b/iy
const HEAPED =
  /\s*(heaped|heaping|rounded|scant|generous|mounded|overflowing|packed|good|full)\b(?=\s+[a-z])/iy
const FL_OZ = /\s*(?:fl\.?|fluid)\s*(?:oz|ounces?)\b\.?/iy
const UNIT_WORD = /\s*-?\s*([a-z]+)(?!-?[\p{L}\p{N}'])\.?/iuy
const OPEN = /\s*\(\s*/y
const CLOSE = /\s*(?:each|per can|per tin)?\s*\)/iy
const EACH = /\s*each\b/iy

/** Volumes that no label gives. */
const SPOONS = new Set(['cup', 'tbsp', 'tsp'])

type Label = Pick<Term, 'eachG' | 'eachMl'>
const NO_LABEL: Label = { eachG: null, eachMl: null }

/** What is sold by the weight on its label. */
const CONTAINERS = new Set(
  'can jar bottle carton package bag box tub pot block bar loaf bunch head'.split(' '),
)

/**
 * Reads an amount that begins at `start` of a text (after `keyboardSigns`), or null where none begins there.
 * Amounts are numbers, fractions, mixed numbers, words (`half a`, `two`, `a dozen`), with or without a unit.
 */
export function scanAmount(text: string, start = 0): Scanned | null {
  let at = start

  function eat(pattern: RegExp): RegExpExecArray | null {
    pattern.lastIndex = at
    const match = pattern.exec(text)
    if (match !== null) at = pattern.lastIndex
    return match
  }

  function attempt<T>(read: () => T | null): T | null {
    const before = at
    const result = read()
    if (result === null) at = before
    return result
  }

  interface Quantity {
    value: number
    doubt: Doubt | null
  }

  function number(): Quantity | null {
    return attempt(() => {
      const sign = eat(SIGN)?.[1] === '-' ? -1 : 1
      let value: number
      let doubt: Doubt | null = null
      let match = eat(MIXED)
      if (match !== null) {
        const part = Number(match[2]) / Number(match[3])
        if (!(part < 1)) return null
        value = Number(match[1]) + part
      } else {
        match = eat(FRACTION)
        if (match !== null) value = Number(match[1]) / Number(match[2])
        else {
          match = eat(THOUSANDS)
          if (match !== null && match[1] !== '0') {
            const [low, high] = [Number(`${match[1]}.${match[2]}`), Number(match[1]! + match[2]!)]
            value = high
            doubt = { kind: 'comma', low, high }
          } else {
            if (match !== null) at = match.index
            match = eat(DECIMAL)
            if (match === null) return null
            value = Number(match[1]!.replace(',', '.'))
          }
        }
      }
      NO_NUMBER.lastIndex = at
      if (NO_NUMBER.test(text)) return null
      return { value: sign * value, doubt }
    })
  }

  /** `half`, `half a`, `a quarter of a`, `three quarters of a`; the value of the part times what stood before */
  function part(times: number): number | null {
    const match = eat(PART)
    if (match === null) return null
    eat(ARTICLE_AFTER_PART)
    return times * PARTS.get(match[1]!.toLowerCase())!
  }

  function quantity(): Quantity | null {
    eat(ABOUT)
    const notFinite = eat(NOT_FINITE)
    if (notFinite !== null) return { value: Number.NaN, doubt: { kind: 'not-finite', word: notFinite[1]! } }
    const vague = eat(VAGUE)
    if (vague !== null) return { value: Number.NaN, doubt: { kind: 'vague', word: vague[1]! } }
    const one = oneQuantity()
    if (one === null) return null
    const upTo = attempt(() => (eat(RANGE) === null ? null : oneQuantity()))
    if (upTo === null) return one
    return { value: one.value, doubt: { kind: 'range', low: one.value, high: upTo.value } }
  }

  function oneQuantity(): Quantity | null {
    const read = number()
    if (read !== null) {
      const plus = eat(AND_PART)
      if (plus !== null) read.value += PARTS.get(plus[1]!.toLowerCase())!
      else if (read.value > 0 && read.value < 1) eat(ARTICLE_AFTER_PART)
      if (eat(DOZEN) !== null) read.value *= 12
      return read
    }
    const value = wordQuantity()
    return value === null ? null : { value, doubt: null }
  }

  function wordQuantity(): number | null {
    return attempt(() => {
      const bare = part(1)
      if (bare !== null) return eat(DOZEN) === null ? bare : bare * 12
      const cardinal = eat(CARDINAL)
      if (cardinal !== null) {
        const n = CARDINALS.get(cardinal[1]!.toLowerCase())!
        const plus = eat(AND_PART)
        if (plus !== null) return n + PARTS.get(plus[1]!.toLowerCase())!
        const parts = n > 0 ? part(n) : null
        if (parts !== null) return parts
        return eat(DOZEN) === null ? n : n * 12
      }
      if (eat(DOZEN) !== null) return 12
      if (eat(COUPLE) !== null) return 2
      if (eat(ARTICLE) === null) return null
      const parts = part(1)
      if (parts !== null) return eat(DOZEN) === null ? parts : parts * 12
      if (eat(DOZEN) !== null) return 12
      return eat(COUPLE) === null ? 1 : 2
    })
  }

  function unit(): Unit | null {
    return attempt(() => {
      if (eat(FL_OZ) !== null) return FLUID_OUNCE
      const word = eat(UNIT_WORD)
      return word === null ? null : unitOf(word[1]!.toLowerCase())
    })
  }

  /** what a label says */
  function label(): Label | null {
    return attempt(() => {
      const read = number()
      const measured = read === null ? null : unit()
      if (read === null || measured === null || measured.kind === 'piece' || SPOONS.has(measured.name))
        return null
      return measured.kind === 'mass'
        ? { eachG: read.value * measured.grams, eachMl: null }
        : { eachG: null, eachMl: read.value * measured.millilitres }
    })
  }

  /** `400 g`, `(400 g)`, `14-oz` before a container, and the container */
  function labelled(): (Label & { unit: Unit }) | null {
    return attempt(() => {
      const bracketed = eat(OPEN) !== null
      const each = label()
      if (each === null || (bracketed && eat(CLOSE) === null)) return null
      const container = unit()
      return container?.kind === 'piece' && CONTAINERS.has(container.name)
        ? { ...each, unit: container }
        : null
    })
  }

  /** `(400 g)` after a measure: of each where it is a container, of all where it is a volume; `(1 cup)` after a mass */
  function bracketed(counted: Unit, count: number): (Label & { isDoubtful: boolean }) | null {
    return attempt(() => {
      const isContainer = counted.kind === 'piece' && CONTAINERS.has(counted.name)
      const isOpen = eat(OPEN) !== null
      // 1 can 400 g
      if (!isOpen && !isContainer) return null
      if (counted.kind !== 'piece') {
        const other = attempt(() => {
          const read = number()
          const also = read === null ? null : unit()
          return also === null || also.kind === counted.kind || eat(CLOSE) === null
            ? null
            : { read: read!, also }
        })
        if (other === null) return null
        const grams =
          other.also.kind === 'mass' && count > 0 ? (other.read.value * other.also.grams) / count : null
        return { eachG: counted.kind === 'volume' ? grams : null, eachMl: null, isDoubtful: false }
      }
      const said = label()
      const isEach = eat(EACH) !== null
      if (said === null || (isOpen && eat(CLOSE) === null)) return null
      if (counted.kind === 'piece') return { ...said, isDoubtful: count > 1 && !isEach }
      return {
        ...NO_LABEL,
        eachG: said.eachG === null || count <= 0 ? null : said.eachG / count,
        isDoubtful: false,
      }
    })
  }

  function term(): { term: Term; doubt: Doubt | null } | null {
    return attempt(() => {
      const one = labelled()
      if (one !== null) return { term: { count: 1, ...one, sizes: [] }, doubt: null }
      const read = quantity()
      if (read === null) return null
      let { value: count, doubt } = read
      if (doubt?.kind === 'vague' || doubt?.kind === 'not-finite') {
        return { term: { count, unit: unit(), ...NO_LABEL, sizes: [] }, doubt }
      }
      const marked = labelled()
      if (marked !== null) return { term: { count, ...marked, sizes: [] }, doubt }
      if (eat(TIMES) !== null) {
        const many = labelled()
        if (many !== null) return { term: { count, ...many, sizes: [] }, doubt }
        const inner = number()
        if (inner === null) return null
        count *= inner.value
        doubt ??= inner.doubt
      }
      const sizes: string[] = []
      for (;;) {
        const size = eat(SIZE)
        if (size !== null) {
          sizes.push(size[1]!.toLowerCase().replace(/[\s-]sized?$/, ''))
          continue
        }
        const heaped = attempt(() => {
          const match = eat(HEAPED)
          if (match === null) return null
          const before = at
          const follows = unit()
          at = before
          return follows === null ? null : match
        })
        if (heaped === null) break
        doubt ??= { kind: 'heaped', word: heaped[1]!.toLowerCase() }
      }
      const counted = unit()
      const each = counted === null ? null : bracketed(counted, count)
      // two cans (400 g): of each or of both?
      if (each?.isDoubtful) {
        const said = each.eachG ?? each.eachMl!
        doubt ??= { kind: 'comma', low: said, high: said * count }
      }
      const { eachG, eachMl } = each ?? NO_LABEL
      return { term: { count, unit: counted, eachG, eachMl, sizes }, doubt }
    })
  }

  const first = term()
  if (first === null) return null
  const terms = [first.term]
  let { doubt } = first
  for (;;) {
    const { unit: last } = terms.at(-1)!
    if (doubt !== null || last === null || last.kind === 'piece') break
    const more = attempt(() => {
      eat(AND)
      const next = term()
      return next !== null && next.term.unit?.kind === last.kind ? next : null
    })
    if (more === null) break
    terms.push(more.term)
    doubt = more.doubt
  }
  return { terms, doubt, end: at }
}
