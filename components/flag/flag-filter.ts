import { flagStates } from '@/lib/flag/schema'

/** Which flags are shown; stands in the address, so that a view can be shared and gone back to. */
export type ShownFlags = { state: (typeof flagStates)[number]; study: string | null }

export function readShown(search: Record<string, string | string[] | undefined>): ShownFlags {
  const { state, study } = search
  return {
    state: flagStates.find((one) => one === state) ?? 'open',
    study: typeof study === 'string' && study.trim() ? study.trim().slice(0, 40) : null,
  }
}

export function flagsAddress({ state, study }: ShownFlags): string {
  const search = new URLSearchParams({ ...(state === 'open' ? {} : { state }), ...(study ? { study } : {}) })
  return search.size > 0 ? `/flags?${search}` : '/flags'
}
