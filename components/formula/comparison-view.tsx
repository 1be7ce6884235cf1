'use client'

import Link from 'next/link'
import { heatLine } from '@/components/marks/heat'
import { StandingMark } from '@/components/marks/standing-mark'
import { SeriesDetails } from '@/components/study/series-details'
import { StationLabel } from '@/components/ui/station-label'
import type { ComparisonPage } from '@/lib/formula/queries/get-comparison'
import { placeText, stationWords, type Place, type Shelf } from '@/lib/formula/rules/comparison'
import { moneyText } from '@/lib/formula/rules/numbers'
import { levelsText } from '@/lib/formula/rules/variants'
import type { AttributeKey } from '@/lib/reading/schema/attributes'

type Props = { page: ComparisonPage; mayWrite: boolean }
type Formula = ComparisonPage['formulas'][number]

/** Each station a shelf in its own weight, on it what was measured; each prototype a column. */
export function ComparisonView({ page, mayWrite }: Props) {
  const { formulas, shelves } = page
  return (
    <>
      <div
        className="relative mt-6 overflow-x-auto pb-2"
        tabIndex={0}
        role="region"
        aria-label="Formulas beside each other"
      >
        <table className="border-collapse text-15">
          <caption className="sr-only">Where each formula stands, by station and attribute</caption>
          <Heads formulas={formulas} mayWrite={mayWrite} />
          {shelves.map((shelf) => (
            <ShelfRows key={shelf.key} shelf={shelf} formulas={formulas} />
          ))}
        </table>
      </div>
      {shelves.length ? (
        <p className="mt-4 max-w-[90ch] text-14 text-soft">
          Beside a mark that lies: when it left its band. Beside one that leans: when it would. Beside one
          that stands: up to when it was read. With several batches the worst is shown. Press one to see what
          it is computed from.
        </p>
      ) : (
        <p className="mt-4 text-15">
          None of them is in a study yet. Make a batch of each and start one; what is read stands here.
        </p>
      )}
    </>
  )
}

const first = 'sticky left-0 z-10 bg-ground pr-4 text-left'

function Heads({ formulas, mayWrite }: { formulas: Formula[]; mayWrite: boolean }) {
  return (
    <thead>
      <tr className="align-bottom">
        <td className={first} />
        {formulas.map((formula) => (
          <th key={formula.id} scope="col" className="w-[124px] min-w-[108px] px-2 pb-1 text-left font-430">
            <Link
              href={`/formulas/${formula.code}`}
              className="font-mono text-17 font-700 underline-offset-4 hover:underline"
            >
              {formula.code}
            </Link>
            <span className="block text-13 leading-tight text-soft">
              {formula.levels.length ? levelsText(formula.levels) : formula.name}
            </span>
          </th>
        ))}
      </tr>
      <Facts
        name="inside, % by volume"
        formulas={formulas}
        text={(one) => one.internalVolumePercent?.toFixed(1)}
      />
      <Facts
        name="cost per kg"
        formulas={formulas}
        text={(one) => (one.costCentsPerKg === null ? undefined : moneyText(one.costCentsPerKg))}
      />
      <tr className="align-top text-14">
        <th scope="row" className={`${first} py-1 font-430`}>
          studies
        </th>
        {formulas.map((formula) => (
          <td key={formula.id} className="px-2 py-1">
            {formula.studies.length ? null : <span className="text-soft">none yet</span>}
            {formula.studies.map((study) => (
              <Link
                key={`${study.code} ${study.batchCode}`}
                href={`/studies/${study.code}`}
                className="block underline underline-offset-4"
              >
                {study.code}
                <span className="text-13 text-soft"> {study.batchCode}</span>
              </Link>
            ))}
          </td>
        ))}
      </tr>
      {mayWrite ? (
        <tr className="text-14">
          <th scope="row" className={`${first} py-1 font-430`}>
            next
          </th>
          {formulas.map((formula) => (
            <td key={formula.id} className="px-2 py-1">
              <Link
                href={`/formulas/${formula.code}/variants?version=${formula.versionNumber}`}
                className="font-650 underline underline-offset-4"
              >
                Vary<span className="sr-only"> {formula.code}</span>
              </Link>
            </td>
          ))}
        </tr>
      ) : null}
    </thead>
  )
}

type FactsProps = { name: string; formulas: Formula[]; text: (formula: Formula) => string | undefined }

function Facts({ name, formulas, text }: FactsProps) {
  return (
    <tr className="border-t border-hair text-14">
      <th scope="row" className={`${first} py-1 font-430 whitespace-nowrap`}>
        {name}
      </th>
      {formulas.map((formula) => (
        <td key={formula.id} className="px-2 py-1">
          {text(formula) ?? <span className="text-soft">not known</span>}
        </td>
      ))}
    </tr>
  )
}

function ShelfRows({ shelf, formulas }: { shelf: Shelf; formulas: Formula[] }) {
  const line = heatLine(shelf.temperatureC ?? 5)
  return (
    <tbody
      style={{ borderBottom: `${line}px ${shelf.kind === 'temperature' ? 'solid' : 'dashed'} var(--ink)` }}
    >
      <tr>
        <th scope="rowgroup" className={`${first} pt-5 pb-1`}>
          {shelf.kind === 'transport' ? (
            <span className="text-17">road</span>
          ) : (
            <StationLabel
              celsius={shelf.temperatureC}
              name="freeze thaw"
              size={shelf.temperatureC === null ? 40 : 32}
            />
          )}
        </th>
        <td colSpan={formulas.length} />
      </tr>
      {shelf.rows.map((row) => (
        <tr key={row.attribute}>
          <th scope="row" className={`${first} py-1 font-430 whitespace-nowrap`}>
            {row.label}
          </th>
          {row.places.map((place, index) => (
            <td key={formulas[index]?.id} className="px-2 py-1 align-bottom">
              {place ? <Stand place={place} label={row.label} /> : <span className="sr-only">not read</span>}
            </td>
          ))}
        </tr>
      ))}
    </tbody>
  )
}

/** The mark, and beside it the week that says how far. */
function Stand({ place, label }: { place: Place; label: string }) {
  const { series, others } = place
  const text = placeText(place)
  const where = `${label} of ${series.batchCode} ${stationWords(series)}`
  const isAlarm = series.standing === 'out' || series.standing === 'leaning'
  return (
    <span className="flex min-h-6 items-end gap-1.5" title={`${where}: ${series.standing}`}>
      <StandingMark standing={series.standing} size={20} title={`${where}: ${series.standing}`} />
      <SeriesDetails
        code={series.studyCode}
        series={{
          batchId: series.batchId,
          studyStationId: series.studyStationId,
          attribute: series.attribute as AttributeKey,
        }}
        figure={`${where}: ${text}`}
        className={`text-13 leading-tight whitespace-nowrap ${isAlarm ? 'font-650 text-alarm' : 'text-soft'}`}
      >
        {text}
      </SeriesDetails>
      {others > 0 ? <span className="sr-only">, the worst of {others + 1}</span> : null}
    </span>
  )
}
