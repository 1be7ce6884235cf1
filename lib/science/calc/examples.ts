/** One worked example a topic, shown by `calc TOPIC --help`; a test runs each and compares. */
export const examples = {
  regression: {
    input: {
      x: [0, 3, 6, 9, 12],
      y: [5.52, 5.49, 5.47, 5.42, 5.4],
      at: [18],
    },
    output: {
      n: 5,
      slope: -0.01033333333333329,
      intercept: 5.521999999999999,
      slopeSe: 0.0008388704928078589,
      interceptSe: 0.006164414002968961,
      residualSd: 0.007958224257542194,
      r2: 0.9806122448979592,
      df: 3,
      slopeP: 0.0011524583750263787,
      predictions: [
        {
          x: 18,
          mean: 5.336,
          meanLow: 5.302020771765599,
          meanHigh: 5.369979228234402,
          newLow: 5.293620456559958,
          newHigh: 5.378379543440043,
        },
      ],
    },
  },
  'shelf-life': {
    input: {
      batches: [
        {
          name: 'A',
          t: [0, 3, 6, 9, 12],
          y: [100.2, 99.4, 99.1, 98.3, 97.9],
        },
        {
          name: 'B',
          t: [0, 3, 6, 9, 12],
          y: [100.4, 99.8, 99, 98.6, 97.8],
        },
      ],
      limit: {
        lower: 95,
      },
      direction: 'decreasing',
      horizon: 60,
    },
    output: {
      model: 'common slope',
      tests: [
        {
          name: 'slopes',
          F: 1.6153846153847422,
          df1: 1,
          df2: 6,
          p: 0.25078696112499593,
          pooled: true,
        },
        {
          name: 'intercepts',
          F: 2.969696969696911,
          df1: 1,
          df2: 7,
          p: 0.12850157441305748,
          pooled: false,
        },
      ],
      batches: [
        {
          name: 'A',
          slope: -0.20166666666666705,
          intercept: 100.19000000000001,
          residualSd: 0.12845232578665047,
          df: 7,
          crossing: 24.02664840748643,
          side: 'lower',
        },
        {
          name: 'B',
          slope: -0.20166666666666705,
          intercept: 100.33000000000001,
          residualSd: 0.12845232578665047,
          df: 7,
          crossing: 24.66618916723143,
          side: 'lower',
        },
      ],
      crossing: 24.02664840748643,
      limitingBatch: 'A',
    },
  },
  'extrapolation-cap': {
    input: {
      dataMonths: 12,
      storage: 'room',
      acceleratedChange: false,
      variable: false,
      statistics: true,
    },
    output: {
      capMonths: 24,
      rule: 'no significant change at accelerated, data hardly variable or analysed: up to 2 × X, at most X + 12',
    },
  },
  mkt: {
    input: {
      temperaturesC: [24.8, 25.1, 27.4, 25],
      hoursEach: [12, 6, 3, 3],
    },
    output: {
      mktC: 25.263739639114533,
      meanC: 25.225,
      minC: 24.8,
      maxC: 27.4,
    },
  },
  arrhenius: {
    input: {
      temperaturesC: [25, 37, 45],
      rates: [0.011, 0.033, 0.062],
      predictC: [5],
    },
    output: {
      eaKJ: 68.39548681836375,
      lnA: 23.089209347469197,
      eaSe: 1.5348373304986067,
      r2: 0.9994966719088025,
      predictions: [
        {
          temperatureC: 5,
          rate: 0.0015260513408025455,
          low: 0.0006480014879472508,
          high: 0.003593869363082111,
        },
      ],
      curvature: {
        p: null,
        doubt: 'curvature not tested: it takes four temperatures',
      },
    },
  },
  'accelerated-age': {
    input: {
      storageC: 25,
      acceleratedC: 45,
      q10: 2,
      targetMonths: 24,
    },
    output: {
      factor: 4,
      acceleratedMonths: 6,
    },
  },
  viscosity: {
    input: {
      torquePercent: 62,
      spindleConstant: 10000,
      rpm: 10,
    },
    output: {
      mPas: 62000,
      fullScalemPas: 100000,
      errorPercent: 1.6129032258064515,
      doubt: null,
    },
  },
  'ph-slope': {
    input: {
      points: [
        {
          bufferPh: 4.01,
          mV: 174.9,
        },
        {
          bufferPh: 7,
          mV: -0.6,
        },
        {
          bufferPh: 10.01,
          mV: -176.1,
        },
      ],
      temperatureC: 25,
    },
    output: {
      slopeMvPerPh: -58.499783334135806,
      offsetMv: -0.21000144443907992,
      efficiencyPercent: 98.88510209275529,
      doubt: null,
    },
  },
  'buffer-ph': {
    input: {
      buffer: 'phthalate',
      temperatureC: 22,
    },
    output: {
      ph: 4.0026,
    },
  },
  separation: {
    input: {
      totalMm: 46,
      topMm: 2.2,
      bottomMm: 1.1,
    },
    output: {
      topPercent: 4.782608695652175,
      bottomPercent: 2.3913043478260874,
      percent: 7.173913043478261,
    },
  },
  'separation-curve': {
    input: {
      t: [0, 1, 2, 3, 4, 5, 6, 8, 10, 12],
      percent: [0, 0, 0.2, 0.1, 0.9, 3.2, 5.1, 8.1, 10.2, 11.9],
    },
    output: {
      onset: 4.043478260869565,
      rate: 2.577477202935123,
      plateau: 16.026328574076622,
      residualSd: 0.0921594628900534,
      model: 'first order after a lag',
    },
  },
  colour: {
    input: {
      reference: {
        L: 92.1,
        a: -0.6,
        b: 4.2,
      },
      sample: {
        L: 91.4,
        a: -0.4,
        b: 5.9,
      },
    },
    output: {
      deltaE00: 1.4928184422619242,
      deltaE76: 1.8493242008906887,
    },
  },
  'phase-fraction': {
    input: {
      lines: [
        {
          percent: 82,
          density: 1.03,
          internal: true,
        },
        {
          percent: 16,
          density: 0.94,
          internal: false,
        },
        {
          percent: 2,
          density: 0.95,
          internal: false,
        },
      ],
    },
    output: {
      totalPercent: 100,
      internalMassPercent: 82,
      internalVolumePercent: 80.62903552584058,
      highInternalPhase: true,
    },
  },
  droplets: {
    input: {
      diametersUm: [1, 2, 3, 5, 10],
      counts: [100, 80, 50, 20, 2],
    },
    output: {
      d10: 2.1031746031746033,
      d32: 4.197452229299363,
      d43: 5.7556904400606985,
      d50v: 4.953246753246753,
      span: 1.5666086067463696,
    },
  },
  centrifuge: {
    input: {
      rpm: 3000,
      radiusMm: 80,
    },
    output: {
      rcf: 804.96,
    },
  },
  settling: {
    input: {
      diameterUm: 2,
      densityDifference: 90,
      viscosityMPas: 1,
    },
    output: {
      velocityMmPerDay: 16.945891199999995,
    },
  },
  outlier: {
    input: {
      values: [5.51, 5.49, 5.52, 5.5, 5.71],
    },
    output: {
      g: 1.7756989278303235,
      critical: 1.7150373123433635,
      index: 4,
      outlier: true,
    },
  },
  drift: {
    input: {
      times: [0, 1, 2, 3, 4, 6, 8, 10],
      values: [5.5, 5.46, 5.45, 5.4, 5.39, 5.31, 5.27, 5.19],
      tolerance: {
        kind: 'shift',
        below: 0.5,
        above: 0.5,
      },
      endTime: 26,
      repeatabilitySd: 0.03,
      coldest: {
        times: [1, 2, 3, 4, 6, 8, 10],
        values: [5.5, 5.51, 5.49, 5.5, 5.52, 5.5, 5.49],
      },
    },
    output: {
      band: {
        lower: 5,
        upper: 6,
      },
      standing: 'leaning',
      used: 0.6199999999999992,
      slope: -0.030204678362573106,
      slopeP: 0.00004347947647885457,
      leavesAt: 16.541142303969014,
      leavesAtLow: 13.870530638612978,
      leavesAtHigh: 21.035966378834917,
      rules: [
        {
          rule: 'lean',
          level: 'leaning',
          at: 10,
          evidence: {
            times: 8,
            slope: -0.030204678362573106,
            slopeP: 0.00004347947647885457,
            alpha: 0.005,
            usedNow: 0.6048538011695914,
            usedAtEnd: 1.5714035087719296,
            endTime: 26,
            comparedWith: 'difference',
            leavesAt: 16.541142303969014,
            leavesAtLow: 13.870530638612978,
            leavesAtHigh: 21.035966378834917,
          },
        },
      ],
    },
  },
  'instrument-day': {
    input: {
      stations: [
        {
          name: '5 °C',
          temperatureC: 5,
          times: [1, 2, 3],
          values: [5.5, 5.51, 5.64],
        },
        {
          name: '25 °C',
          temperatureC: 25,
          times: [1, 2, 3],
          values: [5.49, 5.5, 5.62],
        },
        {
          name: '40 °C',
          temperatureC: 40,
          times: [1, 2, 3],
          values: [5.47, 5.46, 5.58],
        },
      ],
      at: 3,
      repeatabilitySd: 0.03,
    },
    output: {
      shift: true,
      direction: 'high',
      median: 4.166666666666667,
      evidence: {
        residuals: [
          {
            name: '5 °C',
            temperatureC: 5,
            residual: 4.499999999999993,
          },
          {
            name: '25 °C',
            temperatureC: 25,
            residual: 4.166666666666667,
          },
          {
            name: '40 °C',
            temperatureC: 40,
            residual: 3.8333333333333406,
          },
        ],
        beyondOne: 3,
        coldestMean: 4.33333333333333,
      },
    },
  },
  'jar-plan': {
    input: {
      stations: [
        {
          name: '25 °C',
          timePoints: [2, 4, 8, 12],
          watchJars: 1,
          measuringJarsPerPull: 1,
          spares: 2,
        },
        {
          name: '45 °C',
          timePoints: [1, 2, 4, 6, 8, 12],
          watchJars: 2,
          measuringJarsPerPull: 1,
          spares: 2,
        },
      ],
      initialJars: 3,
      retains: 2,
      fillG: 50,
      batchG: 1200,
      lossPercent: 4,
    },
    output: {
      jars: 22,
      watchJars: 3,
      measuringJars: 10,
      spares: 4,
      grams: 1145.8333333333335,
      fits: true,
      shortG: 0,
    },
  },
}
