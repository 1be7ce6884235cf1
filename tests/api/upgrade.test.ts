import { afterAll, beforeAll, expect, it } from 'vitest'
import pg from 'pg'
import { Kysely, PostgresDialect } from 'kysely'
import { trailRows } from '@/lib/cli/checks/trail-rows'
import type { Db } from '@/lib/db/client'
import { newId } from '@/lib/db/id'
import { migrate } from '@/lib/db/migrator'
import { urlAs, withAdmin } from '../support/template'

/** The last migration of the first release; what is written below is written as it was written then. */
const firstRelease = '0005_shelf_case'
const system = '00000000-0000-7000-8000-000000000001'
const name = `stillstand_upgrade_${process.pid}`
const owner = urlAs('stillstand_owner', name)

beforeAll(async () => {
  await withAdmin((admin) => admin.query(`create database ${name} owner stillstand_owner`))
  await migrate(owner, firstRelease)
})
afterAll(() => withAdmin((admin) => admin.query(`drop database if exists ${name} with (force)`)))

it('D11, R05: a record of the first release is migrated whole, and verifies row by row', async () => {
  const client = new pg.Client({ connectionString: owner })
  await client.connect()
  const [formula, version, line, step, batch, weighing, done] = Array.from({ length: 7 }, newId)
  await client.query('begin')
  await client.query(`select set_config('app.actor_id', $1, true)`, [system])
  const write = (text: string, values: unknown[]) => client.query(text, values)
  await write(
    `insert into formula (id, code, name, emulsion_type, created_by) values ($1, 'OLD', 'cream', 'water-in-oil', $2)`,
    [formula, system],
  )
  await write(
    `insert into formula_version (id, formula_id, number, state, created_by) values ($1, $2, 1, 'locked', $3)`,
    [version, formula, system],
  )
  await write(
    `insert into formula_line (id, formula_version_id, position, phase, inci_name, percent_thousandths, density, is_internal)
     values ($1, $2, 1, 'A', 'Aqua', 100000, 1, true)`,
    [line, version],
  )
  await write(
    `insert into formula_step (id, formula_version_id, position, instruction) values ($1, $2, 1, 'Stir.')`,
    [step, version],
  )
  await write(
    `insert into batch (id, code, formula_version_id, size_g, created_by) values ($1, 'OLD-1', $2, 500, $3)`,
    [batch, version, system],
  )
  await write(
    `insert into batch_weighing (id, batch_id, formula_line_id, position, target_g, actual_typed, actual_g, lot, weighed_at, weighed_by)
     values ($1, $2, $3, 1, 500, '499,8', 499.8, 'L7', now(), $4)`,
    [weighing, batch, line, system],
  )
  await write(
    `insert into batch_step (id, batch_id, formula_step_id, position, actual_minutes, done_at, done_by)
     values ($1, $2, $3, 1, 5, now(), $4)`,
    [done, batch, step, system],
  )
  const plan = {
    attributes: [
      { attribute: 'ph', method: 'extract 1 to 10 in water, 30 minutes, at 25 °C', replicates: 1 },
      {
        attribute: 'viscosity',
        method: 'T-bar C, 10 rpm, 30 s, descending, unstirred, at 25 °C',
        viscosity: { spindle: 'T-bar C', spindleConstant: 10000, rpm: 10 },
      },
      { attribute: 'separation', method: 'ruler, at 25 °C' },
    ],
  }
  const [protocol, planned, study] = Array.from({ length: 3 }, newId)
  await write(`insert into protocol (id, code, name, created_by) values ($1, 'OLD', 'screen', $2)`, [
    protocol,
    system,
  ])
  await write(
    `insert into protocol_version (id, protocol_id, number, state, plan, created_by) values ($1, $2, 1, 'locked', $3, $4)`,
    [planned, protocol, JSON.stringify(plan), system],
  )
  await write(
    `insert into study (id, code, title, protocol_version_id, plan, started_at, started_on, end_weeks, fill_g, created_by)
     values ($1, 'OLD', 'old', $2, $3, now(), now(), 12, 30, $4)`,
    [study, planned, JSON.stringify(plan), system],
  )
  await client.query('commit')

  expect((await migrate(owner)).length).toBeGreaterThan(0)

  const { rows: portions } = await client.query(
    'select gross_typed, net_g, lot from batch_portion where batch_weighing_id = $1',
    [weighing],
  )
  expect(portions).toEqual([{ gross_typed: '499,8', net_g: '499.8', lot: 'L7' }])
  const { rows: entries } = await client.query(
    'select kind, actual_minutes from batch_step_entry where batch_step_id = $1',
    [done],
  )
  expect(entries).toEqual([{ kind: 'done', actual_minutes: '5' }])
  const { rows: plans } = await client.query(
    'select plan from study union all select plan from protocol_version',
  )
  for (const { plan: now } of plans)
    expect(now.attributes).toEqual([
      {
        ...{ attribute: 'ph', method: '', replicates: 1 },
        conditions: { phMethod: 'extract', extractParts: 10, extractMinutes: 30, sampleTemperatureC: 25 },
      },
      {
        ...plan.attributes[1],
        method: 'unstirred',
        conditions: { seconds: 30, path: 'descending', sampleTemperatureC: 25 },
      },
      plan.attributes[2],
    ])
  const { rows: trail } = await client.query(
    `select actor_id, reason from trail where table_name in ('batch_portion', 'batch_step_entry')`,
  )
  expect(trail).toHaveLength(2)
  for (const row of trail)
    expect(row).toMatchObject({ actor_id: system, reason: expect.stringMatching(/^Carried over/) })
  await client.end()

  const db = new Kysely({
    dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: owner, max: 1 }) }),
  })
  expect(await trailRows.run(db as unknown as Db)).toEqual([])
  await db.destroy()
})
