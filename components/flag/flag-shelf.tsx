import { attributeName } from '@/lib/reading/schema/attributes'
import { JarGlyph } from '@/components/marks/jar-glyph'
import { heatLine } from '@/components/marks/heat'
import { StationLabel } from '@/components/ui/station-label'
import { spokenDay } from '@/lib/study/rules/calendar'
import type { FlagContext } from './flag-context'

type Props = {
  shelf: NonNullable<FlagContext['shelf']>
  attribute: string
  detectionPercent: number
  /** What the band allows, in words. */
  allowed: string | null
}

/** More jars than these would not be told apart at half the page's width. */
const shownJars = 5

/** The station's jars as they were pulled, standing, leaning or fallen, with what was read under each. */
export function FlagShelf({ shelf, attribute, detectionPercent, allowed }: Props) {
  const read = shelf.cells.filter((cell) => cell.state === 'read' && cell.weeks > 0)
  const cells = read.slice(-shownJars)
  if (cells.length === 0) return null
  const { station } = shelf
  // Where the shelf is short, the earliest gives way.
  const roomFor = (index: number) =>
    index === 0 && cells.length === shownJars ? 'max-sm:hidden md:max-lg:hidden' : ''
  const line = station.isFreezeThaw ? 1.5 : heatLine(station.temperatureC ?? 25)
  return (
    <figure aria-label={`Jars at ${station.name}`} className="min-w-0">
      <div
        className="flex items-end border-ink"
        style={{ borderBottomWidth: line, borderBottomStyle: station.isFreezeThaw ? 'dashed' : 'solid' }}
      >
        <span className="w-[92px] shrink-0 pb-2 sm:w-[104px]">
          <StationLabel celsius={station.isFreezeThaw ? null : station.temperatureC} size={44} />
        </span>
        {cells.map((cell, index) => (
          <span key={cell.weeks} className={`flex flex-1 justify-center ${roomFor(index)}`}>
            <JarGlyph
              height={56}
              posture={cell.posture}
              topPercent={cell.topPercent ?? undefined}
              bottomPercent={cell.bottomPercent ?? undefined}
              detectionPercent={detectionPercent}
              className="max-w-full"
            />
          </span>
        ))}
      </div>
      <figcaption className="mt-1.5 flex">
        <span className="w-[92px] shrink-0 text-14 leading-tight sm:w-[104px]">
          {attributeName(attribute)}
          {allowed ? <span className="block text-13 text-soft">{allowed}</span> : null}
        </span>
        {cells.map((cell, index) => {
          const value = cell.values.find((one) => one.attribute === attribute)
          return (
            <span key={cell.weeks} className={`flex-1 text-center text-15 leading-tight ${roomFor(index)}`}>
              <span className={value?.isOut ? 'font-700 text-alarm' : ''}>
                {value?.now === null || !value ? 'not read' : value.text.replace(/ (%|mPa·s)$/, '')}
              </span>
              <span className="block text-13 text-soft">
                {cell.pullLabel}
                <br />
                {cell.dueOn ? spokenDay(cell.dueOn, false) : ''}
              </span>
            </span>
          )
        })}
      </figcaption>
    </figure>
  )
}
