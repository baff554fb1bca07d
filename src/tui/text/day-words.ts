const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec']
const WEEKDAYS = ['sun', 'mon', 'tue', 'wed', 'thu', 'fri', 'sat']
const MS_A_DAY = 86_400_000

const isoOf = (time: number): string => new Date(time).toISOString().slice(0, 10)

/**
 * The day that people mean by "3 days", "2 weeks", "tomorrow", "friday", "31 dec" or "2026-12-31", as YYYY-MM-DD; a
 * weekday or a day without its year is the next one. Null where it is none, or could be several (3/4).
 *
 * @example dayByWords('friday', '2026-06-01') is '2026-06-05'
 */
export function dayByWords(text: string, today: string): string | null {
  const words = text.trim().toLowerCase().replace(/[.,]/g, ' ').replace(/\s+/g, ' ').trim()
  const now = Date.parse(`${today}T00:00:00Z`)
  if (words === 'today') return today
  if (words === 'tomorrow') return isoOf(now + MS_A_DAY)

  const later = /^(?:in |\+ ?)?(\d{1,3}) ?(d|days?|w|wks?|weeks?|months?)?$/.exec(words)
  if (later !== null && (later[2] !== undefined || /^(in |\+)/.test(words))) {
    const count = Number(later[1])
    const unit = later[2] ?? 'd'
    if (unit.startsWith('month')) return monthsLater(today, count)
    return isoOf(now + count * (unit.startsWith('w') ? 7 : 1) * MS_A_DAY)
  }
  const weekday = /^(?:on |next )?([a-z]{3,9})$/.exec(words)
  if (weekday !== null && isNameOf(weekday[1]!, WEEKDAYS, FULL_WEEKDAYS)) {
    const at = WEEKDAYS.indexOf(weekday[1]!.slice(0, 3))
    const ahead = (at - new Date(now).getUTCDay() + 7) % 7
    return isoOf(now + (ahead === 0 ? 7 : ahead) * MS_A_DAY)
  }
  const dated =
    /^(?<day>\d{1,2})(?:st|nd|rd|th)? (?<month>[a-z]{3,9})(?: (?<year>\d{4}))?$/.exec(words) ??
    /^(?<month>[a-z]{3,9}) (?<day>\d{1,2})(?:st|nd|rd|th)?(?: (?<year>\d{4}))?$/.exec(words)
  if (dated?.groups !== undefined && isNameOf(dated.groups.month!, MONTHS, FULL_MONTHS)) {
    const month = MONTHS.indexOf(dated.groups.month!.slice(0, 3)) + 1
    const year = Number(dated.groups.year ?? today.slice(0, 4))
    const day = calendarDay(year, month, Number(dated.groups.day))
    if (dated.groups.year !== undefined || day === null || day >= today) return day
    return calendarDay(year + 1, month, Number(dated.groups.day))
  }
  const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(words)
  return iso === null ? null : calendarDay(Number(iso[1]), Number(iso[2]), Number(iso[3]))
}

const FULL_WEEKDAYS = ['sunday', 'monday', 'tuesday', 'wednesday', 'thursday', 'friday', 'saturday']
const FULL_MONTHS = [
  'january',
  'february',
  'march',
  'april',
  'may',
  'june',
  'july',
  'august',
  'september',
  'october',
  'november',
  'december',
]

/** Is a word a name, or a beginning of it with three letters or more? */
const isNameOf = (word: string, short: readonly string[], full: readonly string[]): boolean =>
  short.includes(word.slice(0, 3)) && full.some(name => name.startsWith(word))

/** A day that there is, or null. */
function calendarDay(year: number, month: number, day: number): string | null {
  const iso = `${year}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`
  const time = Date.parse(`${iso}T00:00:00Z`)
  return !Number.isNaN(time) && isoOf(time) === iso ? iso : null
}

/** So many months later, or the last day of that month where it is shorter. */
function monthsLater(today: string, count: number): string {
  const [year, month, day] = today.split('-').map(Number) as [number, number, number]
  const months = year * 12 + month - 1 + count
  for (let at = day; at >= 28; at--) {
    const found = calendarDay(Math.floor(months / 12), (months % 12) + 1, at)
    if (found !== null) return found
  }
  return calendarDay(Math.floor(months / 12), (months % 12) + 1, day)!
}
