import type { SKRSContext2D } from '@napi-rs/canvas'
import type { IslandMap } from './island.ts'
import type { TileId } from './mercator.ts'
import { trace } from './path.ts'
import type { Theme } from './theme.ts'

type Draw = (context: SKRSContext2D, tile: TileId, theme: Theme, map: IslandMap) => void

/** Width that is `at14` pixels at zoom 14 and shrinks gently outwards. */
const width = (z: number, at14: number, least: number) => Math.max(least, at14 * 0.76 ** (14 - z))

const builtUp: Draw = (context, tile, theme, map) => {
  if (tile.z < 9) return
  trace(context, tile, map.built, true)
  context.fillStyle = theme.builtUp
  context.globalAlpha = 0.8
  context.fill()
  context.globalAlpha = 1
}

const buildings: Draw = (context, tile, theme, map) => {
  if (tile.z < 13) return
  trace(context, tile, map.buildings, true)
  context.fillStyle = theme.building
  context.fill()
}

const brooksAndRiver: Draw = (context, tile, theme, map) => {
  context.strokeStyle = theme.water
  for (const order of [1, 2] as const) {
    if (order === 1 && tile.z < 8) continue
    const lines = map.streams.filter((stream) => stream.order === order).map((stream) => stream.line)
    trace(context, tile, lines, false)
    context.lineWidth = order === 2 ? width(tile.z, 5.5, 0.9) : width(tile.z, 2.4, 0.6)
    context.stroke()
  }
}

const tracks: Draw = (context, tile, theme, map) => {
  if (tile.z < 11) return
  trace(
    context,
    tile,
    map.ways.filter(({ kind }) => kind === 'track').map(({ line }) => line),
    false,
  )
  context.strokeStyle = theme.track
  context.lineWidth = width(tile.z, 1.5, 0.8)
  context.setLineDash(tile.z > 12 ? [5, 3] : [3, 2])
  context.stroke()
  context.setLineDash([])
}

const roads: Draw = (context, tile, theme, map) => {
  if (tile.z < 9) return
  trace(
    context,
    tile,
    map.ways.filter(({ kind }) => kind === 'road').map(({ line }) => line),
    false,
  )
  context.strokeStyle = theme.roadEdge
  context.lineWidth = width(tile.z, 5, 1.3)
  context.stroke()
  if (tile.z < 11) return
  context.strokeStyle = theme.road
  context.lineWidth = width(tile.z, 3.2, 1)
  context.stroke()
}

export const coastPath = (context: SKRSContext2D, tile: TileId, map: IslandMap) => trace(context, tile, map.coast, true)

const coastLine: Draw = (context, tile, theme, map) => {
  coastPath(context, tile, map)
  context.strokeStyle = theme.coast
  context.lineWidth = width(tile.z, 1.6, 0.8)
  context.stroke()
}

/** From the ground up. */
const layers: readonly Draw[] = [builtUp, brooksAndRiver, tracks, roads, buildings, coastLine]

export const drawFeatures: Draw = (context, tile, theme, map) => {
  context.lineJoin = 'round'
  context.lineCap = 'round'
  for (const layer of layers) layer(context, tile, theme, map)
}
