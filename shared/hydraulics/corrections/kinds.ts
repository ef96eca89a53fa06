/** What an outside series measures. */
export type OutsideQuantity = 'air-pressure' | 'river-stage' | 'tide-gauge'

interface KindFacts {
  label: string
  /** What it needs beside the readings. */
  outside: OutsideQuantity | null
  source: string
}

/** What may be corrected for. Each has its term of the regression in terms.ts. */
export const correctionKinds = {
  trend: {
    label: 'Trend before pumping',
    outside: null,
    source: 'Common practice; Kruseman & de Ridder, ILRI 47, from memory',
  },
  barometric: {
    label: 'Air pressure',
    outside: 'air-pressure',
    source: 'Jacob 1940; Kruseman & de Ridder, ILRI 47, from memory',
  },
  tides: { label: 'Tides by their periods', outside: null, source: 'Schureman 1958, from memory' },
  gauge: { label: 'Tides by a gauge', outside: 'tide-gauge', source: 'Ferris 1951 (ratio and lag), from memory' },
  river: { label: 'River stage', outside: 'river-stage', source: 'Ferris 1951 (ratio and lag), from memory' },
} as const satisfies Record<string, KindFacts>

export type CorrectionKind = keyof typeof correctionKinds
export const correctionKindIds = Object.keys(correctionKinds) as CorrectionKind[]

/** Metres of water per pascal: 1/(ρg) at 1000 kg/m³ and standard gravity. */
export const WATER_PER_PASCAL = 1 / (1000 * 9.80665)

interface OutsideFacts {
  label: string
  dimension: 'pressure' | 'length'
  /** Turns the stored SI value into metres of water. */
  toMetres: number
}

/** What is known of each kind of outside series. */
export const outsideQuantities = {
  'air-pressure': { label: 'Air pressure', dimension: 'pressure', toMetres: WATER_PER_PASCAL },
  'river-stage': { label: 'River stage', dimension: 'length', toMetres: 1 },
  'tide-gauge': { label: 'Tide gauge', dimension: 'length', toMetres: 1 },
} as const satisfies Record<OutsideQuantity, OutsideFacts>
export const outsideQuantityIds = Object.keys(outsideQuantities) as OutsideQuantity[]
