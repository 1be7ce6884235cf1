import { readdir } from 'node:fs/promises'
import path from 'node:path'
import { pathToFileURL } from 'node:url'
import type { Route } from '@/lib/http/route'

const root = path.resolve(import.meta.dirname, '../..')
const methods = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const

export type FoundRoute = { method: (typeof methods)[number]; address: string; route: Route }

/** Every file of one name under app, with its path from the project's root. */
export async function filesNamed(name: string): Promise<string[]> {
  const found = await readdir(path.join(root, 'app'), { recursive: true, withFileTypes: true })
  return found
    .filter((entry) => entry.isFile() && entry.name === name)
    .map((entry) => path.relative(root, path.join(entry.parentPath, entry.name)))
    .sort()
}

/** Every method of every route as it is exported; other exports are listed by name. */
export async function allRoutes(): Promise<{ routes: FoundRoute[]; strange: string[] }> {
  const routes: FoundRoute[] = []
  const strange: string[] = []
  for (const file of await filesNamed('route.ts')) {
    const exported = (await import(/* @vite-ignore */ pathToFileURL(path.join(root, file)).href)) as Record<
      string,
      unknown
    >
    const address = `/${path.dirname(file).replace(/^app\//, '')}`
    for (const [name, value] of Object.entries(exported)) {
      const method = methods.find((known) => known === name)
      if (method && isRoute(value)) routes.push({ method, address, route: value })
      else strange.push(`${file}: ${name}`)
    }
  }
  return { routes, strange }
}

/** Values for [id] and [code] in an address that name nothing. */
export function paramsOf(address: string): Record<string, string | string[]> {
  const params: Record<string, string | string[]> = {}
  for (const [, rest, name] of address.matchAll(/\[(\.\.\.)?(\w+)\]/g)) {
    const value =
      name === 'id' ? '01900000-0000-7000-8000-00000000dead' : name === 'number' ? '999' : 'NONE-999'
    params[name!] = rest ? [value] : value
  }
  return params
}

function isRoute(value: unknown): value is Route {
  return typeof value === 'function' && 'permission' in value && 'kind' in value
}
