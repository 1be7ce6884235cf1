import { createHash } from 'node:crypto'
import { signatureBelongs } from '@/lib/shelf-case/queries/read'
import type { Check } from './check'

/** A case's content is what its hash says, and each signature is over that content and its own facts. */
export const signatures: Check = {
  name: 'Frozen cases and their signatures',
  run: async (db) => {
    const cases = await db
      .selectFrom('shelfCase')
      .select(['id', 'code', 'content', 'contentSha256'])
      .where('content', 'is not', null)
      .orderBy('code')
      .execute()
    const signed = await db
      .selectFrom('signature')
      .select([
        'shelfCaseId',
        'personId',
        'personName',
        'meaning',
        'comment',
        'contentSha256',
        'zone',
        'signedAt',
        'signatureSha256',
      ])
      .execute()
    const found: string[] = []
    for (const { id, code, content, contentSha256 } of cases) {
      const hash = createHash('sha256')
        .update(content ?? '', 'utf8')
        .digest('hex')
      if (hash !== contentSha256) found.push(`The content of case ${code} does not match its hash.`)
      for (const signature of signed.filter((one) => one.shelfCaseId === id))
        if (!signatureBelongs(signature, code, hash))
          found.push(
            `The signature of ${signature.personName} does not belong to the content of case ${code}.`,
          )
    }
    return found
  },
}
