import { spawn, spawnSync } from 'node:child_process'
import { cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { symlinkSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'

const root = path.resolve(import.meta.dirname, '../..')
const input = '{"rpm":3000,"radiusMm":100}'
const answer = { rcf: 1.118e-6 * 100 * 3000 ** 2 }

/** A project of its own with the same sources and packages, where the cache and the sources may be spoilt. */
let project = ''
let cache = ''
beforeAll(() => {
  project = mkdtempSync(path.join(tmpdir(), 'calc start '))
  cache = path.join(project, 'node_modules/.cache')
  for (const name of [
    'lib/cli/calc.mjs',
    'lib/cli/calc.ts',
    'lib/science',
    'package-lock.json',
    'package.json',
  ]) {
    cpSync(path.join(root, name), path.join(project, name), { recursive: true })
  }
  const modules = path.join(root, 'node_modules')
  mkdirSync(path.join(project, 'node_modules'))
  for (const name of readdirSync(modules).filter((entry) => !entry.startsWith('.'))) {
    symlinkSync(path.join(modules, name), path.join(project, 'node_modules', name))
  }
})
beforeEach(() => rmSync(cache, { recursive: true, force: true }))
afterAll(() => rmSync(project, { recursive: true }))

const calc = () =>
  spawnSync(process.execPath, [path.join(project, 'lib/cli/calc.mjs'), 'centrifuge'], {
    input,
    encoding: 'utf8',
  })
const scripts = () => readdirSync(path.join(cache, 'calc'))

describe('how calc starts', { timeout: 60_000 }, () => {
  it('answers from nothing, and then from what it kept', () => {
    for (const run of ['first', 'second']) {
      const { status, stdout, stderr } = calc()
      expect({ run, status, stderr }).toEqual({ run, status: 0, stderr: '' })
      expect(JSON.parse(stdout)).toEqual(answer)
    }
    expect(scripts()).toHaveLength(1)
  })

  it('follows a change of the sources at once, and keeps nothing old', () => {
    calc()
    const before = scripts()
    const source = path.join(project, 'lib/science/centrifuge.ts')
    const text = readFileSync(source, 'utf8')
    writeFileSync(source, text.replace('1.118e-6', '2.236e-6'))
    expect(JSON.parse(calc().stdout)).toEqual({ rcf: 2 * answer.rcf })
    expect(scripts()).toHaveLength(1)
    expect(scripts()).not.toEqual(before)
    writeFileSync(source, text)
  })

  it('answers several at the same moment', async () => {
    const outputs = await Promise.all(
      Array.from({ length: 3 }, () => {
        const child = spawn(process.execPath, [path.join(project, 'lib/cli/calc.mjs'), 'centrifuge'])
        child.stdin.end(input)
        let stdout = ''
        child.stdout.on('data', (chunk: Buffer) => (stdout += chunk.toString()))
        return new Promise<string>((resolve) => child.on('close', () => resolve(stdout)))
      }),
    )
    for (const stdout of outputs) expect(JSON.parse(stdout)).toEqual(answer)
    expect(scripts()).toHaveLength(1)
  })

  it('answers where nothing can be kept', () => {
    writeFileSync(cache, 'a file where the folder would be')
    expect(JSON.parse(calc().stdout)).toEqual(answer)
    expect(existsSync(path.join(cache, 'calc'))).toBe(false)
  })
})
