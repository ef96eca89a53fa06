import type { Finding, FittedCurve } from '../analysis.ts'
import { fitFindings } from '../findings.ts'
import type { KindOutcome } from '../kind.ts'
import { slugResponse, slugResponseWithDerivatives } from './cooper-bredehoeft-papadopulos.ts'
import { effectiveCasingRadius, intakeRadius } from './effective-radius.ts'
import { bestStart, fitHeads, headSd, thinnedHeads, type HeadFit, type HeadModel } from './head-fit.ts'
import { conductivityUnknown, repeatsOption, type SlugMethod } from './line-method.ts'
import { combinedOutcome, repeatExtra, type RepeatFit } from './repeats.ts'
import { checkDimensions, normalisedHeads, type Heads, type SlugInputs, type SlugOptions } from './slug-test.ts'

/** Bounds of the search. */
const UNKNOWNS: HeadModel['unknowns'] = [
  { low: 1e-14, high: 1e2, scale: 'log' },
  { low: 1e-12, high: 1, scale: 'log' },
]
/** Head by which the aquifer has answered; α = r_s²S/r_c² of the starts. */
const HALF = 0.5
const START_ALPHAS = [0.5, 1e-1, 1e-2, 1e-3, 1e-4, 1e-6, 1e-8]
/** A head that stays above this was not followed long enough. */
const FOLLOWED_TO = 0.5

function run(inputs: SlugInputs, options: SlugOptions): KindOutcome {
  checkDimensions(inputs)
  const { heads, leftOut } = normalisedHeads(inputs, options)
  const radii = radiiOf(inputs)
  const model = modelOf(radii)
  const fits = heads.map((one) => {
    const used = thinnedHeads(one, options.readingsPerCycle)
    return fitRepeat(fitHeads(used, model, [bestStart(used, model, startsOf(used, radii))]), one, inputs)
  })
  const thinned = heads.map((one, i) => ({
    wellId: one.repeat.id,
    count: one.time_s.length - (fits[i]?.summary.n ?? 0),
    reason: 'thinned' as const,
  }))
  return combinedOutcome(inputs, fits, {
    otherSd: 0,
    findings: aquiferFindings(inputs),
    leftOut: [...leftOut, ...thinned.filter(({ count }) => count > 0)],
  })
}

const modelOf = ({ well_m, casing_m }: ReturnType<typeof radiiOf>): HeadModel => ({
  unknowns: UNKNOWNS,
  heads: (p, times) => times.map((time) => slugResponse(p[0] as number, p[1] as number, well_m, casing_m, time)),
  derivatives: (p, times) =>
    times.map((time) => {
      const one = slugResponseWithDerivatives(p[0] as number, p[1] as number, well_m, casing_m, time)
      return { head: one.share, by: [one.byLogT, one.byLogS] }
    }),
})

const radiiOf = (inputs: SlugInputs) => ({ well_m: intakeRadius(inputs), casing_m: effectiveCasingRadius(inputs) })

/** β = Tt/r_c² is near one half to two where the head has fallen to half, for the α that occur. */
function startsOf({ time_s, head }: Heads, { well_m, casing_m }: ReturnType<typeof radiiOf>): number[][] {
  const fallen = head.findIndex((value) => value < HALF)
  const half_s = time_s[fallen < 0 ? time_s.length - 1 : fallen] as number
  return START_ALPHAS.map((alpha) => [
    (casing_m ** 2 * (0.25 - 0.1 * Math.log10(alpha))) / half_s,
    Math.min(0.5, (alpha * casing_m ** 2) / well_m ** 2),
  ])
}

function fitRepeat(fit: HeadFit, heads: Heads, inputs: SlugInputs): RepeatFit {
  const [T = NaN, S = NaN] = fit.parameters
  const last = heads.head.at(-1) as number
  const short: Finding[] =
    last > FOLLOWED_TO
      ? [{ code: 'slug-short', severity: 'caution', params: { repeat: heads.repeat.label, head: last } }]
      : []
  return {
    heads,
    K: T / inputs.screenLength_m,
    fitSd: headSd(fit, 0),
    freedom: fit.freedom,
    S: { value: S, fitSd: headSd(fit, 1) },
    residuals: fit.residuals,
    summary: fit.summary,
    drawn: { T_screen_m2_s: T, S },
    findings: [...short, ...fitFindings(fit.summary)],
  }
}

function aquiferFindings({ aquifer }: SlugInputs): Finding[] {
  return aquifer === 'confined' ? [] : [{ code: 'slug-unconfined', severity: 'caution', params: {} }]
}

function curve(inputs: SlugInputs, options: SlugOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  const { well_m, casing_m } = radiiOf(inputs)
  return normalisedHeads(inputs, options).heads.map(({ repeat }, i) => {
    const T = extras[repeatExtra('T_screen_m2_s', i)] as number
    const S = extras[repeatExtra('S', i)] as number
    const at = (time: number) => (time > 0 ? repeat.initial_m * slugResponse(T, S, well_m, casing_m, time) : null)
    return { wellId: repeat.id, drawdown_m: times_s.map((time) => (time === 0 ? repeat.initial_m : at(time))) }
  })
}

export const cooperBredehoeftPapadopulos: SlugMethod = {
  id: 'cooper-bredehoeft-papadopulos',
  label: 'Slug test, confined (Cooper, Bredehoeft & Papadopulos)',
  version: 1,
  source: 'Cooper, Bredehoeft & Papadopulos 1967; ASTM D4104',
  unknowns: [conductivityUnknown, { id: 'S', label: 'Storativity', dimension: 'storage' }],
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
    { code: 'slug-unconfined', statement: 'The aquifer is confined, the well open to all of it', source: 'ASTM D4104' },
    { code: 'slug-short', statement: 'The head was followed to half of its displacement', source: 'common practice' },
    { code: 'depends-on-head', statement: 'K does not depend on the size of the slug', source: 'ASTM D4044' },
  ],
  run,
  curve,
}
