import { AnalysisError } from '../analysis-error.ts'
import type { Finding, FittedCurve, OtherEstimate } from '../analysis.ts'
import { correctionFindings } from '../input-findings.ts'
import type { Kind, KindMethod, KindOutcome } from '../kind.ts'
import { rateHistory } from '../rates.ts'
import { stepIncrements, trendAbscissa, type StepIncrements } from './increments.ts'
import { freeExponentLoss, linearLoss, type LossFit } from './loss-fit.ts'
import { exponentFindings, lossFindings, predictionFindings, stepFindings } from './step-findings.ts'
import type { StepInputs, StepOptions } from './step-test.ts'
import { lossDrawdown, lossInterval, predict, type WellLoss } from './well-loss.ts'

type StepMethod = KindMethod<StepInputs, StepOptions>
type Fit = (increments: StepIncrements, rateError: number) => LossFit

interface Spec extends Pick<StepMethod, 'id' | 'label' | 'version' | 'source' | 'unknowns'> {
  fit: Fit
  findings: (fit: LossFit, increments: StepIncrements) => Finding[]
}

function stepMethod({ fit, findings, ...described }: Spec): StepMethod {
  return {
    ...described,
    options: stepOptions,
    validity,
    run: (inputs, options) => run(inputs, options, fit, findings),
    curve,
  }
}

function run(inputs: StepInputs, options: StepOptions, fit: Fit, findings: Spec['findings']): KindOutcome {
  const increments = stepIncrements(inputs, options)
  const fitted = fit(increments, inputs.rateError)
  const { points } = increments
  const residuals = points.map(({ from_s, rate_m3_s }, i) => ({
    wellId: inputs.well.wellId,
    elapsed_s: from_s + increments.increment_s,
    residual_m: (fitted.residuals[i] as number) * rate_m3_s,
  }))
  const squares = residuals.reduce((sum, { residual_m }) => sum + residual_m ** 2, 0)
  return {
    T: null,
    S: null,
    storageClass: null,
    others: othersOf(fitted.loss),
    extras: { ...lossExtras(fitted.loss), ...pointExtras(increments), ...predictedExtras(fitted.loss, options) },
    residuals,
    fit: {
      n: points.length,
      effectiveN: points.length,
      rmse_m: Math.sqrt(squares / points.length),
      autocorrelation: increments.autocorrelation,
      iterations: fitted.iterations,
      converged: fitted.converged,
      singular: fitted.singular,
      objective: fitted.objective,
    },
    findings: [
      ...lossFindings(fitted),
      ...findings(fitted, increments),
      ...stepFindings(increments, inputs),
      ...predictionFindings(fitted, options),
      ...correctionFindings(inputs.well),
    ],
    leftOut: increments.leftOut,
  }
}

function othersOf(loss: WellLoss): OtherEstimate[] {
  return (['B', 'C', 'P'] as const)
    .slice(0, (loss.covariance[2]?.[2] ?? 0) > 0 ? 3 : 2)
    .map((id, k) => ({ id, ...lossInterval(loss, k as 0 | 1 | 2), determined: Number.isFinite(loss[id]) }))
}

/** The losses by name, so that a stored result can be drawn and predicted from (`lossOf`). */
function lossExtras({ B, C, P, covariance, freedom, rateError, rates, increment_s }: WellLoss): Record<string, number> {
  const at = (i: number, j: number) => (covariance[i] as number[])[j] as number
  return {
    B,
    C,
    P,
    covariance_BB: at(0, 0),
    covariance_BC: at(0, 1),
    covariance_BP: at(0, 2),
    covariance_CC: at(1, 1),
    covariance_CP: at(1, 2),
    covariance_PP: at(2, 2),
    freedom,
    rate_error: rateError,
    lowest_rate_m3_s: rates.low,
    highest_rate_m3_s: rates.high,
    increment_s,
  }
}

/** The losses of a stored result. */
export function lossOf(extras: Record<string, number>): WellLoss {
  const get = (name: string) => extras[name] as number
  const [bc, bp, cp] = [get('covariance_BC'), get('covariance_BP'), get('covariance_CP')]
  return {
    B: get('B'),
    C: get('C'),
    P: get('P'),
    covariance: [
      [get('covariance_BB'), bc, bp],
      [bc, get('covariance_CC'), cp],
      [bp, cp, get('covariance_PP')],
    ],
    freedom: get('freedom'),
    rateError: get('rate_error'),
    rates: { low: get('lowest_rate_m3_s'), high: get('highest_rate_m3_s') },
    increment_s: get('increment_s'),
  }
}

function pointExtras({ points, trend }: StepIncrements): Record<string, number> {
  const named = points.flatMap(({ rate_m3_s, increment_m, drawdown_m }, i) => [
    [`rate_${i + 1}_m3_s`, rate_m3_s],
    [`increment_${i + 1}_m`, increment_m],
    [`drawdown_${i + 1}_m`, drawdown_m],
  ])
  return { trend, ...(Object.fromEntries(named) as Record<string, number>) }
}

function predictedExtras(loss: WellLoss, { predictedRate_m3_s = null }: StepOptions): Record<string, number> {
  const highest = predict(loss, loss.rates.high)
  const share = { laminar_share_highest: highest.laminarShare }
  if (predictedRate_m3_s === null) return share
  if (!(predictedRate_m3_s > 0)) throw new AnalysisError('analysis/bad-option', { option: 'predictedRate_m3_s' })
  const predicted = predict(loss, predictedRate_m3_s)
  return {
    ...share,
    predicted_rate_m3_s: predictedRate_m3_s,
    predicted_drawdown_m: predicted.drawdown_m,
    predicted_low_m: predicted.low_m,
    predicted_high_m: predicted.high_m,
    predicted_specific_capacity_m2_s: predicted.specificCapacity,
    predicted_laminar_share: predicted.laminarShare,
  }
}

/** Losses of the running rate and the common trend of all changes before, as in the increments. */
function curve(inputs: StepInputs, _options: StepOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  const history = rateHistory(inputs.rates)
  const loss = lossOf(extras)
  const logIncrement = Math.log10(loss.increment_s)
  const trend = extras.trend as number
  const drawdown_m = times_s.map((time) => {
    if (!(time > history.start_s) || history.increments.some(({ start_s }) => start_s === time)) return null
    const rate = history.steps.filter(({ start_s }) => start_s < time).at(-1)?.rate_m3_s ?? 0
    const running = rate > 0 ? lossDrawdown(loss, rate) : 0
    return running + trend * (trendAbscissa(history, time, time) - rate * logIncrement)
  })
  return [{ wellId: inputs.well.wellId, drawdown_m }]
}

const stepOptions: StepMethod['options'] = [
  {
    name: 'increment_s',
    label: 'Time after each change',
    kind: 'number',
    dimension: 'time',
    low: 0,
    high: 1e8,
    default: null,
  },
  {
    name: 'trendFrom',
    label: 'Share of each step left out',
    kind: 'number',
    dimension: 'share',
    low: 0,
    high: 0.9,
    default: 0.1,
  },
  {
    name: 'predictedRate_m3_s',
    label: 'Rate to predict',
    kind: 'number',
    dimension: 'discharge',
    low: 0,
    high: 100,
    default: null,
  },
]

const validity: StepMethod['validity'] = [
  {
    code: 'step-trends-differ',
    statement: 'Every step follows the same trend per unit of rate',
    source: 'Hantush 1964',
  },
  { code: 'casing-storage', statement: 'Increments are read after 25 r_c²/T', source: 'Papadopulos & Cooper 1967' },
  { code: 'negative-well-loss', statement: 'Drawdown per unit of rate rises with the rate', source: 'Jacob 1947' },
]

const formationLoss = { id: 'B', label: 'Linear loss', dimension: 's/m²' }
const wellLoss = { id: 'C', label: 'Well loss', dimension: 's²/m⁵' }

export const stepLinear = stepMethod({
  id: 'step-linear',
  label: 'Step drawdown, linear (Hantush–Bierschenk)',
  version: 1,
  source: 'Jacob 1947; Hantush 1964; Bierschenk 1963',
  unknowns: [formationLoss, wellLoss],
  fit: linearLoss,
  findings: () => [],
})

export const stepFreeExponent = stepMethod({
  id: 'step-free-exponent',
  label: 'Step drawdown, free exponent (Rorabaugh)',
  version: 1,
  source: 'Rorabaugh 1953',
  unknowns: [
    formationLoss,
    { ...wellLoss, dimension: 's^P/m^(3P−1)' },
    { id: 'P', label: 'Exponent of well loss', dimension: 'dimensionless' },
  ],
  fit: freeExponentLoss,
  findings: exponentFindings,
})

export const stepTests: Kind<StepInputs, StepOptions> = {
  id: 'step',
  label: 'Step-drawdown test',
  methods: { [stepLinear.id]: stepLinear, [stepFreeExponent.id]: stepFreeExponent },
}
