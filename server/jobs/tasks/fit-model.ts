import { fitUnitModel, type FitOptions } from '#shared/estimates/fit-unit-model.ts'
import type { SiteValue, UnitModel } from '#shared/estimates/types.ts'

export interface FitModelInput {
  values: SiteValue[]
  options: FitOptions
}

/** Fits the model of a unit away from the main thread: a few hundred values take a second or more. */
export const fitModelTask = ({ values, options }: FitModelInput): UnitModel => fitUnitModel(values, options)
