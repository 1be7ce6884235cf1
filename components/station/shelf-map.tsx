'use client'

import Link from 'next/link'
import { useRef, useState, type KeyboardEvent } from 'react'
import { useWidth } from '@/components/charts/use-width'
import { Drawn } from '@/components/marks/drawn'
import type { StandingJar } from '@/lib/station/queries/places'
import { spokenDay } from '@/lib/study/rules/calendar'
import { kindWords } from './jar-words'
import { jarHeight, lineHeight, lineShapes, nameWidth, shelfLines, type ShelfLine } from './shelf-lines'

type Props = {
  station: { name: string; shelves: number; placesPerShelf: number }
  /** Thickness of a shelf: heat is weight. */
  line: number
  jars: StandingJar[]
  /** The study whose jars are in ink; all of them where none is picked. */
  picked: string | null
  /** Jars that are taken out for a move; null while one only looks. */
  taken: ReadonlySet<string> | null
  onTake: (jar: StandingJar) => void
}

/**
 * The station's shelves with every jar in its place. One stop of the tab key: the arrows go from jar to jar. A jar
 * leads to its study; while jars are chosen for a move it is taken out or put back.
 */
export function ShelfMap({ station, line, jars, picked, taken, onTake }: Props) {
  const [box, width] = useWidth<HTMLDivElement>(1360)
  const [current, setCurrent] = useState<string | null>(null)
  const places = useRef(new Map<string, HTMLElement>())
  const lines = shelfLines(station, width)
  const stop = jars.some((jar) => jar.id === current) ? current : (jars[0]?.id ?? null)

  function onKeyDown(event: KeyboardEvent) {
    const at = jars.findIndex((jar) => jar.id === stop)
    const next = nextJar(event.key, jars, at, lines)
    if (!next) return
    event.preventDefault()
    setCurrent(next.id)
    places.current.get(next.id)?.focus()
  }

  return (
    <div ref={box} className="min-w-0" onKeyDown={onKeyDown}>
      {lines.map((one) => {
        const own = jars.filter(
          (jar) => jar.shelf === one.shelf && jar.place >= one.from && jar.place <= one.to,
        )
        const span = (one.to - one.from + 1) * one.pitch
        return (
          <div key={`${one.shelf} ${one.from}`} className="relative" style={{ height: lineHeight }}>
            <span className="absolute bottom-1 left-0 text-13 leading-tight text-soft">
              {one.from === 1 ? <b className="block font-600 text-ink">shelf {one.shelf}</b> : null}
              {one.from === 1 && one.to === station.placesPerShelf ? null : `${one.from}–${one.to}`}
            </span>
            <svg
              className="absolute bottom-0"
              style={{ left: nameWidth }}
              width={span}
              height={lineHeight}
              viewBox={`0 ${line - lineHeight} ${span} ${lineHeight}`}
              aria-hidden
            >
              <Drawn
                shapes={lineShapes(one, own, (jar) =>
                  taken?.has(jar.id)
                    ? 'taken'
                    : taken !== null || (picked !== null && jar.studyCode !== picked)
                      ? 'quiet'
                      : 'plain',
                )}
              />
              <rect x={0} y={0} width={span} height={line} fill="var(--ink)" />
            </svg>
            {own.map((jar) => {
              const shared = {
                ref: (element: HTMLElement | null) => {
                  if (element) places.current.set(jar.id, element)
                  else places.current.delete(jar.id)
                },
                tabIndex: jar.id === stop ? 0 : -1,
                onFocus: () => setCurrent(jar.id),
                'aria-label': spokenJar(jar),
                title: spokenJar(jar),
                className: 'absolute block rounded-4 hover:bg-ink/10',
                style: {
                  left: nameWidth + (jar.place - one.from) * one.pitch,
                  width: one.pitch,
                  bottom: line,
                  height: jarHeight + 10,
                },
              }
              return taken === null ? (
                <Link key={jar.id} href={`/studies/${jar.studyCode}/jars#${jar.code}`} {...shared} />
              ) : (
                <button
                  key={jar.id}
                  type="button"
                  role="checkbox"
                  aria-checked={taken.has(jar.id)}
                  onClick={() => onTake(jar)}
                  {...shared}
                />
              )
            })}
          </div>
        )
      })}
    </div>
  )
}

function spokenJar(jar: StandingJar): string {
  return `${jar.code}, ${kindWords[jar.kind]} of ${jar.studyCode}, batch ${jar.batchCode}, shelf ${jar.shelf}, place ${jar.place}, until ${spokenDay(jar.leavesOn)}`
}

/** Left and right along the shelves; up and down to the jar that stands nearest on the next line with any. */
function nextJar(key: string, jars: StandingJar[], at: number, lines: ShelfLine[]): StandingJar | undefined {
  const jar = jars[at]
  if (!jar) return undefined
  if (key === 'ArrowRight') return jars[at + 1]
  if (key === 'ArrowLeft') return jars[at - 1]
  if (key === 'Home') return jars[0]
  if (key === 'End') return jars.at(-1)
  if (key !== 'ArrowDown' && key !== 'ArrowUp') return undefined
  const lineOf = ({ shelf, place }: StandingJar) =>
    lines.findIndex((one) => one.shelf === shelf && place >= one.from && place <= one.to)
  const column = (one: StandingJar) => one.place - (lines[lineOf(one)]?.from ?? 1)
  const own = lineOf(jar)
  const others = jars.filter((one) => (key === 'ArrowDown' ? lineOf(one) > own : lineOf(one) < own))
  const line = key === 'ArrowDown' ? Math.min(...others.map(lineOf)) : Math.max(...others.map(lineOf))
  return others
    .filter((one) => lineOf(one) === line)
    .toSorted((a, b) => Math.abs(column(a) - column(jar)) - Math.abs(column(b) - column(jar)))[0]
}
