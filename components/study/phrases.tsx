import { heatWeight } from '@/components/marks/heat'
import type { Phrase } from '@/lib/study/rules/finding'

/** A finding with its weight where it lies; a station weighs as much as it is hot, yet more than the words around. */
export function Phrases({ phrases }: { phrases: Phrase[] }) {
  return phrases.map((phrase, index) =>
    phrase.isStrong ? (
      <b key={index} style={{ fontWeight: weightOf(phrase.text) }}>
        {phrase.text.replaceAll(' ', '\u00a0')}
      </b>
    ) : (
      <span key={index}>{phrase.text}</span>
    ),
  )
}

function weightOf(text: string): number {
  const celsius = /^(−?)(\d+) °C$/.exec(text)
  if (!celsius) return 700
  return Math.max(600, heatWeight(Number(celsius[2]) * (celsius[1] ? -1 : 1)))
}
