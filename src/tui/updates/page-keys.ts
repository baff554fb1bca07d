import type { Key } from '../keys.ts'
import { only, type State, type Updated } from '../state.ts'

/** Rows of a page that its frame takes. */
export const PAGE_FRAME = 4

/** A page over the screen: scroll it, or leave it by any other key. */
export function pageKeys(state: State, key: Key): Updated {
  const page = state.page!
  const shown = Math.max(1, state.rows - PAGE_FRAME)
  const furthest = Math.max(0, page.lines.length - shown)
  const to = (scroll: number): Updated =>
    only({ ...state, page: { ...page, scroll: Math.max(0, Math.min(furthest, scroll)) } })
  switch (key.key) {
    case 'up':
      return to(page.scroll - 1)
    case 'down':
      return to(page.scroll + 1)
    case 'page-up':
      return to(page.scroll - shown)
    case 'page-down':
      return to(page.scroll + shown)
    case 'home':
      return to(0)
    case 'end':
      return to(furthest)
    case 'text':
      return key.text === ' ' ? to(page.scroll + shown) : only({ ...state, page: null })
    default:
      return only({ ...state, page: null })
  }
}
