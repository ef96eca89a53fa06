import type { FieldModel } from './gaussian-field.ts'

export type AquiferCode = 'TG' | 'FL' | 'BS'
export const aquiferCodes: readonly AquiferCode[] = ['TG', 'FL', 'BS']

/** Quantities that are random fields of log10 (m²/s, 1). Storage is specific yield in the gravels, elastic elsewhere. */
export type FieldQuantity = 'T' | 'S'

/** Fixed before any region was drawn; estimates of the demo are judged against these. */
export const fieldModels: Record<AquiferCode, Record<FieldQuantity, FieldModel>> = {
  TG: {
    T: { mean: -2.15, sd: 0.4, range: 5_000 },
    S: { mean: -0.86, sd: 0.1, range: 5_000 },
  },
  FL: {
    T: { mean: -2.7, sd: 0.48, range: 7_500 },
    S: { mean: -3.75, sd: 0.3, range: 6_000 },
  },
  BS: {
    T: { mean: -3.2, sd: 0.42, range: 6_500 },
    S: { mean: -3.95, sd: 0.28, range: 6_500 },
  },
}
