import type { Db } from '@/lib/db/client'
import type { Amounts } from '../rules/totals'

/** The amounts of several versions in one statement, for totals beside lists. */
export async function amountsOfVersions(
  db: Db,
  versionIds: readonly string[],
): Promise<Map<string, Amounts[]>> {
  const byVersion = new Map<string, Amounts[]>(versionIds.map((id) => [id, []]))
  if (!versionIds.length) return byVersion
  const rows = await db
    .selectFrom('formulaLine')
    .select(['formulaVersionId', 'percentThousandths', 'density', 'isInternal', 'priceCentsPerKg'])
    .where('formulaVersionId', 'in', versionIds)
    .execute()
  for (const { formulaVersionId, ...amounts } of rows) byVersion.get(formulaVersionId)?.push(amounts)
  return byVersion
}
