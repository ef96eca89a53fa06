import { exponential } from './models/exponential.ts'
import type { VariogramModel } from './models/model.ts'
import { spherical } from './models/spherical.ts'

/** Every variogram family that can be fitted, kriged with and named on a screen. */
export const VARIOGRAM_MODELS = { spherical, exponential } as const satisfies Record<string, VariogramModel>

export type VariogramModelId = keyof typeof VARIOGRAM_MODELS

export const VARIOGRAM_MODEL_IDS = Object.keys(VARIOGRAM_MODELS) as VariogramModelId[]

export const variogramModel = (id: VariogramModelId): VariogramModel => VARIOGRAM_MODELS[id]
