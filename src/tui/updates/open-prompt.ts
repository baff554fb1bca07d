import type { Prompt, State } from '../state.ts'
import { typedLine } from './typing.ts'

/** Opens a line to type into. */
export const openPrompt = (state: State, prompt: Omit<Prompt, 'problem' | 'fresh' | 'caret'>): State => ({
  ...state,
  prompt: { ...prompt, ...typedLine(prompt.text), problem: null },
  message: '',
})
