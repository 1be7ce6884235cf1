'use client'

import type { ReactNode } from 'react'
import { BandBar } from '../marks/band-bar'
import { bandScale } from '../marks/band-bar-shapes'
import { useWidth } from './use-width'

export type StripAttribute = {
  key: string
  /** `Separation`, `Drops, micrometres`. */
  name: string
  /** The value as it is written, with its unit: `39 300 mPa·s`. */
  text: string
  isOut: boolean
  lower?: number | null
  upper?: number | null
  initial?: number | null
  last?: number | null
  now?: number | null
  lowerText?: string
  upperText?: string
}

export type CellStripProps = {
  code: string
  /** `week 10, 17 Nov, read by MA`. */
  note: string
  /** What happened to jars of this pull, a sentence each. */
  happened?: string[]
  href?: string
  attributes: StripAttribute[]
  /** What stands in place of a value's text, such as the text with its details. */
  textAs?: (attribute: StripAttribute) => ReactNode
}

/** The jar that is picked on the sheet: each attribute as a level within its band. */
export function CellStrip({
  code,
  note,
  happened = [],
  href,
  attributes,
  textAs = ({ text }) => text,
}: CellStripProps) {
  return (
    <div
      className="flex flex-wrap gap-x-4 gap-y-4 bg-recess py-4 shadow-[0_0_0_100vmax_var(--recess)] [clip-path:inset(0_-100vmax)]"
      role="group"
      aria-label={`Jar ${code}`}
    >
      <div className="w-[180px]">
        <p className="font-mono text-20 font-650">
          {href ? (
            <a href={href} className="underline decoration-1 underline-offset-4">
              {code}
            </a>
          ) : (
            code
          )}
        </p>
        <p className="text-13 text-soft">{note}</p>
        {happened.map((sentence) => (
          <p key={sentence} className="mt-1 text-13">
            {sentence}
          </p>
        ))}
      </div>
      <ul className="grid min-w-0 flex-1 basis-80 grid-cols-[repeat(auto-fit,minmax(150px,1fr))] gap-x-7 gap-y-4">
        {attributes.map((attribute) => (
          <Level key={attribute.key} attribute={attribute} shown={textAs(attribute)} />
        ))}
      </ul>
    </div>
  )
}

function Level({ attribute, shown }: { attribute: StripAttribute; shown: ReactNode }) {
  const [box, width] = useWidth<HTMLLIElement>(168)
  const { name, isOut, lowerText, upperText, lower, upper, initial, last, now } = attribute
  const bar = { lower, upper, initial, last, now }
  const scale = bandScale({ ...bar, width })
  const edges = [
    { value: bar.lower, text: lowerText },
    { value: bar.upper, text: upperText },
  ]
  return (
    <li ref={box} className="min-w-0">
      <div className="flex items-baseline justify-between gap-2 whitespace-nowrap">
        <span className="truncate text-13 text-soft">{name}</span>
        <span className={`text-15 ${isOut ? 'font-750 text-alarm' : 'font-600'}`}>{shown}</span>
      </div>
      <BandBar {...bar} width={width} title={bandSentence(attribute)} />
      <div className="relative h-4 text-13" aria-hidden>
        {edges.map(({ value, text: edge }) =>
          typeof value === 'number' && edge ? (
            <span
              key={edge}
              className="absolute -translate-x-1/2 whitespace-nowrap"
              style={{ left: Math.min(Math.max(scale.place(value), 10), width - 10) }}
            >
              {edge}
            </span>
          ) : null,
        )}
      </div>
    </li>
  )
}

function bandSentence({ name, text, isOut, lowerText, upperText }: StripAttribute): string {
  const band =
    lowerText && upperText
      ? `band ${lowerText} to ${upperText}`
      : lowerText
        ? `at least ${lowerText}`
        : upperText
          ? `at most ${upperText}`
          : 'no band'
  return `${name} ${text}, ${band}, ${isOut ? 'outside it' : 'inside it'}`
}
