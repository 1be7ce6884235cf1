import { attributes, lengths, narrow, packed, shapes } from './figures/all'
import type { Tally } from './figures/figure'

export type Tallies = ReadonlyMap<string, Tally>

/** One line of the table. Without a target it is printed only. */
export type Row = {
  /** Under this name the value is kept for the page that tells it. */
  key: string
  says: string
  /** Percent, or a plain number. */
  amount: number
  value: string
  error: string
  target: string
  missed: boolean
}

type Share = { hits: number; of: number }
type Target = { most?: number; least?: number }

export function tableOf(tallies: Tallies): Row[] {
  const at = (figure: string, key: string) => tallies.get(figure)?.[key] ?? 0
  const share = (figure: string, key: string, of: string): Share => ({
    hits: at(figure, key),
    of: at(figure, of),
  })
  const drifts = (
    prefix: string,
    which: (name: { attribute: string; shape: string; weeks: number }) => boolean,
  ) =>
    lengths
      .flatMap(({ weeks }) =>
        attributes.flatMap((attribute) => shapes.map((shape) => ({ attribute, shape, weeks }))),
      )
      .filter(which)
      .map(({ attribute, shape, weeks }) =>
        share(`${prefix}drift ${attribute} ${shape} ${weeks}`, 'seen', 'studies'),
      )
      .reduce(pooled, { hits: 0, of: 0 })
  const ofWeeks = (weeks: number) => (name: { weeks: number }) => name.weeks === weeks
  const group = (attribute: string, shape: string) => (name: { attribute: string; shape: string }) =>
    name.attribute === attribute && name.shape === shape

  return [
    percent(
      'steadyFlagged26',
      'unchanging studies ever flagged, 26 weeks',
      share('unchanging 26', 'flagged', 'studies'),
      {
        most: 5,
      },
    ),
    percent(
      'steadyFlagged52',
      'unchanging studies ever flagged, 52 weeks',
      share('unchanging 52', 'flagged', 'studies'),
      {
        most: 5,
      },
    ),
    percent(
      'harmlessLinear',
      'slow but harmless change flagged, linear',
      share('harmless linear', 'flagged', 'studies'),
      {
        most: 10,
      },
    ),
    percent(
      'harmlessSettling',
      'slow but harmless change flagged, settling',
      share('harmless settling', 'flagged', 'studies'),
      {
        most: 25,
      },
    ),
    percent('driftsSeen26', 'drifts seen four weeks ahead, 26 weeks', drifts('', ofWeeks(26)), { least: 90 }),
    percent('driftsSeen52', 'drifts seen four weeks ahead, 52 weeks', drifts('', ofWeeks(52)), { least: 90 }),
    percent('phLinear', 'of these pH, linear', drifts('', group('ph', 'linear')), { least: 97 }),
    percent('phFirstOrder', 'of these pH, first order', drifts('', group('ph', 'first order')), {
      least: 97,
    }),
    percent('viscosityLinear', 'of these viscosity, linear', drifts('', group('viscosity', 'linear')), {
      least: 80,
    }),
    percent(
      'viscosityFirstOrder',
      'of these viscosity, first order',
      drifts('', group('viscosity', 'first order')),
      { least: 92 },
    ),
    percent('separationLinear', 'of these separation, linear', drifts('', group('separation', 'linear')), {
      least: 73,
    }),
    percent(
      'separationFirstOrder',
      'of these separation, first order',
      drifts('', group('separation', 'first order')),
      {
        least: 87,
      },
    ),
    plain(
      'pullsBetween',
      'pulls between the onset flag and leaving',
      at('after a lag', 'pulls between') / at('after a lag', 'begun'),
    ),
    percent(
      'onsetBeforeOut',
      'onset flagged before out, where a pull falls between',
      share('after a lag', 'begun before out', 'with a pull between'),
      { least: 90 },
    ),
    percent(
      'offDaysNamed',
      'days off by 4 s named, no emulsion flagged',
      share('off days', 'named and none flagged', 'days'),
      {
        least: 95,
      },
    ),
    percent('offDaysNamedPh', 'of these pH', share('off days', 'named and none flagged ph', 'days ph')),
    percent(
      'offDaysNamedViscosity',
      'of these viscosity',
      share('off days', 'named and none flagged viscosity', 'days viscosity'),
    ),
    percent('steadyDaysNamed', 'steady days wrongly named', share('unchanging 26', 'named days', 'days'), {
      most: 1,
    }),
    percent('slipsDoubted', 'tenfold slips doubted on entry', share('slips', 'doubted', 'slips'), {
      least: 80,
    }),
    percent('slipsDoubtedPh', 'of these pH', share('slips', 'doubted ph', 'slips ph'), { least: 99 }),
    percent(
      'slipsDoubtedViscosity',
      'of these viscosity',
      share('slips', 'doubted viscosity', 'slips viscosity'),
      { least: 99 },
    ),
    percent(
      'slipsDoubtedSeparation',
      'of these separation',
      share('slips', 'doubted separation', 'slips separation'),
    ),
    percent(
      'onsetTold',
      'onset told within one week, 1 to 4 points a week',
      share('onset', 'within a week', 'studies'),
      {
        least: 90,
      },
    ),
    percent(
      'slowOnsetTold',
      'onset told within one week, 0.3 to 1 point a week',
      share('slow onset', 'within a week', 'studies'),
    ),
    percent('coverage', 'coverage of the one-sided 95 % bound', share('coverage', 'covered', 'batches'), {
      least: 94,
      most: 96,
    }),
    percent(
      'packedSteadyFlagged',
      'packed cream: unchanging flagged, 26 weeks',
      share(`${packed}unchanging 26`, 'flagged', 'studies'),
    ),
    ...attributes.map((attribute) =>
      percent(
        `packedSteadyFlagged ${attribute}`,
        `packed cream: of these ${attribute}`,
        share(`${packed}unchanging 26`, `flagged ${attribute}`, 'studies'),
      ),
    ),
    ...attributes.flatMap((attribute) =>
      shapes.map((shape) =>
        percent(
          `packedDriftsSeen ${attribute} ${shape}`,
          `packed cream: ${attribute} ${shape} seen four weeks ahead`,
          drifts(packed, group(attribute, shape)),
        ),
      ),
    ),
    percent(
      'packedOffDaysNamed',
      'packed cream: days off by 4 s named, none flagged',
      share(`${packed}off days`, 'named and none flagged', 'days'),
    ),
    percent(
      'narrowSteadyFlagged',
      'narrow bands: unchanging flagged, 26 weeks',
      share(`${narrow}unchanging 26`, 'flagged', 'studies'),
    ),
    ...attributes.map((attribute) =>
      percent(
        `narrowSteadyFlagged ${attribute}`,
        `narrow bands: of these ${attribute}`,
        share(`${narrow}unchanging 26`, `flagged ${attribute}`, 'studies'),
      ),
    ),
  ]
}

function pooled(a: Share, b: Share): Share {
  return { hits: a.hits + b.hits, of: a.of + b.of }
}

function percent(key: string, says: string, { hits, of }: Share, target: Target = {}): Row {
  const value = (100 * hits) / of
  const { most = Infinity, least = -Infinity } = target
  return {
    key,
    says,
    amount: value,
    value: `${value.toFixed(1)} %`,
    error: (100 * Math.sqrt(((hits / of) * (1 - hits / of)) / of)).toFixed(2),
    target: targetText(target),
    missed: !(value <= most && value >= least),
  }
}

function plain(key: string, says: string, amount: number): Row {
  return { key, says, amount, value: amount.toFixed(1), error: '', target: '', missed: false }
}

function targetText({ most, least }: Target): string {
  if (most !== undefined && least !== undefined) return `${least} to ${most} %`
  if (most !== undefined) return `at most ${most} %`
  return least === undefined ? '' : `at least ${least} %`
}
