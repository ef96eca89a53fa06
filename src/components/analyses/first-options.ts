import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'

/** Skin shows in the pumped well alone. */
const showsSkin = (method: MethodId) => methods[method].unknowns.some(({ id }) => id === 'skin')

/** Wells that a method begins with: observation wells where there are any, nearest first; as many as it takes. */
export function firstWells(method: MethodId, { series }: AnalysisInputs): string[] {
  const { roles, most } = methods[method].needs.wells
  const fitting = series.filter(({ role }) => (roles as readonly string[]).includes(role))
  const observed = fitting.filter(({ role }) => role === 'observation')
  const chosen = observed.length > 0 && !showsSkin(method) ? observed : fitting
  return [...chosen]
    .sort((a, b) => a.distance_m - b.distance_m)
    .slice(0, most ?? undefined)
    .map(({ wellId }) => wellId)
}

export const firstOptions = (method: MethodId, inputs: AnalysisInputs): AnalysisOptions => ({
  wellIds: firstWells(method, inputs),
  window: null,
})
