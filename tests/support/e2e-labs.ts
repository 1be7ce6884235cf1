import { execFile } from 'node:child_process'
import path from 'node:path'
import { promisify } from 'node:util'
import { script } from '@/lib/cli/steps.mjs'
import { urlAs } from './template'

// The labs that browser tests meet: one filled with the demo, its copy for pages that are only looked at while the first
// is written to, and one empty as after a first start.

export type LabName = 'demo' | 'looked' | 'empty'
export type Lab = { name: LabName; url: string; port: number; database: string; env: Record<string, string> }

export const projectRoot = path.resolve(import.meta.dirname, '../..')
const ports = (process.env['STILLSTAND_E2E_PORTS'] ?? '4310,4311,4312').split(',').map(Number)

function describeLab(name: LabName, port: number): Lab {
  // The port is in the name, so that two runs on one server do not drop each other's lab.
  const database = `stillstand_e2e_${name}_${port}`
  const url = `http://127.0.0.1:${port}`
  return {
    name,
    url,
    port,
    database,
    env: {
      DATABASE_OWNER_URL: urlAs('stillstand_owner', database),
      DATABASE_URL: urlAs('stillstand_app', database),
      DATABASE_SEED_URL: urlAs('stillstand_seed', database),
      HOST: '127.0.0.1',
      PORT: String(port),
      PUBLIC_URL: url,
      STILLSTAND_DEMO: name === 'empty' ? 'off' : 'on',
      STILLSTAND_FILES: path.join(projectRoot, '.data/test', name, 'files'),
      LOG_LEVEL: 'warn',
    },
  }
}

export const demoLab = describeLab('demo', ports[0] ?? 4310)
export const emptyLab = describeLab('empty', ports[1] ?? 4311)
export const lookedLab = describeLab('looked', ports[2] ?? demoLab.port + 2)

/** The one-time code that the console shows to whoever starts an empty lab; each call makes a new one. */
export async function firstCode(): Promise<string> {
  const env = { ...process.env, ...emptyLab.env }
  const { stdout } = await promisify(execFile)(process.execPath, script('lib/cli/first-code.ts'), {
    cwd: projectRoot,
    env,
  })
  return stdout.trim().split('\n').at(-1) ?? ''
}
