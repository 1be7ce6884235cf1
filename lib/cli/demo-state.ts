import pg from 'pg'
import { databaseUrl } from '@/lib/env'
import { demoStateQuery } from './databases.mjs'

// Says what `npm start` may do about the demo in a database that it did not make: filled, people or empty.
const client = new pg.Client({ connectionString: databaseUrl('owner') })
await client.connect()
try {
  const { rows } = await client.query<{ state: string }>(demoStateQuery)
  console.log(rows[0]?.state)
} finally {
  await client.end()
}
