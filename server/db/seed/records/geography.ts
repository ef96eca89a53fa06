import { fault } from '../island/fault.ts'
import type { LonLat, Point } from '../island/frame.ts'
import { EPSG, toLonLat } from '../island/frame.ts'
import { streams } from '../island/streams.ts'
import type { Unit, UnitCode } from '../island/units.ts'
import { outlines, units } from '../island/units.ts'
import type { DemoBoundary, DemoRegion, DemoStream, DemoUnit } from './types.ts'

const degrees = (line: readonly Point[]): LonLat[] =>
  line.map((point) => toLonLat(point).map((angle) => Math.round(angle * 1e7) / 1e7) as LonLat)

const closed = (ring: readonly Point[]): Point[] => [...ring, ring[0]!]

export const region: DemoRegion = {
  name: 'Isle of Veldray',
  epsg: EPSG,
  extent: [-21.48, -38.56, -20.92, -38.25],
  zone: 'Etc/GMT+1',
  verticalDatum: 'Mean sea level, Port Ansel',
}

const DESCRIPTIONS: Record<UnitCode, string> = {
  TG: 'River gravels and sands of the Tarrow valley floor, in contact with the river.',
  PC: 'Stiff silty clay that confines the limestone; thin, and leaky, near its edges.',
  FL: 'Fissured limestone under the Pellow Clay; the Kelder Fault cuts it.',
  BS: 'Fine to medium sandstone of the north, confined by drift; the Kelder Fault cuts it.',
}

function outlineOf(unit: Unit): LonLat[] {
  const [ring, ...others] = outlines(unit.extent)
  if (!ring || others.length > 0) throw new Error(`${unit.name} is not one area`)
  return degrees(closed(ring))
}

export const makeUnits = (): DemoUnit[] =>
  units.map((unit, i) => ({
    code: unit.code,
    name: unit.name,
    kind: unit.setting,
    depthOrder: i + 1,
    connectedStreams: unit.connectedStreams,
    outline: outlineOf(unit),
    description: DESCRIPTIONS[unit.code],
  }))

export const makeStreams = (): DemoStream[] =>
  streams.map(({ code, name, order, line }) => ({ code, name, order: order === 2 ? 1 : 2, path: degrees(line) }))

export const makeBoundaries = (): DemoBoundary[] => [
  { code: fault.code, name: fault.name, kind: fault.kind, units: fault.units, path: degrees(fault.line) },
]
