import { factsOf, OLD_AFTER_YEARS, type Draft, type Facts, type Nearness } from './facts.ts'
import { LIMITS } from './note-limits.ts'
import type { Note, NoteCode, NoteParams, Severity } from './note-types.ts'
import type { CrossValidation } from '#shared/geostatistics/coverage.ts'
import { RESCALE_FROM } from '#shared/geostatistics/coverage.ts'

interface Rule<C extends NoteCode> {
  code: C
  severity: Severity
  when: (f: Facts) => boolean
  params: (f: Facts) => NoteParams[C]
}

type AnyRule = { [C in NoteCode]: Rule<C> }[NoteCode]

const near = (f: Facts): Nearness => f.nearness as Nearness
const nearestShare = (f: Facts): number => (f.nearness ? f.nearness.nearest_m / f.nearness.range_m : NaN)
const counts = (f: Facts) => ({ n: f.draft.values.used.length, sites: f.draft.sites })
const covered = (f: Facts) => {
  const { inside, n, share } = (f.crossValidation as CrossValidation).coverage95
  return { inside, n, share }
}
const coverageN = (f: Facts): number => (f.hasEstimate ? (f.crossValidation?.n ?? 0) : 0)
const coverageP = (f: Facts): number => f.crossValidation?.coverage95.p ?? 1
const isNear = (f: Facts): boolean => nearestShare(f) <= LIMITS.nearShare && near(f).within >= LIMITS.nearCount
const spreadFactor = (f: Facts): number => f.draft.model?.spreadFactor ?? 1
const depthOutside = (f: Facts): boolean => {
  const depth = f.context.depth_m
  if (depth == null || !f.screens) return false
  return depth < f.screens.top_m - LIMITS.depthSlack_m || depth > f.screens.bottom_m + LIMITS.depthSlack_m
}

/** The one table of confidence notes, in the order in which they are told. */
export const NOTE_RULES: readonly AnyRule[] = [
  {
    code: 'outside-unit',
    severity: 'bad',
    when: (f) => !f.insideUnit,
    params: (f) => ({ unit: f.context.unit.name, distance_m: f.edge_m }),
  },
  { code: 'too-few-values', severity: 'bad', when: (f) => f.insideUnit && !f.hasEstimate, params: counts },
  { code: 'values-near', severity: 'good', when: isNear, params: near },
  {
    code: 'values-some',
    severity: 'note',
    when: (f) => nearestShare(f) <= LIMITS.farShare && !isNear(f),
    params: near,
  },
  {
    code: 'nearest-far',
    severity: 'caution',
    when: (f) => nearestShare(f) > LIMITS.farShare && nearestShare(f) <= 1,
    params: near,
  },
  { code: 'beyond-range', severity: 'bad', when: (f) => nearestShare(f) > 1, params: near },
  {
    code: 'unit-mean-only',
    severity: 'caution',
    when: (f) => f.hasEstimate && f.draft.rule === 'mean',
    params: counts,
  },
  {
    code: 'one-cluster',
    severity: 'bad',
    when: (f) => f.hasEstimate && f.clusterShare < LIMITS.clusterShare,
    params: (f) => ({ extent_m: f.clusterExtent_m }),
  },
  {
    code: 'evidence-firm',
    severity: 'good',
    when: (f) => f.hasEstimate && f.evidence.firm >= LIMITS.mostOfWeight,
    params: (f) => ({ share: f.evidence.firm }),
  },
  {
    code: 'evidence-mixed',
    severity: 'note',
    when: (f) => f.hasEstimate && f.evidence.firm < LIMITS.mostOfWeight && f.evidence.slight <= LIMITS.mostOfWeight,
    params: (f) => ({ ...f.counts }),
  },
  {
    code: 'evidence-slight',
    severity: 'caution',
    when: (f) => f.hasEstimate && f.evidence.slight > LIMITS.mostOfWeight,
    params: (f) => ({ share: f.evidence.slight }),
  },
  {
    code: 'surrounded',
    severity: 'good',
    when: (f) => f.hasEstimate && f.outsideHull_m === 0,
    params: (f) => ({ n: f.draft.carried.length }),
  },
  {
    code: 'outside-hull',
    severity: 'caution',
    when: (f) => f.hasEstimate && f.outsideHull_m > 0,
    params: (f) => ({ distance_m: f.outsideHull_m }),
  },
  {
    code: 'edge-near',
    severity: 'note',
    when: (f) => f.hasEstimate && f.insideUnit && f.edge_m < LIMITS.edge_m,
    params: (f) => ({ distance_m: f.edge_m, unit: f.context.unit.name }),
  },
  {
    code: 'coast-near',
    severity: 'note',
    when: (f) => f.hasEstimate && (f.context.coastDistance_m ?? Infinity) < LIMITS.coast_m,
    params: (f) => ({ distance_m: f.context.coastDistance_m as number }),
  },
  {
    code: 'barrier-between',
    severity: 'caution',
    when: (f) => f.hidden.count > 0,
    params: (f) => ({ hidden: f.hidden.count, nearest_m: f.hidden.nearest_m }),
  },
  {
    code: 'neighbours-agree',
    severity: 'good',
    when: (f) => (f.draft.neighbours?.n ?? 0) >= 4 && f.draft.neighbours!.deviation <= LIMITS.agree,
    params: (f) => ({ ...f.draft.neighbours! }),
  },
  {
    code: 'neighbours-disagree',
    severity: 'caution',
    when: (f) => (f.draft.neighbours?.deviation ?? 0) > LIMITS.disagree,
    params: (f) => ({ ...f.draft.neighbours! }),
  },
  {
    code: 'interval-narrow',
    severity: 'good',
    when: (f) => f.hasEstimate && f.factor95 <= LIMITS.narrow,
    params: (f) => ({ factor: f.factor95 }),
  },
  {
    code: 'interval-wide',
    severity: 'caution',
    when: (f) => f.factor95 > LIMITS.wide && f.factor95 <= LIMITS.veryWide,
    params: (f) => ({ factor: f.factor95 }),
  },
  {
    code: 'interval-very-wide',
    severity: 'bad',
    when: (f) => f.factor95 > LIMITS.veryWide,
    params: (f) => ({ factor: f.factor95 }),
  },
  {
    code: 'coverage-holds',
    severity: 'good',
    when: (f) => coverageN(f) >= RESCALE_FROM && coverageP(f) >= 0.05,
    params: covered,
  },
  {
    code: 'coverage-count',
    severity: 'note',
    when: (f) => coverageN(f) > 0 && coverageN(f) < RESCALE_FROM,
    params: covered,
  },
  {
    code: 'coverage-fails',
    severity: 'caution',
    when: (f) => coverageN(f) >= RESCALE_FROM && coverageP(f) < 0.05,
    params: covered,
  },
  {
    code: 'spread-rescaled',
    severity: 'note',
    when: (f) => f.hasEstimate && spreadFactor(f) !== 1,
    params: (f) => ({ factor: spreadFactor(f) }),
  },
  {
    code: 'variogram-assumed',
    severity: 'caution',
    when: (f) => f.hasEstimate && f.draft.rule === 'assumed',
    params: (f) => ({ from: f.draft.model?.assumedFrom ?? '' }),
  },
  {
    code: 'variogram-poor',
    severity: 'caution',
    when: (f) => f.hasEstimate && f.draft.rule === 'isotropic' && f.nuggetShare > LIMITS.nuggetShare,
    params: (f) => ({ nuggetShare: f.nuggetShare }),
  },
  {
    code: 'errors-exceed-scatter',
    severity: 'note',
    when: (f) => f.hasEstimate && f.draft.rule === 'isotropic' && f.draft.model?.errorsExceedScatter === true,
    params: () => ({}),
  },
  {
    code: 'one-test-dominates',
    severity: 'caution',
    when: (f) => (f.heaviest?.weight ?? 0) > LIMITS.mostOfWeight,
    params: (f) => ({ label: f.heaviest!.label, weight: f.heaviest!.weight }),
  },
  {
    code: 'second-opinion-differs',
    severity: 'caution',
    when: (f) => (f.draft.secondOpinion?.ratio ?? 1) > LIMITS.secondOpinion,
    params: (f) => ({ ratio: f.draft.secondOpinion!.ratio }),
  },
  {
    code: 'old-tests',
    severity: 'note',
    when: (f) => f.oldShare > LIMITS.mostOfWeight,
    params: (f) => ({ share: f.oldShare, years: OLD_AFTER_YEARS }),
  },
  {
    code: 'position-poor',
    severity: 'note',
    when: (f) => f.poorest !== null && f.poorest.accuracy_m > LIMITS.position * Math.max(100, f.poorest.distance_m),
    params: (f) => ({ ...f.poorest! }),
  },
  {
    code: 'depth-outside-screens',
    severity: 'caution',
    when: depthOutside,
    params: (f) => ({ depth_m: f.context.depth_m as number, ...f.screens! }),
  },
  {
    code: 'composite-values',
    severity: 'note',
    when: (f) => f.compositeShare > LIMITS.compositeShare,
    params: (f) => ({ share: f.compositeShare }),
  },
  {
    code: 'slug-scale',
    severity: 'note',
    when: (f) => f.slugShare > LIMITS.slugShare,
    params: (f) => ({ share: f.slugShare }),
  },
  {
    code: 'stream-close',
    severity: 'caution',
    when: (f) => (f.stream?.distance_m ?? Infinity) < LIMITS.stream_m,
    params: (f) => ({ stream: f.stream!.name, distance_m: f.stream!.distance_m }),
  },
  {
    code: 'unit-by-outline',
    severity: 'note',
    when: (f) => f.context.unit.byOutlineOnly,
    params: (f) => ({ unit: f.context.unit.name }),
  },
  {
    code: 'values-left-out',
    severity: 'note',
    when: (f) => f.draft.values.excluded.length > 0,
    params: (f) => ({ count: f.draft.values.excluded.length }),
  },
  { code: 'model-outdated', severity: 'note', when: (f) => f.context.modelOutdated === true, params: () => ({}) },
]

/** The notes that hold for an estimate, in the table's order. */
export function notesFor(draft: Draft): Note[] {
  const facts = factsOf(draft)
  return NOTE_RULES.filter((rule) => rule.when(facts)).map(
    ({ code, severity, params }) => ({ code, severity, params: params(facts) }) as Note,
  )
}
