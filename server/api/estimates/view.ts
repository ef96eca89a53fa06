import type { Estimate, EstimateQuantity } from '#shared/contracts/estimates.ts'
import type { Contribution, EstimateResult, Log10Distribution, UnitModel } from '#shared/estimates/types.ts'
import type { Position } from '../../db/spatial.ts'
import type { NearStream } from '../streams/streams.service.ts'
import type { unitsAt } from './estimates.repository.ts'
import type { UnitData } from './unit-data.ts'

type UnitRow = Awaited<ReturnType<typeof unitsAt>>[number]

interface Asked {
  place: Position
  point: { x: number; y: number }
  epsg: number
  units: UnitRow[]
  unit: UnitRow | null
  quantity: EstimateQuantity
}

interface Answered {
  result: EstimateResult
  model: UnitModel
  data: UnitData
  dataVersion: number
  outdated: boolean
  stream: NearStream | null
}

const unitView = ({ id, code, name, kind }: UnitRow) => ({ id, code, name, kind })

const distributionView = (d: Log10Distribution | null) =>
  d && { median: d.median, low80: d.low80, high80: d.high80, low95: d.low95, high95: d.high95 }

function contributionView(positions: UnitData['positions'], c: Contribution) {
  const [lon, lat] = positions.get(c.valueId)!
  return {
    valueId: Number(c.valueId),
    pumpingTestId: Number(c.testId),
    wellId: Number(c.wellId),
    wellCode: c.label,
    lon,
    lat,
    distanceM: c.distance_m,
    bearingDeg: c.bearing_deg,
    weight: c.weight,
    value: 10 ** c.log10,
    evidence: c.evidence,
    year: c.year,
  }
}

function crossValidationView({ crossValidation }: UnitModel): Estimate['crossValidation'] {
  if (!crossValidation) return null
  const { n, meanError, rmse, coverage80, coverage95 } = crossValidation
  return { n, meanError, rmse, coverage80, coverage95 }
}

const variogramView = ({ variogram: v }: UnitModel): Estimate['variogram'] =>
  v && { model: v.model, nugget: v.nugget, partialSill: v.sill, rangeM: v.range }

/** Where no unit is mapped, or no value may be seen, the answer says so instead of being an error. */
export function estimateView(
  { place: [lon, lat], point, epsg, units, unit, quantity }: Asked,
  answered: Answered | null,
): Estimate {
  const place = { lon, lat, ...point, epsg, quantity, units: units.map(unitView), unit: unit && unitView(unit) }
  if (!answered) return { ...place, ...noUnit }
  const { result, model, data, dataVersion, outdated, stream } = answered
  return {
    ...place,
    rule: result.rule,
    valueCount: result.n,
    siteCount: result.sites,
    truth: distributionView(result.truth),
    newTest: distributionView(result.newTest),
    contributions: result.contributions.map((c) => contributionView(data.positions, c)),
    secondOpinion: result.secondOpinion && {
      value: 10 ** result.secondOpinion.log10,
      ratio: result.secondOpinion.ratio,
    },
    excludedCount: result.excluded.length,
    notes: result.notes.map(({ code, severity, params }) => ({ code, severity, params: { ...params } })),
    support: result.support,
    supportBecause: result.supportBecause,
    crossValidation: crossValidationView(model),
    variogram: variogramView(model),
    stream: stream && { name: stream.name, distanceM: stream.distanceM },
    dataVersion,
    modelOutdated: outdated,
  }
}

const noUnit = {
  rule: 'none' as const,
  valueCount: 0,
  siteCount: 0,
  truth: null,
  newTest: null,
  contributions: [],
  secondOpinion: null,
  excludedCount: 0,
  notes: [],
  support: 'none' as const,
  supportBecause: [],
  crossValidation: null,
  variogram: null,
  stream: null,
  dataVersion: 0,
  modelOutdated: false,
}
