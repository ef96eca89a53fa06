import type { AnalysisInputs, OtherWell, Series } from '#shared/hydraulics/analysis.ts'
import { toDrawdown, type StaticLevel } from '#shared/readings/drawdown.ts'
import type { Quantity } from '#shared/readings/model.ts'
import type { CorrectionParts } from '../corrections/corrections.service.ts'
import type { PumpingTestRow, TestParts, TestWellRow } from '../pumping-tests/view.ts'
import { correctedLog } from './corrected.ts'
import type { listEdits, ReadingRow } from './inputs.repository.ts'
import { placement, type Construction } from './placement.ts'

export interface InputParts extends TestParts {
  test: PumpingTestRow
  readings: ReadingRow[]
  edits: Awaited<ReturnType<typeof listEdits>>
  streamDistanceM: number | null
  /** By id of the well. */
  constructions: Map<number, Construction>
  corrections: CorrectionParts
  otherWells: OtherWell[]
}

/** Which stored reading stands behind each point of an inputs series, so that the workbench can leave it out. */
export interface SeriesReadings {
  wellId: string
  seriesId: number
  seq: number[]
  flags: string[]
  /** Drawdown before corrections; left out where there are none. */
  uncorrected_m?: number[]
}

interface Problem {
  code: string
  params: Record<string, string | number>
}

/** A log that gives no drawdown yet, and what is missing. */
export type SeriesProblem = Problem & { wellId: string }

export interface BuiltInputs {
  inputs: AnalysisInputs
  readings: SeriesReadings[]
  problems: SeriesProblem[]
}

type Built = { series: Series; readings: SeriesReadings } | { problem: SeriesProblem }

/**
 * The snapshot that analyses of a test are made from, all in SI, with every reading that has a time and a value;
 * readings that were not taken, or that somebody left out, are there but not included.
 */
export function buildInputs(parts: InputParts): BuiltInputs {
  const { test, steps, streamDistanceM, otherWells } = parts
  const pumped = parts.wells.find(({ row }) => row.role === 'pumped')
  const all = parts.wells.flatMap((well) => wellSeries(well, parts))
  const built = all.flatMap((item) => ('series' in item ? [item] : []))
  return {
    inputs: {
      version: 1,
      rates: steps.map(({ startS, rateM3S }) => ({ start_s: startS, rate_m3_s: rateM3S })),
      rateError: test.rateError,
      series: built.map(({ series }) => series),
      ...(pumped ? { pumpedWell: pumpedWell(pumped, parts) } : {}),
      aquifer: test.aquifer,
      thickness_m: test.thicknessM,
      thicknessBasis: test.thicknessBasis,
      thicknessError: test.thicknessError,
      streamDistance_m: streamDistanceM,
      // Left out where there are none, so that tests without keep their hash.
      ...(otherWells.length > 0 ? { otherWells } : {}),
    },
    readings: built.map(({ readings }) => readings),
    problems: all.flatMap((item) => ('problem' in item ? [item.problem] : [])),
  }
}

/** One series a well: the newest log; an older one of the same well is superseded by it. */
function wellSeries(well: TestWellRow, parts: InputParts): Built[] {
  const { series, readings, edits } = parts
  const log = series.filter(({ testWellId }) => testWellId === well.row.id).at(-1)
  if (!log) return []
  const decided = new Map(
    edits.filter(({ seriesId }) => seriesId === log.id).map(({ seq, action }) => [seq, action === 'take']),
  )
  const rows = readings.filter((row) => row.seriesId === log.id && row.elapsedS !== null && row.valueM !== null)
  const included = rows.map(({ seq, taken }) => decided.get(seq) ?? taken)
  const drawdown = drawdownOf(rows, included, log.quantity, staticLevel(well))
  if (!Array.isArray(drawdown)) return [{ problem: { wellId: String(well.row.wellId), ...drawdown } }]
  const asked = { elapsed_s: rows.map(({ elapsedS }) => elapsedS!), drawdown_m: drawdown, included }
  const meanBefore = log.quantity !== 'drawdown' && well.row.staticLevelM === null
  const corrected = correctedLog(well.row.wellId, parts.corrections, asked, meanBefore)
  if (corrected && 'code' in corrected) return [{ problem: { wellId: String(well.row.wellId), ...corrected } }]
  const points = rows
    .map((row, i) => ({
      row,
      s: corrected?.drawdown_m[i] ?? drawdown[i]!,
      uncorrected: drawdown[i]!,
      included: included[i]!,
    }))
    .sort(byTime)
  return [
    {
      series: {
        wellId: String(well.row.wellId),
        label: well.code,
        role: well.row.role,
        distance_m: well.row.distanceM,
        distanceSd_m: well.row.distanceSdM,
        wellRadius_m: well.wellRadiusM,
        casingRadius_m: well.casingRadiusM,
        ...placed(well, parts),
        elapsed_s: points.map(({ row }) => row.elapsedS!),
        drawdown_m: points.map(({ s }) => s),
        included: points.map((point) => point.included),
        // Nothing else asks for it, and tests without other wells keep their hash.
        ...(meanBefore && parts.otherWells.length > 0 ? { zero: 'mean-before' as const } : {}),
        ...(corrected ? { corrections: corrected.applied } : {}),
      },
      readings: {
        wellId: String(well.row.wellId),
        seriesId: log.id,
        seq: points.map(({ row }) => row.seq),
        flags: points.map(({ row }) => row.flags),
        ...(corrected ? { uncorrected_m: points.map(({ uncorrected }) => uncorrected) } : {}),
      },
    },
  ]
}

function placed(well: TestWellRow, { test, units, wells, constructions }: InputParts) {
  const unitId = units.length === 1 ? units[0]!.unitId : null
  const pumped = wells.find(({ row }) => row.role === 'pumped')
  const { aquifer, thicknessM } = test
  return placement(well, constructions.get(well.row.wellId), { aquifer, thicknessM, unitId, pumped })
}

const pumpedWell = (well: TestWellRow, parts: InputParts) => ({
  wellRadius_m: well.wellRadiusM,
  casingRadius_m: well.casingRadiusM,
  screen: placed(well, parts).screen,
})

const staticLevel = ({ row }: TestWellRow): StaticLevel =>
  row.staticLevelM === null ? { beforePumping: true, removeTrend: false } : { given_m: row.staticLevelM }

/** A step backwards in time stays in the file; analyses want rising times. */
const byTime = (a: { row: ReadingRow }, b: { row: ReadingRow }) =>
  a.row.elapsedS! - b.row.elapsedS! || a.row.seq - b.row.seq

/**
 * Drawdown of every row, or why there is none. The static level comes from the included readings alone; the drawdown of
 * readings that are left out is computed from it too, so that the workbench can show them.
 */
function drawdownOf(
  rows: ReadingRow[],
  included: boolean[],
  quantity: Quantity,
  level: StaticLevel,
): number[] | Problem {
  const asRows = rows.map(({ elapsedS, valueM }, i) => ({
    row: i,
    elapsed_s: elapsedS,
    value_m: valueM,
    taken: included[i]!,
  }))
  const found = toDrawdown(asRows, quantity, level)
  if (!found.ok) return { code: found.code, params: found.params }
  if (found.static === null) return rows.map(({ valueM }) => valueM!)
  const everyRow = asRows.map((row) => ({ ...row, taken: true }))
  const all = toDrawdown(everyRow, quantity, { given_m: found.static.value_m })
  return all.ok ? all.readings.map(({ drawdown_m }) => drawdown_m) : { code: all.code, params: all.params }
}
