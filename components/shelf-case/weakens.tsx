import { FlagMark } from '@/components/marks/flag-mark'
import { JarGlyph } from '@/components/marks/jar-glyph'
import type { Weakness } from '@/lib/shelf-case/rules/content'

/** What a reviewer weighs: what stands, what was answered, what is missing. */
export function Weakens({ weakens }: { weakens: Weakness[] }) {
  if (weakens.length === 0) return <p>Nothing was noted: no flag, no missing pull, no excursion.</p>
  return (
    <ul className="-mt-3">
      {weakens.map((w, i) => (
        <li key={i} className="flex gap-3 border-b border-hair py-2.5">
          <span className="w-8 shrink-0 pt-1" aria-hidden>
            {w.state === 'stands' ? <FlagMark solid={false} /> : null}
            {w.state === 'answered' ? (
              <svg viewBox="0 0 20 16" width="20" height="16">
                <path d="M2 8 8 14 18 2" fill="none" stroke="currentColor" strokeWidth="2.5" />
              </svg>
            ) : null}
            {w.state === 'missing' ? <JarGlyph height={24} state="broken" /> : null}
          </span>
          <div className="min-w-0">
            <h3 className="font-650">{w.title}</h3>
            <p>{w.text}</p>
            <p className="text-13 text-soft">
              {w.state === 'stands' ? 'stands; weigh it' : w.by ? `answered by ${w.by}` : w.state}
            </p>
          </div>
        </li>
      ))}
    </ul>
  )
}
