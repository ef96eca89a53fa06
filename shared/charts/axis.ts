import { formatNumber } from '#shared/quantities/format.ts'

/** One axis of a plot, in the reader's unit. */
export interface Axis {
  scale: 'linear' | 'log'
  min: number
  max: number
  title: string
  /** Values grow downwards (or to the left). */
  inverse: boolean
  /** Between the ticks of a linear axis. */
  step?: number
  /** Years are written without a space between thousands. */
  years?: boolean
}

/** Extents of values; null when there is none. Spreads into Math.min would overflow the stack on long logs. */
export function extentOf(values: Iterable<number>): [number, number] | null {
  let low = Infinity
  let high = -Infinity
  for (const value of values) {
    if (value < low) low = value
    if (value > high) high = value
  }
  return low <= high ? [low, high] : null
}

/** The round step (1, 2 or 5 times a power of ten) that parts a span into about `parts`. */
function roundStep(span: number, parts: number): number {
  const rough = span / parts
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = [1, 2, 5, 10].find((candidate) => candidate * power >= rough * 0.999) ?? 10
  return step * power
}

/** A linear axis from round number to round number over the values, zero included where `fromZero`. */
export function linearAxis(
  values: Iterable<number>,
  title: string,
  { inverse = false, fromZero = true, parts = 8 } = {},
): Axis {
  const [least, most] = extentOf(values) ?? [0, 1]
  const low = fromZero ? Math.min(0, least) : least
  const high = fromZero ? Math.max(0, most) : most
  const step = roundStep(high > low ? high - low : Math.abs(high) || 1, parts)
  // Products such as 7 × 0.2 are off in their last digit, which would show in the ticks.
  const round = (value: number) => Number(value.toPrecision(12))
  const min = round(Math.floor(low / step + 1e-9) * step)
  const max = round(Math.ceil(high / step - 1e-9) * step)
  return { scale: 'linear', min, max: max > min ? max : round(min + step), title, inverse, step }
}

/** A logarithmic axis over the positive values, with a little air at either end. */
export function logAxis(values: Iterable<number>, title: string, { inverse = false, air = 0.04 } = {}): Axis {
  const [low, high] = extentOf(positive(values)) ?? [1, 10]
  const cycles = Math.max(Math.log10(high / low), 0.3)
  const room = 10 ** (air * cycles)
  return { scale: 'log', min: low / room, max: Math.max(high, low * 10 ** 0.3) * room, title, inverse }
}

function* positive(values: Iterable<number>): Generator<number> {
  for (const value of values) if (value > 0 && Number.isFinite(value)) yield value
}

/** Where a value stands along the axis: 0 at the left or bottom end, 1 at the other; may lie outside. */
export function shareOf({ scale, min, max, inverse }: Axis, value: number): number {
  const share = scale === 'log' ? Math.log(value / min) / Math.log(max / min) : (value - min) / (max - min)
  return inverse ? 1 - share : share
}

/** The value at a share of the axis: the inverse of shareOf. */
export function valueAt({ scale, min, max, inverse }: Axis, share: number): number {
  const along = inverse ? 1 - share : share
  return scale === 'log' ? min * (max / min) ** along : min + (max - min) * along
}

/** Whole powers of ten within a logarithmic axis. */
export function powersIn({ min, max }: Axis): number[] {
  const first = Math.ceil(Math.log10(min) - 1e-9)
  const last = Math.floor(Math.log10(max) + 1e-9)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => Number(`1e${first + i}`))
}

/** Multiples of a power of ten that are written on an axis too short for whole powers, fewest first. */
const MULTIPLES = [[1, 2, 5], [1, 2, 3, 4, 5, 6, 7, 8, 9], Array.from({ length: 90 }, (_, i) => 1 + i / 10)]
const FEWEST_LABELS = 2

/** What is written on a logarithmic axis: whole powers of ten, or the roundest numbers of which two or more lie on it. */
export function logLabels(axis: Axis): number[] {
  const { min, max } = axis
  const lowest = Math.floor(Math.log10(min))
  const decades = Array.from({ length: Math.ceil(Math.log10(max)) - lowest + 1 }, (_, i) => lowest + i)
  const within = (multiples: readonly number[]) =>
    decades
      .flatMap((power) => multiples.map((multiple) => Number(`${Number(multiple.toFixed(1))}e${power}`)))
      .filter((value) => value >= min && value <= max)
  const choices = [powersIn(axis), ...MULTIPLES.map(within)]
  return choices.find(({ length }) => length >= FEWEST_LABELS) ?? (choices.at(-1) as number[])
}

export const tickText = (value: number) => formatNumber(value, { figures: 6, trim: true })

/** What stands at a tick of an axis. */
export const textOn = ({ years }: Pick<Axis, 'years'>): ((value: number) => string) => (years ? String : tickText)
