import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { renderReport } from '@/lib/report/document/report'
import { findTopic } from '@/lib/science/calc/topics'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'
import type { CaseContent } from '@/lib/shelf-case/rules/content'
import { calculationsOf, figuresOf, isSame } from '@/lib/shelf-case/rules/recheck'
import { pdfText } from '../support/pdf-text'

// The bytes of a case that the demo froze and signed before format 2: what is frozen is never rewritten.
const bytes = readFileSync('fixtures/reference/frozen-case-1.txt', 'utf8')
const contentSha256 = '587f581bf52ca323f2740d76836525da95780f6ac8956bc5c95e436763fe4113'
const content = JSON.parse(bytes) as CaseContent

describe('a case frozen in format 1', () => {
  it('still verifies: the same bytes under the same SHA-256', () => {
    expect(createHash('sha256').update(bytes, 'utf8').digest('hex')).toBe(contentSha256)
    expect(canonicalJson(content)).toBe(bytes)
  })

  it('is still computed again in every digit', async () => {
    for (const { where, topic, input, output } of calculationsOf(content)) {
      const calc = await findTopic(topic)
      expect(canonicalJson(calc!.run(input)), where).toBe(canonicalJson(output))
    }
    expect(calculationsOf(content)).toHaveLength(5)
    expect(figuresOf(content).filter((one) => !isSame(one))).toEqual([])
  })

  it('still prints', async () => {
    const pages = pdfText(await renderReport({ content, contentSha256, signatures: [] }))
    expect(pages[0]).toContain('Body lotion L2, long-term')
    expect(pages[1]!.replace(/\s+/g, ' ')).toContain(
      'Viscosity 21 common line −0.06 % 0.487 0.810 past 60 all',
    )
    expect(pages.join(' ')).toContain('Mean kinetic temperature')
  }, 30_000)
})
