import { Figure } from './figure'
import { heatLine, heatMarker } from './heat'
import { stationMarkerShapes } from './station-marker-shapes'

/** A station's marker, by itself or on a bit of its line. */
export function StationMark({
  temperatureC,
  size = 12,
  line = 0,
  title,
  className,
}: {
  temperatureC: number
  size?: number
  /** Length of the line it sits on; 0 for none. */
  line?: number
  title?: string
  className?: string
}) {
  const width = Math.max(line, size * 1.5)
  return (
    <Figure
      shapes={[
        ...(line > 0
          ? [
              {
                kind: 'line' as const,
                x1: -line / 2,
                x2: line / 2,
                y1: 0,
                y2: 0,
                stroke: 'ink' as const,
                width: heatLine(temperatureC),
              },
            ]
          : []),
        ...stationMarkerShapes(heatMarker(temperatureC), { x: 0, y: 0, size }),
      ]}
      view={{ x: -width / 2, y: -size * 0.75, width, height: size * 1.5 }}
      title={title}
      className={className}
    />
  )
}
