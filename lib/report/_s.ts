import { renderReport } from '@/lib/report/document/report'
import { attributeEvidence } from '@/lib/shelf-case/rules/attribute'
import { assessSeries } from '@/lib/science/drift'
import { extrapolationCap } from '@/lib/science/extrapolation-cap'
import { createHash } from 'node:crypto'
import { writeFileSync } from 'node:fs'
const times = [0, 13, 26, 39, 52, 78, 104]
const tol = { kind: 'percent', below: 20, above: 20 } as const
const mk = (name: string, off: number) => {
  const obs = times.map((t, i) => ({
    weeks: t,
    value: 62000 * (1 - 0.0013 * t) * (1 + off * Math.sin(i * 3 + off * 1000)),
  }))
  const finding = assessSeries({
    attribute: 'viscosity',
    tolerance: tol,
    endTime: 156,
    repeatabilitySd: 2000,
    isSeparation: false,
    initial: [obs[0]!.value],
    readings: obs.slice(1).map((o, i) => ({
      id: `${i}`,
      time: o.weeks,
      day: `d${i}`,
      jar: `${i}`,
      values: [o.value],
      doubts: [],
    })),
  })
  return { batch: name, finding, observations: obs }
}
const cap = {
  input: {
    dataMonths: 24,
    storage: 'room',
    acceleratedChange: false,
    intermediateChange: false,
    variable: true,
    statistics: true,
  } as const,
  output: extrapolationCap({
    dataMonths: 24,
    storage: 'room',
    acceleratedChange: false,
    intermediateChange: false,
    variable: true,
    statistics: true,
  }),
  why: 'Six months at 40 °C without significant change.',
}
const a = attributeEvidence(
  { attribute: 'viscosity', tolerance: tol, replicates: 1, method: 'x' },
  [mk('L1-1', 0.01), mk('L1-2', 0.012), mk('L1-3', 0.008)],
  cap.output.capMonths,
)
console.log(JSON.stringify(a.calc?.output, null, 1).slice(0, 900), a.supportedMonths)
const months = [0, 3, 6, 9, 12, 18, 24]
const shelf = (label: string, t: number | null, b: string, f: number, ft = false) => ({
  label,
  temperatureC: t,
  isFreezeThaw: ft,
  voice: 'decides',
  batch: b,
  jars: (ft ? [0, 1, 2, 3] : t === 40 ? [0, 3, 6] : months).map((m) => ({
    months: m,
    topPercent: f * m * 0.3,
    bottomPercent: f * m * 0.7,
    percent: f * m,
    standing: f * m > 8 ? 'out' : f * m > 4 ? 'leaning' : 'steady',
  })),
})
const content: any = {
  format: 'stillstand-case-1',
  lab: { name: 'Fernhollow Bench', timeZone: 'Europe/Berlin' },
  case: { code: 'C-007', kind: 'real time' },
  study: {
    code: 'S-003',
    title: 'Oil-in-water lotion L1',
    startedOn: '2024-11-04',
    lastReadOn: '2026-11-04',
    endWeeks: 156,
  },
  batches: ['L1-1', 'L1-2', 'L1-3'].map((code) => ({
    code,
    formula: 'Lotion, version 2',
    emulsionType: 'oil-in-water',
    madeOn: '2024-11-01',
  })),
  station: { name: 'cabinet 25', temperatureC: 25, voice: 'decides', timePointsMonths: months },
  proposal: {
    months: 24,
    storageStatement: 'closed, at or below 25 °C',
    whyFewer: 'So that the pack keeps a date.',
    provisionalRule: '',
    reviewOn: null,
    periodAfterOpeningMonths: null,
    periodAfterOpeningEvidence: '',
  },
  supportedMonths: 33,
  limitingAttribute: 'viscosity',
  dataMonths: 24,
  cap,
  attributes: [a],
  shelves: [
    shelf('25', 25, 'L1-1', 0.02),
    shelf('25', 25, 'L1-2', 0.03),
    shelf('25', 25, 'L1-3', 0.01),
    shelf('40', 40, 'L1-1', 1.5),
    shelf('freeze-thaw', null, 'L1-1', 0.2, true),
  ],
  temperatureRecord: null,
  weakens: [
    {
      state: 'stands',
      title: 'Some months may lie past the data',
      text: 'The data end at month 24.',
      by: null,
    },
  ],
  missing: [],
  readings: Array.from({ length: 80 }, (_, i) => ({
    batch: 'L1-1',
    station: 'cabinet 25',
    jar: 'K7R2M',
    weeks: i,
    attribute: 'viscosity',
    replicate: 1,
    typed: '36,8',
    value: 41600,
    word: null,
    measuredAt: '2025-01-01T10:00:00.000Z',
    recordedAt: '2025-01-01T10:00:00.000Z',
    by: 'MA',
    state: i === 5 ? 'superseded' : 'counts',
    reason: i === 6 ? 'Spindle touched the wall' : null,
  })),
  putForward: { by: 'Liv Brannock', initials: 'LB', at: '2026-11-25T10:00:00.000Z' },
}
const sha = createHash('sha256').update('x').digest('hex')
for (let i = 0; i < 2; i++) {
  const t = Date.now()
  const b = await renderReport({
    content,
    contentSha256: sha,
    signatures: [
      {
        id: '1',
        personName: 'Rune Tarrow',
        meaning: 'approve',
        comment: '',
        zone: 'Europe/Berlin',
        signedAt: '2026-11-30T15:42:07.000Z',
      },
    ],
  })
  console.log(b.length, createHash('sha256').update(b).digest('hex').slice(0, 12), Date.now() - t)
  writeFileSync('/tmp/lead/r.pdf', b)
}
