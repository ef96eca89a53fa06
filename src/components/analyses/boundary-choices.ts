import type { Surrounding } from '#shared/contracts/surroundings.ts'
import type { SketchEdge } from '#shared/charts/test-sketch.ts'
import type { AnalysisResult, ChosenBoundary } from '#shared/hydraulics/analysis.ts'

export const edgeNames: Record<ChosenBoundary['kind'], string> = { recharge: 'Stream', barrier: 'Barrier' }

/** A boundary whose distance is fitted; a second one lies square to the first, where three images stand for both. */
export function addedBoundary(kind: ChosenBoundary['kind'], chosen: readonly ChosenBoundary[]): ChosenBoundary {
  const [first] = chosen
  return { kind, distance_m: null, bearing_deg: first ? (first.bearing_deg + 90) % 360 : 0 }
}

/** What the map knows, in figures that suit a straight line drawn for a winding one. */
export const boundaryOf = ({ kind, distance_m, bearing_deg }: Surrounding): ChosenBoundary => ({
  kind,
  distance_m: Number(distance_m.toPrecision(3)),
  bearing_deg: Math.round(bearing_deg) % 360,
})

const isSame = (one: ChosenBoundary, other: ChosenBoundary) =>
  one.kind === other.kind && one.bearing_deg === other.bearing_deg

/** What the map knows and the analysis does not take yet. */
export const notTaken = (surroundings: readonly Surrounding[], chosen: readonly ChosenBoundary[]): Surrounding[] =>
  surroundings.filter((one) => !chosen.some((boundary) => isSame(boundary, boundaryOf(one))))

/** The distance that was fitted for a boundary, by its place in the list; null where none was. */
export const fittedDistance = (result: Pick<AnalysisResult, 'others'> | null, index: number): number | null =>
  result?.others?.find(({ id }) => id === `boundary_${index + 1}`)?.value ?? null

const FIRST_DISTANCE_M = 100

/** Goes from a fitted distance to a typed one, which begins where the fit ended, and back. */
export function withFitting(boundary: ChosenBoundary, isFitted: boolean, fitted_m: number | null): ChosenBoundary {
  const typed_m = Number((fitted_m ?? FIRST_DISTANCE_M).toPrecision(3))
  return { ...boundary, distance_m: isFitted ? null : typed_m }
}

/** Everything that a sketch of the test shows beside its wells: edges that are taken in, then those the map knows. */
export function sketchEdges(
  chosen: readonly ChosenBoundary[],
  result: Pick<AnalysisResult, 'others'> | null,
  surroundings: readonly Surrounding[],
): SketchEdge[] {
  const taken = chosen.flatMap((boundary, i): SketchEdge[] => {
    const distance_m = boundary.distance_m ?? fittedDistance(result, i)
    const known = surroundings.find((one) => isSame(boundary, boundaryOf(one)))
    const name = known?.name ?? edgeNames[boundary.kind]
    return distance_m === null ? [] : [{ ...boundary, distance_m, name, chosen: true }]
  })
  return [...taken, ...notTaken(surroundings, chosen).map((one) => ({ ...one, chosen: false }))]
}
