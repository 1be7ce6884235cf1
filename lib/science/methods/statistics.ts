import type { Method } from './method'

export const regressionMethod: Method = {
  name: 'Straight line',
  formula: [
    'Least squares of y on x. Limits are t quantile × residual SD × root of (1 ÷ n + squared distance from the mean x ÷ sum of squares of x).',
  ],
  inputs: [
    { key: 'x', says: 'x', unit: '' },
    { key: 'y', says: 'y', unit: '' },
    { key: 'confidence', says: 'confidence', unit: '' },
  ],
  sources: [{ text: 'Least squares; proved on the linear sets of NIST StRD', mark: 'handbook' }],
  topic: 'regression',
}

export const boundWideningMethod: Method = {
  name: 'What fewer times cost',
  formula: [
    'Distance of the one-sided 95 % bound from the line: t quantile (n − 2) × root of (1 ÷ n + squared distance from the mean time ÷ sum of squares of the times), in scatters of one reading.',
    'Wider by: 100 × (distance with the times that are left ÷ distance with all of them − 1).',
  ],
  inputs: [
    { key: 'times', says: 'times read as the protocol says, weeks', unit: '' },
    { key: 'kept', says: 'times that are left, weeks', unit: '' },
    { key: 'at', says: 'told for week', unit: '' },
    { key: 'width', says: 'distance with all times, scatters', unit: '' },
    { key: 'keptWidth', says: 'distance with what is left, scatters', unit: '' },
  ],
  sources: [{ text: 'Confidence bound of the mean line as in ICH Q1E, 2003', mark: 'standard' }],
  topic: null,
}

export const shelfLifeMethod: Method = {
  name: 'Supported months',
  formula: [
    'A line for each batch; slopes are pooled where their F test has p above 0.25, then intercepts likewise, on the refitted common slope.',
    'The months run to where the 95 % confidence bound of the mean line meets the limit: one-sided on the side that moves, two-sided where either may.',
    'With separate lines each batch keeps its own, the error is pooled, and the shortest wins.',
  ],
  inputs: [
    { key: 'months', says: 'supported', unit: 'months' },
    { key: 'crossing', says: 'the bound meets the limit at', unit: 'months' },
    { key: 'cap', says: 'cap', unit: 'months' },
    { key: 'limit', says: 'allowed', unit: '' },
    { key: 'model', says: 'model', unit: '' },
    { key: 'slopes', says: 'F test of the slopes', unit: '' },
    { key: 'intercepts', says: 'F test of the intercepts', unit: '' },
    { key: 'slope', says: 'deciding slope on that scale, a month', unit: '' },
    { key: 'intercept', says: 'deciding intercept on that scale', unit: '' },
    { key: 'residualSd', says: 'residual SD on that scale', unit: '' },
    { key: 'df', says: 'degrees of freedom', unit: '' },
    { key: 'scale', says: 'fitted on', unit: '' },
    { key: 'n', says: 'observations', unit: '' },
    { key: 'direction', says: 'side that moves', unit: '' },
  ],
  sources: [
    { text: 'ICH Q1E, 2003', mark: 'standard' },
    { text: 'Separate lines with the error pooled over batches', mark: 'memory' },
  ],
  topic: 'shelf-life',
}

export const observedMethod: Method = {
  name: 'Last time passed',
  formula: [
    'Regression does not serve this attribute. It supports the last long-term time at which every jar of every batch passed, and nothing beyond.',
  ],
  inputs: [
    { key: 'limit', says: 'allowed', unit: '' },
    { key: 'worst', says: 'worst reading', unit: '' },
    { key: 'times', says: 'months read', unit: '' },
    { key: 'months', says: 'supported', unit: 'months' },
  ],
  sources: [{ text: 'Last long-term time at which every jar passed', mark: 'practice' }],
  topic: 'drift',
}

export const extrapolationCapMethod: Method = {
  name: 'Cap of extrapolation',
  formula: [
    'Room, no significant change at accelerated: 2 × the data and at most 12 months beyond, where they hardly vary or statistics are used; else 1.5 × and at most 6.',
    'Change at accelerated, none at intermediate: 1.5 × and at most 6 with statistics, else 3 beyond; at intermediate too, none.',
    'Refrigerated without change: 1.5 × and at most 6, or 3 beyond; with it none. Frozen: none.',
    'No significant change means six months of accelerated without a series out.',
  ],
  inputs: [
    { key: 'dataMonths', says: 'long-term data', unit: 'months' },
    { key: 'storage', says: 'storage', unit: '' },
    { key: 'acceleratedChange', says: 'significant change at accelerated', unit: '' },
    { key: 'intermediateChange', says: 'at intermediate', unit: '' },
    { key: 'variable', says: 'variable data', unit: '' },
    { key: 'statistics', says: 'statistics used', unit: '' },
    { key: 'rule', says: 'rule', unit: '' },
  ],
  sources: [
    { text: 'Six months of accelerated: ICH Q1A(R2)', mark: 'standard' },
    {
      text: 'Months of the decision tree of ICH Q1E, seen in quotation; the factors 2 and 1.5',
      mark: 'memory',
    },
  ],
  topic: 'extrapolation-cap',
}

export const wholeMonthsMethod: Method = {
  name: 'Months proposed',
  formula: [
    'The least that any attribute supports, under the cap, whole months rounded down. Fewer may be proposed, never more.',
  ],
  inputs: [
    { key: 'limiting', says: 'attribute that supports least', unit: '' },
    { key: 'supported', says: 'supported', unit: 'months' },
    { key: 'cap', says: 'cap', unit: 'months' },
    { key: 'proposed', says: 'proposed', unit: 'months' },
  ],
  sources: [{ text: 'Whole months rounded down, the least over attributes: ICH Q1E', mark: 'standard' }],
  topic: null,
}

export const outlierMethod: Method = {
  name: 'Outlier',
  formula: ['Grubbs, two-sided: the greatest distance from the mean ÷ the SD, against its critical value.'],
  inputs: [
    { key: 'values', says: 'values', unit: '' },
    { key: 'alpha', says: 'significance', unit: '' },
  ],
  sources: [{ text: 'Grubbs 1969; NIST handbook of statistical methods', mark: 'handbook' }],
  topic: 'outlier',
}
