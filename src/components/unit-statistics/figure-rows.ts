import { unparse } from 'papaparse'
import type { UnitFigures, UnitStatistics } from '#shared/contracts/unit-statistics.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import type { Dimension } from '#shared/quantities/units.ts'
import { meanBasisText } from '#shared/words/unit-statistics.ts'
import type { Units } from '../../composables/useUnits.ts'

/** A figure of log10 values, as it is and with every cell of the map having the same say. */
export interface FigureRow {
  name: string
  /** SI; null where a figure has no second reading. */
  plain: number | null
  declustered: number | null
  /** A spread of log10 has no unit. */
  dimension: Dimension | null
}

export function figureRows({ declustered, ...plain }: UnitFigures, dimension: Dimension): FigureRow[] {
  const valued = (name: string, of: (figures: Omit<UnitFigures, 'declustered'>) => number, other: number | null) => ({
    name,
    plain: 10 ** of(plain),
    declustered: other === null ? null : 10 ** other,
    dimension,
  })
  return [
    valued('Geometric mean', ({ mean }) => mean, declustered.mean),
    valued('Median', ({ median }) => median, declustered.median),
    valued('P10', ({ p10 }) => p10, declustered.p10),
    valued('P90', ({ p90 }) => p90, declustered.p90),
    valued('Least', ({ least }) => least, null),
    valued('Greatest', ({ most }) => most, null),
    {
      name: 'Spread, log10 sd',
      plain: plain.n > 1 ? plain.deviation : null,
      declustered: plain.n > 1 ? declustered.deviation : null,
      dimension: null,
    },
  ]
}

export const figureText = (units: Units, value: number | null, dimension: Dimension | null): string => {
  if (value === null) return '–'
  return dimension ? units.quantity(value, dimension) : formatNumber(value, { figures: 2 })
}

export interface MeanRow {
  name: string
  mean: number
  low: number
  high: number
  basis: string
}

/** Of log10; kriging gives a mean of its own. */
interface Interval {
  mean?: number
  low: number
  high: number
}

/** 95 % intervals of the geometric mean, SI: the one to believe first. */
export function meanRows(figures: UnitFigures): MeanRow[] {
  const { meanByKriging, meanBySites, meanIfIndependent } = figures
  const believed = meanByKriging ?? meanBySites
  const row = (name: string, interval: Interval, basis: string): MeanRow => ({
    name,
    mean: 10 ** (interval.mean ?? figures.mean),
    low: 10 ** interval.low,
    high: 10 ** interval.high,
    basis,
  })
  return [
    ...(believed ? [row('Interval of the mean', believed, meanBasisText(figures))] : []),
    ...(meanIfIndependent ? [row('If wells were independent', meanIfIndependent, 'plain Student’s t')] : []),
  ]
}

/** Every figure as CSV in the reader's units; a unit of rock called "=1+1" stays text in a spreadsheet. */
export function figuresCsv({ unit, quantity, figures }: UnitStatistics, dimension: Dimension, units: Units): string {
  if (!figures) return ''
  const label = units.label(dimension)
  const from = (value: number | null, of: Dimension | null) =>
    value === null ? '' : of ? units.from(value, of) : value
  const counts: [string, number][] = [
    ['Wells', figures.n],
    ['Independent sites', figures.sites],
    ...Object.entries(figures.evidence).map(([name, n]): [string, number] => [`Evidence ${name}`, n]),
  ]
  const of = [unit.name, quantity]
  const data = [
    ...counts.map(([name, n]) => [...of, name, n, '', '', '']),
    ...figureRows(figures, dimension).map((row) => [
      ...of,
      row.name,
      from(row.plain, row.dimension),
      from(row.declustered, row.dimension),
      row.dimension ? label : '',
      '',
    ]),
    [
      ...of,
      'Cell size of declustering',
      '',
      units.from(figures.declustered.cellSize, 'length'),
      units.label('length'),
      '',
    ],
    ...meanRows(figures).flatMap(({ name, mean, low, high, basis }) => [
      [...of, `${name}, mean`, units.from(mean, dimension), '', label, basis],
      [...of, `${name}, 95 % low`, units.from(low, dimension), '', label, basis],
      [...of, `${name}, 95 % high`, units.from(high, dimension), '', label, basis],
    ]),
  ]
  const fields = ['aquifer unit', 'quantity', 'figure', 'plain', 'declustered', 'unit', 'basis']
  // A byte order mark, so that spreadsheets read "²" as it is meant.
  return `\uFEFF${unparse({ fields, data }, { escapeFormulae: true, newline: '\r\n' })}\r\n`
}
