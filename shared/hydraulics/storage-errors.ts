/** Refusals of solutions that look at the well's casing or at the saturated thickness; sentences in shared/words/storage-findings.ts. */
export type StorageErrorCode =
  'analysis/no-well-radius' | 'analysis/no-casing-radius' | 'analysis/water-table-thickness'
