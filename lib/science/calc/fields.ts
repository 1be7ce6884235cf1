import type { examples } from './examples'

/** What each field holds, with its unit, as `calc TOPIC --help` prints it; a test finds none missing. */
export const fields: Record<keyof typeof examples, { input: Explained; output: Explained }> = {
  regression: {
    input: {
      x: 'at least three numbers, not all equal; any one unit',
      y: 'as many numbers; any one unit',
      confidence: 'of the two-sided limits, between 0 and 1; 0.95 if left out',
      at: 'values of x to predict y for',
    },
    output: {
      n: 'number of points',
      slope: 'units of y per unit of x',
      intercept: 'y at x = 0',
      slopeSe: 'standard error of the slope',
      interceptSe: 'standard error of the intercept',
      residualSd: 'residual standard deviation, in units of y',
      r2: 'share of variation explained, 0 to 1; null where y is constant',
      df: 'degrees of freedom, n − 2',
      slopeP: 'two-sided p of slope 0; null without residual variation',
      'predictions[].x': 'as asked for in at',
      'predictions[].mean': 'the line at x',
      'predictions[].meanLow': 'lower limit of the mean',
      'predictions[].meanHigh': 'upper limit of the mean',
      'predictions[].newLow': 'lower limit of one new observation',
      'predictions[].newHigh': 'upper limit of one new observation',
    },
  },
  'shelf-life': {
    input: {
      'batches[].name': 'text, each used once',
      'batches[].t': 'times in one unit, usually months; not all equal',
      'batches[].y': 'one observation a time; replicates are entries of their own',
      'limit.lower': 'least allowed, in units of y',
      'limit.upper': 'most allowed, in units of y',
      direction:
        'how the attribute moves: "decreasing" (lower limit), "increasing" (upper limit) or "either"',
      confidence: 'of the bound, one-sided, and two-sided for "either"; 0.95 if left out',
      poolingAlpha: 'batches pool where p is above it; 0.25 if left out',
      horizon: 'furthest time to look at, in units of t',
    },
    output: {
      model: '"common line", "common slope" or "separate lines"',
      'tests[].name': '"slopes", and "intercepts" only where slopes were pooled; no test for one batch',
      'tests[].F': 'ratio of mean squares; null without residual variation',
      'tests[].df1': 'degrees of freedom above',
      'tests[].df2': 'degrees of freedom below',
      'tests[].p': 'upper tail of F; null with it',
      'tests[].pooled': 'true where p is above poolingAlpha',
      'batches[].name': 'as given',
      'batches[].slope': 'units of y per unit of t',
      'batches[].intercept': 'y at t = 0',
      'batches[].residualSd': 'of the chosen model, in units of y',
      'batches[].df': 'its degrees of freedom',
      'batches[].crossing':
        'time at which the bound meets the limit; 0 where outside at once, null where not by horizon',
      'batches[].side': 'limit that is met, "lower" or "upper", or null',
      crossing: 'the least of them, or null',
      limitingBatch: 'batch that crosses first; null where none does or all share one line',
    },
  },
  'extrapolation-cap': {
    input: {
      dataMonths: 'months of long-term data, X',
      storage: '"room", "refrigerated" or "frozen"',
      acceleratedChange: 'true where six months at accelerated show a significant change',
      intermediateChange: 'the same at intermediate; unknown counts as a change',
      variable: 'true where the data change or vary',
      statistics: 'true where the data are analysed statistically',
    },
    output: {
      capMonths: 'longest time that may be supported, never rounded',
      rule: 'the branch of the tree, in words',
    },
  },
  mkt: {
    input: {
      temperaturesC: '°C, above −273.15',
      hoursEach: 'hours that each one stands for; equal if left out',
      deltaHkJ: 'activation enthalpy in kJ/mol; 83.144 if left out',
    },
    output: {
      mktC: 'mean kinetic temperature, °C',
      meanC: 'mean weighted by the same hours, °C',
      minC: 'coldest, °C',
      maxC: 'warmest, °C',
    },
  },
  arrhenius: {
    input: {
      temperaturesC: '°C, at least three different ones above −273.15',
      rates: 'rate at each, above 0; any one unit',
      predictC: '°C to predict the rate for',
    },
    output: {
      eaKJ: 'activation energy, kJ/mol',
      lnA: 'logarithm of the rate factor',
      eaSe: 'standard error of eaKJ',
      r2: 'of ln k on 1/T; null where all rates are equal',
      'predictions[].temperatureC': 'as asked for in predictC',
      'predictions[].rate': 'in the unit of rates',
      'predictions[].low': 'lower 95 % two-sided limit of the mean',
      'predictions[].high': 'upper one',
      'curvature.p': 'p of a quadratic term; null where it was not tested',
      'curvature.doubt': 'in words, where the plot is curved or curvature was not tested; else null',
    },
  },
  'accelerated-age': {
    input: {
      storageC: 'storage temperature, °C',
      acceleratedC: 'accelerated temperature, °C',
      q10: 'assumed factor of rate for every 10 °C, above 0',
      targetMonths: 'months in storage to stand for',
    },
    output: {
      factor: 'q10^((acceleratedC − storageC)/10)',
      acceleratedMonths: 'targetMonths ÷ factor',
    },
  },
  viscosity: {
    input: {
      torquePercent: '% of full scale, above 0',
      factor: 'mPa·s per % torque',
      spindleConstant: 'of spindle and spring class, mPa·s · rpm per % torque; with rpm in place of factor',
      rpm: 'speed, turns per minute',
      bandPercent: 'distance from the initial to the nearer edge of the band, in % of the value',
    },
    output: {
      mPas: 'viscosity, mPa·s',
      fullScalemPas: 'viscosity at 100 % torque, mPa·s',
      errorPercent: 'what ±1 % of full scale is of this reading, %',
      doubt:
        'null, or why: torque outside 10 to 100 %, or with bandPercent an error above a third of the band',
    },
  },
  'ph-slope': {
    input: {
      'points[].bufferPh': 'pH of the buffer at this temperature; at least two different ones',
      'points[].mV': 'potential in it, mV',
      temperatureC: '°C',
    },
    output: {
      slopeMvPerPh: 'mV per pH, negative for a healthy electrode',
      offsetMv: 'potential at pH 7, mV',
      efficiencyPercent: '% of the theoretical slope 2.302585·R·T/F (59.16 mV at 25 °C)',
      doubt: 'null, or why: outside 95 to 105 %',
    },
  },
  'buffer-ph': {
    input: { buffer: '"phthalate", "phosphate" or "borax"', temperatureC: '°C, from 0 to 60' },
    output: { ph: 'linear between the tabulated temperatures' },
  },
  separation: {
    input: {
      totalMm: 'fill height, mm',
      topMm: 'free oil on top, mm',
      bottomMm: 'water or serum below, mm',
    },
    output: {
      topPercent: '% of fill height',
      bottomPercent: '% of fill height',
      percent: 'the two together',
    },
  },
  'separation-curve': {
    input: {
      t: 'at least three times in one unit, usually weeks',
      percent: 'separation at each, % of fill height',
      detectPercent: 'what can be told from none, % of fill height; 1 if left out',
    },
    output: {
      onset: 'first lasting crossing of detectPercent, interpolated; null where there is none',
      rate: '% of fill height per unit of t when separation begins; null without separation',
      plateau: 'level it settles at, % of fill height; null where no end is seen',
      residualSd: 'residual standard deviation, % of fill height',
      model: '"none", "linear" or "first order after a lag"',
    },
  },
  colour: {
    input: {
      'reference.L': 'CIELAB L*',
      'reference.a': 'CIELAB a*',
      'reference.b': 'CIELAB b*',
      'sample.L': 'CIELAB L*',
      'sample.a': 'CIELAB a*',
      'sample.b': 'CIELAB b*',
    },
    output: {
      deltaE00: 'CIEDE2000 with kL = kC = kH = 1',
      deltaE76: 'ΔE*ab of 1976',
    },
  },
  'phase-fraction': {
    input: {
      'lines[].percent': '% w/w',
      'lines[].density': 'g/mL, above 0',
      'lines[].internal': 'true for what is dispersed',
    },
    output: {
      totalPercent: '% w/w of all lines',
      internalMassPercent: 'internal phase, % of their mass',
      internalVolumePercent: 'internal phase, % of their volume, volumes taken as additive',
      highInternalPhase: 'true above 74 % v/v, the closest packing of equal spheres',
    },
  },
  droplets: {
    input: {
      diametersUm: 'micrometres, above 0',
      counts: 'droplets of each; one of each if left out',
    },
    output: {
      d10: 'number mean D[1,0], micrometres',
      d32: 'surface mean D[3,2], micrometres',
      d43: 'volume mean D[4,3], micrometres',
      d50v: 'median by volume, micrometres',
      span: '(d90 − d10)/d50 by volume',
    },
  },
  centrifuge: {
    input: { rpm: 'turns per minute', radiusMm: 'radius, mm' },
    output: { rcf: 'relative centrifugal force, multiples of g' },
  },
  settling: {
    input: {
      diameterUm: 'of the drop, micrometres',
      densityDifference: 'continuous minus dispersed, kg/m³; positive rises',
      viscosityMPas: 'of the continuous phase, mPa·s',
      g: 'acceleration, m/s²; 9.80665 if left out',
    },
    output: { velocityMmPerDay: 'mm a day' },
  },
  outlier: {
    input: {
      values: 'at least three numbers; any one unit',
      alpha: 'significance, between 0 and 1; 0.05 if left out',
    },
    output: {
      g: 'largest distance from the mean in standard deviations; null where all values are equal',
      critical: 'its critical value',
      index: 'of the value furthest from the mean, counted from 0',
      outlier: 'true where g is above critical',
    },
  },
  drift: {
    input: {
      times: 'weeks',
      values: 'a number a time, or a list of replicates',
      initial: 'value or replicates at time 0; if left out, the earliest entry',
      'tolerance.kind':
        '"range" (absolute), "percent" (% of the initial) or "shift" (units from the initial)',
      'tolerance.lower': 'least allowed, with "range"',
      'tolerance.upper': 'most allowed, with "range"',
      'tolerance.below': 'how far it may fall, with "percent" and "shift"',
      'tolerance.above': 'how far it may rise, with "percent" and "shift"',
      endTime: 'week in which the study ends',
      repeatabilitySd: 'of the method, in units of the values; 0 if left out',
      'coldest.times': 'weeks of the coldest other station',
      'coldest.values': 'its values',
      detectionLimit: 'for separation: % of fill height that can be told from none',
      'settled[].time': 'week of a reading whose doubt a person set aside',
      'settled[].rule': 'the doubt: jump, spread or out',
    },
    output: {
      'band.lower': 'lower edge, or null',
      'band.upper': 'upper edge, or null',
      standing: '"untold", "steady", "leaning" or "out"',
      used: 'share of the way from the initial to the nearer edge that the latest reading has gone',
      slope: 'units per week; null under three times',
      slopeP: 'one-sided p of the slope in its own direction',
      leavesAt: 'week in which the trend meets the edge, or null',
      leavesAtLow: 'earliest week by its 95 % band, or null',
      leavesAtHigh: 'latest week by its 95 % band, or null',
      'rules[].rule': 'the rule that fired',
      'rules[].level': 'what it gives: "out", "leaning", "flag" or "doubt"',
      'rules[].at': 'week of the reading',
      'rules[].evidence': 'the numbers behind it',
    },
  },
  'instrument-day': {
    input: {
      'stations[].name': 'text',
      'stations[].temperatureC': '°C',
      'stations[].times': 'weeks, the day in question included',
      'stations[].values': 'a number a time, or a list of replicates',
      at: 'week of the day in question',
      repeatabilitySd: 'of the method, in units of the values',
    },
    output: {
      shift: 'true where the instrument read everything high or low',
      direction: '"high", "low" or null',
      median: 'of the residuals; null with fewer than three stations that can be judged',
      'evidence.residuals[].name': 'station',
      'evidence.residuals[].temperatureC': 'its temperature, °C',
      'evidence.residuals[].residual': "from the station's own earlier line, in repeatability SDs",
      'evidence.beyondOne': 'stations beyond one SD in that direction',
      'evidence.coldestMean': 'mean residual of the two coldest, or null',
    },
  },
  'jar-plan': {
    input: {
      'stations[].name': 'text',
      'stations[].timePoints': 'times of its pulls, any one unit, not negative',
      'stations[].watchJars': 'jars that stay',
      'stations[].measuringJarsPerPull': 'jars used up at each pull',
      'stations[].spares': 'jars for repeats',
      initialJars: 'jars for the initial',
      retains: 'jars kept unopened',
      fillG: 'fill of a jar, g',
      batchG: 'size of the batch, g',
      lossPercent: 'lost in filling, %, from 0 to under 100',
    },
    output: {
      jars: 'of the batch, initial ones and retains included',
      watchJars: 'of all stations',
      measuringJars: 'of all stations and pulls',
      spares: 'of all stations',
      grams: 'jars × fillG ÷ (1 − lossPercent/100)',
      fits: 'true where the batch is large enough',
      shortG: 'g that it is short of; 0 where it fits',
    },
  },
}

type Explained = Record<string, string>
