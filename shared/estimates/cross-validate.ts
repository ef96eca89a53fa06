import {
  crossValidationOf,
  rescalingFactor,
  type CrossValidation,
  type Residual,
} from '#shared/geostatistics/coverage.ts'
import { mixtureMean, mixtureProbability, mixtureQuantile, type Component } from '#shared/geostatistics/mixture.ts'
import type { Polyline } from '#shared/geostatistics/planar.ts'
import { forecast, spreadBy, withError } from './forecast.ts'
import type { PreparedValues } from './prepared-values.ts'
import type { UnitModel, UsedValue } from './types.ts'

/** Wells so near would give the answer away. */
const HELD_BACK_M = 250
const MOST_VALUES = 2000

export interface CrossValidated {
  crossValidation: CrossValidation
  spreadFactor: number
}

/** Indices to foretell: all, or every so-manieth of a large set. */
function chosen(n: number): number[] {
  const step = Math.max(1, n / MOST_VALUES)
  return Array.from({ length: Math.min(n, MOST_VALUES) }, (_, i) => Math.floor(i * step))
}

function foretell(
  values: PreparedValues,
  model: Pick<UnitModel, 'rule' | 'nodes'>,
  index: number,
  barriers: readonly Polyline[],
) {
  const value = values.used[index]!
  const near = new Set(values.neighbourhood.within(value, HELD_BACK_M))
  const tests = new Set(value.testIds)
  const keep = (i: number): boolean => !near.has(i) && !values.used[i]!.testIds.some((id) => tests.has(id))
  return forecast(values, model, value, { barriers, keep })?.components ?? null
}

const varianceOf = (components: readonly Component[], mean: number): number =>
  components.reduce((sum, c) => {
    const variance = c.df === null || c.df <= 2 ? c.sd ** 2 : (c.sd ** 2 * c.df) / (c.df - 2)
    return sum + c.weight * (variance + (c.mean - mean) ** 2)
  }, 0)

function residual(value: UsedValue, truth: readonly Component[]): Residual {
  const shown = withError(truth, value.error)
  const predicted = mixtureMean(shown)
  const width = (p: number): number => mixtureQuantile(shown, 1 - p) - mixtureQuantile(shown, p)
  return {
    id: value.id,
    x: value.x,
    y: value.y,
    observed: value.log10,
    predicted,
    deviation: Math.sqrt(varianceOf(truth, predicted)),
    error: value.error,
    standardised: (value.log10 - predicted) / Math.sqrt(varianceOf(shown, predicted)),
    probability: mixtureProbability(shown, value.log10),
    width80: width(0.1),
    width95: width(0.025),
  }
}

/**
 * Foretells every value without its whole test and without the wells within 250 m, and judges the intervals; null when
 * fewer than two can be foretold. The result describes the intervals as displayed, after rescaling.
 */
export function crossValidate(
  values: PreparedValues,
  model: Pick<UnitModel, 'rule' | 'nodes'>,
  barriers: readonly Polyline[] = [],
): CrossValidated | null {
  const foretold = chosen(values.used.length).flatMap((index) => {
    const truth = foretell(values, model, index, barriers)
    return truth ? [{ value: values.used[index]!, truth }] : []
  })
  if (foretold.length < 2) return null
  const residuals = foretold.map(({ value, truth }) => residual(value, truth))
  const spreadFactor = rescalingFactor(residuals)
  const shown =
    spreadFactor === 1 ? residuals : foretold.map(({ value, truth }) => residual(value, spreadBy(truth, spreadFactor)))
  return { crossValidation: crossValidationOf(shown), spreadFactor }
}
