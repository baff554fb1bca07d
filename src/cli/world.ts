import { readFile, stat, writeFile } from 'node:fs/promises'
import { loadTable } from '../foods/load.ts'
import { plainText } from '../foods/plain-text.ts'
import { createFinder, type Finder } from '../foods/search.ts'
import type { Table } from '../foods/table.ts'
import { Refusal, type World } from './command.ts'
import { ownFoodsKept } from './kept.ts'

/** The largest file or standard input that is read: far more than any shelf. */
const READ_AT_MOST_BYTES = 5_000_000

const TOO_LARGE = `larger than ${READ_AT_MOST_BYTES / 1_000_000} MB, which no shelf is; give a smaller file`

/**
 * The real world: this process, its files and its terminal. The table and the finder are made once, when first asked
 * for; foods from packets, where the cook keeps any, stand behind the table's rows.
 */
export async function processWorld(process: NodeJS.Process): Promise<World> {
  const own = ownFoodsKept(process.env) ? await import('./own-foods.ts') : null
  const kept = own === null ? [] : await own.keptOwnFoods(process.env)
  let table: Table | undefined
  let finder: Finder | undefined
  const world: World = {
    env: process.env,
    columns: Math.max(40, Math.min(process.stdout.columns ?? 80, 120)),
    colour: wantsColour(process),
    interactive: Boolean(process.stdin.isTTY && process.stdout.isTTY),
    now: () => new Date(),
    readStdin: () => readAll(process.stdin),
    readFile: readTextFile,
    writeFile: writeTextFile,
    table: () => {
      table ??= own === null ? loadTable() : own.tableWith(loadTable(), kept)
      return table
    },
    finder: () => {
      finder ??= createFinder(world.table().foods)
      return finder
    },
  }
  return world
}

/** NO_COLOR (any value) wins, then FORCE_COLOR (0 or false is none), then whether stdout is a terminal that has colour. */
export function wantsColour(process: Pick<NodeJS.Process, 'env' | 'stdout'>): boolean {
  const { NO_COLOR, FORCE_COLOR, TERM } = process.env
  if (NO_COLOR !== undefined && NO_COLOR !== '') return false
  if (FORCE_COLOR !== undefined) return FORCE_COLOR !== '0' && FORCE_COLOR !== 'false'
  return Boolean(process.stdout.isTTY) && TERM !== 'dumb'
}

async function readAll(stream: NodeJS.ReadStream): Promise<string> {
  const chunks: Buffer[] = []
  let bytes = 0
  for await (const chunk of stream) {
    bytes += chunk.length
    if (bytes > READ_AT_MOST_BYTES) throw new Refusal(`standard input is ${TOO_LARGE}`)
    chunks.push(Buffer.from(chunk))
  }
  return Buffer.concat(chunks).toString('utf8')
}

const REASONS: Record<string, string> = {
  ENOENT: 'there is no such file',
  EISDIR: 'that is a folder, not a file',
  EACCES: 'you may not read or write it',
  EPERM: 'you may not read or write it',
  ENOTDIR: 'part of the path is not a folder',
  ENOSPC: 'the disk is full',
  EROFS: 'the disk can only be read',
  ENAMETOOLONG: 'the name is too long',
}

function fileRefusal(path: string, error: unknown): Refusal {
  const { code, message } = error as NodeJS.ErrnoException
  return new Refusal(`${plainText(path).slice(0, 200)}: ${REASONS[code ?? ''] ?? plainText(message)}`)
}

async function readTextFile(path: string): Promise<string> {
  try {
    const { size } = await stat(path)
    if (size > READ_AT_MOST_BYTES) throw new Refusal(`${plainText(path)}: ${TOO_LARGE}`)
    return await readFile(path, 'utf8')
  } catch (error) {
    throw error instanceof Refusal ? error : fileRefusal(path, error)
  }
}

async function writeTextFile(path: string, text: string): Promise<void> {
  try {
    await writeFile(path, text)
  } catch (error) {
    throw fileRefusal(path, error)
  }
}
