import Link from 'next/link'
import type { TimeScale } from '@/components/charts/time-scale'
import { PhotoWithLines } from '@/components/photo/photo-with-lines'
import { StationLabel } from '@/components/ui/station-label'
import { photoKeys } from '@/lib/photo/keys'
import type { CurvesPage } from '@/lib/study/queries/curves'
import { attributeOf } from '@/lib/reading/schema/attributes'
import { degrees } from '@/lib/study/rules/finding'
import { shownWithUnit } from '@/lib/study/rules/words'

type Props = {
  code: string
  batch: string
  photos: CurvesPage['photos']
  stations: CurvesPage['stations']
  /** Id of the station whose photos are shown; the one with the most where nothing is said. */
  picked: string | null
  scale: TimeScale
}

const width = 40
const height = 94

/** The watch jar of one station through time, each photo at its own week of the ruler above. */
export function PhotoStrip({ code, batch, photos, stations, picked, scale }: Props) {
  const ofJars = photos.filter((photo) => photo.shows === 'jar')
  const withPhotos = stations.filter((station) => ofJars.some((photo) => photo.studyStationId === station.id))
  const station =
    withPhotos.find((one) => one.id === picked) ??
    withPhotos.toSorted((a, b) => countAt(ofJars, b.id) - countAt(ofJars, a.id))[0]
  if (!station) return null
  const shown = apart(newestOfEach(ofJars.filter((photo) => photo.studyStationId === station.id)), (photo) =>
    scale.x(photo.timeWeeks ?? 0),
  )
  return (
    <section aria-label={`Photos at ${nameOf(station)}`} className="relative" style={{ height: height + 30 }}>
      <div className="absolute top-6 left-0 hidden sm:block">
        <StationLabel celsius={station.isFreezeThaw ? null : station.temperatureC} size={46} />
        <p className="mt-1 text-13 text-soft">photos</p>
      </div>
      {shown.map((photo) => (
        <a
          key={photo.id}
          href={photoKeys.original(photo.id)}
          className="absolute top-1"
          style={{ left: scale.x(photo.timeWeeks ?? 0) - width / 2 }}
        >
          <Photo photo={photo} at={nameOf(station)} />
        </a>
      ))}
      {withPhotos.length > 1 ? (
        <p className="absolute right-0 bottom-0 bg-ground pl-2 text-15">
          photos at{' '}
          {withPhotos.map((one) => (
            <Link
              key={one.id}
              href={`/studies/${encodeURIComponent(code)}/curves?batch=${encodeURIComponent(batch)}&station=${one.id}`}
              scroll={false}
              aria-current={one.id === station.id ? 'true' : undefined}
              className={`ml-2 ${one.id === station.id ? 'font-700' : 'underline underline-offset-4'}`}
            >
              {nameOf(one)}
            </Link>
          ))}
        </p>
      ) : null}
    </section>
  )
}

/** Under the lines that its separation was measured by, and the percent they make, where it was measured on it. */
function Photo({ photo, at }: { photo: Props['photos'][number]; at: string }) {
  const src = photoKeys.preview(photo.id)
  const alt = `Jar ${photo.jarCode} at ${at}, ${photo.label ?? 'initial'}`
  const { measured } = photo
  if (!measured)
    return (
      // A private picture behind a permission check: the image optimiser cannot fetch it.
      // eslint-disable-next-line @next/next/no-img-element
      <img
        {...{ src, alt, width, height }}
        loading="lazy"
        className="block border border-ink object-cover"
        style={{ width, height }}
      />
    )
  const { percent, ...lines } = measured
  const drawn = (height * lines.width) / lines.height
  return (
    <>
      <span className="block overflow-hidden border border-ink" style={{ width, height }}>
        <span className="relative block" style={{ width: drawn, marginLeft: (width - drawn) / 2 }}>
          <PhotoWithLines {...lines} src={src} alt={`${alt}, with the lines it was measured by`} isUnnamed />
        </span>
      </span>
      <span className="block text-center text-13 whitespace-nowrap">
        {shownWithUnit(attributeOf('separation'), percent)}
      </span>
    </>
  )
}

type Station = Props['stations'][number]

function nameOf(station: Station): string {
  return station.isFreezeThaw ? 'freeze-thaw' : degrees(station.temperatureC)
}

function countAt(photos: Props['photos'], stationId: string): number {
  return photos.filter((photo) => photo.studyStationId === stationId).length
}

/** One photo a pull: the one taken last. */
function newestOfEach(photos: Props['photos']): Props['photos'] {
  return [...new Map(photos.map((photo) => [photo.timeWeeks ?? photo.id, photo])).values()]
}

/** Where weeks lie closer than a photo is wide, those in between are left out; the newest one stays. */
function apart<T>(photos: T[], x: (photo: T) => number): T[] {
  const kept: T[] = []
  for (const photo of photos.toReversed()) {
    const before = kept.at(-1)
    if (before === undefined || x(before) - x(photo) >= width + 2) kept.push(photo)
  }
  return kept.toReversed()
}
