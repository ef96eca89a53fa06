import type { Analysis } from '#shared/contracts/analyses.ts'

/**
 * What a reviewer's decision wrote into the regional table; null before it. It stays what it was, whatever other analyses
 * of the test say today.
 */
export const whatWasAdopted = (analysis: Analysis | null): Analysis['adoption'] =>
  analysis?.state === 'accepted' || analysis?.state === 'withdrawn' ? analysis.adoption : null
