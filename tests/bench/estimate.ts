/** Speed of estimates: one with its notes among 10,000 values, a fit, and kriging beside R gstat in the same run. */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { estimateAt, estimateFrom } from '#shared/estimates/estimate-at.ts'
import { fitUnitModel } from '#shared/estimates/fit-unit-model.ts'
import { prepareValues } from '#shared/estimates/prepared-values.ts'
import type { EstimateContext, Evidence, Point, SiteValue } from '#shared/estimates/types.ts'
import { ordinaryKriging } from '#shared/geostatistics/kriging.ts'
import { createNeighbourhood } from '#shared/geostatistics/neighbourhood.ts'
import { quantileOf, rising } from '#shared/geostatistics/robust.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'
import { seededDraws } from '../support/random-field.ts'

const VALUES = 10_000
const FITTED = 1000
const ESTIMATES = 200
const KRIGED = 5000
const NEIGHBOURS = 32
const EVIDENCE: readonly Evidence[] = ['firm', 'fair', 'slight']
const draws = seededDraws(1)

interface Reference {
  name: string
  value: number
}

function report(metric: string, value: number, unit: string, reference: Reference | null = null): void {
  const compared = reference && {
    reference: reference.name,
    referenceValue: reference.value,
    ratio: value / reference.value,
  }
  console.log(
    JSON.stringify({
      bench: 'estimate',
      metric,
      value,
      unit,
      ...(compared ?? { reference: null, referenceValue: null, ratio: null }),
    }),
  )
}

const anywhere = (): Point => ({ x: 200_000 * draws.uniform(), y: 150_000 * draws.uniform() })

/** Waves of three lengths with noise: correlated over some 15 km, and cheap at any number of places. */
function siteValue(_: unknown, i: number): SiteValue {
  const { x, y } = anywhere()
  const waves = Math.sin(x / 5000) + Math.sin(y / 4000 + x / 9000) + 0.5 * Math.sin((x + y) / 2500)
  return {
    id: `v${i}`,
    testId: `t${i}`,
    wellId: `w${i}`,
    label: `V-${i}`,
    x,
    y,
    log10: -2.6 + 0.3 * waves + 0.15 * draws.normal(),
    error: [0.1, 0.2, 0.35][i % 3]!,
    evidence: EVIDENCE[i % 3]!,
    method: 'theis',
    origin: 'observation-well',
    year: 1980 + (i % 45),
    storageClass: null,
    composite: false,
    apportioned: false,
    positionAccuracy_m: 10,
  }
}

const context: EstimateContext = {
  unit: {
    name: 'Bench',
    kind: 'confined',
    outline: [Array.from({ length: 400 }, (_, i) => ring((2 * Math.PI * i) / 400))],
    byOutlineOnly: false,
  },
  quantity: 'T',
  barriers: [Array.from({ length: 60 }, (_, i) => [60_000 + i * 800, 40_000 + 500 * Math.sin(i)] as const)],
  streams: [{ name: 'Tarrow', distance_m: 900 }],
  yearNow: 2026,
}

function ring(angle: number): readonly [number, number] {
  return [100_000 + 150_000 * Math.cos(angle), 75_000 + 120_000 * Math.sin(angle)]
}

function milliseconds(work: () => void): number {
  const start = performance.now()
  work()
  return performance.now() - start
}

function p95(work: (place: Point) => void): number {
  for (let i = 0; i < 20; i++) work(anywhere())
  const times = Array.from({ length: ESTIMATES }, anywhere).map((place) => milliseconds(() => work(place)))
  return quantileOf(rising(times), 0.95)
}

function benchEstimates(values: SiteValue[]): void {
  let model = fitUnitModel([], { quantity: 'T' })
  report(`fit with cross-validation at ${FITTED} values`, milliseconds(() => {
    model = fitUnitModel(values.slice(0, FITTED), { quantity: 'T' })
  }) / 1000, 's') // prettier-ignore
  const prepared = prepareValues(values, 'T')
  report(`estimate with notes at ${VALUES} values, p95`, p95((p) => estimateFrom(p, prepared, model, context)), 'ms') // prettier-ignore
  report(`estimate with notes at ${VALUES} unprepared values, p95`, p95((p) => estimateAt(p, values, model, context)), 'ms') // prettier-ignore
}

const VARIOGRAM: Variogram = { model: 'exponential', nugget: 0.02, sill: 0.2, range: 15_000 }

const R_SCRIPT = `
suppressMessages({library(sp); library(gstat)})
d <- read.csv("values.csv"); coordinates(d) <- ~x+y
p <- read.csv("places.csv"); coordinates(p) <- ~x+y
t <- system.time(k <- krige(z ~ 1, d, p, vgm(0.2, "Exp", 5000, 0.02), nmax = ${NEIGHBOURS}, debug.level = 0))
writeLines(c(sprintf("%.6f", t[["elapsed"]]), sprintf("%.17g", k$var1.pred)), "out.txt")
`

function gstat(values: SiteValue[], places: Point[]): { seconds: number; means: number[] } {
  const folder = mkdtempSync(join(tmpdir(), 'estimate-bench-'))
  const lines = (rows: (string | number)[][]): string => rows.map((row) => row.join(',')).join('\n')
  writeFileSync(join(folder, 'values.csv'), lines([['x', 'y', 'z'], ...values.map((v) => [v.x, v.y, v.log10])]))
  writeFileSync(join(folder, 'places.csv'), lines([['x', 'y'], ...places.map((p) => [p.x, p.y])]))
  writeFileSync(join(folder, 'krige.R'), R_SCRIPT)
  execFileSync('Rscript', ['krige.R'], { cwd: folder })
  const [seconds, ...means] = readFileSync(join(folder, 'out.txt'), 'utf8').trim().split('\n').map(Number)
  rmSync(folder, { recursive: true })
  return { seconds: seconds as number, means }
}

function benchKriging(values: SiteValue[]): void {
  const places = Array.from({ length: KRIGED }, anywhere)
  const theirs = gstat(values, places)
  let means: number[] = []
  const seconds = milliseconds(() => {
    const index = createNeighbourhood(values)
    means = places.map((place) => {
      const near = index.nearest(place, NEIGHBOURS).map((i) => values[i]!)
      const data = { x: near.map((v) => v.x), y: near.map((v) => v.y), z: near.map((v) => v.log10), errorVariance: null } // prettier-ignore
      return ordinaryKriging(place, data, VARIOGRAM).mean
    })
  })
  const apart = Math.max(...means.map((mean, i) => Math.abs(mean - theirs.means[i]!)))
  if (!(apart < 1e-9)) throw new Error(`kriging differs from gstat by ${apart}`)
  report(`kriging of ${KRIGED} places from the nearest ${NEIGHBOURS} of ${VALUES} values`, seconds / 1000, 's', {
    name: 'R gstat krige',
    value: theirs.seconds,
  })
}

const values = Array.from({ length: VALUES }, siteValue)
benchEstimates(values)
benchKriging(values)
