import { EnvironmentError, readEnvironment } from '@/lib/env'

// Run by `npm start` before anything else of ours, so that a wrong variable is named before it does harm.
try {
  readEnvironment(process.env)
} catch (error) {
  if (!(error instanceof EnvironmentError)) throw error
  for (const problem of error.problems) console.error(problem)
  process.exitCode = 1
}
