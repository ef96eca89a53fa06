import { AnalysisError } from '../analysis-error.ts'
import type { FittedCurve } from '../analysis.ts'
import { fitFindings } from '../findings.ts'
import type { KindOutcome } from '../kind.ts'
import { GRAVITY, springDisplacement, springTransmissivity } from './damped-spring.ts'
import { effectiveCasingRadius } from './effective-radius.ts'
import { fitHeads, headSd, type HeadFit, type HeadModel } from './head-fit.ts'
import { conductivityUnknown, repeatsOption, type SlugMethod } from './line-method.ts'
import { combinedOutcome, repeatExtra, type RepeatFit } from './repeats.ts'
import {
  checkDimensions,
  checkStorage,
  normalisedHeads,
  type Heads,
  type SlugInputs,
  type SlugOptions,
} from './slug-test.ts'
import { springStarts } from './spring-starts.ts'
import { columnRule, dampingFinding, lengthFinding, repeatRule } from './swing-findings.ts'

/** Constant of the logarithm. Source: van der Kamp 1976. */
const CONSTANT = 0.79
const START_DAMPINGS = [0.03, 0.15, 0.5]

/** Start and velocity are free: when exactly the level was let go is seldom known to a tenth of a second. */
const model: HeadModel = {
  unknowns: [
    { low: 1e-4, high: 1e3, scale: 'log' },
    { low: 1e-4, high: 0.999, scale: 'log' },
    { low: -10, high: 10, scale: 'linear' },
    { low: -10, high: 10, scale: 'linear' },
  ],
  heads: (parameters, time_s) => {
    const [frequency_1_s = 1, damping = 1, start = 1, velocity = 0] = Array.from(parameters)
    return time_s.map((time) => springDisplacement({ frequency_1_s, damping }, time, start, velocity))
  },
}

function run(inputs: SlugInputs, options: SlugOptions): KindOutcome {
  checkDimensions(inputs)
  checkStorage(inputs)
  const { heads, leftOut } = normalisedHeads(inputs, options)
  const fits = heads.map((one) => fitRepeat(fitHeads(one, model, springStarts(one, START_DAMPINGS)), one, inputs))
  const leverage = Math.max(...fits.map(({ drawn }) => drawn.storage_leverage as number))
  const otherSd = leverage * Math.LN10 * inputs.storage.logSd
  return combinedOutcome(inputs, fits, { otherSd, findings: [], leftOut })
}

function fitRepeat(fit: HeadFit, heads: Heads, inputs: SlugInputs): RepeatFit {
  const [frequency_1_s = NaN, damping = NaN, start = NaN, velocity = NaN] = fit.parameters
  const spring = { frequency_1_s, damping }
  const casingRadius_m = effectiveCasingRadius(inputs)
  const well = { casingRadius_m, screenRadius_m: inputs.screenRadius_m, storativity: inputs.storage.value }
  const found = springTransmissivity(spring, well, CONSTANT)
  if (!found) throw new AnalysisError('analysis/spring-no-transmissivity', { repeat: heads.repeat.label, damping })
  const { T, a } = found
  // T = a·ln(T/(k·r_s²·S·ω0)) with a = r_c²ω0/(8ζ): ln T goes with ln ω0, and with ln ζ and ln S as these.
  const leverage = 1 / (1 - a / T)
  return {
    heads,
    K: T / inputs.screenLength_m,
    fitSd: logSd(fit, [1, -leverage]),
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
      storage_leverage: leverage * (a / T),
    },
    findings: [
      dampingFinding('swinging', damping, heads),
      lengthFinding(spring, inputs, casingRadius_m),
      ...fitFindings(fit.summary),
    ],
  }
}

/** Standard deviation of ln T from those of ln ω0 and ln ζ. */
function logSd(fit: HeadFit, gradient: number[]): number {
  if (headSd(fit, 0) === Infinity || headSd(fit, 1) === Infinity) return Infinity
  const at = (i: number, j: number) => (fit.covariance[i] as number[])[j] as number
  const variance = gradient.reduce((sum, a, i) => sum + gradient.reduce((part, b, j) => part + a * b * at(i, j), 0), 0)
  return Math.sqrt(Math.max(0, variance))
}

function curve(inputs: SlugInputs, options: SlugOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  return normalisedHeads(inputs, options).heads.map(({ repeat }, i) => {
    const get = (name: string) => extras[repeatExtra(name, i)] as number
    const spring = { frequency_1_s: get('frequency_1_s'), damping: get('damping') }
    const at = (time: number) => repeat.initial_m * springDisplacement(spring, time, get('start'), get('velocity'))
    return { wellId: repeat.id, drawdown_m: times_s.map((time) => (time >= 0 ? at(time) : null)) }
  })
}

export const oscillating: SlugMethod = {
  id: 'slug-oscillating',
  label: 'Oscillating slug test (van der Kamp)',
  version: 1,
  source: 'van der Kamp 1976; ASTM D5785',
  unknowns: [conductivityUnknown],
  options: [repeatsOption],
  validity: [
    { code: 'damping-strong', statement: 'The damping is below 0.2', source: 'ASTM D5785' },
    columnRule,
    repeatRule,
  ],
  run,
  curve,
}
