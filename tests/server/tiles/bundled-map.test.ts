import { createHash } from 'node:crypto'
import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { createCanvas, loadImage } from '@napi-rs/canvas'
import { describe, expect, it } from 'vitest'
import { bundledTiles } from '../../../server/tiles/bundled.ts'
import { makeCoast } from '../../../server/db/seed/island/coast.ts'
import { allTiles } from '../../../tiles/generator/cover.ts'
import { localToWorld, TILE } from '../../../tiles/generator/mercator.ts'
import { themes } from '../../../tiles/generator/theme.ts'
import { drawWorld, makeWorldLand } from '../../../tiles/generator/world.ts'

const read = (theme: string, z: number, x: number, y: number) =>
  readFileSync(join(bundledTiles, theme, `${z}`, `${x}`, `${y}.webp`))

async function pixels(bytes: Buffer): Promise<Uint8ClampedArray> {
  const image = await loadImage(bytes)
  const context = createCanvas(TILE, TILE).getContext('2d')
  context.drawImage(image, 0, 0)
  return context.getImageData(0, 0, TILE, TILE).data
}

describe('the kept pictures of the bundled map', () => {
  const tiles = allTiles()

  it('are exactly the tiles that the generator draws, and their hash is the version', () => {
    const hash = createHash('sha256')
    let bytes = 0
    for (const { name } of themes) {
      for (const { z, x, y } of tiles) {
        const image = read(name, z, x, y)
        hash.update(image)
        bytes += image.length
      }
      const kept = readdirSync(join(bundledTiles, name), { recursive: true, encoding: 'utf8' })
      expect(kept.filter((path) => path.endsWith('.webp'))).toHaveLength(tiles.length)
    }
    const version: unknown = JSON.parse(readFileSync(join(bundledTiles, 'version.json'), 'utf8'))
    expect(version).toEqual({ version: hash.digest('hex').slice(0, 12), tilesPerTheme: tiles.length, bytes })
  })

  it('take less than 20 MB in the repository', () => {
    const { bytes } = JSON.parse(readFileSync(join(bundledTiles, 'version.json'), 'utf8')) as { bytes: number }
    expect(bytes).toBeLessThan(20e6)
  })

  it('look as the generator draws them now', async () => {
    for (const theme of themes) {
      const tile = { z: 2, x: 1, y: 2 }
      const canvas = createCanvas(TILE, TILE)
      const context = canvas.getContext('2d')
      context.fillStyle = `rgb(${theme.sea.join()})`
      context.fillRect(0, 0, TILE, TILE)
      drawWorld(context, tile, theme, [...makeWorldLand(), ...makeCoast().map((ring) => ring.map(localToWorld))])
      const drawn = context.getImageData(0, 0, TILE, TILE).data
      const kept = await pixels(read(theme.name, tile.z, tile.x, tile.y))
      const difference = drawn.reduce((sum, value, i) => sum + Math.abs(value - kept[i]!), 0) / drawn.length
      // WebP loses a little; another outline or another colour would be far beyond this.
      expect(difference).toBeLessThan(1.5)
    }
  })

  it('reach zoom 14 over the whole island', () => {
    const deepest = new Set(tiles.filter(({ z }) => z === 14).map(({ x, y }) => `${x}/${y}`))
    for (const point of makeCoast(400).flat()) {
      const [x, y] = localToWorld(point)
      expect(deepest).toContain(`${Math.floor(x * 2 ** 14)}/${Math.floor(y * 2 ** 14)}`)
    }
  })
})
