import { ESLint } from 'eslint'
import path from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'

describe('the walls between the rooms', () => {
  let eslint: ESLint
  beforeAll(async () => {
    eslint = new ESLint({ ruleFilter: ({ ruleId }) => ruleId === 'stillstand/boundaries' })
    // The first text loads the configuration with all its plugins.
    await complaints('lib/jar/rules.ts', '')
  }, 60_000)

  async function complaints(file: string, code: string): Promise<string[]> {
    const [result] = await eslint.lintText(code, { filePath: path.resolve(file) })
    return result?.messages.map((message) => message.message) ?? []
  }

  const refused: [string, string, string][] = [
    ['lib/session/commands.ts', "import { Lucia } from 'lucia'", 'Only lib/auth imports lucia'],
    ['app/(notebook)/studies/page.tsx', "import { db } from '@/lib/db/client'", 'touch the database'],
    ['lib/flag/mail.ts', "import { sql } from 'kysely'", 'touch the database'],
    ['lib/jar/rules.ts', "import { findJar } from './queries'", 'run in the browser too'],
    [
      'components/jar/jar-form.tsx',
      "import { getJar } from '@/lib/jar/queries/jars'",
      'Components run in the browser',
    ],
    [
      'components/jar/jar-form.tsx',
      "import { write } from '@/lib/http/route'",
      'Components run in the browser',
    ],
    ['components/marks/jar.ts', "import useSWR from 'swr'", 'draw plain arrays'],
    ['lib/science/mean.ts', "import * as z from '@/lib/http/zod'", 'imports nothing of the project'],
    ['migrations/0009_x.ts', "import { db } from '@/lib/db/client'", 'A migration is frozen'],
    ['lib/photo/jobs.ts', "const s = await import('sharp')", 'out by decision'],
    ['lib/jar/index.ts', "export * from './schema'", 'No barrels'],
    ['lib/jar/utils.ts', 'export const x = 1', 'name the file after the concept'],
    ['lib/jar/numbers.ts', 'export const x = 1', "A noun's folder holds"],
  ]
  it.each(refused)('%s may not: %s', async (file, code, complaint) => {
    expect((await complaints(file, code)).join('\n')).toContain(complaint)
  })

  const allowed: [string, string][] = [
    ['lib/auth/session.ts', "import { Lucia } from 'lucia'"],
    ['lib/jar/queries.ts', "import type { Db } from '@/lib/db/client'"],
    ['lib/jar/commands/void-jar.ts', "import { sql } from 'kysely'"],
    ['lib/jar/rules.ts', "import type { JarRow } from './queries'"],
    ['components/jar/jar-form.tsx', "import type { JarRow } from '@/lib/jar/queries/jars'"],
    ['components/jar/jar-form.tsx', "import { jarInput } from '@/lib/jar/schema'"],
    ['lib/science/mean.ts', "import { assertFinite } from './guard'"],
  ]
  it.each(allowed)('%s may: %s', async (file, code) => {
    expect(await complaints(file, code)).toEqual([])
  })
})
