import pino from 'pino'

// One JSON object a line: a line break inside a name arrives escaped and cannot forge a line.
export const log = pino({
  level: process.env['LOG_LEVEL'] ?? (process.env['VITEST'] ? 'silent' : 'info'),
  base: null,
  redact: ['*.password', '*.token', '*.cookie'],
})
