import type { Well } from '#shared/contracts/wells.ts'

export type Construction = Pick<
  Well,
  'depthM' | 'staticDepthM' | 'measuringPointM' | 'screens' | 'picks' | 'groundElevationM'
>

export interface Band {
  name: string
  top: number
  bottom: number
  /** Where the name is written, so that names of thin units do not cover each other. */
  labelY: number
  topM: number
  bottomM: number | null
}

export interface Layout {
  /** Vertical place of a depth below ground, pixels. */
  y: (depthM: number) => number
  ground: number
  bottom: number
  /** Where the casing ends above ground. */
  head: number
  screens: { top: number; bottom: number; current: boolean }[]
  bands: Band[]
  waterY: number | null
  ticks: { y: number; depthM: number }[]
}

const LINE_PX = 15
const GROUND_PX = 34

/** A round step that gives three to six marks down to the depth. `unit` is metres in one of the reader's units. */
function tickStep(depthM: number, unit: number): number {
  const rough = depthM / unit / 5
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = [1, 2, 5, 10].find((digit) => digit * power >= rough) ?? 10
  return step * power * unit
}

/** Names one below the other, each at its place or as near below as the one above leaves. */
function spread(places: number[], last: number): number[] {
  const down: number[] = []
  for (const place of places) down.push(Math.max(place, (down.at(-1) ?? -Infinity) + LINE_PX))
  const up: number[] = []
  for (const place of down.reverse()) up.push(Math.min(place, (up.at(-1) ?? last + LINE_PX) - LINE_PX))
  return up.reverse()
}

const deepest = ({ depthM, screens, picks, staticDepthM }: Construction) =>
  Math.max(
    depthM ?? 0,
    staticDepthM ?? 0,
    ...screens.map(({ bottomM }) => bottomM),
    ...picks.map(({ topM, bottomM }) => bottomM ?? topM),
  )

/**
 * Where everything of a well is drawn in a figure of this height. Null where nothing about its depth is known.
 * `isCurrent` says whether a screen is open at the date that is asked about.
 */
export function constructionLayout(
  well: Construction,
  height: number,
  { lengthUnit, isCurrent }: { lengthUnit: number; isCurrent: (screen: Well['screens'][number]) => boolean },
): Layout | null {
  const end = deepest(well)
  if (end <= 0) return null
  const y = (depthM: number) => GROUND_PX + (depthM / end) * (height - GROUND_PX - 14)
  const step = tickStep(end, lengthUnit)
  const tops = well.picks.map(({ topM, bottomM }) => (y(topM) + y(bottomM ?? end)) / 2)
  const labels = spread(tops, height - 8)
  const above = well.measuringPointM ?? 0
  return {
    y,
    ground: y(0),
    bottom: y(well.depthM ?? end),
    head: Math.max(10, y(-Math.max(0.3, above))),
    screens: well.screens.map((screen) => ({
      top: y(screen.topM),
      bottom: y(screen.bottomM),
      current: isCurrent(screen),
    })),
    bands: well.picks.map(({ unitName, topM, bottomM }, i) => ({
      name: unitName,
      top: y(topM),
      bottom: y(bottomM ?? end),
      labelY: labels[i]!,
      topM,
      bottomM,
    })),
    // Read from the measuring point; what stands above ground flows.
    waterY: well.staticDepthM === null ? null : Math.max(6, y(well.staticDepthM - above)),
    ticks: Array.from({ length: Math.floor(end / step + 1e-9) + 1 }, (_, i) => ({ y: y(i * step), depthM: i * step })),
  }
}
