import type { Prompt, State } from '../state.ts'

/** Opens a line to type into. */
export const openPrompt = (state: State, prompt: Omit<Prompt, 'problem' | 'fresh'>): State => ({
  ...state,
  prompt: { ...prompt, fresh: prompt.text !== '', problem: null },
  message: '',
})
