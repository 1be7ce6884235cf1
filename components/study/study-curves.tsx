'use client'

import useSWR from 'swr'
import type { CurveInput } from '@/components/charts/curve-data'
import { Curves } from '@/components/charts/curves'
import { Empty } from '@/components/ui/empty'
import { LinkButton } from '@/components/ui/link-button'
import { fetcher } from '@/lib/http/fetcher'
import { type AttributeKey } from '@/lib/reading/schema/attributes'
import type { CurvesPage } from '@/lib/study/queries/curves'
import { studyKeys } from '@/lib/study/keys'
import { curveName } from '@/components/charts/curve-geometry'
import { BatchTabs } from './batch-tabs'
import { BesideChoice } from './beside-choice'
import { curveInputs } from './curve-inputs'
import { PhotoStrip } from './photo-strip'
import { SeriesDetails } from './series-details'
import { StudyHeading, type StudyRights } from './study-heading'

type Props = {
  code: string
  rights: StudyRights
  batch: string | null
  station: string | null
  /** A batch of another study whose readings are drawn along; empty where none is. */
  beside: string
}

/** Every measured attribute over the study's own time, under one ruler with the photos of one station. */
export function StudyCurves({ code, rights, batch, station, beside }: Props) {
  const { data: page } = useSWR<CurvesPage>(studyKeys.curves(code, beside), fetcher)
  if (!page) return null
  const { study, batches } = page
  const shown = batches.find((one) => one.code === batch) ?? batches[0]
  const plots = shown ? curveInputs(page, shown.id) : []
  const photos = page.photos.filter((photo) => photo.batchId === shown?.id)
  return (
    <>
      <StudyHeading
        study={study}
        batches={batches}
        part="curves"
        rights={rights}
        headline={page.finding.headline}
        sentence={page.finding.sentence}
      />
      {batches.length > 1 ? (
        <BatchTabs code={code} path="/curves" batches={batches} shown={shown?.code ?? ''} />
      ) : null}
      <BesideChoice batch={batch} beside={beside} page={page} />
      <div className="mt-5">
        {plots.length === 0 ? (
          <Empty
            title="No curve yet"
            sentence="Curves begin with the first readings; a trend needs five time points."
            act={<LinkButton href={`/studies/${encodeURIComponent(code)}`}>Open the sheet</LinkButton>}
          />
        ) : (
          <Curves
            plots={plots}
            heights={plots.map(heightOf)}
            startOn={study.startedOn}
            endWeeks={study.endWeeks}
            todayWeeks={page.todayWeeks}
            nameAs={(input, series, name) => {
              const attribute = input.attribute as AttributeKey | undefined
              return shown && attribute && !series.beside ? (
                <SeriesDetails
                  code={code}
                  series={{ batchId: shown.id, studyStationId: series.id, attribute }}
                  figure={`${input.title} at ${curveName(series)}, ${series.standing},`}
                >
                  {name}
                </SeriesDetails>
              ) : (
                name
              )
            }}
            strip={
              photos.length === 0
                ? undefined
                : (scale) => (
                    <PhotoStrip
                      code={code}
                      batch={shown?.code ?? ''}
                      photos={photos}
                      stations={page.stations}
                      picked={station}
                      scale={scale}
                    />
                  )
            }
          />
        )}
      </div>
    </>
  )
}

/** As high as the words and keys at its left need: title, small print, a line for each station, the table's link. */
function heightOf({ title, unit, series }: CurveInput, index: number): number {
  const needed = (title.length > 10 ? 66 : 36) + unit.length * 21 + series.length * 30 + 46
  return Math.max(index === 0 ? 266 : 224, needed)
}
