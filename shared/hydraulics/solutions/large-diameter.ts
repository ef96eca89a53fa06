import {
  complex,
  minus,
  over,
  plus,
  scaled,
  squared,
  times,
  writeComplex,
  type Complex,
} from '#shared/numerics/complex.ts'
import { laplaceInverter, type LaplaceTransform, type TimeSpan } from '#shared/numerics/laplace-inversion.ts'
import { AnalysisError } from '../analysis-error.ts'
import type { Finding } from '../analysis.ts'
import { CASING_STORAGE } from '../casing-storage.ts'
import { storativity, transmissivity, type Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { beyondFace, wellFace, type WellFace } from '../well-face.ts'
import { largeDiameterStarts } from './large-diameter-starts.ts'

/** A well that takes part of its discharge from the water stored in its casing. */
export interface StoringWell {
  T: number
  S: number
  /** Additional head loss at the face, σ·q/(2πT) for a flow q; below zero the radius r_w·e^−σ takes its place. */
  skin: number
  wellRadius_m: number
  casingRadius_m: number
}

/** Drawdown, and its derivatives by ln T, ln S and skin. */
const VALUES = 4

/**
 * Drawdown per unit rate of a fully penetrating well with storage and skin in an unbounded confined aquifer.
 * @param distance_m null: the level inside the pumped well
 * @returns writes value and derivatives by ln T, ln S and skin; error ≤ 1e-8 of the value, or 1e-11/(4πT) if that is more
 * Source: Papadopulos & Cooper 1967; skin as Agarwal, Al-Hussainy & Ramey 1970.
 */
export function largeDiameterRespond(well: StoringWell, distance_m: number | null, span?: TimeSpan | null): Respond {
  const { T, S } = well
  const radius = effectiveRadius(well)
  // Between the screen and the effective radius of a negative skin the level is that of the well.
  const beyond = distance_m !== null && distance_m > radius ? distance_m : null
  const front = beyond === null ? 0 : ((beyond - radius) ** 2 * S) / (4 * T)
  return laplaceInverter(beyond === null ? inWell(well) : inAquifer(well, beyond), VALUES, { front, span })
}

const effectiveRadius = ({ wellRadius_m, skin }: StoringWell) => wellRadius_m * Math.exp(Math.max(0, -skin))

/** s = G/(1 + cpG)/(2πTp) with c = r_c²/(2T) and G = K0(q)/(q·K1(q)) + σ. */
function inWell(well: StoringWell): LaplaceTransform {
  return (re, im, out) => {
    const p = complex(re, im)
    const { G, perG, share, stored } = flows(well, p)
    const unit = over(complex(1 / (2 * Math.PI * well.T)), p)
    const value = times(unit, times(G, share))
    const byG = times(unit, squared(share))
    const byLogS = times(byG, perG.logS)
    // c falls with T as the whole does: −s − ∂s/∂ln c − ∂s/∂ln S.
    const byLogT = minus(times(value, minus(times(stored, share), complex(1))), byLogS)
    writeComplex([value, byLogT, byLogS, times(byG, perG.skin)], out)
  }
}

/** s = V/(1 + cpG)/(2πTp), V = K0(m)/(q·K1(q)). */
function inAquifer(well: StoringWell, distance_m: number): LaplaceTransform {
  const { T, S, skin } = well
  return (re, im, out) => {
    const p = complex(re, im)
    const { face, perG, share, stored, cp } = flows(well, p)
    const { V, rise, fall } = beyondFace(p, T, S, distance_m, face)
    const value = times(over(complex(1 / (2 * Math.PI * T)), p), times(V, share))
    const less = (derivative: Complex) => times(times(cp, share), derivative)
    const logS = minus(scaled(0.5, minus(rise, fall)), less(perG.logS))
    const logT = minus(minus(times(stored, share), complex(1)), logS)
    const bySkin = minus(skin < 0 ? scaled(-1, rise) : complex(0), less(perG.skin))
    writeComplex([value, times(value, logT), times(value, logS), times(value, bySkin)], out)
  }
}

interface Flows {
  face: WellFace
  G: Complex
  /** Derivatives of G by ln S and by skin. */
  perG: { logS: Complex; skin: Complex }
  cp: Complex
  /** cpG, what the casing gives against what the aquifer gives. */
  stored: Complex
  /** 1/(1 + cpG), the aquifer's share of the discharge. */
  share: Complex
}

function flows(well: StoringWell, p: Complex): Flows {
  const { T, S, skin, casingRadius_m } = well
  const face = wellFace(p, T, S, effectiveRadius(well))
  const G = plus(face.G, complex(Math.max(0, skin)))
  const cp = scaled(casingRadius_m ** 2 / (2 * T), p)
  const stored = times(cp, G)
  return {
    face,
    G,
    perG: { logS: scaled(0.5, face.slope), skin: skin < 0 ? scaled(-1, face.slope) : complex(1) },
    cp,
    stored,
    share: over(complex(1), plus(complex(1), stored)),
  }
}

function respond([T = NaN, S = NaN, skin = 0]: number[], place: ResponsePlace, span?: TimeSpan | null): Respond {
  const { wellRadius_m, casingRadius_m, pumped, distance_m } = place
  if (!wellRadius_m) throw new AnalysisError('analysis/no-well-radius')
  if (!casingRadius_m) throw new AnalysisError('analysis/no-casing-radius')
  return largeDiameterRespond({ T, S, skin, wellRadius_m, casingRadius_m }, pumped ? null : distance_m, span)
}

const skin: Unknown = { id: 'skin', label: 'Skin', dimension: 'dimensionless', low: -6, high: 200, scale: 'linear' }

const validity: Solution['validity'] = [
  {
    code: 'casing-storage-unseen',
    statement: 'Readings begin before 25 r_c²/T, while the casing still gives water',
    source: 'Papadopulos & Cooper 1967',
  },
]

/** Says so when all readings come after the time that the solution is made for. */
function judgeStorage([T = NaN]: number[], { inputs, wells }: SolutionReadings): Finding[] {
  const pumped = inputs.series.find(({ role }) => role === 'pumped') ?? inputs.pumpedWell
  const over_s = (CASING_STORAGE.drawdown * (pumped?.casingRadius_m ?? NaN) ** 2) / T
  const from_s = Math.min(...wells.map(({ time_s }) => time_s[0] ?? Infinity))
  return from_s > over_s ? [{ code: 'casing-storage-unseen', severity: 'note', params: { from_s, over_s } }] : []
}

const hasPumped = ({ wells }: SolutionReadings) => wells.some(({ series }) => series.role === 'pumped')

/** Without skin, for readings of any wells. */
export const largeDiameter: Solution = {
  id: 'large-diameter',
  label: 'Large-diameter well (Papadopulos–Cooper)',
  version: 1,
  source: 'Papadopulos & Cooper 1967',
  aquifers: ['confined'],
  known: ['well-radius', 'casing-radius'],
  unknowns: [transmissivity, storativity],
  respond: (parameters, place, span) => respond([parameters[0] as number, parameters[1] as number], place, span),
  noise: 1e-9,
  guess: (readings) => largeDiameterStarts(readings).map(([T, S]) => [T, S]),
  validity,
  judge: judgeStorage,
}

/** With skin, which only the level inside the pumped well shows. */
export const largeDiameterSkin: Solution = {
  id: 'large-diameter-skin',
  label: 'Large-diameter well with skin',
  version: 1,
  source: 'Papadopulos & Cooper 1967; Agarwal, Al-Hussainy & Ramey 1970',
  aquifers: ['confined'],
  known: ['well-radius', 'casing-radius'],
  unknowns: [transmissivity, storativity, skin],
  respond: (parameters, place, span) => respond(Array.from(parameters), place, span),
  noise: 1e-9,
  guess: largeDiameterStarts,
  validity: [
    ...validity,
    {
      code: 'skin-unseen',
      statement: 'The level inside the pumped well is among the readings',
      source: 'Agarwal, Al-Hussainy & Ramey 1970',
    },
  ],
  judge: (parameters, readings) => [
    ...judgeStorage(parameters, readings),
    ...(hasPumped(readings) ? [] : [{ code: 'skin-unseen', severity: 'caution' as const, params: {} }]),
  ],
}
