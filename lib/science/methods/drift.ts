import type { RuleName } from '../series'
import type { Method, Source } from './method'

const ourRule: Source = {
  text: 'Rule of this house; how often it errs is measured by npm run simulate',
  mark: 'practice',
}
const repeatability: Source = { text: 'Repeatability SD of the method, a lab setting', mark: 'memory' }

export const driftMethod: Method = {
  name: 'Where a series stands',
  formula: [
    'Over the means of replicates that count, in time order. Band: the tolerance about the batch’s own initial.',
    'Used: distance of the latest mean from the initial ÷ distance of the edge on that side.',
    'Slope: least squares; its p is one-sided, with a residual SD never below s ÷ root of the replicates.',
    'Leaves at: where the line meets the edge; earliest and latest: where its 95 % confidence band does.',
    'Out: confirmed beyond the band. Leaning: as the rule of that name says, which its flag shows. Untold: under three times, the initial with them. Else steady.',
  ],
  inputs: [
    { key: 'latest', says: 'latest that counts', unit: '' },
    { key: 'used', says: 'band used', unit: '' },
    { key: 'band', says: 'band', unit: '' },
    { key: 'rules', says: 'rules that fired', unit: '' },
    { key: 'leavesAt', says: 'leaves its band in week', unit: '' },
    { key: 'leavesBetween', says: 'earliest and latest week, 95 %', unit: '' },
    { key: 'slope', says: 'slope', unit: '' },
    { key: 'slopeP', says: 'p of the slope', unit: '' },
    { key: 'residualSd', says: 'residual SD', unit: '' },
    { key: 's', says: 'repeatability SD, s', unit: '' },
    { key: 'n', says: 'times that count, with the initial', unit: '' },
    { key: 'doubted', says: 'times in doubt, left out', unit: '' },
    { key: 'initial', says: 'initial, mean of its replicates', unit: '' },
    { key: 'tolerance', says: 'tolerance of the protocol', unit: '' },
    { key: 'endTime', says: 'study ends in week', unit: '' },
    { key: 'coldest', says: 'compared with the coldest other station', unit: '' },
  ],
  sources: [ourRule, repeatability],
  topic: 'drift',
}

const evidenceInputs = {
  mean: { key: 'mean', says: 'reading', unit: '' },
  edge: { key: 'edge', says: 'edge of the band', unit: '' },
  by: { key: 'by', says: 'beyond it by', unit: '' },
  repeat: { key: 'repeat', says: 'repeat on a second jar', unit: '' },
  difference: { key: 'difference', says: 'difference', unit: '' },
  allowed: { key: 'allowed', says: 'explained by repeats', unit: '' },
  expected: { key: 'expected', says: 'where it was expected', unit: '' },
  from: { key: 'from', says: 'expected from', unit: '' },
  confirmedBy: { key: 'confirmedBy', says: 'repeats that confirm it', unit: '' },
  initial: { key: 'initial', says: 'initial', unit: '' },
  used: { key: 'used', says: 'band used', unit: '' },
}

function rule(name: string, formula: string[], inputs: Method['inputs'], ...sources: Source[]): Method {
  return { name, formula, inputs, sources: [ourRule, ...sources], topic: 'drift' }
}

const { mean, edge, by, repeat, difference, allowed, expected, from, confirmedBy, initial, used } =
  evidenceInputs

/** Every rule of the drift, and what else may put a reading in doubt, by the name that its flag carries. */
export const ruleMethods = {
  out: rule(
    'Out of the band',
    [
      'The latest mean is beyond the band, and so are a repeat on a spare jar and the mean of the two.',
      'Where the two differ by more than 2.8 × s ÷ root of the replicates, a third jar is read and the median counts. Until then it is a doubt and the standing stays.',
    ],
    [mean, edge, by, repeat, difference, allowed, confirmedBy],
    repeatability,
  ),
  edge: rule(
    'Near the edge',
    ['Band used is at least 80 %: a flag, the standing stays.'],
    [mean, initial, edge, used],
  ),
  lean: rule(
    'Leaning',
    [
      'At least five times; slope significant one-sided at 0.005, from eleven times on at 0.02, for a band of one side at 0.1.',
      'The fitted line has used at least half of the band now (0.55 in studies over 26 weeks) and at least 0.8 when the study ends, on the same side.',
      'For a band of two sides also: the differences from the coldest other station have a slope of the same sign at 0.05, or that station passes the same rule.',
    ],
    [
      { key: 'times', says: 'times', unit: '' },
      { key: 'slope', says: 'slope a week', unit: '' },
      { key: 'slopeP', says: 'p of the slope', unit: '' },
      { key: 'alpha', says: 'significant under', unit: '' },
      { key: 'usedNow', says: 'band used by the line now', unit: '' },
      { key: 'usedAtEnd', says: 'band used at the end', unit: '' },
      { key: 'endTime', says: 'study ends in week', unit: '' },
      { key: 'comparedWith', says: 'confirmed by', unit: '' },
      { key: 'leavesAt', says: 'leaves its band in week', unit: '' },
      { key: 'leavesAtLow', says: 'earliest, 95 %', unit: '' },
      { key: 'leavesAtHigh', says: 'latest, 95 %', unit: '' },
    ],
    repeatability,
  ),
  onset: rule(
    'Separation has begun',
    [
      'Above the detection limit on two jars of one day, or in two pulls in a row. The limit is 1 %, or 1 mm of the fill’s height where that is more.',
    ],
    [
      { key: 'percent', says: 'separation', unit: '%' },
      { key: 'detectionLimit', says: 'told from none above', unit: '%' },
      { key: 'seenIn', says: 'seen in', unit: '' },
      { key: 'since', says: 'since week', unit: '' },
    ],
  ),
  jump: rule(
    'Away from its line',
    [
      'From four earlier times on: outside the line’s prediction, half-width the greater of t(0.995) × residual SD and 4 s ÷ root of the replicates, × root of (1 + leverage).',
      'Before: more than 7 s ÷ root of the replicates from the latest mean. A doubt: measure again.',
    ],
    [mean, expected, from, difference, allowed, repeat],
    repeatability,
  ),
  spread: rule(
    'Replicates apart',
    [
      'Their range is above 3.6 s for two, the 99 % factor of the studentized range for more. A doubt: measure again.',
    ],
    [
      { key: 'range', says: 'range', unit: '' },
      allowed,
      { key: 'replicates', says: 'replicates', unit: '' },
      mean,
      repeat,
    ],
    repeatability,
  ),
  torque: rule(
    'Torque in doubt',
    ['Outside the torque that the spindle reads well, or an error above a third of the band.'],
    [{ key: 'reason', says: 'reason', unit: '' }],
  ),
  conditions: rule(
    'Conditions differ',
    [
      'Method, spindle, speed or sample temperature differ from the initial’s; or the instrument is overdue or in doubt.',
    ],
    [{ key: 'reason', says: 'reason', unit: '' }],
  ),
  type: rule(
    'Emulsion type changed',
    [
      'The emulsion-type test points to another continuous phase than at the start: out, whatever the numbers say.',
    ],
    [{ key: 'found', says: 'found', unit: '' }],
    { text: 'Dilution, conductivity and dye each point to the continuous phase', mark: 'handbook' },
  ),
  window: rule(
    'Outside its window',
    ['The jar was pulled outside the window of its time point. A note; statistics use the actual time.'],
    [{ key: 'time', says: 'pulled in week', unit: '' }],
  ),
  excursion: rule(
    'Station left its limits',
    [
      'The station left its limits while the jar stood in it. A note, with the mean kinetic temperature, which never excuses it.',
    ],
    [{ key: 'extremeC', says: 'went to', unit: '°C' }],
  ),
} satisfies Record<RuleName | 'conditions' | 'type' | 'window' | 'excursion', Method>

export const instrumentDayMethod: Method = {
  name: 'One instrument off on one day',
  formula: [
    'Residuals of the day from each station’s own earlier line (mean of its latest two while under six times), in s.',
    'Off where, to one side: their median over at least three stations is above 2.25, at least three are above 1, and the mean of the two coldest is above 1.75.',
    'Within 14 days of making, when viscosity builds everywhere, only a note.',
  ],
  inputs: [
    { key: 'stations', says: 'stations', unit: '' },
    { key: 'median', says: 'median', unit: 's' },
    { key: 'beyondOne', says: 'above 1 s to that side', unit: '' },
    { key: 'coldestMean', says: 'mean of the two coldest', unit: 's' },
    { key: 'residuals', says: 'residuals in s', unit: '' },
  ],
  sources: [ourRule, repeatability],
  topic: 'instrument-day',
}
