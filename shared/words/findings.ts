import type { AnalysisErrorCode } from '#shared/hydraulics/analysis-error.ts'
import type { Finding } from '#shared/hydraulics/analysis.ts'
import { methods } from '#shared/hydraulics/catalogue.ts'
import { rateFactorWell } from '#shared/hydraulics/other-wells.ts'
import { kindMethods } from '#shared/hydraulics/kinds.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import { defaultUnitSystemId, unitSystemById, type UnitSystem } from '#shared/quantities/systems.ts'
import { correctionFindings, correctionRefusals } from './correction-findings.ts'
import { correctionFigures } from './corrections.ts'
import { forecastFindings } from './forecast.ts'
import { kindFindings, kindOptionNames, kindRefusals } from './kind-findings.ts'
import { leakageFindings, penetrationRefusals } from './leakage-findings.ts'
import { storageFindings, storageRefusals } from './storage-findings.ts'

/** Reads params as text in the reader's units. */
export interface Words {
  text: (name: string) => string
  number: (name: string) => string
  percent: (name: string) => string
  length: (name: string) => string
  span: (name: string) => string
  rate: (name: string) => string
  transmissivity: (name: string) => string
  pressure: (name: string) => string
  /** Figures of a correction, which are the params themselves. */
  figures: () => string
}
export type Sentences<Code extends string> = Record<Code, (words: Words) => string>

/** The name that the methods give to a quantity they find. */
const parameterName = (id: string): string =>
  rateFactorName(id) ??
  [...Object.values(methods), ...kindMethods]
    .flatMap(({ unknowns }): readonly { id: string; label: string }[] => unknowns)
    .find((unknown) => unknown.id === id)?.label ??
  id

function rateFactorName(id: string): string | null {
  const well = rateFactorWell(id)
  return well === null ? null : `The factor on the rates of ${well}`
}

const optionNames: Record<string, string> = {
  ...kindOptionNames,
  window: 'The time window must end after it begins, and cannot begin before zero.',
  match: 'The curve of this method cannot be laid by hand, because its shape changes with storativity.',
  line: 'The line drawn by hand needs a slope and a height.',
  readingsPerCycle: 'The number of readings used per factor of ten in time must be at least 1.',
}

/** Every finding of an analysis. */
const findings: Sentences<string> = {
  ...correctionFindings,
  ...forecastFindings,
  ...kindFindings,
  ...leakageFindings,
  ...storageFindings,
  'u-small': ({ number, percent }) =>
    `u is at most ${number('u')} in the window, within the limit of ${number('limit')}: the straight line is off by ${percent('drawdownError')} of drawdown and ${percent('slopeError')} of slope at most.`,
  'u-large': ({ number, percent, span }) =>
    `u reaches ${number('u')} in the window, above the limit of ${number('limit')}: the straight line is off by ${percent('drawdownError')} of drawdown and ${percent('slopeError')} of slope there. Begin the window after ${span('validFrom_s')}.`,
  'u-unknown': () =>
    'Whether the readings are late enough for a straight line cannot be told, because no drawdown before the stop is used.',
  'casing-storage-over': ({ text, span }) =>
    `At ${text('well')} the readings used begin after water stored in the casing stopped mattering (${span('over_s')}).`,
  'casing-storage': ({ text, span }) =>
    `At ${text('well')} water stored in the casing still matters until ${span('over_s')}, but the readings used begin at ${span('from_s')}. Begin the window later.`,
  'casing-unknown': ({ text }) =>
    `The casing radius of ${text('well')} is not known, so the effect of water stored in the casing cannot be judged. Enter it on the well's page.`,
  'no-storage-from-pumped-well': () =>
    'No storativity is given, because drawdown in the pumped well mixes it with losses at the well.',
  'pumped-well-in-joint-fit': () =>
    'The pumped well is fitted together with observation wells. Losses at the well pull the result; try without it.',
  'hand-line': () =>
    'The line was drawn by hand. Its interval holds the scatter of the readings about it, and how far least squares would move the line.',
  'hand-curve': () =>
    'The curve was laid over the readings by hand, and nothing was searched. Its interval holds the scatter of the readings, and how far least squares would move the curve.',
  'rate-varied': ({ percent }) =>
    `The rate differed by up to ${percent('variation')} from its mean, more than ${percent('limit')}. A curve fit with the whole rate history is safer.`,
  'aquifer-leaky': () =>
    'The aquifer is leaky, and the method assumes that no water enters from above or below. Late readings make transmissivity too high.',
  'aquifer-unlike': ({ text }) =>
    `The solution describes another kind of aquifer than the ${text('aquifer')} one of this test. Compare it with one made for that kind.`,
  'parameters-correlated': ({ text, number }) =>
    `${parameterName(text('one'))} and ${parameterName(text('other')).toLowerCase()} move together (correlation ${number('correlation')}): these readings hardly tell one from the other.`,
  'drainage-over': ({ span }) =>
    `The readings reach ${span('last_s')} and are taken to follow delayed drainage, so storage is specific yield.`,
  'drainage-not-over': ({ span }) =>
    `The readings end at ${span('last_s')}. Delayed drainage normally lasts about 3 d, so storage is apparent and is not used for effects over years.`,
  'thinning-corrected': ({ percent }) =>
    `Drawdown was corrected for thinning of the aquifer; the largest was ${percent('share')} of the saturated thickness.`,
  'thinning-offered': ({ percent }) =>
    `Drawdown reaches ${percent('share')} of the saturated thickness. Consider the correction for thinning.`,
  'thinning-too-large': ({ percent }) =>
    `Drawdown reaches ${percent('share')} of the saturated thickness, more than half. No method here holds for such a test.`,
  'window-short': ({ number, span }) =>
    `The readings used span ${span('from_s')} to ${span('to_s')}, only ${number('cycles')} of a factor of ten in time. A longer window is safer.`,
  'distance-uncertain': ({ text, length, percent }) =>
    `The distance of ${text('well')}, ${length('distance_m')}, is uncertain by ${length('distanceSd_m')} (${percent('share')}). Above ${percent('limit')} storativity is weak evidence; measure the distance.`,
  'few-readings': ({ text }) => `Only ${text('n')} readings are used.`,
  'residuals-correlated': ({ text, number }) => {
    // Where the likeness of readings outlasts the log, even one independent reading would tell more.
    const worth =
      Number(text('effectiveN')) < 1
        ? 'less than one independent reading would'
        : `as much as ${number('effectiveN')} independent readings`
    return `The ${text('n')} readings stray from the model together, not one by one: they tell ${worth}, and the intervals are widened for it.`
  },
  'readings-weighed-less': ({ text }) =>
    `${text('count')} of ${text('n')} readings lie so far off the curve that they were weighed less. Look at them on the plot: one that is wrong is better left out with its reason.`,
  'not-converged': ({ text }) =>
    `The search did not come to an end after ${text('iterations')} steps. Do not use the result.`,
  'not-determined': ({ text, number }) =>
    `${parameterName(text('parameter'))} is not determined by these data: its interval spans a factor of ${number('factor')}.`,
  'at-bound': ({ text }) =>
    `${parameterName(text('parameter'))} ran to the edge of the range searched. Check rate, distance and units.`,
  'curve-covered': ({ number }) =>
    `The readings begin early enough (u up to ${number('u')}) for the bend of the curve to fix storativity.`,
  'curve-late-only': ({ number }) =>
    `The readings begin when u is already ${number('u')}; the bend of the curve, at u above ${number('limit')}, is not covered.`,
  'recovery-ratio-near-one': ({ number }) =>
    `The line reaches zero at t/t' = ${number('ratio')} (${number('low')} to ${number('high')}), near the expected 1.`,
  'recovery-ratio-high': ({ number }) =>
    `The line reaches zero at t/t' = ${number('ratio')} instead of 1: the level is back too early. Recharge during the test, or a storativity that is larger in pumping than in recovery, would do that.`,
  'recovery-ratio-low': ({ number }) =>
    `The line reaches zero at t/t' = ${number('ratio')} instead of 1: the level stays down. An aquifer of limited extent, a falling trend or a wrong static level would do that.`,
  'limit-transmissivity': ({ transmissivity }) =>
    `A transmissivity of ${transmissivity('value')} cannot be right (allowed are ${transmissivity('low')} to ${transmissivity('high')}). Check the units of rate and drawdown.`,
  'limit-storage': ({ number }) =>
    `A storativity of ${number('value')} cannot be right (allowed are values above 0 and below ${number('high')}). Check the distance and the units of time.`,
  'unusual-transmissivity': ({ transmissivity }) =>
    `A transmissivity of ${transmissivity('value')} is unusual (common are ${transmissivity('low')} to ${transmissivity('high')}). Check the units of rate and drawdown.`,
  'unusual-elastic-storage': ({ number }) =>
    `A storativity of ${number('value')} is unusual for a confined aquifer (common are ${number('low')} to ${number('high')}). Check the distance and the kind of aquifer.`,
  'unusual-specific-yield': ({ number }) =>
    `A specific yield of ${number('value')} is unusual (common are ${number('low')} to ${number('high')}). Check the distance and whether drainage was over.`,
  'thickness-basis-unknown': ({ length }) =>
    `It is not known what the thickness of ${length('thickness_m')} measures, so hydraulic conductivity is weak evidence.`,
}

/** Every reason for which an analysis refuses its inputs. */
const refusals: Sentences<AnalysisErrorCode> = {
  ...kindRefusals,
  ...penetrationRefusals,
  ...storageRefusals,
  ...correctionRefusals,
  'analysis/unknown-method': ({ text }) => `The method "${text('method')}" is not known. Reload the page.`,
  'analysis/no-wells': () => 'Choose at least one well.',
  'analysis/unknown-well': () => 'A chosen well is not part of this test. Choose the wells again.',
  'analysis/wrong-wells': ({ text }) =>
    `This method takes ${text('most')} well at a time; ${text('found')} are chosen.`,
  'analysis/too-few-wells': ({ text }) =>
    `This method needs ${text('needed')} observation wells with readings; there are ${text('found')}.`,
  'analysis/uneven-series': () => 'The readings of a well are incomplete. Upload them again.',
  'analysis/no-rate': () => 'No pumping rate above zero is given. Enter the rate history.',
  'analysis/bad-rate': () => 'A step of the rate history is not a number. Correct it.',
  'analysis/negative-rate': ({ rate }) =>
    `A rate of ${rate('rate_m3_s')} is negative. Enter pumping as a positive rate.`,
  'analysis/rates-out-of-order': ({ span }) =>
    `The rate step at ${span('start_s')} does not follow the one before it. Put the steps in order of time.`,
  'analysis/bad-option': ({ text }) => optionNames[text('option')] ?? `The setting "${text('option')}" cannot be used.`,
  'analysis/zero-distance': ({ text }) =>
    `The distance of ${text('well')} from the pumped well is zero or missing. Enter it.`,
  'analysis/distances-equal': () => 'All wells chosen are equally far from the pumped well, so no line can be drawn.',
  'analysis/too-few-readings': ({ text }) =>
    `This method needs ${text('needed')} readings; ${text('found')} are in the window. Widen it or include more readings.`,
  'analysis/times-equal': () => 'All readings in the window have the same time. Check the time column of the file.',
  'analysis/slope-not-positive': () =>
    'Drawdown does not change along the window as pumping makes it change. Move the window, or check the sign of the readings.',
  'analysis/no-drawdown': () =>
    'No reading shows drawdown above zero. Check the static level and the sign of the readings.',
  'analysis/no-recovery': () => 'The rate history has no stop. Add a step with rate zero where pumping ended.',
  'analysis/no-common-time': ({ span }) =>
    `The wells have readings in common only from ${span('from_s')} to ${span('to_s')}. Choose a moment in between.`,
  'analysis/no-thickness': () => 'The correction for thinning needs the saturated thickness. Enter it.',
  'analysis/not-unconfined': () => 'The correction for thinning is for unconfined aquifers only.',
  'analysis/thinning-too-large': ({ length }) =>
    `Drawdown reaches ${length('drawdown_m')}, more than half of the saturated thickness of ${length('thickness_m')}. The correction for thinning does not hold there.`,
  'analysis/thinning-early': ({ span }) =>
    `The readings end at ${span('last_s')}, before delayed drainage is over. The correction for thinning is for later readings; say so if they are late enough.`,
  'analysis/boundaries-too-many': ({ text }) =>
    `${text('found')} boundaries were chosen; image wells stand for at most two. Choose the nearest.`,
  'analysis/boundaries-behind': () =>
    'Both boundaries lie on the same side of the pumped well, one behind the other. Choose the nearer.',
  'analysis/boundaries-facing': () =>
    'This method cannot fit the distances of two boundaries that face each other: it would take minutes. Fit them by a confined or leaky curve, and enter what it finds.',
  'analysis/boundaries-angle': () =>
    'Image wells cannot stand for two boundaries that meet at this angle: it must be 180° divided by a whole number, or by an even one where a stream meets a barrier. Choose one of them.',
  'analysis/boundary-place': () => 'A boundary needs a distance above zero and a direction.',
  'analysis/bearing-unknown': () =>
    'The direction of an observation well from the pumped well is not known, so its distance from the boundary is not either. Enter the position of both wells.',
  'analysis/no-fit': () => 'No curve could be fitted. Check rate, distance and units.',
  'analysis/match-incomplete': ({ text }) =>
    `The curve laid by hand has no value of “${parameterName(text('parameter'))}”. Type one, or go back to least squares.`,
  'analysis/match-outside': ({ text }) =>
    `“${parameterName(text('parameter'))}” of the curve laid by hand is outside what this method can find. Move the curve back, or go back to least squares.`,
}

/** A finding as a sentence in the reader's units. @throws RangeError for a code without a sentence */
export function findingText(finding: Pick<Finding, 'code' | 'params'>, units: UnitSystem): string {
  const sentence = findings[finding.code]
  if (!sentence) throw new RangeError(`No sentence for the finding ${finding.code}`)
  return sentence(wordsOf(finding.params, units))
}

/** Why an analysis was refused, as a sentence in the reader's units (the default system where none is known). */
export function analysisErrorText(
  code: AnalysisErrorCode,
  params: Finding['params'],
  units: UnitSystem = unitSystemById(defaultUnitSystemId),
): string {
  return refusals[code](wordsOf(params, units))
}

/** Codes that have a sentence, for tests and menus. */
export const findingCodes = Object.keys(findings)

const numbersOf = (params: Finding['params']) =>
  Object.fromEntries(
    Object.entries(params).flatMap(([name, value]) => (typeof value === 'number' ? [[name, value]] : [])),
  )

function wordsOf(params: Finding['params'], units: UnitSystem): Words {
  const value = (name: string) => Number(params[name])
  return {
    text: (name) => String(params[name] ?? ''),
    number: (name) => formatNumber(value(name), { figures: 2, trim: true }),
    percent: (name) => `${formatNumber(100 * value(name), { figures: 2, trim: true })} %`,
    length: (name) => formatQuantity(value(name), units.length, { trim: true }),
    span: (name) => formatElapsed(value(name)),
    rate: (name) => formatQuantity(value(name), units.discharge, { trim: true }),
    transmissivity: (name) => formatQuantity(value(name), units.transmissivity, { trim: true }),
    pressure: (name) => formatQuantity(value(name), units.pressure, { trim: true }),
    figures: () => correctionFigures({ record: numbersOf(params), given: params.given === 1 }, units),
  }
}
