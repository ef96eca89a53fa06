import { AnalysisError } from '../analysis-error.ts'
import type { Finding, FittedCurve, ParameterEstimate } from '../analysis.ts'
import { casingFinding } from '../casing-storage.ts'
import { determinationFindings } from '../findings.ts'
import type { Kind, KindMethod, KindOutcome } from '../kind.ts'
import { conductivityEstimate, parameterEstimate, UNDETERMINED_FACTOR } from '../parameter-estimate.ts'
import { LARGEST_U, smallUFinding, STRAIGHT_LINE_CONSTANT, theisU, timeOfU } from '../small-u.ts'
import { THINNING_OFFERED_ABOVE, THINNING_REFUSED_ABOVE, thinningCorrection } from '../unconfined.ts'
import { iterateTransmissivity, unitTransmissivity, type SpecificCapacityProblem } from './iteration.ts'
import { penetrationLoss } from './partial-penetration.ts'
import type { SpecificCapacityInputs, SpecificCapacityOptions } from './specific-capacity-test.ts'

/** Storativity assumed where none is given, with the standard deviation of its log10 (common practice). */
export const assumedStorage = {
  confined: { value: 1e-4, logSd: 1 },
  leaky: { value: 1e-4, logSd: 1 },
  unconfined: { value: 0.1, logSd: 0.3 },
} as const satisfies Record<SpecificCapacityInputs['aquifer'], { value: number; logSd: number }>

/** Freedom of a normal distribution: all errors are known beforehand. */
const NORMAL = 1e9

interface Assumed {
  S: number
  logSd: number
  wellLoss: number
  wellLossSd: number
}

function run(inputs: SpecificCapacityInputs, options: SpecificCapacityOptions): KindOutcome {
  checkInputs(inputs)
  const assumed = assumedFrom(inputs, options)
  const problem = problemOf(inputs, options, assumed)
  const solved = iterateTransmissivity(problem)
  const T = solved && estimateOf(solved.T, problem, inputs, assumed)
  const { thickness_m, thicknessError } = inputs
  return {
    T,
    S: null,
    storageClass: null,
    K: T && thickness_m !== null ? conductivityEstimate(T, thickness_m, thicknessError) : null,
    extras: {
      specific_capacity_m2_s: inputs.rate_m3_s / inputs.drawdown_m,
      formation_drawdown_m: problem.formation_m,
      well_loss_m: assumed.wellLoss * inputs.rate_m3_s ** 2,
      penetration_loss: problem.penetration,
      S: assumed.S,
    },
    residuals: [],
    fit: {
      n: 1,
      effectiveN: 1,
      rmse_m: 0,
      autocorrelation: 0,
      iterations: solved?.iterations ?? 0,
      converged: solved !== null,
      singular: false,
      objective: 0,
    },
    findings: [
      ...(solved ? solvedFindings(solved.T, problem, inputs) : [noSolution(problem)]),
      ...assumptionFindings(inputs, options, assumed, problem),
      ...determinationFindings({ T }),
    ],
    leftOut: [],
  }
}

/** @throws AnalysisError for a rate, drawdown, time or radius that is missing or not positive */
function checkInputs(inputs: SpecificCapacityInputs): void {
  if (!(inputs.rate_m3_s > 0 && Number.isFinite(inputs.rate_m3_s))) throw new AnalysisError('analysis/no-rate')
  if (!(inputs.drawdown_m > 0 && Number.isFinite(inputs.drawdown_m))) throw new AnalysisError('analysis/no-drawdown')
  const wrong = (['duration_s', 'wellRadius_m'] as const).find((name) => !(inputs[name] > 0))
  if (wrong) throw new AnalysisError('analysis/dimension', { dimension: wrong })
}

function assumedFrom({ aquifer }: SpecificCapacityInputs, options: SpecificCapacityOptions): Assumed {
  const S = options.storativity ?? assumedStorage[aquifer].value
  const logSd = options.storativityLogSd ?? assumedStorage[aquifer].logSd
  if (!(S > 0 && logSd >= 0)) throw new AnalysisError('analysis/bad-option', { option: 'storativity' })
  return { S, logSd, wellLoss: options.wellLoss_s2_m5 ?? 0, wellLossSd: options.wellLossSd_s2_m5 ?? 0 }
}

function problemOf(
  inputs: SpecificCapacityInputs,
  options: SpecificCapacityOptions,
  { S, wellLoss }: Assumed,
): SpecificCapacityProblem {
  const { rate_m3_s, duration_s, wellRadius_m } = inputs
  const unlost_m = inputs.drawdown_m - wellLoss * rate_m3_s ** 2
  if (!(unlost_m > 0)) {
    throw new AnalysisError('analysis/well-loss-exceeds', {
      loss_m: wellLoss * rate_m3_s ** 2,
      drawdown_m: inputs.drawdown_m,
    })
  }
  const formation_m = options.thinning ? unthinned(unlost_m, inputs) : unlost_m
  return { rate_m3_s, formation_m, duration_s, wellRadius_m, S, penetration: penetrationOf(inputs) }
}

function unthinned(drawdown_m: number, { aquifer, thickness_m }: SpecificCapacityInputs): number {
  if (aquifer !== 'unconfined') throw new AnalysisError('analysis/not-unconfined')
  if (thickness_m === null || !(thickness_m > 0)) throw new AnalysisError('analysis/no-thickness')
  if (drawdown_m > THINNING_REFUSED_ABOVE * thickness_m) {
    throw new AnalysisError('analysis/thinning-too-large', { drawdown_m, thickness_m })
  }
  return thinningCorrection(drawdown_m, thickness_m)
}

function penetrationOf({ screenLength_m, thickness_m, wellRadius_m }: SpecificCapacityInputs): number {
  if (screenLength_m === null || thickness_m === null) return 0
  if (!(screenLength_m > 0 && screenLength_m <= thickness_m)) {
    throw new AnalysisError('analysis/dimension', { dimension: 'screenLength_m' })
  }
  return penetrationLoss(screenLength_m, thickness_m, wellRadius_m)
}

/**
 * Errors of rate, drawdown, well loss and storativity carried into ln T. T stands on both sides of its equation, so
 * that each is enlarged by 1/(1 − u/T), u = Q/(4πs).
 */
function estimateOf(
  T: number,
  problem: SpecificCapacityProblem,
  inputs: SpecificCapacityInputs,
  { logSd, wellLoss, wellLossSd }: Assumed,
): ParameterEstimate {
  const share = unitTransmissivity(problem) / T
  const turbulent = problem.rate_m3_s ** 2 / problem.formation_m
  const otherSd =
    Math.hypot(
      (1 + 2 * wellLoss * turbulent) * inputs.rateError,
      inputs.drawdownSd_m / problem.formation_m,
      turbulent * wellLossSd,
      share * Math.LN10 * logSd,
    ) /
    (1 - share)
  return parameterEstimate(T, { fitSd: 0, freedom: NORMAL, otherSd }, UNDETERMINED_FACTOR.T)
}

const noSolution = ({ formation_m, duration_s, S }: SpecificCapacityProblem): Finding => ({
  code: 'specific-capacity-no-solution',
  severity: 'bad',
  params: { drawdown_m: formation_m, duration_s, S },
})

function solvedFindings(T: number, problem: SpecificCapacityProblem, inputs: SpecificCapacityInputs): Finding[] {
  const { S, wellRadius_m, duration_s } = problem
  return [
    smallUFinding(theisU(T, S, wellRadius_m, duration_s), timeOfU(T, S, wellRadius_m, LARGEST_U)),
    casingFinding(T, inputs, duration_s, 'drawdown'),
  ]
}

/** What stands in for knowledge. */
function assumptionFindings(
  inputs: SpecificCapacityInputs,
  options: SpecificCapacityOptions,
  { S, logSd, wellLoss }: Assumed,
  { penetration }: SpecificCapacityProblem,
): Finding[] {
  const { thickness_m, screenLength_m, drawdown_m } = inputs
  const findings: Finding[] = [{ code: 'storage-assumed', severity: 'note', params: { S, factor: 10 ** (2 * logSd) } }]
  if (wellLoss === 0) findings.push({ code: 'well-loss-unknown', severity: 'caution', params: {} })
  if (penetration > 0 && thickness_m !== null && screenLength_m !== null) {
    const params = { share: screenLength_m / thickness_m, penetration }
    findings.push({ code: 'penetration-corrected', severity: 'note', params })
  }
  if (thickness_m === null || screenLength_m === null) {
    findings.push({ code: 'penetration-unknown', severity: 'note', params: {} })
  }
  if (inputs.aquifer === 'unconfined' && thickness_m !== null) {
    const params = { drawdown_m, thickness_m, share: drawdown_m / thickness_m }
    if (options.thinning) findings.push({ code: 'thinning-corrected', severity: 'note', params })
    else if (params.share > THINNING_OFFERED_ABOVE)
      findings.push({ code: 'thinning-offered', severity: 'caution', params })
  }
  return findings
}

/** Drawdown of the pumped well with the T found, well loss and partial penetration included. */
function curve(
  inputs: SpecificCapacityInputs,
  _options: SpecificCapacityOptions,
  { T, extras }: KindOutcome,
  times_s: number[],
): FittedCurve[] {
  const drawdown_m = times_s.map((time) => {
    if (!T || !(time > 0)) return null
    const argument = (STRAIGHT_LINE_CONSTANT * T.value * time) / (inputs.wellRadius_m ** 2 * (extras.S as number))
    const bracket = Math.log(argument) + 2 * (extras.penetration_loss as number)
    const modelled = (inputs.rate_m3_s * bracket) / (4 * Math.PI * T.value) + (extras.well_loss_m as number)
    return modelled > 0 ? modelled : null
  })
  return [{ wellId: inputs.wellId, drawdown_m }]
}

export const specificCapacityMethod: KindMethod<SpecificCapacityInputs, SpecificCapacityOptions> = {
  id: 'specific-capacity',
  label: 'Specific capacity to transmissivity (Theis)',
  version: 1,
  source: 'Theis 1963; Bradbury & Rothschild 1985; ASTM D5472',
  unknowns: [{ id: 'T', label: 'Transmissivity', dimension: 'transmissivity' }],
  options: [
    {
      name: 'storativity',
      label: 'Storativity assumed',
      kind: 'number',
      dimension: 'storage',
      low: 0,
      high: 0.5,
      default: null,
    },
    {
      name: 'storativityLogSd',
      label: 'Its error as log10',
      kind: 'number',
      dimension: 'dimensionless',
      low: 0,
      high: 3,
      default: null,
    },
    { name: 'wellLoss_s2_m5', label: 'Well loss C', kind: 'number', dimension: 's²/m⁵', low: 0, high: 1e7, default: 0 },
    {
      name: 'wellLossSd_s2_m5',
      label: 'Error of C',
      kind: 'number',
      dimension: 's²/m⁵',
      low: 0,
      high: 1e7,
      default: 0,
    },
    { name: 'thinning', label: 'Correct for thinning of the aquifer', kind: 'flag', default: false },
  ],
  validity: [
    { code: 'u-large', statement: 'u = r²S/(4Tt) is at most 0.05', source: 'ASTM D5472' },
    { code: 'casing-storage', statement: 'The drawdown was read after 25 r_c²/T', source: 'Papadopulos & Cooper 1967' },
    { code: 'well-loss-unknown', statement: 'The loss of the well is known', source: 'Bradbury & Rothschild 1985' },
  ],
  run,
  curve,
}

export const specificCapacityTests: Kind<SpecificCapacityInputs, SpecificCapacityOptions> = {
  id: 'specific-capacity',
  label: 'Specific capacity',
  methods: { [specificCapacityMethod.id]: specificCapacityMethod },
}
