import { systemActor, type Actor } from '@/lib/auth/actor'
import { newId } from '@/lib/db/id'
import { transact } from '@/lib/db/transact'
import { assessSeries } from '@/lib/science/drift'
import type { TestDatabase } from './database'

const weekMs = 7 * 24 * 3600 * 1000
const times = [0, 13, 26, 39, 52]

/**
 * A study of two batches at 25 °C with five times of pH, falling by 0.004 a week from 5.50 with a fixed small
 * scatter: enough evidence for a case. Rows are laid directly, because only the case is under test here.
 */
export async function shelfStudy(t: TestDatabase, technician: Actor, clientId: string) {
  const ids = {
    study: newId(),
    station: newId(),
    place: newId(),
    version: newId(),
    batches: [newId(), newId()],
  }
  const startedAt = new Date(Date.now() - 53 * weekMs)
  const plan = {
    endWeeks: 52,
    fillG: 30,
    fillHeightMm: 40,
    lossPercent: 0,
    restHours: 0,
    retains: 0,
    initialJars: 0,
    pack: 'glass',
    stations: [
      {
        kind: 'temperature',
        temperatureC: 25,
        voice: 'decides',
        timePoints: times.slice(1),
        windowDays: 7,
        watchJars: 0,
        measuringJarsPerPull: 1,
        spares: 0,
      },
    ],
    attributes: [
      { attribute: 'ph', tolerance: { kind: 'range', lower: 5, upper: 6 }, replicates: 1, method: 'direct' },
    ],
  }
  await transact(t.db, systemActor(), { reason: 'test' }, async (trx) => {
    const [formula, formulaVersion, protocol] = [newId(), newId(), newId()]
    const createdBy = technician.personId
    await trx
      .insertInto('formula')
      .values({ id: formula, code: 'T1', name: 'test lotion', emulsionType: 'oil-in-water', createdBy })
      .execute()
    await trx
      .insertInto('formulaVersion')
      .values({ id: formulaVersion, formulaId: formula, number: 1, createdBy })
      .execute()
    await trx
      .insertInto('batch')
      .values(
        ids.batches.map((id, i) => ({
          id,
          code: `T1-${i + 1}`,
          formulaVersionId: formulaVersion,
          sizeG: 1000,
          createdBy,
        })),
      )
      .execute()
    await trx
      .insertInto('station')
      .values({ id: ids.station, name: 'room cabinet', kind: 'temperature', temperatureC: 25, walkOrder: 1 })
      .execute()
    await trx
      .insertInto('protocol')
      .values({ id: protocol, code: 'P-901', name: 'test', createdBy })
      .execute()
    await trx
      .insertInto('protocolVersion')
      .values({ id: ids.version, protocolId: protocol, number: 1, plan: JSON.stringify(plan), createdBy })
      .execute()
    await trx
      .insertInto('study')
      .values({
        id: ids.study,
        code: 'S-901',
        title: 'Test lotion, long-term',
        protocolVersionId: ids.version,
        plan: JSON.stringify(plan),
        clientId,
        isShared: true,
        startedAt: startedAt.toISOString(),
        startedOn: startedAt.toISOString().slice(0, 10),
        endWeeks: 52,
        fillG: 30,
        createdBy,
      })
      .execute()
    await trx
      .insertInto('studyBatch')
      .values(
        ids.batches.map((batchId, position) => ({ id: newId(), studyId: ids.study, batchId, position })),
      )
      .execute()
    await trx
      .insertInto('studyStation')
      .values({
        id: ids.place,
        studyId: ids.study,
        stationId: ids.station,
        position: 0,
        voice: 'decides',
        temperatureC: 25,
      })
      .execute()
    for (const [i, batchId] of ids.batches.entries()) {
      const rows = times.map((weeks, k) => ({
        id: newId(),
        studyId: ids.study,
        batchId,
        studyStationId: weeks === 0 ? null : ids.place,
        attribute: 'ph',
        value: Number((5.5 - 0.004 * weeks + [0.004, -0.006, 0.002, 0.005, -0.003][(k + i) % 5]!).toFixed(3)),
        typed: `5.${k}`,
        measuredAt: new Date(startedAt.getTime() + weeks * weekMs).toISOString(),
        recordedBy: technician.personId,
      }))
      await trx.insertInto('reading').values(rows).execute()
      const finding = assessSeries({
        attribute: 'ph',
        tolerance: { kind: 'range', lower: 5, upper: 6 },
        endTime: 52,
        repeatabilitySd: 0.03,
        isSeparation: false,
        initial: [rows[0]!.value],
        readings: rows.slice(1).map((row, k) => ({
          id: row.id,
          time: times[k + 1]!,
          day: row.measuredAt.slice(0, 10),
          jar: `${k}`,
          values: [row.value],
          doubts: [],
        })),
      })
      await trx
        .insertInto('series')
        .values({
          id: newId(),
          studyId: ids.study,
          batchId,
          studyStationId: ids.place,
          attribute: 'ph',
          standing: finding.standing,
          used: finding.used,
          finding: JSON.stringify(finding),
        })
        .execute()
    }
  })
  return ids
}
