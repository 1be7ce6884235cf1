import { createHash } from 'node:crypto'
import { canonicalJson } from '@/lib/shelf-case/rules/canonical'

export type SignedFacts = {
  shelfCaseId: string
  personId: string
  personName: string
  meaning: string
  comment: string
  contentSha256: string
  zone: string
  signedAt: string
}

/**
 * SHA-256 over what the signature says: who, when, meaning, case and content. Moving a signature to another
 * case, or changing any of it below the application, makes it no longer come out.
 */
export function signatureHash(facts: SignedFacts, caseCode: string): string {
  const { shelfCaseId, personId, personName, meaning, comment, contentSha256, zone, signedAt } = facts
  const signed = {
    caseCode,
    shelfCaseId,
    personId,
    personName,
    meaning,
    comment,
    contentSha256,
    zone,
    signedAt,
  }
  return createHash('sha256').update(canonicalJson(signed), 'utf8').digest('hex')
}
