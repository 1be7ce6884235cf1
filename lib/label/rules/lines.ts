import type { JarRow } from '@/lib/jar/queries'
import { namedJar } from '@/lib/jar/rules'
import { spokenDay } from '@/lib/study/rules/calendar'
import { degrees } from '@/lib/study/rules/finding'

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
  Pick<JarRow, 'isFreezeThaw' | 'stationName' | 'studyStationId' | 'variant'>

/** What a person reads on a label: the code with its station, then the lines, what matters most first. */
export function labelWords(jar: Labelled, ownPack: string | null): { code: string; lines: string[] } {
  const station =
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw }
  return {
    code: namedJar(jar.code, station),
    lines: [
      `${jar.studyCode}, ${jar.batchCode}`,
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

/** How the jar lies or stands, in which pack, in light or foil: whoever puts it back must know. */
function howOf({ variant }: Labelled, ownPack: string | null): string[] {
  if (!variant) return []
  const words = ownPack ? variant.replace('own pack', ownPack) : variant
  return [words.charAt(0).toUpperCase() + words.slice(1)]
}

function whereOf(jar: Labelled): string {
  if (jar.studyStationId === null) return jar.kind === 'retain' ? 'retain cupboard' : 'opened at the start'
  const name = jar.stationName ?? ''
  const station = jar.temperatureC === null ? name : `${degrees(jar.temperatureC)}, ${name}`
  return jar.shelf === null ? station : `${jar.shelf}/${jar.place}, ${station}`
}
