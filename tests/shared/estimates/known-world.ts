import { Matrix, solve } from 'ml-matrix'
import type { Evidence, SiteValue } from '#shared/estimates/types.ts'
import type { Point } from '#shared/geostatistics/planar.ts'
import { structureCovariance, totalSill, type Variogram } from '#shared/geostatistics/variogram.ts'
import { fieldCovariance, randomField, seededDraws, type Draws } from '../../support/random-field.ts'
import { makeSiteValue } from './make.ts'

/** An invented region where the truth is known: 40 km by 30 km, wells scattered and crowded around towns. */
export interface KnownWorld {
  variogram: Variogram
  values: SiteValue[]
  places: Point[]
  truth: number[]
}

const WIDTH = 40_000
const HEIGHT = 30_000
const MEAN = -2.7

const GRADES: readonly { upTo: number; evidence: Evidence; error: number }[] = [
  { upTo: 0.3, evidence: 'firm', error: 0.1 },
  { upTo: 0.7, evidence: 'fair', error: 0.2 },
  { upTo: 1, evidence: 'slight', error: 0.4 },
]

const anywhere = (draws: Draws): Point => ({ x: draws.uniform() * WIDTH, y: draws.uniform() * HEIGHT })

function wellPlaces(count: number, draws: Draws): Point[] {
  const towns = Array.from({ length: 6 }, () => anywhere(draws))
  return Array.from({ length: count }, (_, i) => {
    const town = towns[i % towns.length] as Point
    return i % 2 === 0 ? anywhere(draws) : { x: town.x + 1500 * draws.normal(), y: town.y + 1500 * draws.normal() }
  })
}

function worldVariogram(seed: number, draws: Draws): Variogram {
  return {
    model: seed % 2 === 0 ? 'spherical' : 'exponential',
    nugget: seed % 3 === 0 ? 0.02 : 0,
    sill: 0.15 + 0.2 * draws.uniform(),
    range: 8000 + 10_000 * draws.uniform(),
  }
}

export function makeKnownWorld(seed: number, wells = 150, asked = 200): KnownWorld {
  const draws = seededDraws(seed)
  const variogram = worldVariogram(seed, draws)
  const sites = wellPlaces(wells, draws)
  const places = Array.from({ length: asked }, () => anywhere(draws))
  const field = randomField([...sites, ...places], variogram, MEAN, draws)
  const values = sites.map((site, i) => {
    const draw = draws.uniform()
    const { evidence, error } = GRADES.find((g) => draw <= g.upTo)!
    return makeSiteValue({ id: `v${i}`, ...site, log10: field[i]! + error * draws.normal(), error, evidence })
  })
  return { variogram, values, places, truth: field.slice(wells) }
}

/** Mean width of the 95 % interval by ordinary kriging from all values with the true variogram: the least one can hope for. */
export function idealWidth({ values, variogram, places }: KnownWorld): number {
  const n = values.length
  const system = Matrix.ones(n + 1, n + 1)
  system.setSubMatrix(fieldCovariance(values, variogram), 0, 0)
  values.forEach((value, i) => system.set(i, i, system.get(i, i) + value.error ** 2))
  system.set(n, n, 0)
  const right = Matrix.ones(n + 1, places.length)
  places.forEach((place, k) =>
    values.forEach((v, i) => right.set(i, k, structureCovariance(variogram, Math.hypot(v.x - place.x, v.y - place.y)))),
  )
  const weights = solve(system, right)
  const widths = places.map((_, k) => {
    const variance = totalSill(variogram) - weights.getColumnVector(k).dot(right.getColumnVector(k))
    return 2 * 1.959964 * Math.sqrt(variance)
  })
  return widths.reduce((a, b) => a + b, 0) / places.length
}
