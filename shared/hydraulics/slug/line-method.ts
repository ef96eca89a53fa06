import { AnalysisError } from '../analysis-error.ts'
import type { Finding, FittedCurve, HandLine } from '../analysis.ts'
import { fitFindings, handLineFinding } from '../findings.ts'
import type { KindMethod, KindOutcome } from '../kind.ts'
import { slopeSd, straightLine, type StraightLine } from '../straight-line.ts'
import { combinedOutcome, repeatExtra, type RepeatFit } from './repeats.ts'
import { checkDimensions, normalisedHeads, type Heads, type SlugInputs, type SlugOptions } from './slug-test.ts'
import { bendFindings } from './two-lines.ts'

export type SlugMethod = KindMethod<SlugInputs, SlugOptions>

interface HeadBand {
  from: number
  to: number
}

/** A slug method that turns the rate at which ln(H/H0) falls into K. */
export interface LineSpec extends Pick<SlugMethod, 'id' | 'label' | 'version' | 'source' | 'validity'> {
  /** Normalised heads between which the line is drawn. */
  heads: HeadBand
  /** K over the rate of fall, in metres. */
  length: (inputs: SlugInputs, options: SlugOptions) => number
  options: SlugMethod['options']
  findings: (inputs: SlugInputs, options: SlugOptions) => Finding[]
}

const FEWEST_READINGS = 3

export const conductivityUnknown = { id: 'K', label: 'Hydraulic conductivity', dimension: 'conductivity' }
export const repeatsOption: SlugMethod['options'][number] = { name: 'repeatIds', label: 'Repeats', kind: 'repeats' }

export function lineMethod(spec: LineSpec): SlugMethod {
  const { id, label, version, source, validity, heads } = spec
  return {
    id,
    label,
    version,
    source,
    validity,
    unknowns: [conductivityUnknown],
    options: [
      repeatsOption,
      { name: 'heads', label: 'Heads H/H₀ of the line', kind: 'heads', default: heads },
      { name: 'line', label: 'Line drawn by hand', kind: 'line' },
      ...spec.options,
    ],
    run: (inputs, options) => run(spec, inputs, options),
    curve,
  }
}

function run(spec: LineSpec, inputs: SlugInputs, options: SlugOptions): KindOutcome {
  checkDimensions(inputs)
  const band = checkedBand(options.heads ?? spec.heads)
  const { heads, leftOut } = normalisedHeads(inputs, options)
  const hand = options.line ?? null
  if (hand && heads.length > 1) throw new AnalysisError('analysis/bad-option', { option: 'line' })
  const length_m = spec.length(inputs, options)
  const fits = heads.map((one) => fitRepeat(one, band, hand, length_m, inputs))
  const outside = heads.map((one, i) => ({
    wellId: one.repeat.id,
    count: one.time_s.length - (fits[i]?.summary.n ?? 0),
    reason: 'outside-window' as const,
  }))
  const findings = [
    ...(hand ? [handLineFinding] : []),
    ...bandFindings(band, spec.heads, hand),
    ...spec.findings(inputs, options),
  ]
  return combinedOutcome(inputs, fits, {
    otherSd: 0,
    findings,
    leftOut: [...leftOut, ...outside.filter(({ count }) => count > 0)],
  })
}

function checkedBand(band: HeadBand): HeadBand {
  if (!(band.from > 0 && band.to > band.from && band.to <= 1)) {
    throw new AnalysisError('analysis/bad-option', { option: 'heads' })
  }
  return band
}

function fitRepeat(all: Heads, band: HeadBand, hand: HandLine | null, length_m: number, inputs: SlugInputs): RepeatFit {
  const used = withinBand(all, band)
  // On log10, so that a line drawn by hand is read off like that of every other method.
  const line = straightLine(
    used.time_s,
    used.head.map((head) => -Math.log10(head)),
    { hand, time_s: used.time_s },
  )
  const { repeat } = all
  const residuals = used.time_s.map((time, i) => ({
    wellId: repeat.id,
    elapsed_s: time,
    residual_m: repeat.initial_m * ((used.head[i] as number) - headOf(line, time)),
  }))
  const squares = residuals.reduce((sum, { residual_m }) => sum + residual_m ** 2, 0)
  const summary = { ...line.summary, rmse_m: Math.sqrt(squares / residuals.length) }
  return {
    heads: all,
    K: length_m * Math.LN10 * line.slope,
    fitSd: slopeSd(line),
    freedom: line.freedom,
    residuals,
    summary,
    drawn: { slope: line.slope, intercept: line.intercept },
    findings: [...bendFindings(all, inputs), ...fitFindings(summary)],
  }
}

const headOf = ({ slope, intercept }: Pick<StraightLine, 'slope' | 'intercept'>, time_s: number) =>
  10 ** -(intercept + slope * time_s)

/**
 * Readings from the moment the head first falls to the band's top until it first falls below its bottom. Choosing them
 * one by one by their heads would turn noise into slope.
 * @throws AnalysisError with fewer than three readings
 */
function withinBand({ time_s, head }: Heads, { from, to }: HeadBand): Pick<Heads, 'time_s' | 'head'> {
  const start = head.findIndex((value) => value <= to)
  const after = head.findIndex((value, i) => i >= start && value < from)
  const range = start < 0 ? [] : [start, after < 0 ? head.length : after]
  const used = { time_s: time_s.slice(...range), head: head.slice(...range) }
  const found = start < 0 ? 0 : used.time_s.length
  if (found < FEWEST_READINGS)
    throw new AnalysisError('analysis/slug-readings', { needed: FEWEST_READINGS, found, from, to })
  return used
}

function bandFindings(band: HeadBand, recommended: HeadBand, hand: HandLine | null): Finding[] {
  if (hand || (band.from === recommended.from && band.to === recommended.to)) return []
  const params = { from: band.from, to: band.to, bestFrom: recommended.from, bestTo: recommended.to }
  return [{ code: 'heads-other', severity: 'note', params }]
}

function curve(inputs: SlugInputs, options: SlugOptions, { extras }: KindOutcome, times_s: number[]): FittedCurve[] {
  return normalisedHeads(inputs, options).heads.map(({ repeat }, i) => {
    const line = {
      slope: extras[repeatExtra('slope', i)] as number,
      intercept: extras[repeatExtra('intercept', i)] as number,
    }
    return {
      wellId: repeat.id,
      drawdown_m: times_s.map((time) => (time >= 0 ? repeat.initial_m * headOf(line, time) : null)),
    }
  })
}
