import type { ExclusionReason, Quantity, SiteValue, StorageClass } from './types.ts'

/** Possible values, SI. Outside, a value is a mistake of units or of analysis. T, S: project's limits; K follows T. */
export const QUANTITY_LIMITS: Record<Quantity, { least: number; most: number }> = {
  T: { least: 1e-10, most: 10 },
  S: { least: 0, most: 0.5 },
  Sy: { least: 0, most: 0.5 },
  K: { least: 1e-14, most: 10 },
}

/** The one class that each quantity is made of; classes are never pooled. */
const STORAGE_CLASS: Partial<Record<Quantity, StorageClass>> = { S: 'elastic', Sy: 'specific-yield' }

/** Error of log10 that a test of fair evidence leaves (methods: evidence). */
export const NEW_TEST_ERROR: Record<Quantity, number> = { T: 0.2, S: 0.35, Sy: 0.25, K: 0.2 }

interface Rule {
  reason: ExclusionReason
  broken: (value: SiteValue, quantity: Quantity) => boolean
}

/** Why a value may not enter statistics and estimates; the first that holds is given. */
const RULES: readonly Rule[] = [
  { reason: 'not-finite', broken: (v) => ![v.x, v.y, v.log10, v.error].every(Number.isFinite) || !(v.error > 0) },
  {
    reason: 'beyond-limits',
    broken: (v, q) => v.log10 > Math.log10(QUANTITY_LIMITS[q].most) || v.log10 < Math.log10(QUANTITY_LIMITS[q].least),
  },
  { reason: 'composite', broken: (v) => v.composite && !v.apportioned },
  { reason: 'storage-class', broken: (v, q) => q in STORAGE_CLASS && v.storageClass !== STORAGE_CLASS[q] },
  {
    reason: 'storage-origin',
    broken: (v, q) => q in STORAGE_CLASS && (v.origin === 'pumped-well' || v.origin === 'slug-test'),
  },
]

export const exclusionOf = (value: SiteValue, quantity: Quantity): ExclusionReason | null =>
  RULES.find((rule) => rule.broken(value, quantity))?.reason ?? null
