import type { Mail } from '@/lib/mail/send'
import { instantText } from '@/lib/report/rules'

type Facts = {
  code: string
  proposedMonths: number | null
  storageStatement: string
  studyCode: string
  studyTitle: string
  putForwardByName: string
}
type Signature = {
  personName: string
  meaning: string
  signedAt: string
  zone: string
  comment: string
} | null

export function caseMail(
  person: { name: string; email: string },
  event: 'put forward' | 'sent back' | 'signed',
  facts: Facts,
  signature: Signature,
  link: string,
): Mail {
  const what = `${facts.proposedMonths} months for ${facts.studyTitle} (study ${facts.studyCode}), ${facts.storageStatement}`
  const signed = signature
    ? `${signature.personName}, ${instantText(signature.signedAt, signature.zone)}, meaning: ${signature.meaning}.${signature.comment ? `\n“${signature.comment}”` : ''}`
    : ''
  const body = {
    'put forward': `${facts.putForwardByName} puts a shelf life forward: ${what}.\n\nIt waits for a signature. Who logged a reading in the study cannot sign it.`,
    'sent back': `The case was sent back: ${what}.\n\n${signed}`,
    signed: `The shelf life is signed: ${what}.\n\n${signed}`,
  }[event]
  return {
    to: person.email,
    subject: `Case ${facts.code} ${event === 'put forward' ? 'waits for a signature' : `is ${event}`}`,
    text: `${person.name},\n\n${body}\n\n${link}\n`,
  }
}
