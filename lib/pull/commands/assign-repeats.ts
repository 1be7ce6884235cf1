import type { Trx } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { namedJar } from '@/lib/jar/rules/code'
import type { WantedFlag } from '@/lib/flag/rules/wanted'
import type { Frame, FrameSpare } from '@/lib/series/queries/frame'
import type { AssignedRepeat } from '../schema'

type Wish = { want: WantedFlag; pullId: string; repeatOf: string; spare: FrameSpare | null }

/**
 * A spare jar of the same batch and station for each reading beyond the band, and a third where two differ, in the
 * pull they belong to. The flag's sentence says which jar, or that none is left.
 */
export async function assignRepeats(
  trx: Trx,
  frame: Frame,
  wanted: readonly WantedFlag[],
): Promise<{ wanted: WantedFlag[]; repeats: AssignedRepeat[] }> {
  const spares = [...frame.study.spares]
  const wishes = wanted.flatMap((want) => wishOf(frame, want, spares))
  const given = wishes.flatMap(({ want, pullId, repeatOf, spare }) =>
    spare ? [{ id: newId(), want, pullId, repeatOf, spare }] : [],
  )
  if (given.length > 0) {
    await trx
      .insertInto('pullJar')
      .values(
        given.map(({ id, want, pullId, repeatOf, spare }) => ({
          id,
          pullId,
          repeatOf,
          jarId: spare.id,
          studyId: frame.study.id,
          asks: 'repeat',
          attribute: want.attribute,
        })),
      )
      .execute()
  }
  return {
    wanted: wanted.map((want) => {
      const wish = wishes.find((one) => one.want === want)
      return wish ? withJar(frame, want, wish.spare) : want
    }),
    repeats: given.map(({ id, want, spare }) => ({
      pullJarId: id,
      jarCode: spare.code,
      name: nameOf(frame, spare),
      shelf: spare.shelf,
      place: spare.place,
      attribute: want.attribute,
    })),
  }
}

function wishOf(frame: Frame, want: WantedFlag, spares: FrameSpare[]): Wish[] {
  const wantsThird = want.evidence['wants'] !== undefined
  if (want.level !== 'doubt' || !(want.rule === 'out' || wantsThird)) return []
  const reading = frame.readings.find((row) => row.id === want.readingId)
  if (!reading?.pullJarId || !reading.pullId) return []
  const repeatOf = reading.repeatOf ?? reading.pullJarId
  const given = frame.study.repeats.filter(
    (repeat) => repeat.repeatOf === repeatOf && repeat.state !== 'missed',
  )
  if (given.filter((repeat) => repeat.attribute === want.attribute).length >= (wantsThird ? 2 : 1)) return []
  const { pullId } = reading
  const index = spares.findIndex(
    (spare) =>
      spare.batchId === want.batchId &&
      spare.studyStationId === want.studyStationId &&
      !spare.missedIn.includes(pullId),
  )
  const [spare = null] = index === -1 ? [] : spares.splice(index, 1)
  return [{ want, pullId, repeatOf, spare }]
}

function withJar(frame: Frame, want: WantedFlag, spare: FrameSpare | null): WantedFlag {
  if (!spare) return { ...want, sentence: `${want.sentence} No spare jar is left there.` }
  const place = spare.shelf === null ? '' : `, shelf ${spare.shelf}, place ${spare.place}`
  const name = nameOf(frame, spare)
  return {
    ...want,
    sentence: `${want.sentence} The spare jar is ${name}${place}.`,
    evidence: { ...want.evidence, repeatJar: name },
  }
}

function nameOf(frame: Frame, spare: FrameSpare): string {
  const station = frame.study.stations.find((one) => one.id === spare.studyStationId)
  return namedJar(spare.code, station ?? null)
}
