import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { z } from 'zod'
import { overzoom } from './overzoom.ts'
import type { TileAddress } from './tile-address.ts'
import { createCache } from '../cache.ts'

export const bundledTiles = fileURLToPath(new URL('../../tiles', import.meta.url))

/** Deepest zoom that the bundled map answers; a browser enlarges it further. */
export const BUNDLED_ZOOM = 14
const KEPT = 2_000

export const themes = ['light', 'dark'] as const
export type ThemeName = (typeof themes)[number]

const versionFile = z.object({ version: z.string().regex(/^[0-9a-f]{6,64}$/) })

export interface BundledTiles {
  /** Changes with the pictures, never otherwise. */
  version: () => Promise<string>
  /** The tile as WebP; null deeper than the bundled map goes. */
  tile: (theme: ThemeName, tile: TileAddress) => Promise<Buffer | null>
}

async function readIfThere(path: string): Promise<Buffer | null> {
  try {
    return await readFile(path)
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null
    throw error
  }
}

/**
 * The map in `tiles/`. It holds the whole world to zoom 5 and, deeper, only what shows the island: every other tile is
 * the enlarged part of its deepest ancestor, made on request and kept in memory.
 */
export function openBundledTiles(folder = bundledTiles): BundledTiles {
  const cached = createCache<Buffer>(KEPT)
  const read = (theme: ThemeName, { z: zoom, x, y }: TileAddress) =>
    readIfThere(join(folder, theme, `${zoom}`, `${x}`, `${y}.webp`))

  async function enlarged(theme: ThemeName, tile: TileAddress): Promise<Buffer> {
    for (let up = 1; up <= tile.z; up++) {
      const ancestor = { z: tile.z - up, x: tile.x >> up, y: tile.y >> up }
      const image = await read(theme, ancestor)
      if (image) return overzoom(image, ancestor.z, tile)
    }
    throw new Error(`the bundled map has no tile at all for the theme ${theme} in ${folder}`)
  }

  let version: Promise<string> | null = null
  return {
    version: () =>
      (version ??= readFile(join(folder, 'version.json'), 'utf8').then(
        (text) => versionFile.parse(JSON.parse(text)).version,
      )),
    async tile(theme, tile) {
      if (tile.z > BUNDLED_ZOOM) return null
      const drawn = await read(theme, tile)
      return drawn ?? cached(`${theme}/${tile.z}/${tile.x}/${tile.y}`, () => enlarged(theme, tile))
    },
  }
}
