import type { MapWellQuery } from '#shared/contracts/map.ts'
import { mercatorBits, mercatorInts } from '#shared/geodesy/index.ts'

const world = 2 ** mercatorBits
/** As many cells as a screen of 8 K needs with the margin that the map asks for. */
const mostCells = 128 * 128
/** A cell is 64 = 2⁶ pixels wide, as far as there are not too many of them; at zoom 0 the world is 256 = 2⁸. */
const [cellPixelBits, worldPixelBits] = [6, 8]

/** From a cell to a cell, both included. */
export type Span = [from: number, to: number]

/** A box in whole cells: a cluster at its edge is the same cluster whichever box it is asked for in. */
export interface MapView {
  /** The side of a cell is 2^bits of the Mercator integers. */
  bits: number
  /** Two across the date line. */
  columns: Span[]
  rows: Span
}

/** Mercator integers of a box. Across the date line its columns are two spans. */
function spansOf([west, south, east, north]: MapWellQuery['bbox']): Pick<MapView, 'columns' | 'rows'> {
  const a = mercatorInts(west, north)
  const b = mercatorInts(east, south)
  // The date line as the eastern edge is the end of the map, not its beginning.
  const [left, right] = [a.mx, east === 180 ? world - 1 : b.mx]
  const wraps = left > right
  return {
    columns: wraps
      ? [
          [left, world - 1],
          [0, right],
        ]
      : [[left, right]],
    rows: [a.my, b.my],
  }
}

const inCells =
  (bits: number) =>
  ([from, to]: Span): Span => [from >> bits, to >> bits]

const length = ([from, to]: Span) => to - from + 1

function cellsIn({ columns, rows }: Pick<MapView, 'columns' | 'rows'>, bits: number): number {
  const lengths = columns.map((span) => length(inCells(bits)(span)))
  return lengths.reduce((sum, each) => sum + each, 0) * Math.max(0, length(inCells(bits)(rows)))
}

/**
 * What a query looks at. Cells are coarser where a box has more of them than any screen shows: the world at street level
 * would answer with every well.
 */
export function viewOf({ bbox, zoom }: Pick<MapWellQuery, 'bbox' | 'zoom'>): MapView {
  const spans = spansOf(bbox)
  let bits = Math.max(0, mercatorBits - worldPixelBits - zoom + cellPixelBits)
  while (cellsIn(spans, bits) > mostCells) bits += 1
  return { bits, columns: spans.columns.map(inCells(bits)), rows: inCells(bits)(spans.rows) }
}
