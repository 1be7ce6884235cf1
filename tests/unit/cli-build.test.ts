import { mkdtemp, mkdir, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { hashSources, isBuilt } from '@/lib/cli/build.mjs'

describe('whether the build is that of the sources', () => {
  let root = ''
  const write = async (file: string, content: string) => {
    await mkdir(path.dirname(path.join(root, file)), { recursive: true })
    await writeFile(path.join(root, file), content)
  }

  beforeEach(async () => {
    root = await mkdtemp(path.join(tmpdir(), 'with space '))
    await write('app/page.tsx', 'one')
    await write('.next/BUILD_ID', 'x')
    await write('.next/built-from', await hashSources(root))
  })
  afterEach(() => rm(root, { recursive: true }))

  it('holds while nothing changes', async () => {
    expect(await isBuilt(root)).toBe(true)
  })

  it('notices a changed, a moved and a new file', async () => {
    await write('app/page.tsx', 'two')
    expect(await isBuilt(root)).toBe(false)
    await rm(path.join(root, 'app/page.tsx'))
    await write('app/other.tsx', 'one')
    expect(await isBuilt(root)).toBe(false)
    await rm(path.join(root, 'app/other.tsx'))
    await write('app/page.tsx', 'one')
    expect(await isBuilt(root)).toBe(true)
    await write('lib/new.ts', '')
    expect(await isBuilt(root)).toBe(false)
  })

  it('does not take a build that was killed for a whole one', async () => {
    await rm(path.join(root, '.next/BUILD_ID'))
    expect(await isBuilt(root)).toBe(false)
  })
})
