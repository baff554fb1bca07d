import { spawnSync } from 'node:child_process'
import { mkdtempSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'

const program = new URL('../../dist/shortstave.js', import.meta.url).pathname
const folder = mkdtempSync(join(tmpdir(), 'shortstave-test-'))

/** Runs the bundled program as a shell would, without a terminal. */
function run(args: string[], options: { input?: string | Buffer; env?: Record<string, string> } = {}) {
  const { status, signal, stdout, stderr } = spawnSync(process.execPath, [program, ...args], {
    input: options.input ?? '',
    env: { PATH: process.env.PATH, HOME: folder, SHORTSTAVE_HOME: join(folder, 'home'), ...options.env },
    timeout: 20_000,
    maxBuffer: 64_000_000,
  })
  return { status, signal, out: stdout.toString(), err: stderr.toString() }
}

describe('the bundled program', () => {
  it('works out three different pairings from the sample shelf', () => {
    const { status, out } = run(['pair', '--json'])
    expect(status).toBe(0)
    const { pairings, reached } = JSON.parse(out)
    expect(reached).toBe(true)
    expect(pairings).toHaveLength(3)
    const sets = pairings.map((pairing: { items: { food: string }[] }) =>
      pairing.items
        .map(item => item.food)
        .sort()
        .join(),
    )
    expect(new Set(sets).size).toBe(3)
  })

  it('without a command and without a terminal says what the screens would open with', () => {
    const { status, out } = run([])
    expect(status).toBe(0)
    expect(out).toContain('DIAAS')
  })

  it('writes no escape sequence when it is piped, and some under FORCE_COLOR', () => {
    const plain = run(['pair'])
    expect(plain.out).not.toContain('\u001b')
    expect(run(['pair'], { env: { FORCE_COLOR: '1' } }).out).toContain('\u001b[')
    expect(run(['pair'], { env: { FORCE_COLOR: '1', NO_COLOR: '1' } }).out).not.toContain('\u001b')
  })

  it('ends quietly when the reader closes the pipe', () => {
    const { stdout, stderr } = spawnSync(
      'sh',
      ['-c', `"${process.execPath}" "${program}" foods --json | head -c 10; echo "status $?"`],
      { env: { PATH: process.env.PATH, HOME: folder } },
    )
    expect(stdout.toString()).toContain('status 0')
    expect(stderr.toString()).toBe('')
  })

  it('refuses 10 MB of noise on standard input in one line', () => {
    const noise = Buffer.alloc(10_000_000)
    for (let i = 0; i < noise.length; i++) noise[i] = (i * 2654435761) >>> 24
    const { status, out, err } = run(['pair', '--shelf', '-'], { input: noise })
    expect(status).toBe(2)
    expect(out).toBe('')
    expect(err.trim().split('\n')).toHaveLength(1)
  })

  it('refuses a 10 MB file, a folder and a missing file in one line each', () => {
    const large = join(folder, 'large.csv')
    writeFileSync(large, 'food,grams\n'.repeat(1_000_000))
    for (const path of [large, folder, join(folder, 'none.csv')]) {
      const { status, err } = run(['pair', '--shelf', path])
      expect(status).toBe(2)
      expect(err.trim().split('\n')).toHaveLength(1)
      expect(err).not.toContain('    at ')
    }
  })

  it('gives help for the program and for every command', () => {
    const overview = run(['--help'])
    expect(overview.status).toBe(0)
    for (const [, name] of overview.out.matchAll(/^ {2}shortstave (\w+)/gm)) {
      const help = run([name!, '--help'])
      expect(help.status).toBe(0)
      expect(help.out).toContain(`usage: shortstave ${name}`)
    }
  })
})
