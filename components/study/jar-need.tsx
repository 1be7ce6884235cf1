'use client'

import { Drawn } from '@/components/marks/drawn'
import { jarShapes } from '@/components/marks/jar-shapes'
import { moveShapes } from '@/components/marks/place'
import { FigureDetails } from '@/components/ui/figure-details'
import { setAsideJars } from '@/lib/protocol/rules/plan'
import { grouped } from '@/lib/number/rules'
import { needFacts } from './need-facts'
import type { Need } from './start-state'

const width = 696
const jarHeight = 24

/** The jars that a study takes, standing as far as the batch reaches; the rest is dotted. */
export function JarNeed({ need }: { need: Need }) {
  const { plan } = need
  const groups = [
    { name: 'watch', count: need.watchJars, kind: 'watch' as const },
    { name: 'measuring', count: need.measuringJars + plan.initialJars, kind: 'spare' as const },
    { name: 'spare', count: need.spares, kind: 'spare' as const },
    { name: 'retain', count: plan.retains, kind: 'retain' as const },
    { name: 'set aside', count: setAsideJars(plan), kind: 'retain' as const },
  ].filter((group) => group.count > 0)
  const gaps = (groups.length - 1) * 12
  const pitch = Math.min(18, (width - gaps - 4) / Math.max(1, need.jars))
  const height = Math.min(jarHeight, Math.max(8, pitch * 1.45))
  const starts = groups.map((_, index) =>
    groups.slice(0, index).reduce((sum, group) => sum + group.count * pitch + 12, 2),
  )
  const reach = groups.map((group, index) => {
    const before = groups.slice(0, index).reduce((sum, one) => sum + one.count, 0)
    return Math.max(0, Math.min(group.count, need.enoughFor - before))
  })
  return (
    <figure className="min-w-0">
      <svg
        viewBox={`0 0 ${width} 66`}
        className="block w-full max-w-[820px]"
        role="img"
        aria-label={`${need.jars} jars needed, the batch fills ${Math.min(need.jars, need.enoughFor)}`}
      >
        {need.fits ? null : (
          <text
            x={width}
            y={12}
            fontSize={13}
            fontWeight={650}
            textAnchor="end"
            style={{ fill: 'var(--alarm)' }}
          >
            {need.jars - need.enoughFor} {need.jars - need.enoughFor === 1 ? 'jar' : 'jars'} short
          </text>
        )}
        {groups.map((group, index) => (
          <g key={group.name}>
            {Array.from({ length: group.count }, (_, place) => (
              <Drawn
                key={place}
                shapes={moveShapes(
                  jarShapes({ height, kind: group.kind, state: place < reach[index]! ? 'drawn' : 'planned' }),
                  starts[index]! + (place + 0.5) * pitch,
                  42,
                )}
              />
            ))}
            <path
              d={`M${starts[index]} 47v4h${group.count * pitch}v-4`}
              fill="none"
              stroke="var(--ink)"
              strokeWidth="1"
            />
            <text
              x={starts[index]! + (group.count * pitch) / 2}
              y={64}
              fontSize={12}
              textAnchor={index === 0 ? 'start' : index === groups.length - 1 ? 'end' : 'middle'}
              dx={
                index === 0
                  ? (-group.count * pitch) / 2
                  : index === groups.length - 1
                    ? (group.count * pitch) / 2
                    : 0
              }
            >
              {group.count} {group.name}
            </text>
          </g>
        ))}
        <path d={`M0 43H${width}`} stroke="var(--ink)" strokeWidth="2" />
      </svg>
      <figcaption className="mt-1 text-15">
        <FigureDetails figure={`${need.jars} jars`} facts={() => needFacts(need, 'jars')} /> of{' '}
        {plan.fillG.toFixed(1)} g are{' '}
        <FigureDetails
          figure={`${grouped(Math.ceil(need.grams), 0)} g`}
          facts={() => needFacts(need, 'grams')}
        />{' '}
        with {plan.lossPercent} % loss. {need.batch.code} has {grouped(Math.floor(need.leftG), 0)} g left,
        enough for {need.enoughFor}.{' '}
        {need.fits ? null : (
          <FigureDetails
            figure={`${grouped(Math.ceil(need.shortG), 0)} g short`}
            facts={() => needFacts(need, 'short')}
            className="font-650 text-alarm"
          />
        )}
      </figcaption>
    </figure>
  )
}
