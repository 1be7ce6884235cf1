/**
 * `standard` keeps every job. `short` keeps one waiting job per singletonKey and lets the next one with the
 * same key fall into it, which is how mails about one thing are gathered.
 */
type Queue = {
  policy: 'standard' | 'short'
  /** minute hour day month weekday, in UTC */
  cron?: string
  retryLimit: number
  retryDelay: number
}

const mail = { policy: 'standard', retryLimit: 8, retryDelay: 15 } as const

/** The owner makes these when it migrates, so the list imports nothing. */
export const queues = {
  'trail.seal': { policy: 'short', cron: '* * * * *', retryLimit: 0, retryDelay: 0 },
  'session.sweep': { policy: 'short', cron: '17 3 * * *', retryLimit: 1, retryDelay: 60 },
  'person.mail-invitation': mail,
  'person.mail-reset': mail,
  'cycle.watch': { policy: 'short', cron: '*/5 * * * *', retryLimit: 0, retryDelay: 0 },
  'cycle.mail': mail,
  'flag.mail': { ...mail, policy: 'short' },
  'shelf-case.mail': mail,
  'photo.preview': { policy: 'standard', retryLimit: 3, retryDelay: 5 },
  'photo.sweep': { policy: 'short', cron: '37 3 * * *', retryLimit: 1, retryDelay: 60 },
} as const satisfies Record<string, Queue>

export type QueueName = keyof typeof queues
