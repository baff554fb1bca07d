/** Apostrophes are dropped inside words (`baker's` = `bakers`), all else that is no letter or digit parts words. */
const APOSTROPHES = /['’`´]/g
const WORD = /[\p{L}\p{M}\p{N}]+/gu
const WORD_WITH_APOSTROPHES = /[\p{L}\p{M}\p{N}](?:['’`´]?[\p{L}\p{M}\p{N}])*/gu
const NOT_ASCII = /[^\p{ASCII}]/u
const LATIN_ACCENTS = /[\u0300-\u036F]/g

/** Text without case, accents and apostrophes; letters of other scripts stay as they are. */
export function fold(text: string): string {
  const lower = text.toLowerCase().replace(APOSTROPHES, '')
  return NOT_ASCII.test(lower)
    ? lower.normalize('NFKD').replace(LATIN_ACCENTS, '').replace(/ß/g, 'ss')
    : lower
}

/** Plurals that the endings below would get wrong, and singulars that look like plurals. */
const IRREGULAR = new Map(
  Object.entries({
    leaves: 'leaf',
    loaves: 'loaf',
    halves: 'half',
    calves: 'calf',
    cookies: 'cookie',
    pies: 'pie',
    gas: 'gas',
    avocadoes: 'avocado',
    avocados: 'avocado',
  }),
)

/**
 * The singular of an English kitchen word, by its ending; what has no such ending is given back as it is. It need
 * not be a real word: names and queries pass through it alike.
 *
 * @example singular('potatoes') // 'potato'
 */
export function singular(word: string): string {
  const known = IRREGULAR.get(word)
  if (known !== undefined) return known
  if (word.length < 4 || !word.endsWith('s')) return word
  const before = word[word.length - 2]
  if (before === 's' || before === 'u' || before === 'i') return word
  if (word.endsWith('os') && word.length === 4) return word
  if (word.endsWith('ies') && word.length > 4) return `${word.slice(0, -3)}y`
  if (word.endsWith('oes')) return word.slice(0, -2)
  if (/(ch|sh|x|ss|zz)es$/.test(word)) return word.slice(0, -2)
  return word.slice(0, -1)
}

/**
 * One spelling for words that are written in several ways; keys and values are singular. Other words for the same
 * food (`aubergine`, `brinjal`) are left to the aliases, so that the search knows them when they are mistyped.
 */
const SPELLINGS = new Map(
  Object.entries({
    yoghurt: 'yogurt',
    yoghourt: 'yogurt',
    yogourt: 'yogurt',
    soya: 'soy',
    soja: 'soy',
    tempe: 'tempeh',
    houmous: 'hummus',
    houmou: 'hummus',
    hommus: 'hummus',
    hummous: 'hummus',
    humous: 'hummus',
    humus: 'hummus',
    hommos: 'hummus',
    tahina: 'tahini',
    bulghur: 'bulgur',
    burghul: 'bulgur',
    bulgar: 'bulgur',
    bulger: 'bulgur',
    dhal: 'dal',
    daal: 'dal',
    dahl: 'dal',
    dhall: 'dal',
    moong: 'mung',
    mungo: 'mung',
    urid: 'urad',
    azuki: 'adzuki',
    aduki: 'adzuki',
    flaxseed: 'flax seed',
    chilli: 'chili',
    chile: 'chili',
    chillie: 'chili',
    chillies: 'chili',
    wholemeal: 'whole wheat',
    wholewheat: 'whole wheat',
    wholegrain: 'whole grain',
    chapatti: 'chapati',
    omelet: 'omelette',
    skimmed: 'skim',
    nonfat: 'skim',
    tinned: 'canned',
    tin: 'canned',
    can: 'canned',
    jarred: 'canned',
    grey: 'gray',
    filo: 'phyllo',
    dehulled: 'hulled',
    husked: 'hulled',
    shelled: 'hulled',
    sprouted: 'sprout',
    sprouting: 'sprout',
    germinated: 'sprout',
    kidneybean: 'kidney bean',
    blackeye: 'black eyed',
    blackeyed: 'black eyed',
    blackeyes: 'black eyed',
    eye: 'eyed',
  }),
)

/** One word of a text, as it is compared. */
export interface Word {
  /** singular, in the one spelling */
  stem: string
  /** where it stands in the text, end exclusive */
  start: number
  end: number
}

/** The word, or the two words, that a folded word is compared as. */
export function stemsOf(written: string): readonly string[] {
  const one = singular(written)
  const spelled = SPELLINGS.get(one)
  return spelled === undefined ? [one] : spelled.split(' ')
}

/** The singulars of written words that may be compared as this stem, or as a longer one that it begins. */
export function writtenAs(stem: string): string[] {
  const written = [stem]
  for (const [word, spelled] of SPELLINGS) {
    if (spelled.split(' ').some(one => one.startsWith(stem))) written.push(word)
  }
  for (const [plural, one] of IRREGULAR) if (one.startsWith(stem)) written.push(plural)
  return written
}

/**
 * The words of a text in their order: folded, singular, in one spelling.
 *
 * @example wordsOf('Soya-beans, tinned') // ['soy', 'bean', 'canned']
 */
export function wordsOf(text: string): string[] {
  const words: string[] = []
  for (const written of writtenWords(text)) {
    words.push(...stemsOf(written))
  }
  return words
}

/**
 * The runs of letters and digits of a text, folded. Thousands of aliases pass here before a first search is answered,
 * nearly all in plain ASCII, which needs no pattern.
 */
export function writtenWords(text: string): string[] {
  const lower = text.toLowerCase()
  const words: string[] = []
  let start = -1
  for (let i = 0; i < lower.length; i++) {
    const code = lower.charCodeAt(i)
    if (code > 127 || code === APOSTROPHE || code === BACKTICK) return fold(text).match(WORD) ?? []
    const isWord = (code >= 97 && code <= 122) || (code >= 48 && code <= 57)
    if (isWord && start < 0) start = i
    else if (!isWord && start >= 0) {
      words.push(lower.slice(start, i))
      start = -1
    }
  }
  if (start >= 0) words.push(start === 0 ? lower : lower.slice(start))
  return words
}
const APOSTROPHE = 39
const BACKTICK = 96

/** The same words with the place of each in the text, end exclusive, for marking. */
export function placedWords(text: string): Word[] {
  const words: Word[] = []
  for (const match of text.matchAll(WORD_WITH_APOSTROPHES)) {
    const [start, end] = [match.index, match.index + match[0].length]
    for (const stem of wordsOf(match[0])) words.push({ stem, start, end })
  }
  return words
}

/** Words that say nothing of which food is meant. */
const STOP_WORDS = new Set(
  'a an the of in on with and or & for from my some any to by at as au de la le di e plus fresh freshly'.split(
    ' ',
  ),
)

/** Words of preparation and praise: they help where a name has them, and cost nothing where none has. */
const WEAK_WORDS = new Set(
  (
    'plain ordinary regular standard common organic ripe chopped diced sliced minced rinsed drained peeled grated ' +
    'cubed crumbled mashed shredded washed trimmed pitted stoned unsalted salted salt unsweetened cold hot warm ' +
    'leftover home made homemade large medium small big long short round whole natural pure seed bean grain kernel nut groat piece ' +
    'food packed heaped level extra style type good nice local'
  ).split(' '),
)

export function isStopWord(stem: string): boolean {
  return STOP_WORDS.has(stem)
}

export function isWeakWord(stem: string): boolean {
  return WEAK_WORDS.has(stem)
}
