import type { KindErrorCode } from '#shared/hydraulics/kind-errors.ts'
import type { Sentences } from './findings.ts'

const dimensionNames: Record<string, string> = {
  casingRadius_m: 'The radius of the casing',
  wellRadius_m: 'The radius of the bore',
  screenRadius_m: 'The radius of the screen',
  screenLength_m: 'The length of the screen',
  screenTop_m: "The depth of the screen's top",
  thickness_m: 'The saturated thickness',
  anisotropy: 'The ratio of vertical to horizontal conductivity',
  filterPack: 'The radius or porosity of the filter pack',
  storage: 'The storativity assumed',
  duration_s: 'The time since pumping began',
}

/** Findings of recovery by equivalent time, steady state, and the kinds of test beside the constant rate. */
export const kindFindings: Sentences<string> = {
  'stop-drawdown-single': ({ span }) =>
    `The drawdown at the stop is a single reading, taken ${span('late_s')} before it. Storativity hangs on it.`,
  'slopes-equal': ({ percent, span }) =>
    `From ${span('from_s')} to ${span('to_s')} the levels of the wells change alike: their difference moved by ${percent('share')}, within ${percent('limit')}.`,
  'slopes-differ': ({ percent, span }) =>
    `From ${span('from_s')} to ${span('to_s')} the levels of the wells do not change alike: their difference moved by ${percent('share')}, more than ${percent('limit')}. Choose a later window.`,
  'steady-leaky': () =>
    'The aquifer is leaky. The formula holds for wells that are close together compared with the reach of leakage; distant wells make transmissivity too high.',

  'negative-formation-loss': () =>
    'The linear loss comes out negative, which cannot be. Drawdown grows faster than the steps explain: check rates and static level.',
  'negative-well-loss': () =>
    'The well loss comes out negative: drawdown per unit of rate falls as the rate rises. Likely causes are a well that developed during the test, steps of unequal length or with too few readings, a rate that was not constant, or a wrong static level. Do not use it to predict.',
  'well-loss-unclear': () =>
    'The well loss is not distinguishable from zero: its interval reaches below it. More steps, further apart in rate, would tell.',
  'well-loss-small': ({ number }) =>
    `A well loss of ${number('C')} s²/m⁵ is that of a well in good condition (up to ${number('good')}).`,
  'well-loss-raised': ({ number }) =>
    `A well loss of ${number('C')} s²/m⁵ is raised (good wells have up to ${number('good')}): the well may be clogging or insufficiently developed.`,
  'well-loss-large': ({ number }) =>
    `A well loss of ${number('C')} s²/m⁵ is large (above ${number('raised')}): a clogged or poorly developed well, or a screen too small for these rates.`,
  'well-loss-none': () => 'No well loss fits these steps better than some: the exponent means nothing.',
  'steps-unequal': ({ span }) =>
    `The steps last from ${span('shortest_s')} to ${span('longest_s')}. Increments are read ${span('increment_s')} after each change, which is the same for all.`,
  'step-trend-level': () => 'Within the steps the level does not fall with time, so no trend was removed.',
  'step-trends-differ': ({ text }) =>
    `Step ${text('step')} falls more steeply in time, for its rate, than step ${text('other')}. Development, a boundary or a changing rate would do that; the trend removed is the common one.`,
  'exponent-at-bound': ({ number }) =>
    `The exponent ran to the edge of the range searched, ${number('P')}. The steps do not tell it; use the linear method.`,
  'exponent-open': ({ number }) =>
    `The exponent ${number('P')} is open: its interval is ${number('low')} to ${number('high')}. More steps, further apart in rate, would tell.`,
  'exponent-exact': ({ text }) =>
    `With ${text('steps')} steps a free exponent fits exactly; the interval rests on the scatter of the readings within the steps alone.`,
  'rate-beyond-steps': ({ rate }) =>
    `The rate of ${rate('rate_m3_s')} lies outside those tested, ${rate('low_m3_s')} to ${rate('high_m3_s')}: the prediction is an extrapolation.`,

  'repeats-few': ({ text }) =>
    `${text('repeats')} of the ${text('expected')} repeats that are expected. Repeats with slugs of different size show whether the well itself plays a part.`,
  'repeats-agree': ({ number }) =>
    `Repeats with slugs of different size agree within a factor of ${number('ratio')}: the result does not depend on the slug.`,
  'repeats-alike': ({ number, length }) =>
    `The repeats agree within a factor of ${number('ratio')}, but their slugs were alike (${length('small_m')} to ${length('large_m')}), so that dependence on the slug cannot be seen.`,
  'repeats-disagree': ({ number }) =>
    `The repeats differ by a factor of ${number('ratio')}, and not by the size of the slug. The screen may clog or clear from one to the next.`,
  'depends-on-head': ({ number, length }) =>
    `Conductivity changes by a factor of ${number('ratio')} with the size of the slug (${length('small_m')} to ${length('large_m')}). Losses in the well or a draining screen would do that; use the smallest slug.`,
  'heads-other': ({ percent }) =>
    `The line is drawn from ${percent('to')} to ${percent('from')} of the first displacement; ${percent('bestTo')} to ${percent('bestFrom')} is recommended for this method.`,
  'heads-curved': ({ text }) =>
    `In ${text('repeat')} the logarithm of the head does not fall in a straight line but ever more slowly, as where water is stored in the aquifer. A curve with storage describes that.`,
  'double-straight-line': ({ text, number, percent, span }) =>
    `${text('repeat')} shows two straight lines: until ${span('time_s')} (${percent('head')} of the displacement) the level moves ${number('ratio')} times as fast. The filter pack drains then; only the second line is the aquifer.`,
  'double-straight-line-unexplained': ({ text, number, percent, span }) =>
    `${text('repeat')} shows two straight lines: until ${span('time_s')} (${percent('head')} of the displacement) the level moves ${number('ratio')} times as fast. The level stands above the screen, so a filter pack does not explain it; check depth and construction.`,
  'screen-short': ({ number }) =>
    `The screen is ${number('ratio')} radii long; below ${number('limit')} the shape factor of a line is rough.`,
  'screen-ratio': ({ number }) =>
    `Length over radius of the screen is ${number('ratio')}, outside ${number('low')} to ${number('high')} for which the curves of the method were drawn.`,
  'slug-confined': () =>
    'The method is for unconfined aquifers. In a confined one it holds roughly, where the screen is well below the confining layer.',
  'slug-unconfined': () =>
    'The method is for confined aquifers and wells open to all of it. Here conductivity may come out too high.',
  'filter-pack-drains': ({ length }) =>
    `The level stands in the screen, so the filter pack drains with it: a casing radius of ${length('radius_m')} is used instead of ${length('casing_m')}.`,
  'slug-short': ({ text, percent }) =>
    `${text('repeat')} was followed to ${percent('head')} of its displacement only; storativity and conductivity are hard to tell apart.`,
  'slug-storage': () => 'The storativity of a slug test is kept and not used.',
  'slug-no-thickness': () => 'No transmissivity is given, because the saturated thickness is not known.',
  'damping-fits': ({ text, number }) =>
    `The damping of ${text('repeat')}, ${number('damping')}, is within the range of the method.`,
  'damping-weak': ({ text, number }) =>
    `The damping of ${text('repeat')}, ${number('damping')}, is below ${number('low')}: the level swings. Use the method for oscillating tests.`,
  'damping-strong': ({ text, number }) =>
    `The damping of ${text('repeat')}, ${number('damping')}, is above ${number('low')}: the level hardly swings. Use the method near critical damping.`,
  'damping-overdamped': ({ text, number }) =>
    `The damping of ${text('repeat')}, ${number('damping')}, is above ${number('high')}: inertia plays no part. Use a method for overdamped tests.`,
  'column-agrees': ({ length, percent }) =>
    `The frequency gives a column of ${length('measured_m')}, within ${percent('limit')} of that in the well (${length('built_m')}).`,
  'column-differs': ({ length, percent }) =>
    `The frequency gives a column of ${length('measured_m')}, but the well holds ${length('built_m')} (${percent('share')} apart). Check depths and radii.`,

  'specific-capacity-no-solution': ({ length, span, number }) =>
    `No transmissivity fits a drawdown of ${length('drawdown_m')} after ${span('duration_s')} with a storativity of ${number('S')}. Check units, the well loss and the time.`,
  'storage-assumed': ({ number }) =>
    `The storativity ${number('S')} is assumed, right within a factor of ${number('factor')} in two cases of three or better; the interval allows for it.`,
  'well-loss-unknown': () =>
    'No well loss is taken off, because none is known: transmissivity is likely to be too low.',
  'penetration-corrected': ({ percent }) =>
    `The well is open to ${percent('share')} of the aquifer; the extra drawdown of that is taken off.`,
  'penetration-unknown': () =>
    'The length of the screen or the thickness of the aquifer is not known, so the well is taken to be open to all of it.',

  'antecedent-short': ({ span }) =>
    `The record before pumping lasts ${span('antecedent_s')}, less than the test with its ${span('test_s')}. The correction is uncertain.`,
  'correction-weak': ({ percent }) =>
    `The correction explains only ${percent('explained')} of the movement before pumping. Consider leaving it out.`,
  'correction-odd': ({ number }) =>
    `An efficiency of ${number('efficiency')} is outside 0 to 1. Check units, sign and clock of the series.`,
  'lag-at-end': ({ span }) => `The best lag is the longest tried, ${span('lag_s')}. Try longer ones.`,
  'tides-inseparable': ({ text, span }) =>
    `The record before pumping is too short to tell ${text('one')} and ${text('other')} apart (it takes ${span('needed_s')}). Only ${text('one')} is fitted.`,
  'outside-gap': ({ span }) =>
    `The series that is followed has no value for ${span('gap_s')}; the correction is interpolated over more than ${span('limit_s')}.`,
}

/** Every reason for which these methods refuse their inputs. */
export const kindRefusals: Sentences<KindErrorCode> = {
  'analysis/no-stop-drawdown': () =>
    'No reading of pumping is used, so the drawdown at the stop is not known. Include readings before the stop.',
  'analysis/dimension': ({ text }) =>
    `${dimensionNames[text('dimension')] ?? text('dimension')} is missing or cannot be right. Enter it.`,
  'analysis/slug-readings': ({ text, percent }) =>
    `The line needs ${text('needed')} readings between ${percent('to')} and ${percent('from')} of the first displacement; there are ${text('found')}. Widen the range of heads.`,
  'analysis/no-repeats': () => 'Choose at least one repeat of the slug test.',
  'analysis/initial-head': ({ text }) => `The first displacement of ${text('repeat')} is missing or zero. Enter it.`,
  'analysis/spring-no-transmissivity': ({ text, number }) =>
    `No transmissivity fits ${text('repeat')}: a damping of ${number('damping')} is too strong for this column and the storativity assumed.`,
  'analysis/well-loss-exceeds': ({ length }) =>
    `The well loss of ${length('loss_m')} is as large as the drawdown of ${length('drawdown_m')}. Check both.`,
  'analysis/step-readings': ({ text }) =>
    `Step ${text('step')} has ${text('found')} usable readings at different times; ${text('needed')} are needed. Include more, or leave less of each step out.`,
  'analysis/too-few-steps': ({ text }) =>
    `A step test needs ${text('needed')} steps of different rates; there are ${text('found')}.`,
  'analysis/step-increment': ({ span }) =>
    `The time after each change must be within the shortest step, ${span('shortest_s')}.`,
  'analysis/correction-readings': ({ text }) =>
    `This correction needs ${text('needed')} readings before pumping; there are ${text('found')}. Enter its figures instead, or upload an earlier log.`,
  'analysis/correction-cover': ({ span }) =>
    `The uploaded series does not cover all readings: it is missing from ${span('from_s')} to ${span('to_s')}, the lag included. Upload a longer one, or leave those readings out.`,
  'analysis/correction-level': () =>
    'The uploaded series does not move before pumping, so that nothing can be learned from it. Enter the efficiency.',
  'analysis/correction-alike': () =>
    'Two corrections move alike before pumping, so that one cannot be told from the other. Enter the figures of one of them, or leave it out.',
}

export const kindOptionNames: Record<string, string> = {
  heads: 'The heads of the line must lie between 0 and 1, the lower first.',
  shape: 'The shape of the intake is not known.',
  trendFrom: 'The share of each step left out must be at least 0 and below 1.',
  predictedRate_m3_s: 'The rate to predict must be above zero.',
  storativity: 'The storativity assumed must be above zero, and its error not below.',
  efficiency: 'The efficiency must be a number.',
  lag: 'The longest lag cannot be below zero, and its step must be above.',
  lagCount: 'More than 400 lags would be tried. Shorten the longest lag, or widen the step.',
  trend: 'The slope of the trend must be a number.',
}
