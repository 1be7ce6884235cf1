import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Page } from '@playwright/test'
import type { AxeResults, RunOptions } from 'axe-core'
import { expect } from './watch'

// Read once and handed to each page once: fetching the rules takes longer than most pages need to be checked with them.
const rules = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

type Part = { within?: string; rules?: string[] }
type WithAxe = { axe?: { run: (at: string | Document, options: RunOptions) => Promise<AxeResults> } }

/** Axe finds nothing on the page as it stands, in all of it and by all rules unless told otherwise. */
export async function expectAxeClean(page: Page, what: string, { within, rules: only }: Part = {}) {
  if (!(await page.evaluate(() => Boolean((window as WithAxe).axe)))) await page.evaluate(rules)
  const options: RunOptions = {
    // What is well is not told in full.
    resultTypes: ['violations'],
    ...(only && { runOnly: only }),
  }
  const found = await page.evaluate(
    async ({ at, options: how }) => {
      const { violations } = await (window as WithAxe).axe!.run(at ?? document, how)
      return violations.map(({ id, nodes }) => ({
        id,
        at: nodes.map((node) => `${node.target.join(' ')}: ${node.failureSummary}`),
      }))
    },
    { at: within, options },
  )
  expect(found, what).toEqual([])
}
