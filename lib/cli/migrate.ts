import { migrate } from '@/lib/db/migrator'
import { databaseUrl } from '@/lib/env'
import { installJobs } from '@/lib/jobs/install'

try {
  const ownerUrl = databaseUrl('owner')
  const done = await migrate(ownerUrl)
  await installJobs(ownerUrl)
  console.log(done.length === 0 ? 'The database is up to date.' : `Migrated: ${done.join(', ')}.`)
} catch (error) {
  console.error(error instanceof Error ? error.message : String(error))
  process.exitCode = 1
}
