import { spawn, type ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { claimFolder, isServed } from '@/lib/cli/run-record.mjs'

describe('the record of what runs for a folder', () => {
  let folder = ''
  let child: ChildProcess
  const file = () => path.join(folder, 'run.json')

  beforeEach(async () => {
    folder = await mkdtemp(path.join(tmpdir(), 'stillstand-run-'))
    child = spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)'], {
      detached: true,
      stdio: 'ignore',
    })
    await once(child, 'spawn')
  })
  afterEach(async () => {
    if (child.exitCode === null && child.signalCode === null) child.kill('SIGKILL')
    await rm(folder, { recursive: true })
  })

  /** What a start with this process number and these children leaves behind when it is killed. */
  async function leaveRecord(change: (record: { pid: number; born: string; children: unknown[] }) => void) {
    const record = await claimFolder(folder)
    record.add('web server', child.pid)
    record.serves('http://127.0.0.1:3000')
    const written = JSON.parse(await readFile(file(), 'utf8'))
    change(written)
    await writeFile(file(), JSON.stringify(written))
  }

  it('refuses a second start while the first one lives, and says where it is and how to stop it', async () => {
    await leaveRecord((record) => Object.assign(record, record.children[0]))
    await expect(claimFolder(folder)).rejects.toMatchObject({
      message: `Stillstand runs from this folder already at http://127.0.0.1:3000 (process ${child.pid}).`,
      todo: expect.stringContaining(`kill ${child.pid}`),
    })
    expect(isServed(folder)).toBe(true)
    expect(child.exitCode).toBeNull()
  })

  it('ends the children that a killed start left', async () => {
    await leaveRecord((record) => (record.born = 'long ago'))
    const ended = once(child, 'exit')
    await claimFolder(folder)
    expect(await ended).toEqual([null, 'SIGTERM'])
  })

  it('leaves a stranger alone that got the number of a process of ours', async () => {
    await leaveRecord((record) => {
      record.born = 'long ago'
      record.children = [{ name: 'web server', pid: child.pid, born: 'long ago' }]
    })
    await claimFolder(folder)
    expect(child.exitCode).toBeNull()
    expect(child.signalCode).toBeNull()
  })

  it('takes a record that was cut short for none', async () => {
    await writeFile(file(), '{"pid": 1')
    const record = await claimFolder(folder)
    expect(isServed(folder)).toBe(true)
    record.release()
    expect(isServed(folder)).toBe(false)
  })
})
