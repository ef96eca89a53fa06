import type { FittedCurve } from '../analysis.ts'
import { fitFindings } from '../findings.ts'
import type { KindOutcome } from '../kind.ts'
import { columnLength, GRAVITY, springDamping } from './damped-spring.ts'
import { effectiveCasingRadius } from './effective-radius.ts'
import { bestStart, fitHeads, headSd, thinnedHeads, type HeadModel } from './head-fit.ts'
import { inertialHeads } from './inertial-heads.ts'
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
import { columnRule, dampingFinding, lengthFinding, repeatRule } from './swing-findings.ts'

/** Constant of the logarithm, without skin. Source: Kipp 1985. */
const CONSTANT = 1
const START_DAMPINGS = [0.15, 0.3, 0.6, 1.2, 2.5, 5]
const START_COLUMNS = [0.7, 1, 1.4]
/** Step in log10 of the storativity for its effect on T, taken at the fit by a second one. */
const STORAGE_STEP = 0.5

interface Well {
  screenRadius_m: number
  casingRadius_m: number
  S: number
}

function run(inputs: SlugInputs, options: SlugOptions): KindOutcome {
  checkDimensions(inputs)
  checkStorage(inputs)
  const { heads, leftOut } = normalisedHeads(inputs, options)
  const used = heads.map((one) => thinnedHeads(one, options.readingsPerCycle))
  const fits = used.map((one, i) => fitRepeat(one, heads[i] as Heads, inputs))
  const thinned = used.map((one, i) => ({
    wellId: one.repeat.id,
    count: (heads[i] as Heads).time_s.length - one.time_s.length,
    reason: 'thinned' as const,
  }))
  const leverage = Math.max(...fits.map(({ drawn }) => Math.abs(drawn.storage_leverage as number)))
  return combinedOutcome(inputs, fits, {
    otherSd: leverage * Math.LN10 * inputs.storage.logSd,
    findings: [],
    leftOut: [...leftOut, ...thinned.filter(({ count }) => count > 0)],
  })
}

function fitRepeat(used: Heads, all: Heads, inputs: SlugInputs): RepeatFit {
  const casingRadius_m = effectiveCasingRadius(inputs)
  const well = { casingRadius_m, screenRadius_m: inputs.screenRadius_m, S: inputs.storage.value }
  const built_m = columnLength(Math.max(0, inputs.screenTop_m), inputs.screenLength_m, well)
  const model = modelOf(well)
  const fit = fitHeads(used, model, [bestStart(used, model, startsOf(well, built_m))])
  const [T = NaN, column_m = NaN] = fit.parameters
  const other = { ...well, S: well.S * 10 ** STORAGE_STEP }
  const [otherT = NaN] = fitHeads(used, modelOf(other), [[T, column_m]]).parameters
  const spring = { frequency_1_s: Math.sqrt(GRAVITY / column_m), damping: NaN }
  const damping = springDamping(T, spring.frequency_1_s, { ...well, storativity: well.S }, CONSTANT)
  return {
    heads: all,
    K: T / inputs.screenLength_m,
    fitSd: headSd(fit, 0),
    freedom: fit.freedom,
    residuals: fit.residuals,
    summary: fit.summary,
    drawn: {
      T_screen_m2_s: T,
      column_m,
      frequency_1_s: spring.frequency_1_s,
      damping,
      storage_leverage: Math.log(otherT / T) / (STORAGE_STEP * Math.LN10),
    },
    findings: [
      dampingFinding('near-critical', damping, all),
      lengthFinding(spring, inputs, casingRadius_m),
      ...fitFindings(fit.summary),
    ],
  }
}

const modelOf = (well: Well): HeadModel => ({
  unknowns: [
    { low: 1e-10, high: 1e2, scale: 'log' },
    { low: 1e-2, high: 1e4, scale: 'log' },
  ],
  heads: (parameters, time_s) =>
    inertialHeads({ ...well, T: parameters[0] as number, column_m: parameters[1] as number }, time_s),
})

/** Columns about the one that was built, and the T that would damp them by several amounts. */
function startsOf({ casingRadius_m, screenRadius_m, S }: Well, built_m: number): number[][] {
  return START_COLUMNS.flatMap((factor) => {
    const column_m = factor * built_m
    const frequency = Math.sqrt(GRAVITY / column_m)
    return START_DAMPINGS.map((damping) => {
      const a = (casingRadius_m ** 2 * frequency) / (8 * damping)
      return [a * Math.max(2, 1.3 * Math.log(a / (screenRadius_m ** 2 * S * frequency))), column_m]
    })
  })
}

function curve(inputs: SlugInputs, options: SlugOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  const casingRadius_m = effectiveCasingRadius(inputs)
  const later = times_s.filter((time) => time > 0)
  return normalisedHeads(inputs, options).heads.map(({ repeat }, i) => {
    const T = extras[repeatExtra('T_screen_m2_s', i)] as number
    const column_m = extras[repeatExtra('column_m', i)] as number
    const well = { casingRadius_m, screenRadius_m: inputs.screenRadius_m, S: inputs.storage.value, T, column_m }
    const heads = inertialHeads(well, later)
    const found = new Map(later.map((time, k) => [time, repeat.initial_m * (heads[k] as number)]))
    const drawdown_m = times_s.map((time) => found.get(time) ?? (time === 0 ? repeat.initial_m : null))
    return { wellId: repeat.id, drawdown_m }
  })
}

export const nearCritical: SlugMethod = {
  id: 'slug-near-critical',
  label: 'Slug test near critical damping (Kipp)',
  version: 1,
  source: 'Kipp 1985; ASTM D5881',
  unknowns: [conductivityUnknown],
  options: [
    repeatsOption,
    {
      name: 'readingsPerCycle',
      label: 'Most readings per factor of ten in time',
      kind: 'number',
      dimension: 'count',
      low: 2,
      high: 10_000,
      default: 50,
    },
  ],
  validity: [
    { code: 'damping-weak', statement: 'The damping is between 0.2 and 5', source: 'ASTM D5881' },
    columnRule,
    repeatRule,
  ],
  run,
  curve,
}
