import { attributeName } from '@/lib/reading/schema/attributes'
import { heatWeight } from '@/components/marks/heat'
import type { FlagPage } from '@/lib/flag/queries/one'
import type { AgainstTrend } from '@/lib/flag/rules/against-trend'
import { spokenDay } from '@/lib/study/rules/calendar'
import { capital, shownValue, shownWithUnit } from '@/lib/study/rules/words'
import { stationText } from '@/lib/flag/rules/list'
import { instrumentNoun, whole } from './flag-words'
import { comparedOthers, instrumentVerdict } from './instrument-verdict'
import { MovedAxis, MovedBar } from './moved-bar'

/** Whether it was the product or what it was read with: every reading of that day against its own trend. */
export function Moved({ flag, stationMeanC }: { flag: FlagPage; stationMeanC: number | null }) {
  const day = flag.onDay ?? flag.readOn
  const jars = flag.sameJar.filter((row) => !row.isFlagged || flag.sameInstrument.length === 0)
  if (!day || flag.sameInstrument.length + jars.length === 0) return null
  const reach = reachOf([...flag.sameInstrument, ...jars])
  return (
    <section aria-labelledby="moved">
      <div className="border-b-[1.75px] border-ink pb-2">
        <h2 id="moved" className="text-20 font-650">
          What else moved on {spokenDay(day, false)}
        </h2>
        <p className="text-14 text-soft">each against its own trend, in % of the initial</p>
      </div>
      {flag.sameInstrument.length > 0 ? (
        <Group title={`${capital(flag.instrumentName ?? '')}, ${flag.instrumentCode}, the same day`}>
          {flag.sameInstrument.map((row) => (
            <Row
              key={row.readingIds[0]}
              row={row}
              reach={reach}
              name={<SeriesName row={row} flag={flag} />}
              isBar={row.differencePercent !== null}
            />
          ))}
        </Group>
      ) : null}
      {jars.length > 0 ? (
        <Group title={`The jars of this pull${flag.jarName ? `, ${flag.jarName} among them` : ''}`}>
          {jars.map((row) => (
            <Row
              key={row.readingIds[0]}
              row={row}
              reach={reach}
              name={jarRowName(row, jars)}
              isBar={row.differencePercent !== null && !row.isBeyond}
            />
          ))}
        </Group>
      ) : null}
      <div className="mt-2 flex items-start justify-between gap-4">
        <p className="max-w-[22ch] text-13 text-soft">box: twice the scatter of each about its trend</p>
        <MovedAxis reach={reach} />
      </div>
      {stationMeanC === null ? null : (
        <p className="mt-1 text-15">
          {capital(flag.stationName ?? 'the station')} stood at {stationMeanC.toFixed(1).replace('-', '−')} °C
          in the mean.
        </p>
      )}
      <Verdict flag={flag} />
    </section>
  )
}

function Group({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <>
      <h3 className="mt-4 mb-1 text-13 font-430 text-soft">{title}</h3>
      <ul className="divide-y divide-hair">{children}</ul>
    </>
  )
}

function Row({
  row,
  reach,
  name,
  isBar,
}: {
  row: AgainstTrend
  reach: number
  name: React.ReactNode
  isBar: boolean
}) {
  const value = shownWithUnit(row, row.value)
  const weight = row.isFlagged || row.isBeyond ? 'font-650' : ''
  return (
    <li className="flex min-h-[31px] items-center justify-between gap-4 text-15">
      <span className={weight}>{name}</span>
      {isBar ? (
        <>
          <span className="sr-only">
            {value}, {signed(row.differencePercent!)} % from its trend
          </span>
          <MovedBar
            difference={row.differencePercent!}
            scatter={row.scatterPercent}
            reach={reach}
            isFlagged={row.isFlagged}
            isBeyond={row.isBeyond}
          />
        </>
      ) : (
        <span className={row.isBeyond ? 'text-right font-700 text-alarm' : 'text-right'}>
          {whole(value)}
          {row.isBeyond ? `, ${allowed(row)}: beyond` : ''}
        </span>
      )}
    </li>
  )
}

/** Where an attribute was read on several jars of the pull, each is named. */
function jarRowName(row: AgainstTrend, rows: AgainstTrend[]): string {
  const name = attributeName(row.attribute)
  const isAlone = rows.filter((one) => one.attribute === row.attribute).length === 1
  return isAlone || !row.jarCode ? name : `${name}, jar ${row.jarCode}`
}

function SeriesName({ row, flag }: { row: AgainstTrend; flag: FlagPage }) {
  const isSameBatch = row.batchCode === flag.batchCode
  return (
    <>
      {row.studyCode}
      {isSameBatch ? '' : `, ${row.batchCode},`} {row.isFreezeThaw ? 'in ' : 'at '}
      <span style={{ fontWeight: row.isFreezeThaw ? 430 : heatWeight(row.temperatureC ?? 25) }}>
        {whole(stationText(row))}
      </span>
    </>
  )
}

function Verdict({ flag }: { flag: FlagPage }) {
  if (!flag.instrumentCode) return null
  const noun = instrumentNoun(flag.attribute)
  const verdict = instrumentVerdict(flag.sameInstrument)
  const text =
    comparedOthers(flag.sameInstrument) === 0
      ? `Nothing else that has a trend was read on ${flag.instrumentCode} that day, so the day alone does not tell the ${noun} from the product.`
      : verdict === 'moved'
        ? `Were it the product, the others would stay in their boxes. They lie to one side: look at the ${noun} first.`
        : verdict === 'steady'
          ? `Were it the ${noun}, every dot of the first group would sit to one side. They do not.`
          : `Too few others were read on ${flag.instrumentCode} that day to tell the ${noun} from the product.`
  return <p className="mt-3 max-w-[56ch] text-15">{text}</p>
}

/** A round reach that holds nearly all; what lies further is an arrow. */
function reachOf(rows: AgainstTrend[]): number {
  const sizes = rows.flatMap((row) =>
    row.differencePercent === null
      ? []
      : [Math.max(Math.abs(row.differencePercent), 2 * (row.scatterPercent ?? 0))],
  )
  const most = Math.max(6, ...sizes)
  return [6, 12, 18, 24, 30, 45].find((reach) => most <= reach) ?? 60
}

function allowed(row: AgainstTrend): string {
  const { band, value } = row
  const isLow = band?.lower !== null && band?.lower !== undefined && value < band.lower
  const edge = isLow ? band.lower : band?.upper
  return typeof edge === 'number' ? `allowed ${isLow ? 'down ' : ''}to ${shownValue(row, edge)}` : ''
}

function signed(value: number): string {
  return `${value < 0 ? '−' : '+'}${Math.abs(value).toFixed(1)}`
}
