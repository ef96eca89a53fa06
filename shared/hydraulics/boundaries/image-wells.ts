import { AnalysisError } from '../analysis-error.ts'
import { parallelRows } from './parallel-images.ts'

/** A straight, fully penetrating edge of the aquifer, as seen from the pumped well. */
export interface Boundary {
  /** `recharge`: a stream or lake that keeps its level; `barrier`: no water passes. */
  kind: 'recharge' | 'barrier'
  /** Shortest distance from the pumped well. */
  distance_m: number
  /** Direction of that shortest way, degrees clockwise from north. */
  bearing_deg: number
}

/** A well that stands in for a boundary: +1 pumps like the real one, −1 injects as much. */
export interface ImageWell {
  east_m: number
  north_m: number
  sign: number
}

/** Image wells at equal steps, endlessly many; a single one where there is no step. */
export interface ImageRow extends ImageWell {
  step: { east_m: number; north_m: number } | null
}

interface Edge {
  east: number
  north: number
  distance_m: number
  sign: 1 | -1
}

/** Mirrors of two edges that meet close after at most so many images, or never. */
const MOST_IN_A_WEDGE = 200
/** Positions closer than this share of the nearer edge's distance are one place. */
const SAME_PLACE = 1e-6

/**
 * Image wells of one or two straight boundaries. The edges mirror every well, images among them, until nothing new
 * appears; between two parallel edges they never end.
 * @throws AnalysisError for an edge without distance, more than two edges, one edge behind another, or an angle whose
 * mirrors contradict each other
 * Sources: Ferris et al. 1962; Stallman 1963; ASTM D5270.
 */
export function imageRows(boundaries: readonly Boundary[]): ImageRow[] {
  if (boundaries.length > 2) throw new AnalysisError('analysis/boundaries-too-many', { found: boundaries.length })
  const edges = boundaries.map(edgeOf)
  if (isPair(edges) && cosine(...edges) > 1 - 1e-9) throw new AnalysisError('analysis/boundaries-behind')
  if (isPair(edges) && isOpposite(...edges)) return betweenParallels(edges)
  return inWedge(edges).map((image) => ({ ...image, step: null }))
}

/** Whether two boundaries run parallel, with the pumped well between them. */
export function faceEachOther(boundaries: readonly Pick<Boundary, 'bearing_deg'>[]): boolean {
  const edges = boundaries.map(({ bearing_deg }) => edgeOf({ kind: 'barrier', distance_m: 1, bearing_deg }))
  return isPair(edges) && isOpposite(...edges)
}

function edgeOf({ kind, distance_m, bearing_deg }: Boundary): Edge {
  if (!(distance_m > 0) || !Number.isFinite(bearing_deg)) throw new AnalysisError('analysis/boundary-place')
  const angle = (bearing_deg * Math.PI) / 180
  return { east: Math.sin(angle), north: Math.cos(angle), distance_m, sign: kind === 'barrier' ? 1 : -1 }
}

const isPair = (edges: Edge[]): edges is [Edge, Edge] => edges.length === 2
const cosine = (one: Edge, other: Edge) => one.east * other.east + one.north * other.north
const isOpposite = (one: Edge, other: Edge) => cosine(one, other) < -1 + 1e-9
const realWell: ImageWell = { east_m: 0, north_m: 0, sign: 1 }

function betweenParallels(edges: [Edge, Edge]): ImageRow[] {
  const [{ east, north }] = edges
  return parallelRows(edges).map(({ first_m, step_m, sign }) => ({
    east_m: first_m * east,
    north_m: first_m * north,
    sign,
    step: { east_m: step_m * east, north_m: step_m * north },
  }))
}

/** Mirrors of mirrors until all of them are known. */
function inWedge(edges: Edge[]): ImageWell[] {
  const tolerance = SAME_PLACE * Math.min(...edges.map(({ distance_m }) => distance_m))
  const found = [realWell]
  for (let i = 0; i < found.length; i++) {
    for (const edge of edges) {
      const image = mirror(found[i] as ImageWell, edge)
      const same = found.find((known) => isNear(known, image, tolerance))
      if (same && same.sign === image.sign) continue
      if (same || isInside(image, edges, tolerance) || found.length > MOST_IN_A_WEDGE)
        throw new AnalysisError('analysis/boundaries-angle')
      found.push(image)
    }
  }
  return found.slice(1)
}

function mirror({ east_m, north_m, sign }: ImageWell, edge: Edge): ImageWell {
  const beyond = 2 * (edge.distance_m - edge.east * east_m - edge.north * north_m)
  return {
    east_m: east_m + beyond * edge.east,
    north_m: north_m + beyond * edge.north,
    sign: sign * edge.sign,
  }
}

const isNear = (one: ImageWell, other: ImageWell, tolerance: number) =>
  Math.hypot(one.east_m - other.east_m, one.north_m - other.north_m) < tolerance

const isInside = ({ east_m, north_m }: ImageWell, edges: Edge[], tolerance: number) =>
  edges.every(({ east, north, distance_m }) => east * east_m + north * north_m < distance_m - tolerance)
