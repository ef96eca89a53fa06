import type { Dimension } from '#shared/quantities/units.ts'

/** What a reader asks for by name. S is elastic storage; Sy, the drainable storage of an unconfined aquifer, stands apart. */
export type ParameterId = 'T' | 'S' | 'Sy' | 'K'

export interface Parameter {
  id: ParameterId
  name: string
  symbol: string
  dimension: Dimension
}

export const parameters: Record<ParameterId, Parameter> = {
  T: { id: 'T', name: 'Transmissivity', symbol: 'T', dimension: 'transmissivity' },
  S: { id: 'S', name: 'Storativity', symbol: 'S', dimension: 'storage' },
  Sy: { id: 'Sy', name: 'Specific yield', symbol: 'Sy', dimension: 'storage' },
  K: { id: 'K', name: 'Hydraulic conductivity', symbol: 'K', dimension: 'conductivity' },
}

export const parameterList: readonly Parameter[] = Object.values(parameters)
