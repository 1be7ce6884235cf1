import pg from 'pg'
import PgBoss from 'pg-boss'
import { queues } from './queues'

/** The owner makes pg-boss' tables and queues; the application's role may only use them. */
export async function installJobs(ownerUrl: string): Promise<void> {
  const owner = new pg.Client({ connectionString: ownerUrl })
  await owner.connect()
  try {
    // Of two servers starting at once the second waits, and then finds everything there.
    await owner.query("select pg_advisory_lock(hashtext('stillstand jobs'))")
    await makeQueues(ownerUrl)
    await owner.query(`
      grant usage on schema pgboss to stillstand_app, stillstand_seed;
      grant select, insert, update, delete on all tables in schema pgboss to stillstand_app, stillstand_seed;
    `)
  } finally {
    await owner.end()
  }
}

async function makeQueues(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    max: 2,
    supervise: false,
    schedule: false,
    migrate: true,
  })
  boss.on('error', () => undefined)
  await boss.start()
  try {
    // pg-boss' own, for what runs by the clock.
    await boss.createQueue('__pgboss__send-it')
    for (const [name, { policy, retryLimit, retryDelay }] of Object.entries(queues)) {
      const options = { name, policy, retryLimit, retryDelay, retryBackoff: retryDelay > 0 }
      await boss.createQueue(name, options)
      await boss.updateQueue(name, options)
    }
  } finally {
    await boss.stop({ graceful: false })
  }
}
