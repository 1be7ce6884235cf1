import { JarGlyph } from '@/components/marks/jar-glyph'

export function TinyJar({
  standing,
  layers,
  state,
  height = 34,
  title,
}: {
  standing: 'steady' | 'leaning' | 'out' | 'untold'
  layers: { topPercent: number; bottomPercent: number } | null
  state: 'due' | 'resting' | 'done' | 'missed'
  height?: number
  title?: string
}) {
  return (
    <JarGlyph
      height={height}
      state={state === 'done' ? 'drawn' : state}
      posture={
        state !== 'done'
          ? 'upright'
          : standing === 'out'
            ? 'lying'
            : standing === 'leaning'
              ? 'leaning'
              : 'upright'
      }
      topPercent={layers?.topPercent ?? 0}
      bottomPercent={layers?.bottomPercent ?? 0}
      {...(title ? { title } : {})}
    />
  )
}
