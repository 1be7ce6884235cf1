import { describe, expect, it } from 'vitest'
import { interrupt, resume, run } from '@/lib/cli/steps.mjs'
import { countPlaywright, countVitest } from '@/lib/cli/test-count.mjs'

const node = (code: string, options = {}) =>
  run(process.execPath, ['-e', code], { what: 'The program', ...options })

describe('running a command', () => {
  it('gives back what was printed, line by line while it comes', async () => {
    const seen: string[] = []
    const { stdout } = await node('console.log("one\\ntwo"); console.error("three")', {
      onLine: (line: string) => seen.push(line),
    })
    expect(stdout).toBe('one\ntwo\n')
    expect(seen.toSorted()).toEqual(['one', 'three', 'two'])
  })

  it('says what failed, with its last lines and what to do', async () => {
    const failing = node('console.error("no room on the disk"); process.exit(3)', { todo: 'Make room.' })
    await expect(failing).rejects.toMatchObject({
      message: 'The program ended with 3.',
      todo: 'Make room.',
      output: ['no room on the disk'],
    })
  })

  it('says that a program is not there', async () => {
    await expect(run('/no/such/program', [])).rejects.toThrow('/no/such/program could not be started')
  })

  it('ends what runs when interrupted, and starts nothing until resumed', async () => {
    const running = node('setInterval(() => {}, 1000)')
    interrupt()
    await expect(running).rejects.toThrow('The program ended with SIGTERM.')
    await expect(node('')).rejects.toThrow('was not started')
    resume()
    await expect(node('')).resolves.toMatchObject({ code: 0 })
  })
})

describe('counting tests', () => {
  it('counts a test file that does not load, and a test that did not run, as failed', () => {
    const report = {
      numTotalTests: 5,
      numPassedTests: 3,
      numFailedTests: 1,
      testResults: [
        { status: 'failed', assertionResults: [] },
        { status: 'failed', assertionResults: [{ status: 'failed' }, { status: 'passed' }] },
        { status: 'passed', assertionResults: [{ status: 'passed' }] },
      ],
    }
    expect(countVitest(report)).toEqual({ passed: 3, failed: 3 })
  })

  it('counts flaky and skipped browser tests and errors outside of tests as failed', () => {
    const stats = { expected: 7, unexpected: 1, flaky: 1, skipped: 1 }
    expect(countPlaywright({ stats, errors: [{}] })).toEqual({ passed: 7, failed: 4 })
  })
})
