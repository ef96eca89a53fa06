import type { SKRSContext2D } from '@napi-rs/canvas'
import { createCanvas } from '@napi-rs/canvas'
import { fonts } from './fonts.ts'
import type { IslandMap } from './island.ts'
import type { TileId, World } from './mercator.ts'
import { TILE } from './mercator.ts'
import type { Theme } from './theme.ts'

type Style = 'settlement' | 'water' | 'summit'

export interface Label {
  text: string
  style: Style
  font: string
  /** Centre in pixels of the whole world at one zoom. */
  x: number
  y: number
  /** Radians, so that the text follows a stream and never stands on its head. */
  angle: number
  halfWidth: number
  halfHeight: number
}

type Wish = Omit<Label, 'halfWidth' | 'halfHeight'>

const SETTLEMENT = {
  town: { from: 8, size: 14 },
  village: { from: 10, size: 12.5 },
  hamlet: { from: 11, size: 12 },
} as const

const pixels = (z: number, [x, y]: World): [number, number] => [x * TILE * 2 ** z, y * TILE * 2 ** z]

function settlementWishes(z: number, map: IslandMap): Wish[] {
  return (['town', 'village', 'hamlet'] as const).flatMap((kind) =>
    map.settlements
      .filter((place) => place.kind === kind && z >= SETTLEMENT[kind].from)
      .map(({ name, at }): Wish => {
        const [x, y] = pixels(z, at)
        const size = SETTLEMENT[kind].size + Math.max(0, z - 11) * 0.8
        return { text: name, style: 'settlement', font: fonts.upright(size), x, y: y - 2, angle: 0 }
      }),
  )
}

function waterWishes(z: number, map: IslandMap): Wish[] {
  if (z < 10) return []
  return map.waters.map(({ name, at }): Wish => {
    const [x, y] = pixels(z, at)
    return { text: name, style: 'water', font: fonts.italic(12.5 + Math.max(0, z - 11)), x, y, angle: 0 }
  })
}

function summitWishes(z: number, map: IslandMap): Wish[] {
  if (z < 11) return []
  return map.summits.map(({ name, height, at }): Wish => {
    const [x, y] = pixels(z, at)
    const text = `${name} ${Math.round(height)}`
    return { text, style: 'summit', font: fonts.upright(11 + Math.max(0, z - 12) * 0.5), x, y: y - 10, angle: 0 }
  })
}

interface Spot {
  x: number
  y: number
  angle: number
}

/** Spots every `gap` pixels along a line, where the text may run with the line. */
function spotsAlong(line: readonly (readonly [number, number])[], first: number, gap: number): Spot[] {
  const spots: Spot[] = []
  let walked = 0
  let next = first
  for (let i = 1; i < line.length; i++) {
    const [ax, ay] = line[i - 1]!
    const [bx, by] = line[i]!
    walked += Math.hypot(bx - ax, by - ay)
    if (walked < next) continue
    next += gap
    // The direction over a longer stretch: a single segment of a winding stream says little.
    const [fx, fy] = line[Math.max(0, i - 14)]!
    const [tx, ty] = line[Math.min(line.length - 1, i + 14)]!
    const angle = Math.atan((ty - fy) / (tx - fx || 1e-9))
    spots.push({ x: bx + 9 * Math.sin(angle), y: by - 9 * Math.cos(angle), angle })
  }
  return spots
}

function streamWishes(z: number, map: IslandMap): Wish[] {
  return map.streams
    .filter(({ order }) => z >= (order === 2 ? 10 : 12))
    .flatMap(({ name, order, line }) => {
      const drawn = line.map((point) => pixels(z, point))
      const font = fonts.italic(order === 2 ? 13.5 : 12)
      return spotsAlong(drawn, order === 2 ? 150 : 110, 620).map((spot): Wish => ({
        text: name,
        style: 'water',
        font,
        ...spot,
      }))
    })
}

const ruler = createCanvas(8, 8).getContext('2d')

function measured(wish: Wish): Label {
  ruler.font = wish.font
  const width = ruler.measureText(wish.text).width + 8
  const height = Number.parseFloat(/([\d.]+)px/.exec(wish.font)?.[1] ?? '12') + 6
  const [c, s] = [Math.abs(Math.cos(wish.angle)), Math.abs(Math.sin(wish.angle))]
  return { ...wish, halfWidth: (width * c + height * s) / 2, halfHeight: (width * s + height * c) / 2 }
}

const clash = (a: Label, b: Label) =>
  Math.abs(a.x - b.x) < a.halfWidth + b.halfWidth && Math.abs(a.y - b.y) < a.halfHeight + b.halfHeight

/** Labels of one zoom over the whole island: placed once, so that neighbouring tiles agree. */
export function placeLabels(z: number, map: IslandMap): Label[] {
  const wishes = [settlementWishes, waterWishes, streamWishes, summitWishes].flatMap((make) => make(z, map))
  return wishes.map(measured).reduce<Label[]>((placed, label) => {
    return placed.some((other) => clash(other, label)) ? placed : [...placed, label]
  }, [])
}

const colours: Record<Style, (theme: Theme) => { fill: string; halo: string }> = {
  settlement: (theme) => ({ fill: theme.label, halo: theme.labelHalo }),
  water: (theme) => ({ fill: theme.waterLabel, halo: theme.waterLabelHalo }),
  summit: (theme) => ({ fill: theme.summit, halo: theme.labelHalo }),
}

function drawLabel(context: SKRSContext2D, tile: TileId, theme: Theme, label: Label): void {
  const { fill, halo } = colours[label.style](theme)
  context.save()
  context.translate(label.x - tile.x * TILE, label.y - tile.y * TILE)
  context.rotate(label.angle)
  context.font = label.font
  context.textAlign = 'center'
  context.textBaseline = 'middle'
  context.lineJoin = 'round'
  context.lineWidth = 3
  context.strokeStyle = halo
  context.strokeText(label.text, 0, 0)
  context.fillStyle = fill
  context.fillText(label.text, 0, 0)
  context.restore()
}

export function drawLabels(context: SKRSContext2D, tile: TileId, theme: Theme, labels: readonly Label[]): void {
  const centre = (tile.x + 0.5) * TILE
  const middle = (tile.y + 0.5) * TILE
  for (const label of labels) {
    const reach = TILE / 2 + 4
    if (Math.abs(label.x - centre) > reach + label.halfWidth) continue
    if (Math.abs(label.y - middle) > reach + label.halfHeight) continue
    drawLabel(context, tile, theme, label)
  }
}
