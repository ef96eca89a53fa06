import { formatNumber } from '#shared/quantities/format.ts'
import { fromSI, toSI } from '#shared/quantities/units.ts'
import type { ParameterId } from '#shared/words/parameters.ts'

/** Light to dark, each darker than the one before, so that the order is read without colour too. */
const transmissivityRamp = ['#F3E3B3', '#DCC77E', '#A9B665', '#6FA36F', '#3C8A80', '#1F6B83', '#15486B']
/** A second hue, so that nobody takes a map of storage for one of transmissivity. */
const storageRamp = ['#F3E4F0', '#DDBBD8', '#BE8FBE', '#9A669F', '#77437F', '#552661']

interface Scale {
  ramp: readonly string[]
  /** Breaks in the unit they were chosen in. */
  breaks: readonly number[]
  unitId: string
}

/** Half-decades, as for everything that varies by its logarithm; specific yield varies by its amount. */
const scales: Record<ParameterId, Scale> = {
  T: { ramp: transmissivityRamp, breaks: [10, 30, 100, 300, 1000, 3000], unitId: 'm2/d' },
  K: { ramp: transmissivityRamp, breaks: [0.3, 1, 3, 10, 30, 100], unitId: 'm/d' },
  S: { ramp: storageRamp, breaks: [3e-5, 1e-4, 3e-4, 1e-3, 3e-3], unitId: '1' },
  Sy: { ramp: storageRamp, breaks: [0.02, 0.05, 0.1, 0.15, 0.2], unitId: '1' },
}

export interface ValueClass {
  colour: string
  /** SI; null where the class is open. A value on a break belongs to the class above it. */
  from: number | null
  to: number | null
}

export interface ValueClasses {
  classes: readonly ValueClass[]
  /** SI, rising; one fewer than there are classes. */
  breaks: readonly number[]
  /** The breaks in the reader's unit, as text. */
  labels: readonly string[]
}

/** The nearest of 1 and 3 times a power of ten, on a logarithmic scale. */
function nearestHalfDecade(value: number): { step: number; power: number } {
  const halves = Math.round(2 * Math.log10(value))
  return { step: halves % 2 === 0 ? 1 : 3, power: Math.floor(halves / 2) }
}

/** `count` numbers 1, 3, 10, 30 … from the one nearest to `start` on; parsed from text, so that 3e-5 is 3e-5. */
function halfDecades(start: number, count: number): number[] {
  const first = nearestHalfDecade(start)
  return Array.from({ length: count }, (_, i) => {
    const odd = first.step === 3 ? i + 1 : i
    return Number(`${odd % 2 === 0 ? 1 : 3}e${first.power + Math.floor(odd / 2)}`)
  })
}

function roundBreaks({ breaks, unitId }: Scale, readersUnit: string): number[] {
  if (unitId === readersUnit) return [...breaks]
  return halfDecades(fromSI(toSI(breaks[0]!, unitId), readersUnit), breaks.length)
}

/**
 * Classes for colouring values of a parameter, with breaks that are round numbers in the unit `unitId`.
 * @throws RangeError for an unknown unit
 */
export function valueClasses(parameter: ParameterId, unitId: string): ValueClasses {
  const scale = scales[parameter]
  const round = roundBreaks(scale, unitId)
  const breaks = round.map((value) => toSI(value, unitId))
  const classes = scale.ramp.map((colour, i) => ({ colour, from: breaks[i - 1] ?? null, to: breaks[i] ?? null }))
  return { classes, breaks, labels: round.map((value) => formatNumber(value, { trim: true })) }
}

/** Which class an SI value belongs to, counted from 0. */
export const classIndex = ({ breaks }: ValueClasses, valueSI: number): number =>
  breaks.filter((limit) => valueSI >= limit).length
