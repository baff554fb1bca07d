import type { Food } from './food.ts'

/**
 * Foods by id, from the lines of the table's file, each read when it is first asked for: a command that works on a
 * shelf of thirty foods does not pay for five hundred. Going through all of them reads all.
 */
export class LazyFoods extends Map<string, Food> {
  private readonly unread: Map<string, string>

  constructor(lines: readonly string[]) {
    super()
    this.unread = new Map(lines.map(line => [idOf(line), line]))
  }

  override get(id: string): Food | undefined {
    const line = this.unread.get(id)
    if (line !== undefined) {
      this.unread.delete(id)
      super.set(id, JSON.parse(line) as Food)
    }
    return super.get(id)
  }

  override has(id: string): boolean {
    return this.unread.has(id) || super.has(id)
  }

  override get size(): number {
    return super.size + this.unread.size
  }

  override entries() {
    this.readAll()
    return super.entries()
  }

  override values() {
    this.readAll()
    return super.values()
  }

  override keys() {
    this.readAll()
    return super.keys()
  }

  override forEach(visit: (food: Food, id: string, map: Map<string, Food>) => void): void {
    this.readAll()
    super.forEach(visit)
  }

  override [Symbol.iterator]() {
    return this.entries()
  }

  private readAll(): void {
    for (const id of [...this.unread.keys()]) this.get(id)
  }
}

/** Each line of the file begins with its food's id. */
function idOf(line: string): string {
  const start = '{"id":"'.length
  return line.slice(start, line.indexOf('"', start))
}
