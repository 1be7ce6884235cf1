import type { SeriesInput, SeriesReading } from '@/lib/science/series'

/** A pH series with s = 0.03 in a band of 5.5 ± 0.5 over 26 weeks, one jar a pull. */
export function phSeries(readings: SeriesReading[], change: Partial<SeriesInput> = {}): SeriesInput {
  return {
    attribute: 'ph',
    tolerance: { kind: 'shift', below: 0.5, above: 0.5 },
    endTime: 26,
    repeatabilitySd: 0.03,
    isSeparation: false,
    initial: [5.5],
    readings,
    ...change,
  }
}

/** Separation in % of fill height with s = 0.5, at most 5 allowed, over 26 weeks. */
export function separationSeries(readings: SeriesReading[], change: Partial<SeriesInput> = {}): SeriesInput {
  return phSeries(readings, {
    attribute: 'separation',
    tolerance: { kind: 'range', upper: 5 },
    repeatabilitySd: 0.5,
    isSeparation: true,
    detectionLimit: 1,
    initial: [0],
    ...change,
  })
}

export function reading(
  time: number,
  values: number | number[],
  change: Partial<SeriesReading> = {},
): SeriesReading {
  return {
    id: `w${time}`,
    time,
    day: `day ${time}`,
    jar: `jar ${time}`,
    values: typeof values === 'number' ? [values] : values,
    doubts: [],
    ...change,
  }
}

/** Weekly readings from week 1 on. */
export function weekly(...values: (number | number[])[]): SeriesReading[] {
  return values.map((value, i) => reading(i + 1, value))
}

/** A repeat on a spare jar of the same day. */
export function repeat(of: SeriesReading, values: number | number[], name = 'repeat'): SeriesReading {
  return reading(of.time, values, {
    id: `${of.id} ${name}`,
    jar: `${of.jar} ${name}`,
    day: of.day,
    isRepeatOf: of.id,
  })
}
