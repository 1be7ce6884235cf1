import { readFile } from 'node:fs/promises'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { POST as startStudy } from '@/app/api/studies/route'
import { roles, type Role } from '@/lib/auth/actor'
import { may, permissions, type Permission } from '@/lib/auth/permissions'
import { newId } from '@/lib/db/id'
import { call } from '../support/call'
import { testDatabase, type Signed, type TestDatabase } from '../support/database'
import { initialOf, makeBatch, makeProtocol, makeStations } from '../support/running-study'
import { allRoutes, filesNamed, paramsOf, type FoundRoute } from '../support/walk'

/** What may be reached without a session, named here a second time on purpose. */
const publicRoutes = [
  'POST /api/invitations',
  'POST /api/resets',
  'PUT /api/resets',
  'POST /api/session',
  'POST /api/setup',
  ...['GET', 'POST', 'PUT', 'PATCH', 'DELETE'].map((method) => `${method} /api/[...path]`),
]
const publicPages = [
  'app/(auth)/invitation/[token]/page.tsx',
  'app/(auth)/reset/[token]/page.tsx',
  'app/(auth)/reset/page.tsx',
  'app/(auth)/setup/page.tsx',
  'app/(auth)/sign-in/page.tsx',
  'app/(device)/shell/page.tsx',
]

let t: TestDatabase
let routes: FoundRoute[]
let strange: string[]
const people = new Map<Role, Signed>()

beforeAll(async () => {
  t = await testDatabase()
  await t.lab()
  for (const role of roles) people.set(role, await t.person(role))
  ;({ routes, strange } = await allRoutes())
  // Signing out works, so it comes last.
  const isSignOut = (found: FoundRoute) => name(found) === 'DELETE /api/session'
  routes = [...routes.filter((found) => !isSignOut(found)), ...routes.filter(isSignOut)]
})
afterAll(() => t.close())

const name = ({ method, address }: FoundRoute) => `${method} ${address}`
const knock = (found: FoundRoute, cookie?: string) =>
  call(found.route, {
    method: found.method,
    path: found.address.replace(/\[[^\]]+\]/g, 'x'),
    params: paramsOf(found.address),
    body: found.route.kind === 'upload' ? new FormData() : {},
    ...(cookie ? { cookie } : {}),
  })

it('every route is declared through the wrappers and carries its permission', () => {
  expect(strange).toEqual([])
  expect(routes.length).toBeGreaterThan(15)
  for (const { route } of routes) expect(Object.keys(permissions)).toContain(route.permission)
  expect(
    routes
      .filter((found) => found.route.permission === 'public')
      .map(name)
      .sort(),
  ).toEqual(publicRoutes.sort())
})

it('a reading method never writes and a writing one never reads only', () => {
  for (const found of routes.filter((one) => one.address !== '/api/[...path]'))
    expect([name(found), ['read', 'download'].includes(found.route.kind)]).toEqual([
      name(found),
      found.method === 'GET',
    ])
})

it('R07: without a cookie every route but the public ones answers 401', async () => {
  for (const found of routes.filter((one) => one.route.permission !== 'public')) {
    const answer = await knock(found)
    expect([name(found), answer.status]).toEqual([name(found), 401])
    expect(answer.body.error.sentence).toMatch(/Sign in/)
  }
})

it('A05: every route × every role answers as the table says', async () => {
  for (const found of routes.filter((one) => one.route.permission !== 'public'))
    for (const [role, { cookie, actor }] of people) {
      const answer = await knock(found, cookie)
      const cell = `${name(found)} as ${role}`
      if (may(actor, found.route.permission))
        expect([cell, [401, 403].includes(answer.status)]).toEqual([cell, false])
      else expect([cell, answer.status]).toEqual([cell, 403])
      // Nothing here exists and nothing sent is complete, so a fault would be ours.
      expect([cell, answer.status < 500]).toEqual([cell, true])
    }
}, 90_000)

it('A05: somebody without a role may do nothing', async () => {
  const { cookie } = await t.person([])
  for (const found of routes.filter((one) => one.route.permission !== 'public'))
    expect([name(found), (await knock(found, cookie)).status]).toEqual([name(found), 403])
})

it('A05: a study of somebody else is not there for a client, at any address of it', async () => {
  const formulator = await t.person('formulator')
  await makeStations(formulator.actor)
  const protocolVersionId = await makeProtocol(formulator.actor)
  const batchId = await makeBatch(formulator.actor, { code: 'SWEEP-1' })
  const body = { id: newId(), title: 'Not shared', protocolVersionId, batchIds: [batchId] }
  const input = { ...body, initialReadings: initialOf(batchId) }
  expect((await call(startStudy, { cookie: formulator.cookie, body: input })).status).toBe(200)
  const { code } = await t.db
    .selectFrom('study')
    .select('code')
    .where('id', '=', body.id)
    .executeTakeFirstOrThrow()
  const client = await t.person('client')
  const open = routes.filter(
    (found) => found.address.startsWith('/api/studies/[code]') && may(client.actor, found.route.permission),
  )
  expect(open.length).toBeGreaterThan(1)
  for (const found of open) {
    const options = {
      method: found.method,
      params: { code },
      query: { batchId, studyStationId: newId(), attribute: 'ph' },
      body: { isFollowing: true },
      cookie: client.cookie,
    }
    expect([name(found), (await call(found.route, options)).status]).toEqual([name(found), 404])
  }
})

it('A07: every refusal of every route carries the headers', async () => {
  for (const found of routes) {
    const { headers } = await knock(found)
    expect([name(found), headers.get('cache-control'), headers.get('x-content-type-options')]).toEqual([
      name(found),
      'no-store',
      'nosniff',
    ])
  }
})

describe('pages', () => {
  it('each declares its permission and asks for exactly that one', async () => {
    for (const file of await filesNamed('page.tsx')) {
      const source = await readFile(file, 'utf8')
      const declared = /^export const permission = '([^']+)'/m.exec(source)?.[1]
      expect([file, declared && declared in permissions]).toEqual([file, true])
      const isPublic = publicPages.includes(file)
      expect([file, declared === 'public']).toEqual([file, isPublic])
      expect([file, isPublic || /\bpage\(permission\)/.test(source)]).toEqual([file, true])
    }
  })
})

/** The table of the product's description, typed once more: technician, formulator, QA, manager, client. */
const table: Record<Permission, string> = {
  'reading.log': 'yes yes no no no',
  'photo.add': 'yes yes no no no',
  'photo.audit': 'no no yes yes no',
  'handover.write': 'yes yes no no no',
  'day.review': 'no no yes no no',
  'cycle.log': 'yes yes no no no',
  'flag.comment': 'yes yes yes yes no',
  'flag.answer': 'no yes yes no no',
  'flag.close-out': 'no no yes no no',
  'formula.read': 'yes yes yes yes no',
  'formula.write': 'no yes no no no',
  'batch.read': 'yes yes yes yes no',
  'batch.write': 'no yes no no no',
  'protocol.read': 'yes yes yes yes no',
  'protocol.write': 'no yes no no no',
  'protocol.approve': 'no no yes no no',
  'study.read': 'yes yes yes yes yes',
  'study.write': 'no yes no no no',
  'bench.read': 'yes yes yes yes no',
  'reading.read': 'yes yes yes yes no',
  'case.read': 'yes yes yes yes no',
  'case.put-forward': 'no yes no no no',
  'case.sign': 'no no yes no no',
  'station.read': 'yes yes yes yes no',
  'station.write': 'no no no yes no',
  'station.log': 'yes no no yes no',
  'jar.move': 'yes yes no yes no',
  'instrument.read': 'yes yes yes yes no',
  'instrument.write': 'no no no yes no',
  'instrument.calibrate': 'yes no no yes no',
  'person.manage': 'no no no yes no',
  'lab.manage': 'no no no yes no',
  'mail.read': 'no no no yes no',
  'trail.read': 'yes yes yes yes no',
  'report.read': 'yes yes yes yes yes',
  'profile.own': 'yes yes yes yes yes',
  public: 'yes yes yes yes yes',
}

it('A05: permissions.ts is the table', () => {
  expect(Object.keys(permissions).sort()).toEqual(Object.keys(table).sort())
  for (const permission of Object.keys(table) as Permission[]) {
    const cells = roles.map((role) => (may({ roles: [role] }, permission) ? 'yes' : 'no')).join(' ')
    expect([permission, cells]).toEqual([permission, table[permission]])
  }
})

it('A05: two roles may what either may', () => {
  expect(may({ roles: ['technician', 'qa'] }, 'case.sign')).toBe(true)
  expect(may({ roles: ['technician', 'qa'] }, 'reading.log')).toBe(true)
  expect(may({ roles: ['technician', 'qa'] }, 'study.write')).toBe(false)
})
