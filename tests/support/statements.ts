import pg from 'pg'

const uncounted = /^\s*(begin|start transaction|commit|rollback|select set_config)/i
const session = /from "session"/i

/**
 * Counts in pg itself, because lucia and pg-boss do not go through Kysely. BEGIN, COMMIT, set_config and
 * the session's two are left out.
 */
export async function countStatements(
  work: () => Promise<unknown>,
): Promise<{ count: number; texts: string[] }> {
  const texts: string[] = []
  const prototype = pg.Client.prototype as unknown as { query: (...args: unknown[]) => unknown }
  const original = prototype.query
  prototype.query = function (this: unknown, ...args: unknown[]) {
    const first = args[0] as string | { text?: string }
    const text = typeof first === 'string' ? first : (first?.text ?? '')
    if (text && !uncounted.test(text) && !session.test(text)) texts.push(text)
    return original.apply(this, args)
  }
  try {
    await work()
  } finally {
    prototype.query = original
  }
  return { count: texts.length, texts }
}
