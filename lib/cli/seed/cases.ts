import { newId } from '@/lib/db/id'
import { demoPassword } from '@/lib/lab/rules'
import { draftCase } from '@/lib/shelf-case/commands/draft'
import { putCaseForward } from '@/lib/shelf-case/commands/put-forward'
import { signCase } from '@/lib/shelf-case/commands/sign'
import { computeFor } from '@/lib/shelf-case/queries/read'
import { newCase } from '@/lib/shelf-case/schema'
import { endStudy } from '@/lib/study/commands/change-study'
import { daysAgo, type Filling } from './context'

type Study = { id: string; code: string }

/** The finished long-term study with its signed case, and one case that waits for QA. */
export async function fillCases(
  filling: Filling,
  { finished, waiting }: { finished: Study; waiting: Study },
) {
  await signFinished(filling, finished)
  await putForward(filling, waiting, 4)
}

export async function signFinished(filling: Filling, finished: Study): Promise<void> {
  const { liv, rune } = filling.people
  const signed = await putForward(filling, finished, 30)
  await filling.act(rune, daysAgo(filling, 28, 16, 42), (trx) =>
    signCase(trx, rune, signed.code, {
      id: newId(),
      version: signed.version,
      contentSha256: signed.contentSha256!,
      meaning: 'approve',
      comment: '',
      password: demoPassword,
    }),
  )
  const study = await filling.db
    .selectFrom('study')
    .select('version')
    .where('id', '=', finished.id)
    .executeTakeFirstOrThrow()
  await filling.act(liv, daysAgo(filling, 27, 9), (trx, now) =>
    endStudy(
      trx,
      liv,
      finished.code,
      {
        version: study.version,
        reason: 'All pulls are read and the case is signed.',
      },
      now,
    ),
  )
}

async function putForward(filling: Filling, study: Study, days: number) {
  const { liv } = filling.people
  const { computed } = await computeFor(filling.db, liv, study.id, null)
  const draft = await filling.act(liv, daysAgo(filling, days, 15), (trx) =>
    draftCase(
      trx,
      liv,
      newCase.parse({
        id: newId(),
        studyId: study.id,
        kind: 'real time',
        proposedMonths: computed.supportedMonths,
        storageStatement: `closed, at or below ${computed.station.temperatureC} °C`,
      }),
    ),
  )
  return filling.act(liv, daysAgo(filling, days, 16), (trx) =>
    putCaseForward(trx, liv, draft.code, { version: draft.version }),
  )
}
