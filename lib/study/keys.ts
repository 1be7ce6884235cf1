import type { SeriesAddress } from './schema'

/** Jars to measure by day, of all running studies. */
export const workloadKey = '/api/workload'

export const studyKeys = {
  start: '/api/studies',
  one: (code: string) => address(code),
  sheet: (code: string) => `${address(code)}/sheet`,
  curves: (code: string, beside: string | null = null) =>
    `${address(code)}/curves${beside ? `?${new URLSearchParams({ beside })}` : ''}`,
  /** What one series is computed from. */
  series: (code: string, { batchId, studyStationId, attribute }: SeriesAddress) =>
    `${address(code)}/series?${new URLSearchParams({ batchId, studyStationId, attribute })}`,
  amendments: (code: string) => `${address(code)}/amendments`,
  end: (code: string) => `${address(code)}/end`,
  follow: (code: string) => `${address(code)}/follow`,
}

function address(code: string): string {
  return `/api/studies/${encodeURIComponent(code)}`
}
