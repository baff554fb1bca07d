import { answer, type Command } from './command.ts'
import { anythingKept, homeOf, openStore } from './kept.ts'
import { sampleShelf } from './shelf-source.ts'

/** The terminal screens; without a terminal, what they would open with: the pairings of the shelf. */
export const screens: Command = {
  name: 'screens',
  summary: 'the terminal screens: shelf, bench, plate',
  help: '',
  async run(argv, world) {
    if (!world.interactive) return (await import('./pair.ts')).pair.run(argv, world)
    const { runScreens } = await import('../tui/main.tsx')
    await runScreens({
      table: world.table(),
      sampleShelf: sampleShelf(world),
      kept: anythingKept(world.env),
      colour: world.colour,
      spoken: world.env.INK_SCREEN_READER === 'true',
      now: world.now,
      store: () => openStore(world.env),
      settings: async () => {
        const { SettingsStore } = await import('../shelf/settings-store.ts')
        return new SettingsStore(homeOf(world.env))
      },
    })
    return answer('')
  },
}
