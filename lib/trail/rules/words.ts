/** What the record calls its tables, fields and acts: the product's own words instead of the database's. */

export const tableWords: Record<string, string> = {
  batch: 'batch',
  batch_step: 'process step of a batch',
  batch_weighing: 'weighing of a batch',
  calibration: 'calibration',
  client: 'client',
  cycle_press: 'press at the freeze-thaw board',
  cycle_step: 'half of a freeze-thaw cycle',
  cycle_alarm: 'overdue half of a cycle, told by mail',
  flag: 'flag',
  flag_comment: 'comment on a flag',
  formula: 'formula',
  formula_answer: 'answer to a question of a formula',
  formula_line: 'line of a formula',
  formula_step: 'process step of a formula',
  formula_version: 'version of a formula',
  holiday: 'holiday',
  ingredient: 'ingredient',
  instrument: 'instrument',
  instrument_check: 'daily check of an instrument',
  jar: 'jar',
  jar_move: 'jar of a move',
  lab: 'lab',
  logger_file: "logger's file of a station",
  lot: 'lot of a buffer or check fluid',
  person: 'person',
  photo: 'photo',
  protocol: 'protocol',
  protocol_version: 'version of a protocol',
  pull: 'pull',
  pull_jar: 'jar of a pull',
  reading: 'reading',
  reading_doubt: 'doubt on a reading, found later',
  shelf_case: 'case',
  signature: 'signature',
  station: 'station',
  station_downtime: 'planned downtime of a station',
  station_downtime_cancel: 'cancelled downtime of a station',
  station_move: 'move of jars',
  station_temperature: 'temperature of a station',
  study: 'study',
  study_batch: 'batch of a study',
  study_follower: 'follower of a study',
  study_station: 'station of a study',
  study_station_move: 'move of a station’s series',
}

const actWords: Record<string, string> = { insert: 'made', update: 'changed', delete: 'removed' }

export function thingWord(table: string | null): string {
  return table === null ? '' : (tableWords[table] ?? table.replaceAll('_', ' '))
}

export function actWord(entry: { operation: string; event: string | null }): string {
  return entry.event ?? actWords[entry.operation] ?? entry.operation
}

const fieldNames: Record<string, string> = {
  person_id: 'person',
  sha256: 'SHA-256',
  content_sha256: 'SHA-256 of the content',
  ph: 'pH',
  rpm: 'rpm',
  is_void: 'void',
  is_active: 'active',
  inci: 'INCI name',
  on_day: 'day',
  due_on: 'due on',
  at_weeks: 'at week',
  time_weeks: 'at week',
  end_weeks: 'ends at week',
  from_on: 'first day',
  to_on: 'last day',
  light_lux: 'light, lux',
  light_uv_wm2: 'UV light, W/m²',
  light_hours: 'hours of light a day',
}

/** Units that a field's name carries, said after its value. */
const units: [RegExp, string][] = [
  [/_percent$/, ' %'],
  [/_mm$/, ' mm'],
  [/_g$/, ' g'],
  [/_c$/, ' °C'],
  [/_weeks$/, ''],
  [/_hours$/, ' h'],
  [/_minutes$/, ' min'],
]

export function fieldWord(field: string): string {
  const known = fieldNames[field]
  if (known) return known
  const bare = units.reduce((name, [ending]) => name.replace(ending, ''), field)
  return bare.replace(/^is_/, '').replaceAll('_', ' ')
}

export function fieldUnit(field: string): string {
  return units.find(([ending]) => ending.test(field))?.[1] ?? ''
}
