import { AnalysisError, type Finding, type FittedCurve } from '../analysis.ts'
import { fitFindings } from '../findings.ts'
import type { KindOutcome } from '../kind.ts'
import { columnLength, GRAVITY, springDisplacement, springTransmissivity, type Spring } from './damped-spring.ts'
import { effectiveCasingRadius } from './effective-radius.ts'
import { fitHeads, headSd, type HeadFit, type HeadModel } from './head-fit.ts'
import { conductivityUnknown, repeatsOption, type SlugMethod } from './line-method.ts'
import { combinedOutcome, repeatExtra, type RepeatFit } from './repeats.ts'
import { checkDimensions, normalisedHeads, type Heads, type SlugInputs, type SlugOptions } from './slug-test.ts'
import { springStarts } from './spring-starts.ts'

/** The measured length of the column should agree with that of the well to this share. Source: ASTM D5785. */
const LENGTH_SHARE = 0.2

interface SwingSpec extends Pick<SlugMethod, 'id' | 'label' | 'version' | 'source' | 'validity'> {
  /** Constant of the logarithm, see `springTransmissivity`. */
  constant: number
  /** Damping for which the method is meant, and searched. */
  meant: { low: number; high: number }
  searched: { low: number; high: number }
  /** Whether the moment of the start is unknown, so that the swing may begin anywhere. */
  freeStart: boolean
  dampings: number[]
  code: string
}

function swingMethod(spec: SwingSpec): SlugMethod {
  const { id, label, version, source, validity } = spec
  return {
    id,
    label,
    version,
    source,
    validity,
    unknowns: [conductivityUnknown],
    options: [repeatsOption],
    run: (inputs, options) => run(spec, inputs, options),
    curve,
  }
}

function run(spec: SwingSpec, inputs: SlugInputs, options: SlugOptions): KindOutcome {
  checkDimensions(inputs)
  if (!(inputs.storage.value > 0)) throw new AnalysisError('analysis/dimension', { dimension: 'storage' })
  const { heads, leftOut } = normalisedHeads(inputs, options)
  const model = modelOf(spec)
  const fits = heads.map((one) => fitRepeat(spec, fitHeads(one, model, springStarts(one, spec.dampings)), one, inputs))
  const storageSd = Math.LN10 * inputs.storage.logSd
  const leverage = Math.max(...fits.map(({ drawn }) => drawn.storageLeverage as number))
  return combinedOutcome(inputs, fits, { otherSd: leverage * storageSd, findings: [], leftOut })
}

function modelOf({ searched, freeStart }: SwingSpec): HeadModel {
  return {
    unknowns: [
      { low: 1e-4, high: 1e3, scale: 'log' },
      { ...searched, scale: 'log' },
      { low: -10, high: 10, scale: 'linear' },
      ...(freeStart ? [{ low: -10, high: 10, scale: 'linear' } as const] : []),
    ],
    heads: (parameters, time_s) => {
      const [frequency_1_s = 1, damping = 1, start = 1, velocity = 0] = Array.from(parameters)
      return time_s.map((time) => springDisplacement({ frequency_1_s, damping }, time, start, velocity))
    },
  }
}

function fitRepeat(spec: SwingSpec, fit: HeadFit, heads: Heads, inputs: SlugInputs): RepeatFit {
  const [frequency_1_s = NaN, damping = NaN, start = NaN, velocity = 0] = fit.parameters
  const spring = { frequency_1_s, damping }
  const casingRadius_m = effectiveCasingRadius(inputs)
  const well = { casingRadius_m, screenRadius_m: inputs.screenRadius_m, storativity: inputs.storage.value }
  const found = springTransmissivity(spring, well, spec.constant)
  if (!found) throw new AnalysisError('analysis/spring-no-transmissivity', { repeat: heads.repeat.label, damping })
  const { T, a } = found
  // From T = a·(ln T − ln S − ln ω0 + …): how ln T answers to the logarithms of frequency, damping and storativity.
  const answer = 1 / (1 - a / T)
  const gradient = [answer * (1 - a / T), -answer]
  return {
    heads,
    K: T / inputs.screenLength_m,
    fitSd: fit.singular || headSd(fit, 1) === Infinity ? Infinity : propagated(fit, gradient),
    freedom: fit.freedom,
    residuals: fit.residuals,
    summary: fit.summary,
    drawn: {
      frequency_1_s,
      damping,
      start,
      velocity,
      column_m: GRAVITY / frequency_1_s ** 2,
      T_screen_m2_s: T,
      storageLeverage: answer * (a / T),
    },
    findings: [
      ...dampingFindings(spec, damping, heads),
      ...lengthFindings(spring, { ...well, ...inputs, casingRadius_m }),
      ...fitFindings(fit.summary),
    ],
  }
}

function propagated({ covariance }: HeadFit, gradient: number[]): number {
  const variance = gradient.reduce(
    (sum, a, i) => sum + gradient.reduce((part, b, j) => part + a * b * ((covariance[i] as number[])[j] as number), 0),
    0,
  )
  return Math.sqrt(Math.max(0, variance))
}

function dampingFindings({ meant, code }: SwingSpec, damping: number, { repeat }: Heads): Finding[] {
  const inside = damping >= meant.low && damping <= meant.high
  const params = { repeat: repeat.label, damping, low: meant.low, high: meant.high }
  return inside
    ? [{ code: 'damping-fits', severity: 'good', params }]
    : [{ code: damping < meant.low ? 'damping-weak' : code, severity: 'caution', params }]
}

/** Frequency gives a length of the column that the well can be asked about. */
function lengthFindings({ frequency_1_s }: Spring, inputs: SlugInputs): Finding[] {
  const measured_m = GRAVITY / frequency_1_s ** 2
  const built_m = columnLength(Math.max(0, inputs.screenTop_m), inputs.screenLength_m, inputs)
  const share = Math.abs(measured_m / built_m - 1)
  const params = { measured_m, built_m, share, limit: LENGTH_SHARE }
  return share <= LENGTH_SHARE
    ? [{ code: 'column-agrees', severity: 'good', params }]
    : [{ code: 'column-differs', severity: 'caution', params }]
}

function curve(inputs: SlugInputs, options: SlugOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  return normalisedHeads(inputs, options).heads.map(({ repeat }, i) => {
    const get = (name: string) => extras[repeatExtra(name, i)] as number
    const spring = { frequency_1_s: get('frequency_1_s'), damping: get('damping') }
    const at = (time: number) => repeat.initial_m * springDisplacement(spring, time, get('start'), get('velocity'))
    return { wellId: repeat.id, drawdown_m: times_s.map((time) => (time >= 0 ? at(time) : null)) }
  })
}

const repeatRule = {
  code: 'depends-on-head',
  statement: 'K does not depend on the size of the slug',
  source: 'ASTM D4044',
}
const columnRule = {
  code: 'column-differs',
  statement: 'The frequency gives the length of the column to 20 %',
  source: 'ASTM D5785',
}

export const oscillating = swingMethod({
  id: 'slug-oscillating',
  label: 'Oscillating slug test (van der Kamp)',
  version: 1,
  source: 'van der Kamp 1976; ASTM D5785',
  constant: 0.79,
  meant: { low: 0, high: 0.2 },
  searched: { low: 1e-4, high: 0.999 },
  freeStart: true,
  dampings: [0.03, 0.15, 0.5],
  code: 'damping-strong',
  validity: [
    { code: 'damping-strong', statement: 'The damping is at most 0.2', source: 'ASTM D5785' },
    columnRule,
    repeatRule,
  ],
})

export const nearCritical = swingMethod({
  id: 'slug-near-critical',
  label: 'Slug test near critical damping (Kipp)',
  version: 1,
  source: 'Kipp 1985; ASTM D5881',
  constant: 1,
  meant: { low: 0.2, high: 5 },
  searched: { low: 1e-3, high: 50 },
  freeStart: false,
  dampings: [0.3, 0.8, 1.5, 4],
  code: 'damping-overdamped',
  validity: [
    { code: 'damping-weak', statement: 'The damping is between 0.2 and 5', source: 'ASTM D5881' },
    columnRule,
    repeatRule,
  ],
})
