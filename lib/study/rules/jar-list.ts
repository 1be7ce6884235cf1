import type { JarRow } from '@/lib/jar/queries/jars'
import { namedJar } from '@/lib/jar/rules/code'
import { choice, describeList } from '@/lib/list/schema'
import { degrees } from './finding'
import { withVariant } from './words'

export const kindWords: Record<string, string> = {
  watch: 'watch jar',
  measuring: 'measuring jar',
  spare: 'spare',
  retain: 'retain',
}

export const jarList = describeList<JarRow>()({
  name: 'jars',
  sort: 'place',
  columns: [
    { key: 'code', title: 'jar', sort: 'text', value: nameOf },
    { key: 'kind', title: 'kind', sort: 'text', value: kindOf },
    { key: 'batch', title: 'batch', sort: 'text', value: (jar) => jar.batchCode },
    { key: 'station', title: 'station', sort: 'number', value: stationOf },
    { key: 'state', title: 'state', sort: 'text', value: (jar) => jar.state },
    {
      key: 'place',
      title: 'place',
      sort: 'text',
      value: (jar) => (jar.shelf === null ? '' : `shelf ${jar.shelf}, place ${jar.place}`),
    },
    { key: 'next', title: 'asked for next', kind: 'day', sort: 'day', value: (jar) => jar.nextDueOn },
    { key: 'fill', title: 'fill, g', kind: 'number', sort: 'number', value: fillOf },
    {
      key: 'tare',
      title: 'tare, g',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (jar) => jar.tareG,
    },
    {
      key: 'gross',
      title: 'gross, g',
      kind: 'number',
      sort: 'number',
      isExtra: true,
      value: (jar) => jar.grossG,
    },
    {
      key: 'height',
      title: 'filled to, mm',
      kind: 'number',
      isExtra: true,
      value: (jar) => jar.fillHeightMm,
    },
  ],
  filters: {
    station: choice('Station'),
    batch: choice('Batch'),
    kind: choice('Kind', Object.keys(kindWords)),
    state: choice('State', ['stored', 'pulled', 'resting', 'spent', 'kept', 'lost']),
  },
})

export function nameOf(jar: JarRow): string {
  return namedJar(
    jar.code,
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw },
  )
}

export function kindOf(jar: JarRow): string {
  return jar.setAsideFor ? `for ${jar.setAsideFor}` : (kindWords[jar.kind] ?? jar.kind)
}

export function fillOf(jar: JarRow): number | null {
  return jar.grossG === null || jar.tareG === null ? null : Number((jar.grossG - jar.tareG).toFixed(2))
}

/** Where it stands, or why it stands nowhere. */
export function stationOf(jar: JarRow): string {
  if (jar.studyStationId === null) return jar.kind === 'retain' ? 'retains' : 'opened at the start'
  return withVariant(placeName(jar), jar.variant ?? '')
}

function placeName(jar: JarRow): string {
  if (jar.isFreezeThaw) return `freeze-thaw, ${jar.stationName}`
  return jar.temperatureC === null
    ? (jar.stationName ?? '')
    : `${degrees(jar.temperatureC)}, ${jar.stationName}`
}
