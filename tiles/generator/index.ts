/** Draws the bundled base map: `node --import tsx tiles/generator/index.ts [folder]`. Takes a few minutes. */
import { createHash } from 'node:crypto'
import { mkdirSync, rmSync, writeFileSync } from 'node:fs'
import { dirname, join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { allTiles } from './cover.ts'
import { drawTile, makeAtelier } from './draw.ts'
import type { TileId } from './mercator.ts'
import { themes } from './theme.ts'

const QUALITY = 92
const folder = resolve(process.argv[2] ?? join(fileURLToPath(new URL('.', import.meta.url)), '..'))

const pathOf = (theme: string, { z, x, y }: TileId) => join(folder, theme, String(z), String(x), `${y}.webp`)

const started = Date.now()
const atelier = makeAtelier()
const tiles = allTiles()
const hash = createHash('sha256')
let bytes = 0
for (const theme of themes) {
  rmSync(join(folder, theme.name), { recursive: true, force: true })
  for (const tile of tiles) {
    const image = drawTile(atelier, tile, theme).toBuffer('image/webp', QUALITY)
    const path = pathOf(theme.name, tile)
    mkdirSync(dirname(path), { recursive: true })
    writeFileSync(path, image)
    hash.update(image)
    bytes += image.length
  }
}
// The version is part of every tile's address, so that browsers may keep tiles for ever.
const version = { version: hash.digest('hex').slice(0, 12), tilesPerTheme: tiles.length, bytes }
writeFileSync(join(folder, 'version.json'), `${JSON.stringify(version)}\n`)
process.stdout.write(`${JSON.stringify(version)} in ${Math.round((Date.now() - started) / 1000)} s\n`)
