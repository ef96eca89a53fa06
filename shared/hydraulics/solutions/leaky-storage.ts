import { aquitardH, aquitardWellFunction } from '#shared/numerics/aquitard-well-function.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import type { Finding } from '../analysis.ts'
import { storativity, transmissivity, type Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import { theisU } from '../small-u.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { theis } from '../theis.ts'
import { radiusOf } from '../wells.ts'
import { shapeStarts } from './shape-starts.ts'

/** Water from the aquitard that changes the last drawdown by less than this share looks like a drift of the rate. */
const LEAST_SHARE = 0.05
/** β of the starts. */
const BETAS = [0.01, 0.05, 0.2, 0.5, 1, 3]

/**
 * r/β, a length that is the same for all wells: 4·√(T·S·b'/(K'·S')), with b', K' and S' of the aquitard (1/(r/β) is the
 * sum of such terms where aquitards lie above and below).
 */
export const aquitardStorageLength: Unknown = {
  id: 'r_beta',
  label: 'Aquitard storage length r/β',
  dimension: 'length',
  low: 1e-2,
  high: 1e7,
  scale: 'log',
}

/**
 * Drawdown s = Q·H(u, β)/(4πT) at early time in an aquifer fed from the storage of an aquitard, β = r/`storageLength_m`.
 * It holds for t < S'b'/(10K'). Source: Hantush 1960, J. Geophys. Res. 65, 3713–3725; ASTM D6028.
 */
export function leakyStorageDrawdown(
  rate_m3_s: number,
  [T, S, storageLength_m]: readonly [T: number, S: number, storageLength_m: number],
  distance_m: number,
  time_s: number,
): number {
  return (rate_m3_s / (4 * Math.PI * T)) * aquitardH(theisU(T, S, distance_m, time_s), distance_m / storageLength_m)
}

/** K'S'/b' of the aquitard in 1/s, all that early readings tell of it. */
export const aquitardStorageProduct = (T: number, S: number, storageLength_m: number) =>
  (16 * T * S) / (storageLength_m * storageLength_m)

/** Unit-rate response with derivatives by ln T, ln S and ln r/β. */
export function leakyStorageRespond(
  parameters: ArrayLike<number>,
  { distance_m }: Pick<ResponsePlace, 'distance_m'>,
): Respond {
  const [T, S, length] = [parameters[0] as number, parameters[1] as number, parameters[2] as number]
  const factor = 1 / (4 * Math.PI * T)
  const beta = distance_m / length
  const values = new Float64Array(3)
  return (time_s, out) => {
    aquitardWellFunction(theisU(T, S, distance_m, time_s), beta, values)
    const [H, byU] = [values[0] as number, values[1] as number]
    out[0] = factor * H
    out[1] = factor * (-H - byU)
    out[2] = factor * byU
    out[3] = -factor * (values[2] as number)
  }
}

const guess = (readings: SolutionReadings) =>
  shapeStarts(leakyStorageRespond, readings, (distance) => BETAS.map((beta) => [distance / beta]))

const judge = (parameters: number[], readings: SolutionReadings): Finding[] => [
  ...theis.judge(parameters, readings),
  ...judgeAquitard(parameters, readings),
]

function judgeAquitard([T = NaN, S = NaN, length = NaN]: number[], { wells }: SolutionReadings): Finding[] {
  const used = wells.filter(({ time_s }) => time_s.length > 0)
  const shares = used.map(({ series, time_s }) => {
    const u = theisU(T, S, radiusOf(series), time_s.at(-1) as number)
    return 1 - aquitardH(u, radiusOf(series) / length) / exponentialIntegral(u)
  })
  const beta = Math.max(...used.map(({ series }) => radiusOf(series) / length))
  const share = Math.max(...shares)
  if (!(share >= LEAST_SHARE)) {
    return [{ code: 'aquitard-storage-not-shown', severity: 'caution', params: { beta, share, limit: LEAST_SHARE } }]
  }
  const last_s = Math.max(...used.map(({ time_s }) => time_s.at(-1) as number))
  const params = { beta, share, last_s, product_per_s: aquitardStorageProduct(T, S, length) }
  return [{ code: 'aquitard-early-time', severity: 'note', params }]
}

export const leakyStorage: Solution = {
  id: 'leaky-storage',
  label: 'Leaky aquifer curve with aquitard storage, early time (Hantush)',
  version: 1,
  source: 'Hantush 1960; ASTM D6028',
  aquifers: ['leaky'],
  shift: { storages: ['S'] },
  unknowns: [transmissivity, storativity, aquitardStorageLength],
  respond: leakyStorageRespond,
  guess,
  validity: [
    ...theis.validity,
    {
      code: 'aquitard-early-time',
      statement: "Readings end before S'b'/(10K') of the aquitard, which pumping alone does not tell",
      source: 'Hantush 1960; ASTM D6028',
    },
    {
      code: 'aquitard-storage-not-shown',
      statement:
        'Water from the aquitard changes the last drawdown by 5 % or more, which no drift of rate or level would',
      source: 'common practice',
    },
  ],
  judge,
}
