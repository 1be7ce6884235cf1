import { useCallback, useEffect, useState } from 'react'

/** What is being typed, kept in the device at each key, so that a closed tab loses nothing. */
export function useKeptDraft<T extends object>(key: string, empty: T) {
  const [held, setHeld] = useState<{ key: string; draft: T }>({ key, draft: empty })
  const draft = held.key === key ? held.draft : empty

  useEffect(() => {
    const kept = readDraft<T>(key)
    // Read after the first paint: the server knows no device.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setHeld((before) => (kept || before.key !== key ? { key, draft: { ...empty, ...kept } } : before))
    // The empty draft is made anew at each render; only the place decides.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [key])

  const set = useCallback(
    (change: Partial<T>) => {
      const after = { ...draft, ...change }
      store(key, after)
      setHeld({ key, draft: after })
    },
    [key, draft],
  )

  const forget = useCallback(() => {
    store(key, null)
    setHeld({ key, draft: empty })
    // As above.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [key])

  return [draft, set, forget] as const
}

function readDraft<T>(key: string): Partial<T> | null {
  try {
    const text = localStorage.getItem(`stillstand.batch-draft.${key}`)
    return text ? (JSON.parse(text) as Partial<T>) : null
  } catch {
    return null
  }
}

function store(key: string, draft: object | null): void {
  try {
    if (draft) localStorage.setItem(`stillstand.batch-draft.${key}`, JSON.stringify(draft))
    else localStorage.removeItem(`stillstand.batch-draft.${key}`)
  } catch {
    // A full or forbidden store loses the draft at a reload, not what is on the screen.
  }
}
