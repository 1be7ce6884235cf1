import { refuse } from '@/lib/http/errors'
import type { PlannedAttribute } from '@/lib/protocol/schema'
import { attributeOf, attributeName, toldFromInitial, readByText } from '@/lib/reading/schema/attributes'
import { methodText } from '@/lib/reading/rules/conditions'
import { computed, ImpossibleEntry } from '@/lib/reading/rules/impossible-entry'
import { valueOf as readingValue } from '@/lib/reading/rules/value'
import { readTyped } from '@/lib/reading/schema/typed'
import { isBeyondBand, toleranceBand } from '@/lib/science/band'
import { mean } from '@/lib/science/mean'
import { viscosity, viscosityFactor } from '@/lib/science/viscosity'
import type { Band } from '@/lib/science/series'
import type { InitialReading } from '@/lib/study/schema'
import { inSentence } from './finding'
import { shownValue } from './words'

export type InitialRow = {
  batchId: string
  attribute: string
  replicate: number
  value: number
  word: string | null
  typed: string
  detail: Record<string, unknown>
  instrumentId: string | null
  measuredAt: string | undefined
}

/**
 * The initial readings of every batch as rows, or a refusal that names the field. An initial is needed wherever
 * the band is told from it; separation, look, odour and mass start from nothing by definition.
 */
export function initialRows(
  planned: PlannedAttribute[],
  batches: { id: string; code: string }[],
  given: InitialReading[],
): InitialRow[] {
  for (const batch of batches) {
    for (const attribute of planned) refuseMissing(attribute, batch, given)
  }
  return given.flatMap((reading, index) => {
    const attribute = planned.find((one) => one.attribute === reading.attribute)
    const batch = batches.find((one) => one.id === reading.batchId)
    if (!attribute || !batch) {
      throw refuse.invalid(
        'An initial reading belongs to no batch or attribute of this study. Leave it out.',
        {
          [`initialReadings.${index}.attribute`]: 'This study does not measure it.',
        },
      )
    }
    const rows = reading.typed.map((text, place) => rowOf(attribute, reading, text, place, index))
    refuseOutside(attribute, batch, rows, index)
    return rows
  })
}

function refuseMissing(
  attribute: PlannedAttribute,
  batch: { id: string; code: string },
  given: InitialReading[],
) {
  if (attribute.tolerance.kind === 'range' && !toldFromInitial(attribute)) return
  const label = attributeName(attribute.attribute)
  const readings = given.filter((one) => one.batchId === batch.id && one.attribute === attribute.attribute)
  if (readings.length === 0) {
    throw refuse.invalid(
      `${batch.code} has no initial ${inSentence(attribute.attribute)}, and its ${toldFromInitial(attribute) ? 'change' : 'band'} is told from the initial. Measure it before the study starts.`,
      { initialReadings: `${label} of ${batch.code} is missing.` },
    )
  }
  if (readings.length > 1) {
    throw refuse.invalid(
      `The initial ${inSentence(attribute.attribute)} of ${batch.code} is given twice. Leave one out.`,
      {
        initialReadings: `${label} of ${batch.code} stands twice.`,
      },
    )
  }
}

function rowOf(
  planned: PlannedAttribute,
  reading: InitialReading,
  text: string,
  place: number,
  index: number,
): InitialRow {
  const attribute = attributeOf(planned.attribute, planned)
  const path = `initialReadings.${index}.typed.${place}`
  if (readByText.has(attribute.kind)) return ofItself(planned, reading, text, place, path)
  const wordAt = attribute.words?.indexOf(text.toLowerCase()) ?? -1
  const typed = wordAt === -1 ? readTyped(text) : wordAt
  if (typed === null) {
    throw refuse.invalid(`The initial ${inSentence(attribute.key)} "${text}" is no number. Type it again.`, {
      [path]: attribute.words ? `Choose one of: ${attribute.words.join(', ')}.` : 'Type a number.',
    })
  }
  const { value, detail } = valueOf(planned, reading, typed, path)
  const { lower, upper } = attribute.possible
  if (value < lower || value > upper) {
    throw refuse.invalid(
      `${attribute.label} runs from ${lower} to ${upper}, so ${text} cannot be. Type it again.`,
      {
        [path]: `${attribute.label} runs from ${lower} to ${upper}.`,
      },
    )
  }
  return {
    batchId: reading.batchId,
    attribute: planned.attribute,
    replicate: place + 1,
    value,
    word: attribute.words?.[value] ?? null,
    typed: text,
    detail: { method: methodText(planned), ...planned.conditions, ...detail },
    instrumentId: reading.instrumentId,
    measuredAt: reading.measuredAt,
  }
}

function ofItself(
  planned: PlannedAttribute,
  { batchId, detail, instrumentId, measuredAt }: InitialReading,
  text: string,
  place: number,
  path: string,
): InitialRow {
  try {
    const read = readingValue(
      { attribute: planned.attribute, typed: text, detail },
      {
        ...{ planned, spindles: [], last: null, initial: 'self' },
        jar: { tareG: null, grossG: null, fillHeightMm: null },
      },
    )
    return {
      ...{
        batchId,
        attribute: planned.attribute,
        replicate: place + 1,
        typed: text,
        instrumentId,
        measuredAt,
      },
      ...{ value: read.value, word: read.word, detail: { method: methodText(planned), ...read.detail } },
    }
  } catch (error) {
    if (!(error instanceof ImpossibleEntry)) throw error
    throw refuse.invalid(`The initial ${inSentence(planned.attribute)}: ${error.sentence}`, {
      [path]: error.sentence,
    })
  }
}

function valueOf(planned: PlannedAttribute, reading: InitialReading, typed: number, path: string) {
  const { isTorque, detail } = reading
  if (!isTorque) return { value: typed, detail: { ...planned.viscosity, ...detail } }
  const conditions = { ...planned.viscosity, ...detail }
  if (conditions.spindleConstant === undefined || conditions.rpm === undefined) {
    throw refuse.invalid(
      'A torque needs the protocol to name spindle and speed. Type mPa·s, or add them there.',
      {
        [path]: 'Spindle and speed are missing.',
      },
    )
  }
  if (!(typed > 0 && typed <= 110) || !(conditions.rpm > 0)) {
    throw refuse.invalid(`A torque of ${typed} % cannot be. It runs from 0 to 100 %.`, {
      [path]: 'Torque runs from 0 to 100 %.',
    })
  }
  const factor = viscosityFactor(conditions.spindleConstant, conditions.rpm)
  const value = computed(viscosity({ torquePercent: typed, factor }).mPas)
  return { value, detail: { ...conditions, torquePercent: typed } }
}

function refuseOutside(
  planned: PlannedAttribute,
  batch: { code: string },
  rows: InitialRow[],
  index: number,
) {
  const initial = mean(rows.map((row) => row.value))
  const band = toleranceBand(planned.tolerance, initial)
  if (!isBeyondBand(band, initial)) return
  throw refuse.invalid(
    `The initial ${inSentence(planned.attribute)} of ${batch.code} is ${shownValue(attributeOf(planned.attribute, planned), initial)}, outside its own band (${bandText(planned, band)}). Correct the reading, or the tolerance in the protocol.`,
    { [`initialReadings.${index}.typed.0`]: 'Outside its own band.' },
  )
}

function bandText(planned: PlannedAttribute, { lower, upper }: Band): string {
  const shown = (value: number) => shownValue(attributeOf(planned.attribute, planned), value)
  if (lower === null) return `at most ${shown(upper!)}`
  return upper === null ? `at least ${shown(lower)}` : `${shown(lower)} to ${shown(upper)}`
}
