import { dayText } from '@/lib/report/rules'
import { hashMethod } from '@/lib/science/methods/making'
import { mktMethod } from '@/lib/science/methods/heat'
import { exactly, factsOf, type FigureFacts } from '@/lib/science/methods/method'
import {
  extrapolationCapMethod,
  observedMethod,
  shelfLifeMethod,
  wholeMonthsMethod,
} from '@/lib/science/methods/statistics'
import type { CaseDetail } from '@/lib/shelf-case/queries/read'
import type { Computed } from '@/lib/shelf-case/rules/build'
import type { AttributeEvidence } from '@/lib/shelf-case/rules/content'
import { decidingFit } from '@/lib/shelf-case/rules/scale'

/** What the months of one attribute are computed from, as the case holds it. */
export function attributeFacts(a: AttributeEvidence, content: Computed, when: string): FigureFacts {
  const result = exactly(a.supportedMonths, a.supportedMonths === 1 ? 'month' : 'months')
  if (a.calc === null) {
    const drift = a.series?.find((one) => one.calc !== null)
    return factsOf(observedMethod, {
      name: `${a.label} supports`,
      result,
      when,
      values: {
        limit: a.limit,
        worst:
          a.worst && `${exactly(a.worst.value, a.unit)}, ${a.worst.batch}, month ${exactly(a.worst.months)}`,
        times: a.reading.length,
        months: a.supportedMonths,
      },
      more: (a.series ?? []).flatMap(({ batch, calc }) =>
        calc ? [{ says: `batch ${batch} stands`, value: calc.output.standing }] : [],
      ),
      ...(drift?.calc ? { input: drift.calc.input } : {}),
    })
  }
  const { input, output } = a.calc
  const fit = decidingFit(a)
  const test = (name: 'slopes' | 'intercepts') => {
    const found = output.tests.find((one) => one.name === name)
    if (!found || found.F === null || found.p === null) return null
    return `F ${exactly(found.F)} with ${found.df1} and ${found.df2}, p ${exactly(found.p)}: ${found.pooled ? 'pooled' : 'not pooled'}`
  }
  return factsOf(shelfLifeMethod, {
    name: `${a.label} supports`,
    result,
    when,
    values: {
      limit: a.limit,
      crossing: a.crossingMonths ?? `not by month ${exactly(input.horizon)}`,
      cap: content.cap?.output.capMonths,
      months: a.supportedMonths,
      model: output.model,
      slopes: test('slopes'),
      intercepts: test('intercepts'),
      slope: fit?.slope,
      intercept: fit?.intercept,
      residualSd: fit?.residualSd,
      df: fit?.df,
      scale: a.scale,
      n: a.n,
      direction: input.direction,
    },
    more: [
      { says: 'confidence', value: exactly(input.confidence ?? 0.95) },
      { says: 'decided by', value: a.decidedBy ?? output.limitingBatch ?? 'all batches' },
    ],
    input,
  })
}

export function capFacts(cap: NonNullable<Computed['cap']>, when: string): FigureFacts {
  const { input, output } = cap
  const yesNo = (is: boolean | undefined) => (is === undefined ? null : is ? 'yes' : 'no')
  return factsOf(extrapolationCapMethod, {
    result: exactly(output.capMonths, 'months'),
    when,
    values: {
      rule: output.rule,
      dataMonths: input.dataMonths,
      storage: input.storage,
      acceleratedChange: yesNo(input.acceleratedChange),
      intermediateChange: yesNo(input.intermediateChange),
      variable: yesNo(input.variable),
      statistics: yesNo(input.statistics),
    },
    input,
  })
}

export function recordFacts(record: NonNullable<Computed['temperatureRecord']>, when: string): FigureFacts {
  const { input, output } = record.calc
  return factsOf(mktMethod, {
    result: exactly(output.mktC, '°C'),
    when,
    values: {
      entries: input.temperaturesC.length,
      meanC: output.meanC,
      minC: output.minC,
      maxC: output.maxC,
      deltaHkJ: input.deltaHkJ,
    },
    more: [{ says: 'excursions', value: String(record.excursions.length) }],
    input,
  })
}

export function monthsFacts(content: Computed, months: number, when: string): FigureFacts {
  const limiting = content.attributes.find((a) => a.attribute === content.limitingAttribute)
  return factsOf(wholeMonthsMethod, {
    result: exactly(content.supportedMonths, 'months'),
    when,
    values: {
      limiting: limiting ? limiting.label : 'none',
      cap: content.cap?.output.capMonths,
      proposed: months || null,
    },
    more: content.attributes.map((a) => ({ says: a.label, value: exactly(a.supportedMonths, 'months') })),
  })
}

export function hashFacts(detail: CaseDetail): FigureFacts {
  return factsOf(hashMethod, {
    result: detail.contentSha256 ?? '',
    when: frozenText(detail),
    values: { bytes: `case ${detail.code}, format ${detail.content?.format ?? ''}` },
  })
}

/** A draft is computed as one looks; what is frozen says since when. */
export function frozenText({ putForwardAt, content }: CaseDetail): string {
  return content && putForwardAt
    ? `Frozen ${dayText(putForwardAt)}; computed then, never since.`
    : 'A draft, computed as it is shown.'
}
