import type { Trx } from '@/lib/db/client'
import { formulaTotals, type Amounts } from '../rules/totals'

/** What lists sort formulas by, kept whenever the lines of a latest version are written. */
export async function keepFigures(
  trx: Trx,
  versions: readonly { formulaId: string; versionId: string; lines: readonly Amounts[] }[],
): Promise<void> {
  const rows = versions.map(({ formulaId, versionId, lines }) => {
    const { internalVolumePercent, isHighInternalPhase, missingThousandths, costCentsPerKg } =
      formulaTotals(lines)
    return {
      ...{ formulaId, formulaVersionId: versionId },
      ...{ internalVolumePercent, isHighInternalPhase, missingThousandths, costCentsPerKg },
    }
  })
  await trx
    .insertInto('formulaFigure')
    .values(rows)
    .onConflict((conflict) =>
      conflict.column('formulaId').doUpdateSet((eb) => ({
        formulaVersionId: eb.ref('excluded.formulaVersionId'),
        internalVolumePercent: eb.ref('excluded.internalVolumePercent'),
        isHighInternalPhase: eb.ref('excluded.isHighInternalPhase'),
        missingThousandths: eb.ref('excluded.missingThousandths'),
        costCentsPerKg: eb.ref('excluded.costCentsPerKg'),
      })),
    )
    .execute()
}
