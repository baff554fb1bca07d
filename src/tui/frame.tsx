import { Text } from 'ink'

/** One screen: lines that are already fitted to the terminal. */
export function Frame({ lines }: { lines: readonly string[] }) {
  return <Text>{lines.join('\n')}</Text>
}
