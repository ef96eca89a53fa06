import table from './crs-table.json' with { type: 'json' }
import type { Box } from './types.ts'

/**
 * The committed table of coordinate systems, made from PROJ's copy of the EPSG registry by
 * tests/reference/crs-table.py. Its rows are strings of fields between bars, because as objects the file would
 * be four times as long; they are read on first use. Large: load lazily in the browser.
 */

/** A datum shift to WGS 84 that needs no grid file. */
export interface DatumOperation {
  /** Name and code in the EPSG registry: `OSGB36 to WGS 84 (6), EPSG:1314`. */
  name: string
  accuracy_m: number
  /** Position vector parameters: metres, arc seconds, parts per million; null when the datum is taken as it is. */
  towgs84: string | null
  /** Where it holds; null for the whole area of use of the system. */
  area: Box | null
}

/** Order and sense of the system's own two axes: east north, north east, or west south (southern Africa). */
export type AxisOrder = 'en' | 'ne' | 'ws'

export interface Crs {
  epsg: number
  name: string
  /** Area of use in words and as a box. */
  area: string
  box: Box
  kind: 'projected' | 'geographic'
  axis: AxisOrder
  /** Metres in one unit of the coordinates; null for degrees. */
  metresPerUnit: number | null
  /** For proj4js, without datum shift. */
  definition: string
  /** The most accurate first. */
  operations: readonly DatumOperation[]
  /** Accuracy of the datum shift, in metres: the worst of the operations. */
  accuracy_m: number
  /** What the registry states with a grid file, where that is better; the program carries no grids. */
  accuracyWithGrid_m: number | null
}

/** `grid`: no shift without a grid file. `operation`: no published shift at all. `projection`: proj4js differs from PROJ. `axes`: an unusual order of axes. */
export type RefusalReason = 'grid' | 'operation' | 'projection' | 'axes'
export interface Refusal {
  epsg: number
  name: string
  reason: RefusalReason
}

const metresInUnit: Record<string, number> = { 'us-ft': 1200 / 3937, ft: 0.3048 }

const fieldsOf = (row: string): string[] => row.split('|')
const boxOf = (text: string): Box => {
  const [west = NaN, south = NaN, east = NaN, north = NaN] = text.split(',').map(Number)
  return [west, south, east, north]
}

function readOperation(row: string): DatumOperation {
  const [name = '', codes = '', accuracy = '', towgs84 = '', area = ''] = fieldsOf(row)
  return {
    name: codes ? `${name}, ${codes}` : name,
    accuracy_m: Number(accuracy),
    towgs84: towgs84 || null,
    area: area ? boxOf(area) : null,
  }
}

function metresPerUnitOf(definition: string): number | null {
  if (definition.startsWith('longlat')) return null
  const scale = /to_meter=(\S+)/.exec(definition)
  const unit = /units=(\S+)/.exec(definition)
  return scale ? Number(scale[1]) : (metresInUnit[unit?.[1] ?? ''] ?? 1)
}

function readSystem(row: string, areas: string[], operations: DatumOperation[]): Crs {
  const [code = '', name = '', area = '', axis = 'en', definition = '', used = '', withGrid = ''] = fieldsOf(row)
  const [words = '', box = ''] = fieldsOf(areas[Number(area)] ?? '')
  const own = used.split(',').map((index) => operations[Number(index)]!)
  return {
    epsg: Number(code),
    name,
    area: words,
    box: boxOf(box),
    kind: definition.startsWith('longlat') ? 'geographic' : 'projected',
    axis: axis as AxisOrder,
    metresPerUnit: metresPerUnitOf(definition),
    definition: `+proj=${definition.replaceAll(' ', ' +')}`,
    operations: own,
    accuracy_m: Math.max(...own.map((operation) => operation.accuracy_m)),
    accuracyWithGrid_m: withGrid ? Number(withGrid) : null,
  }
}

function readRefusal(row: string): Refusal {
  const [code = '', name = '', reason = ''] = fieldsOf(row)
  return { epsg: Number(code), name, reason: reason as RefusalReason }
}

const byCode = <Row extends { epsg: number }>(rows: Row[]) => new Map(rows.map((row) => [row.epsg, row]))

function readTable() {
  const operations = table.operations.map(readOperation)
  return {
    systems: byCode(table.systems.map((row) => readSystem(row, table.areas, operations))),
    refusals: byCode(table.refused.map(readRefusal)),
  }
}

let read: ReturnType<typeof readTable> | undefined

/** Every offered and every refused system, by EPSG code. */
export const crsTable = () => (read ??= readTable())
