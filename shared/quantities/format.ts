import { fromSI, unitById } from './units.ts'

export interface NumberFormat {
  /** Significant figures (default 3). */
  figures?: number
  /** Drop zeros at the end of the decimals: 2.50 becomes 2.5 (default false, because they tell the precision). */
  trim?: boolean
}

/** Narrow no-break space: separates thousands and never breaks a number over two lines. */
const THOUSANDS = '\u202f'
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹'
/** Outside these bounds a number is written with a power of ten. */
const SMALLEST_PLAIN = 1e-3
const LARGEST_PLAIN = 1e9

const superscript = (exponent: number) =>
  (exponent < 0 ? '⁻' : '') + [...String(Math.abs(exponent))].map((digit) => SUPERSCRIPTS[Number(digit)]).join('')

const trimZeros = (decimal: string) => (decimal.includes('.') ? decimal.replace(/\.?0+$/, '') : decimal)

function groupThousands(decimal: string): string {
  const [whole = '', fraction] = decimal.split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, THOUSANDS)
  return fraction === undefined ? grouped : `${grouped}.${fraction}`
}

function magnitudeText(magnitude: number, figures: number, trim: boolean): string {
  const [mantissa = '', power] = magnitude.toExponential(figures - 1).split('e')
  const exponent = Number(power)
  const shorten = (text: string) => (trim ? trimZeros(text) : text)
  // The rounded value decides, so that 0.00099996 reads 0.00100 and not 1.00×10⁻³.
  const rounded = Number(`${mantissa}e${power}`)
  if (rounded < SMALLEST_PLAIN || rounded >= LARGEST_PLAIN) return `${shorten(mantissa)}×10${superscript(exponent)}`
  return groupThousands(shorten(rounded.toFixed(Math.max(0, figures - 1 - exponent))))
}

/**
 * A number as the program shows it: decimal point, narrow no-break space between thousands,
 * powers of ten with superscripts below 0.001 and from 10⁹ on. NaN is "–".
 */
export function formatNumber(value: number, { figures = 3, trim = false }: NumberFormat = {}): string {
  if (Number.isNaN(value)) return '–'
  const sign = value < 0 ? '−' : ''
  if (!Number.isFinite(value)) return `${sign}∞`
  if (value === 0) return '0'
  return sign + magnitudeText(Math.abs(value), figures, trim)
}

/** A number with a fixed count of decimals, for columns of readings: 12.340. */
export function formatDecimals(value: number, decimals: number): string {
  if (!Number.isFinite(value)) return formatNumber(value)
  const text = Math.abs(value).toFixed(decimals)
  return (value < 0 && Number(text) !== 0 ? '−' : '') + groupThousands(text)
}

const withLabel = (text: string, unitId: string) => `${text} ${unitById(unitId).label}`.trimEnd()

/** An SI value in a unit, with its label: "640 m²/d". @throws RangeError for an unknown unit */
export function formatQuantity(valueSI: number, unitId: string, format: NumberFormat = {}): string {
  return withLabel(formatNumber(fromSI(valueSI, unitId), format), unitId)
}

/** An interval of SI values in a unit: "450 to 910 m²/d". @throws RangeError for an unknown unit */
export function formatInterval(lowSI: number, highSI: number, unitId: string, format: NumberFormat = {}): string {
  const [low, high] = [lowSI, highSI].map((value) => formatNumber(fromSI(value, unitId), format))
  return withLabel(`${low} to ${high}`, unitId)
}
