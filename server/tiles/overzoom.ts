import { createCanvas, loadImage } from '@napi-rs/canvas'
import type { TileAddress } from './tile-address.ts'

const SIZE = 256
const QUALITY = 82

/** The part of an ancestor tile that a deeper tile shows, enlarged to a whole tile. */
export async function overzoom(ancestor: Buffer, from: number, tile: TileAddress): Promise<Buffer> {
  const scale = 2 ** (tile.z - from)
  const image = await loadImage(ancestor)
  const canvas = createCanvas(SIZE, SIZE)
  const context = canvas.getContext('2d')
  // The whole ancestor is drawn and cut off by the canvas: cutting first would leave seams between neighbours.
  const left = -(tile.x % scale) * SIZE
  const top = -(tile.y % scale) * SIZE
  context.drawImage(image, left, top, SIZE * scale, SIZE * scale)
  return canvas.encode('webp', QUALITY)
}
