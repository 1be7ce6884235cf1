import { ensureTemplate } from './template'

export async function setup(): Promise<void> {
  await ensureTemplate()
}
