import type { JarRow } from '@/lib/jar/queries/jars'
import { namedJar } from '@/lib/jar/rules/code'
import { spokenDay } from '@/lib/study/rules/calendar'

type Labelled = Pick<
  JarRow,
  | 'code'
  | 'kind'
  | 'setAsideFor'
  | 'studyCode'
  | 'batchCode'
  | 'startedOn'
  | 'shelf'
  | 'place'
  | 'temperatureC'
> &
  Pick<JarRow, 'isFreezeThaw' | 'stationName' | 'studyStationId' | 'variant'> &
  Partial<Pick<JarRow, 'isReference'>>

/** What a person reads on a label: the code with its station, then the lines, what matters most first. */
export function labelWords(jar: Labelled, ownPack: string | null): { code: string; lines: string[] } {
  const station =
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw }
  return {
    code: namedJar(jar.code, station),
    lines: [
      `${jar.studyCode}, ${jar.batchCode}${jar.isReference ? ', a reference' : ''}`,
      kindOf(jar),
      ...howOf(jar, ownPack),
      whereOf(jar),
      spokenDay(jar.startedOn),
    ].filter((line) => line !== ''),
  }
}

const kindWords: Record<string, string> = {
  watch: 'watch, stays sealed',
  measuring: 'measuring',
  spare: 'spare',
  retain: 'retain',
}

function kindOf({ kind, setAsideFor }: Labelled): string {
  return setAsideFor ? `for ${setAsideFor}` : (kindWords[kind] ?? kind)
}

/** How the jar lies or stands, in light or foil, and in which pack: whoever puts it back must know. */
function howOf({ variant }: Labelled, ownPack: string | null): string[] {
  const parts = (variant ?? '').split(', ').filter((part) => part !== '')
  const isOwnPack = parts.includes('own pack')
  const light = parts.includes('wrapped in foil') ? 'in foil' : parts.includes('in light') ? 'in light' : null
  const stands = parts.filter((part) => !['own pack', 'wrapped in foil', 'in light'].includes(part))
  const how = [...stands, light].filter((part) => part !== null).join(', ')
  return [how.charAt(0).toUpperCase() + how.slice(1), isOwnPack ? (ownPack ?? 'own pack') : '']
}

/** Its temperature stands before the code already. */
function whereOf(jar: Labelled): string {
  if (jar.studyStationId === null) return jar.kind === 'retain' ? 'retain cupboard' : 'opened at the start'
  const name = jar.stationName ?? ''
  return jar.shelf === null ? name : `${jar.shelf}/${jar.place}, ${name}`
}
