import type { Db } from '@/lib/db/client'

/** One thing that can be recomputed from the database alone. What it finds wrong, one sentence each. */
export type Check = { name: string; run: (db: Db) => Promise<string[]> }
