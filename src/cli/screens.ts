import type { Command } from './command.ts'

/** The terminal screens; without a terminal, what they would open with: the pairings of the shelf. */
export const screens: Command = {
  name: 'screens',
  summary: 'the terminal screens: shelf, bench, plate',
  help: '',
  async run(argv, world) {
    const { pair } = await import('./pair.ts')
    return pair.run(argv, world)
  },
}
