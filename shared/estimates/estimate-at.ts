import { inverseDistance } from '#shared/geostatistics/inverse-distance.ts'
import { mixtureQuantile, type Component } from '#shared/geostatistics/mixture.ts'
import { bearing, distance } from '#shared/geostatistics/planar.ts'
import { deviationOf } from '#shared/geostatistics/robust.ts'
import { NEW_TEST_ERROR } from './data-rules.ts'
import type { Draft } from './facts.ts'
import { dataRule } from './fit-unit-model.ts'
import { forecast, neighboursOf, spreadBy, withError, type Weighted } from './forecast.ts'
import { notesFor } from './notes.ts'
import { prepareValues, type PreparedValues } from './prepared-values.ts'
import { supportOf } from './support.ts'
import type {
  Contribution,
  EstimateContext,
  EstimateResult,
  Log10Distribution,
  NeighbourScatter,
  Point,
  SecondOpinion,
  SiteValue,
  UnitModel,
  UsedValue,
} from './types.ts'
import { insideRings } from '#shared/geostatistics/planar.ts'

/** Neighbours whose scatter is told. */
const SCATTER_OF = 8
/** Nearest values that are listed when there is no estimate. */
const LISTED = 5

export function distributionOf(components: Component[]): Log10Distribution {
  const at = (p: number): number => mixtureQuantile(components, p)
  return { median: at(0.5), low80: at(0.1), high80: at(0.9), low95: at(0.025), high95: at(0.975), components }
}

/** Quantile `p` of an estimate, log10; with uniform draws for `p` it gives draws of the distribution. */
export const estimateQuantile = (d: Log10Distribution, p: number): number => mixtureQuantile(d.components, p)

function contribution(place: Point, value: UsedValue, weight: number): Contribution {
  const { testId, wellId, label, log10, error, evidence, year } = value
  const distance_m = distance(place, value)
  const bearing_deg = bearing(place, value)
  return { valueId: value.id, testId, wellId, label, distance_m, bearing_deg, weight, log10, error, evidence, year }
}

function carriedBy(values: PreparedValues, place: Point, weighted: readonly Weighted[]): Draft['carried'] {
  return weighted
    .map(({ index, weight }) => {
      const value = values.used[index]!
      return { value, contribution: contribution(place, value, weight) }
    })
    .sort((a, b) => Math.abs(b.contribution.weight) - Math.abs(a.contribution.weight))
}

function secondOpinion(near: readonly UsedValue[], place: Point, median: number): SecondOpinion | null {
  if (near.length === 0) return null
  const distances = near.map((v) => distance(place, v))
  const log10 = inverseDistance(distances, near.map((v) => v.log10)) // prettier-ignore
  return { log10, ratio: 10 ** Math.abs(log10 - median) }
}

function scatterOf(near: readonly UsedValue[]): NeighbourScatter | null {
  const nearest = near.slice(0, SCATTER_OF).map((v) => v.log10)
  return nearest.length < 2 ? null : { n: nearest.length, deviation: deviationOf(nearest) }
}

const ruleOnly = (values: PreparedValues) => {
  const sites = values.sites().length
  const rule = dataRule(sites, 0, false)
  return { rule, nodes: [], sites }
}

function draftOf(place: Point, values: PreparedValues, model: UnitModel | null, context: EstimateContext): Draft {
  const { rule, nodes, sites } = model ?? ruleOnly(values)
  const { outline } = context.unit
  const inside = outline.length === 0 || insideRings(place, outline)
  const made = inside ? forecast(values, { rule, nodes }, place, { barriers: context.barriers }) : null
  const near = made ? neighboursOf(values, place, { barriers: context.barriers }).map((i) => values.used[i]!) : []
  const truth = made ? distributionOf(spreadBy(made.components, model?.spreadFactor ?? 1)) : null
  return {
    place,
    values,
    context,
    model,
    rule: made ? rule : 'none',
    sites,
    truth,
    carried: made ? carriedBy(values, place, made.weighted) : [],
    secondOpinion: truth ? secondOpinion(near, place, truth.median) : null,
    neighbours: scatterOf(near),
  }
}

/** An estimate from values prepared once; see `estimateAt`. */
export function estimateFrom(
  place: Point,
  values: PreparedValues,
  model: UnitModel | null,
  context: EstimateContext,
): EstimateResult {
  const draft = draftOf(place, values, model, context)
  const notes = notesFor(draft)
  const { support, because } = supportOf(notes)
  const { truth, rule, sites } = draft
  const listed = values.neighbourhood.nearest(place, LISTED).map((i) => contribution(place, values.used[i]!, 0))
  return {
    version: 1,
    quantity: context.quantity,
    place,
    rule,
    n: values.used.length,
    sites,
    truth,
    newTest: truth
      ? distributionOf(withError(truth.components, context.newTestError ?? NEW_TEST_ERROR[context.quantity]))
      : null,
    contributions: truth ? draft.carried.map((c) => c.contribution) : listed,
    secondOpinion: draft.secondOpinion,
    neighbours: draft.neighbours,
    excluded: [...values.excluded],
    notes,
    support,
    supportBecause: because,
  }
}

/**
 * What to expect at a place in one aquifer unit: all numbers are log10 of SI values, distances are metres in the
 * region's projected system. Without a fitted model the estimate is the mean of the unit's independent sites, or none.
 * Only the values given are used: the caller decides which the reader may see. Pure and deterministic.
 */
export function estimateAt(
  place: Point,
  values: readonly SiteValue[],
  model: UnitModel | null,
  context: EstimateContext,
): EstimateResult {
  return estimateFrom(place, prepareValues(values, context.quantity), model, context)
}
