import type { AnalysisErrorCode } from '#shared/hydraulics/analysis-error.ts'
import { correctionName } from './corrections.ts'
import type { Sentences } from './findings.ts'

/** What analyses say of corrected readings, and of other wells that pumped. */
export const correctionFindings: Sentences<string> = {
  'pressure-low': ({ pressure }) =>
    `Its values, ${pressure('lowest')} to ${pressure('highest')}, are less than air weighs anywhere (${pressure('limit')}). Where the barometer shows differences only, they are right; otherwise check the unit.`,
  'correction-applied': ({ text, figures }) => {
    const by = text('series') ? ` by ${text('series')}` : ''
    return `The readings of ${text('well')} are corrected for ${correctionName(text('correction'))}${by}: ${figures()}.`
  },
  'other-well-superposed': ({ text }) =>
    `The drawdown by ${text('well')} is superposed with its rates as given, from the start of the test on.`,
  'other-well-fitted': ({ text }) =>
    `The drawdown by ${text('well')} is superposed; one factor on its rates is fitted together with the aquifer.`,
  'other-well-not-counted': ({ text }) =>
    `${text('well')} pumped too, and this method takes no account of it. A curve superposes it.`,
  'other-well-and-trend': ({ text }) =>
    `${text('well')} pumped before the test, and the trend before pumping is taken off as well: part of its drawdown may count twice. Use one of the two.`,
}

type CorrectionErrorCode = Extract<AnalysisErrorCode, `analysis/other-well${string}`>

export const correctionRefusals: Sentences<CorrectionErrorCode> = {
  'analysis/other-well-distance': ({ text }) =>
    `The distance between ${text('well')} and ${text('of')} is zero or not known. Correct the place of ${text('well')}.`,
  'analysis/other-well-behind': ({ text }) =>
    `${text('well')} stands beyond a boundary of the analysis, where image wells say nothing. Take one of the two out.`,
  'analysis/other-wells-boundary': ({ text }) =>
    `The distance of a boundary cannot be fitted while ${text('well')} is superposed. Enter the distance.`,
}
