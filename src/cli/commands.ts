import type { Command } from './command.ts'

/** The commands by name. Each loads its own file, so that one command costs nothing of the others. */
export const COMMANDS: Record<string, () => Promise<Command>> = {
  screens: async () => (await import('./screens.ts')).screens,
  find: async () => (await import('./find.ts')).find,
  food: async () => (await import('./food.ts')).food,
  foods: async () => (await import('./foods.ts')).foods,
  score: async () => (await import('./score.ts')).score,
  pair: async () => (await import('./pair.ts')).pair,
  complement: async () => (await import('./complement.ts')).complement,
  shelf: async () => (await import('./shelf.ts')).shelf,
  card: async () => (await import('./card.ts')).card,
  label: async () => (await import('./label.ts')).label,
  settings: async () => (await import('./settings.ts')).settings,
}

/** The commands in the order in which help lists them; the screens are what the program does without a command. */
export const commandNames = Object.keys(COMMANDS).filter(name => name !== 'screens')
