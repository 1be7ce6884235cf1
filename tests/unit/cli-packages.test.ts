import { mkdtemp, mkdir, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { packagesAreCurrent } from '@/lib/cli/machine.mjs'

describe('whether the installed packages are those of the lock file', () => {
  let root = ''
  const wanted = {
    '': { version: '0.1.0' },
    'node_modules/a': { version: '1.0.0', integrity: 'sha512-a' },
    'node_modules/only-elsewhere': { version: '2.0.0', integrity: 'sha512-e', optional: true },
  }
  const installed = (packages: object) =>
    writeFile(path.join(root, 'node_modules/.package-lock.json'), JSON.stringify({ packages }))

  beforeEach(async () => {
    root = await mkdtemp(path.join(tmpdir(), 'with space '))
    await mkdir(path.join(root, 'node_modules'))
    await writeFile(path.join(root, 'package-lock.json'), JSON.stringify({ packages: wanted }))
  })
  afterEach(() => rm(root, { recursive: true }))

  it('says no before any install, and after one that was killed', async () => {
    expect(await packagesAreCurrent(root)).toBe(false)
  })

  it('says yes without the optional packages of other platforms', async () => {
    await installed({ 'node_modules/a': wanted['node_modules/a'] })
    expect(await packagesAreCurrent(root)).toBe(true)
  })

  it('says no for another version, another content and a missing package', async () => {
    await installed({ 'node_modules/a': { version: '1.0.1', integrity: 'sha512-a' } })
    expect(await packagesAreCurrent(root)).toBe(false)
    await installed({ 'node_modules/a': { version: '1.0.0', integrity: 'sha512-other' } })
    expect(await packagesAreCurrent(root)).toBe(false)
    await installed({})
    expect(await packagesAreCurrent(root)).toBe(false)
  })
})
