import type { AnalysisInputs, ChosenBoundary, Series } from '#shared/hydraulics/analysis.ts'
import { directionText } from './directions.ts'

/** A stream or barrier near the test: one that an analysis takes in, or one that the map knows. */
export interface SketchEdge {
  kind: ChosenBoundary['kind']
  name: string
  distance_m: number
  bearing_deg: number
  chosen: boolean
}

type Distance = (metres: number) => string

const wellText = ({ label, distance_m, bearing_deg }: Series, distance: Distance) =>
  `${label} stands ${distance(distance_m)} ${bearing_deg == null ? 'away in a direction that is not known' : `to the ${directionText(bearing_deg)}`}.`

const edgeText = ({ kind, name, distance_m, bearing_deg, chosen }: SketchEdge, distance: Distance) =>
  `${name}, a ${kind === 'recharge' ? 'stream' : 'barrier'}${chosen ? ' of the analysis' : ''}, lies ${distance(distance_m)} to the ${directionText(bearing_deg)}.`

/** What the sketch of a test shows, for those who do not see it. */
export function sketchText(
  { series }: Pick<AnalysisInputs, 'series'>,
  edges: readonly SketchEdge[],
  distance: Distance,
): string {
  const pumped = series.find(({ role }) => role === 'pumped')
  return [
    `Sketch of the test, north up, around the pumped well${pumped ? ` ${pumped.label}` : ''}.`,
    ...series.filter(({ role }) => role === 'observation').map((one) => wellText(one, distance)),
    ...edges.map((edge) => edgeText(edge, distance)),
  ].join(' ')
}
