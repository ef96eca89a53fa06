import type { Note, NoteCode, NoteParams } from '#shared/estimates/note-types.ts'
import type { ExclusionReason, Support } from '#shared/estimates/types.ts'
import { compassPoint } from '#shared/geodesy/compass.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { distanceText } from './distances.ts'

type Length = (metres: number) => string
/** Distances are told to two figures, depths to three. */
type Sentence<C extends NoteCode> = (params: NoteParams[C], distance: Length, depth: Length) => string

const percent = (share: number): string => `${Math.round(share * 100)} %`
const figure = (value: number): string => formatNumber(value, { figures: 2, trim: true })
const count = (n: number, noun: string): string => `${n} ${noun}${n === 1 ? '' : 's'}`
/** "is" or "are", by number. */
const be = (n: number): string => (n === 1 ? 'is' : 'are')

type Nearness = NoteParams['values-near']

const nearest = ({ nearest_m, bearing_deg }: Nearness, distance: Length): string =>
  `nearest ${distance(nearest_m)} ${compassPoint(bearing_deg)}`

const within = (p: Nearness, distance: Length): string =>
  `${count(p.within, 'test')} within the ${distance(p.range_m)} range, ${nearest(p, distance)}; ${p.firm} of them firm.`

/** One sentence per note. Numbers come with the reader's units; nothing here decides anything. */
const SENTENCES: { [C in NoteCode]: Sentence<C> } = {
  'outside-unit': ({ unit, distance_m }, distance) =>
    `The place lies outside ${unit}, ${distance(distance_m)} from its outline: no estimate is given.`,
  'too-few-values': ({ n, sites }) =>
    `No estimate: ${count(n, 'value')} at ${count(sites, 'site')} more than 500 m apart can be used here; four sites are needed.`,
  'values-near': within,
  'values-some': within,
  'nearest-far': (p, distance) =>
    `The nearest test is ${distance(p.nearest_m)} away (${compassPoint(p.bearing_deg)}), close to the ${distance(p.range_m)} range: tests say little about this place.`,
  'beyond-range': (p, distance) =>
    `No test lies within the ${distance(p.range_m)} range; the nearest is ${distance(p.nearest_m)} away (${compassPoint(p.bearing_deg)}). This is little more than the mean of the unit.`,
  'unit-mean-only': ({ n, sites }) =>
    `Only ${count(sites, 'independent site')} (${count(n, 'value')}): the estimate is the geometric mean of the unit, the same everywhere in it. A fit in space needs 30 sites.`,
  'one-cluster': ({ extent_m }, distance) =>
    `All tests stand in one cluster ${distance(extent_m)} across and speak for a small part of the unit.`,
  'evidence-firm': ({ share }) => `Firm tests carry ${percent(share)} of the weight.`,
  'evidence-mixed': ({ firm, fair, slight }) =>
    `Evidence is mixed: ${firm} firm, ${fair} fair and ${slight} slight among the tests used.`,
  'evidence-slight': ({ share }) => `Slight evidence carries ${percent(share)} of the weight.`,
  surrounded: ({ n }) => `Tests lie on all sides of the place; ${n} carry the estimate.`,
  'outside-hull': ({ distance_m }, distance) =>
    `The place lies ${distance(distance_m)} outside the area that tests surround: the estimate reaches beyond the data.`,
  'edge-near': ({ distance_m, unit }, distance) =>
    `The edge of ${unit} is ${distance(distance_m)} away; the unit may be thinner or absent here.`,
  'coast-near': ({ distance_m }, distance) =>
    `The coast is ${distance(distance_m)} away: consider tides in a test and salt water in pumping.`,
  'barrier-between': ({ hidden, nearest_m }, distance) =>
    `${count(hidden, 'test')}, the nearest ${distance(nearest_m)} away, ${hidden === 1 ? 'lies' : 'lie'} beyond a mapped barrier and ${be(hidden)} not used.`,
  'neighbours-agree': ({ n, deviation }) =>
    `The nearest ${n} tests agree, within a factor of ${figure(10 ** deviation)} of each other typically.`,
  'neighbours-disagree': ({ n, deviation }) =>
    `The nearest ${n} tests disagree: they scatter by a factor of ${figure(10 ** deviation)} typically.`,
  'interval-narrow': ({ factor }) => `The 95 % interval spans a factor of only ${figure(factor)}.`,
  'interval-wide': ({ factor }) => `The 95 % interval is wide: it spans a factor of ${figure(factor)}.`,
  'interval-very-wide': ({ factor }) =>
    `The 95 % interval spans a factor of ${figure(factor)}: only the order of magnitude is known, if that.`,
  'coverage-holds': ({ share, n }) =>
    `Intervals hold in this unit: the 95 % interval covered ${percent(share)} of ${n} values in cross-validation.`,
  'coverage-count': ({ inside, n }) =>
    `In cross-validation the 95 % interval covered ${inside} of ${n} values, too few to judge it.`,
  'coverage-fails': ({ share, n }) =>
    `Intervals do not hold in this unit: the 95 % interval covered ${percent(share)} of ${n} values in cross-validation.`,
  'spread-rescaled': ({ factor }) =>
    factor > 1
      ? `The interval was widened by a factor of ${figure(factor)} (in logarithms), as cross-validation asked.`
      : `The interval was narrowed to ${percent(factor)} (in logarithms), as cross-validation allowed.`,
  'variogram-assumed': ({ from }) => `The variogram is assumed, taken from ${from}; tests here are too few to fit one.`,
  'variogram-poor': ({ nuggetShare }) =>
    `Neighbouring tests hardly resemble each other (${percent(nuggetShare)} of the variance at short distance), so near tests help little.`,
  'errors-exceed-scatter': () =>
    'The errors assumed for the tests exceed the scatter seen between neighbours; the nugget is held at zero.',
  'one-test-dominates': ({ label, weight }) => `One test, ${label}, carries ${percent(weight)} of the weight.`,
  'second-opinion-differs': ({ ratio }) => `Inverse distance weighting gives a value ${figure(ratio)} times different.`,
  'old-tests': ({ share, years }) => `${percent(share)} of the weight lies in tests more than ${years} years old.`,
  'position-poor': ({ label, accuracy_m, distance_m }, distance) =>
    `The position of ${label}, ${distance(distance_m)} away, is known to ${distance(accuracy_m)} only.`,
  'depth-outside-screens': ({ depth_m, top_m, bottom_m }, _distance, depth) =>
    `A depth of ${depth(depth_m)} lies outside the tested screens (${depth(top_m)} to ${depth(bottom_m)}).`,
  'composite-values': ({ share }) =>
    `${percent(share)} of the weight lies in tests of several units at once, shared out by judgement or flow log.`,
  'slug-scale': ({ share }) =>
    `Slug tests carry ${percent(share)} of the weight: they feel only metres around the well, and skin can make them read low.`,
  'stream-close': ({ stream, distance_m }, distance) =>
    `The stream is close: ${stream} is ${distance(distance_m)} away, and a long test may feel it.`,
  'unit-by-outline': ({ unit }) =>
    `${unit} is known here by its outline only: no well tells its top and bottom, so check its depth.`,
  'values-left-out': ({ count: left }) =>
    `${count(left, 'value')} of this unit ${be(left)} left out by the data rules (composite, class of storage, or beyond limits).`,
  'model-outdated': () => 'Values have changed since the model was fitted; a new fit is under way.',
}

/** The sentence of a confidence note in the reader's units. */
export function noteText(note: Note, units: UnitSystem): string {
  // A note's code and parameters belong together by its type; the catalogue keeps them so.
  const sentence = SENTENCES[note.code] as Sentence<NoteCode>
  return sentence(
    note.params as never,
    (metres) => distanceText(metres, units),
    (metres) => formatQuantity(metres, units.length, { trim: true }),
  )
}

const SUPPORT_LABELS: Record<Support, string> = {
  well: 'Well supported',
  partly: 'Partly supported',
  weakly: 'Weakly supported',
  none: 'No estimate',
}

export const supportLabel = (support: Support): string => SUPPORT_LABELS[support]

const EXCLUSIONS: Record<ExclusionReason, string> = {
  'not-finite': 'The value, its error or its place is missing.',
  'beyond-limits': 'The value lies beyond what is possible.',
  composite: 'The test spans several units and has not been shared out among them.',
  'storage-class': 'The class of storage is another one, apparent or unclassified.',
  'storage-origin': 'Storage from a pumped well or a slug test is not used.',
}

/** Why a value takes no part in statistics and estimates. */
export const exclusionText = (reason: ExclusionReason): string => EXCLUSIONS[reason]
