import type { SlugDetails } from '#shared/contracts/test-details.ts'
import type { SlugInputs, SlugRepeat } from '#shared/hydraulics/slug/slug-test.ts'
import { toDrawdown } from '#shared/readings/drawdown.ts'
import type { BuiltInputs, InputParts, SeriesProblem, SeriesReadings } from './build-inputs.ts'
import { decidedReadings, type DecidedReading } from './decided-readings.ts'

type Log = InputParts['series'][number]
type Known = SlugDetails['repeats'][number]

interface BuiltRepeat {
  repeat: SlugRepeat
  readings: SeriesReadings
}

/** The snapshot of a slug test, all in SI: every log of the well is one repeat, in the order in which they came. */
export function buildSlugInputs(
  parts: InputParts,
  details: SlugDetails,
): Omit<BuiltInputs, 'inputs'> & { kind: 'slug'; inputs: SlugInputs } {
  const { test, wells, series } = parts
  const well = wells.find(({ row }) => row.role === 'pumped')
  if (!well) throw new Error('A slug test has a well')
  const logs = series.filter(({ testWellId }) => testWellId === well.row.id)
  const built = logs.map((log, i) =>
    buildRepeat(log, parts, {
      wellId: String(well.row.wellId),
      staticM: well.row.staticLevelM,
      label: `Repeat ${i + 1}`,
      known: details.repeats.find(({ seriesId }) => seriesId === log.id),
    }),
  )
  const good = built.flatMap((one) => ('repeat' in one ? [one] : []))
  return {
    kind: 'slug',
    inputs: {
      version: 1,
      wellId: String(well.row.wellId),
      label: well.code,
      repeats: good.map(({ repeat }) => repeat),
      casingRadius_m: details.casingRadiusM,
      wellRadius_m: details.wellRadiusM,
      screenRadius_m: details.screenRadiusM,
      screenLength_m: details.screenLengthM,
      screenTop_m: details.screenTopM,
      thickness_m: test.thicknessM,
      thicknessError: test.thicknessError,
      filterPack: details.filterPack && { radius_m: details.filterPack.radiusM, porosity: details.filterPack.porosity },
      radiusError: details.radiusError,
      anisotropy: details.anisotropy,
      aquifer: test.aquifer,
      storage: details.storage,
    },
    readings: good.map(({ readings }) => readings),
    problems: built.flatMap((one) => ('problem' in one ? [one.problem] : [])),
  }
}

interface About {
  wellId: string
  staticM: number | null
  label: string
  known: Known | undefined
}

function buildRepeat(
  log: Log,
  parts: InputParts,
  { wellId, staticM, label, known }: About,
): BuiltRepeat | { problem: SeriesProblem } {
  const readings = decidedReadings(log, parts)
  const shift_s = known?.startS ?? 0
  const displacement = displacementOf(readings, log.quantity, shift_s, staticM)
  if (!Array.isArray(displacement)) return { problem: { wellId, ...displacement } }
  const largest = largestOf(readings, displacement)
  const start_s = known?.startS ?? (largest === null ? 0 : readings[largest]!.elapsedS)
  return {
    repeat: {
      id: String(log.id),
      label: known?.label || label,
      initial_m: known?.initialM ?? (largest === null ? 0 : displacement[largest]!),
      elapsed_s: readings.map(({ elapsedS }) => elapsedS - start_s),
      displacement_m: displacement,
      included: readings.map(({ included }) => included),
    },
    readings: {
      wellId,
      seriesId: log.id,
      seq: readings.map(({ seq }) => seq),
      flags: readings.map(({ flags }) => flags),
    },
  }
}

/** Above the static level positive. A log of displacements is taken as it is. Or why there is no displacement. */
function displacementOf(
  readings: DecidedReading[],
  quantity: Log['quantity'],
  shift_s: number,
  staticM: number | null,
) {
  if (quantity === 'drawdown') return readings.map(({ valueM }) => valueM)
  const rows = readings.map(({ elapsedS, valueM, included }, row) => ({
    row,
    elapsed_s: elapsedS - shift_s,
    value_m: valueM,
    taken: included,
  }))
  const level = staticM === null ? ({ beforePumping: true, removeTrend: false } as const) : { given_m: staticM }
  const found = toDrawdown(rows, quantity, level)
  if (!found.ok) return { code: found.code, params: found.params }
  const given_m = found.static!.value_m
  const all = toDrawdown(
    rows.map((row) => ({ ...row, taken: true })),
    quantity,
    { given_m },
  )
  return all.ok ? all.readings.map(({ drawdown_m }) => -drawdown_m) : { code: all.code, params: all.params }
}

/** The reading with the largest displacement among those included: with it the level was moved. */
function largestOf(readings: DecidedReading[], displacement: number[]): number | null {
  let best: number | null = null
  readings.forEach(({ included }, i) => {
    if (included && (best === null || Math.abs(displacement[i]!) > Math.abs(displacement[best]!))) best = i
  })
  return best
}
