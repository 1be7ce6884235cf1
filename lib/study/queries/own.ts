import { sql, type AliasedRawBuilder } from 'kysely'
import type { OwnAttribute } from '@/lib/reading/schema/own'

/** What the study's plan says of an attribute of its own, beside a row that names one; null for those that all know. */
export function ownOf(study: string, row: string): AliasedRawBuilder<OwnAttribute | null, 'own'> {
  const key = sql.ref(`${row}.attribute`)
  return sql<OwnAttribute | null>`(select planned -> 'own' from jsonb_array_elements(${sql.ref(`${study}.plan`)} -> 'attributes') planned
    where ${key} like 'own.%' and planned ->> 'attribute' = ${key})`.as('own')
}
