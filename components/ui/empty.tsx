import type { ReactNode } from 'react'

/** What will be here, and the one next act. The dotted jars are those still to come. */
export function Empty({ title, sentence, act }: { title: ReactNode; sentence?: ReactNode; act?: ReactNode }) {
  return (
    <div className="py-6">
      <svg viewBox="0 0 200 40" width="200" height="40" aria-hidden>
        {[0, 1, 2, 3, 4].map((place) => (
          <path
            key={place}
            transform={`translate(${14 + place * 40} 38)`}
            d="M-10.2 -30.1V-1H10.2V-30.1M-10.8 -33.4H10.8"
            fill="none"
            stroke="var(--rule)"
            strokeWidth="1.5"
            strokeLinecap="round"
            strokeDasharray="0.01 3.15"
          />
        ))}
        <path d="M0 39H200" stroke="var(--ink)" strokeWidth="1" />
      </svg>
      <p className="mt-3 text-20 font-650">{title}</p>
      {sentence ? <p className="mt-1 max-w-[60ch] text-15">{sentence}</p> : null}
      {act ? <div className="mt-4">{act}</div> : null}
    </div>
  )
}
