import type { JarRow } from '@/lib/jar/queries'
import { namedJar } from '@/lib/jar/rules'
import { spokenDay } from '@/lib/study/rules/calendar'
import { degrees } from '@/lib/study/rules/finding'

export type Label = { jar: JarRow; /** Side length in modules, and the path of the dark ones. */ qr: Qr }
export type Qr = { size: number; path: string }

/** Labels three by seven on a sheet of A4: the square for the scanner, the code for the eye. */
export function LabelSheet({ labels }: { labels: Label[] }) {
  return (
    <ol className="label-sheet mt-6 grid grid-cols-1 border-t border-l border-hair sm:grid-cols-2 lg:grid-cols-3 print:mt-0 print:grid-cols-3 print:border-0">
      {labels.map(({ jar, qr }) => (
        <li
          key={jar.id}
          className="flex h-[37mm] break-inside-avoid items-center gap-3 overflow-hidden border-r border-b border-hair px-3 print:border-hair"
          style={paper}
        >
          <svg
            viewBox={`-2 -2 ${qr.size + 4} ${qr.size + 4}`}
            className="h-[27mm] w-[27mm] shrink-0"
            role="img"
            aria-label={`Square of jar ${jar.code}`}
            shapeRendering="crispEdges"
          >
            <rect x={-2} y={-2} width={qr.size + 4} height={qr.size + 4} fill="#fff" />
            <path d={qr.path} fill="#000" />
          </svg>
          <span className="min-w-0 leading-tight">
            <b className="block font-mono text-20 font-700 whitespace-nowrap">{nameOf(jar)}</b>
            <span className="block truncate text-13">
              {jar.studyCode}, {jar.batchCode}
            </span>
            <span className="block truncate text-13">{where(jar)}</span>
            <span className="block text-13">
              {kindWords[jar.kind]}, {spokenDay(jar.startedOn)}
            </span>
          </span>
        </li>
      ))}
    </ol>
  )
}

/** A label is paper in either theme: a scanner wants black on white. */
const paper = { background: '#fff', color: '#000' }

const kindWords: Record<string, string> = {
  watch: 'watch, stays sealed',
  measuring: 'measuring',
  spare: 'spare',
  retain: 'retain',
}

function nameOf(jar: JarRow): string {
  return namedJar(
    jar.code,
    jar.isFreezeThaw === null ? null : { temperatureC: jar.temperatureC, isFreezeThaw: jar.isFreezeThaw },
  )
}

function where(jar: JarRow): string {
  if (jar.studyStationId === null) return jar.kind === 'retain' ? 'retain cupboard' : 'opened at the start'
  const station =
    jar.temperatureC === null ? jar.stationName : `${degrees(jar.temperatureC)}, ${jar.stationName}`
  return jar.shelf === null ? (station ?? '') : `${station}, ${jar.shelf}/${jar.place}`
}
