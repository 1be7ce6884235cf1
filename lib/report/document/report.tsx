import { createElement, type ReactElement } from 'react'
import { Document, renderToBuffer } from '@react-pdf/renderer'
import { registerFonts } from '@/lib/report/document/fonts'
import { FirstPage } from '@/lib/report/document/first-page'
import { PageFrame } from '@/lib/report/document/page-frame'
import { EvidencePages } from '@/lib/report/document/evidence-pages'
import { ReadingPages } from '@/lib/report/document/reading-pages'
import type { CaseContent } from '@/lib/shelf-case/rules/content'

export type ReportInput = {
  content: CaseContent
  contentSha256: string
  signatures: {
    id: string
    personName: string
    meaning: string
    comment: string
    zone: string
    signedAt: string
  }[]
}

/**
 * The report from the frozen content and its signatures alone. The same input gives the same bytes: the
 * document's own dates are those of the last signature, and nothing else in it knows the time.
 */
export async function renderReport(input: ReportInput): Promise<Uint8Array> {
  registerFonts()
  const at = new Date(input.signatures.at(-1)?.signedAt ?? input.content.putForward.at)
  const { code } = input.content.case
  const page = (key: string, content: ReactElement) =>
    createElement(PageFrame, { code, key, isInvented: input.content.isInvented }, content)
  const document = createElement(
    Document,
    {
      title: `Shelf-life report, case ${code}`,
      author: input.content.lab.name,
      subject: `SHA-256 ${input.contentSha256}`,
      creator: 'Stillstand',
      producer: 'Stillstand',
      language: 'en',
      creationDate: at,
      modificationDate: at,
    },
    page('first', createElement(FirstPage, input)),
    page('evidence', createElement(EvidencePages, { content: input.content })),
    page('readings', createElement(ReadingPages, { content: input.content })),
  )
  return new Uint8Array(await renderToBuffer(document))
}
