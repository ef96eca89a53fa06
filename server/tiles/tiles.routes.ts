import { createCanvas } from '@napi-rs/canvas'
import type { Request, Response } from 'express'
import { Router } from 'express'
import type { CustomBasemap } from './basemap.ts'
import { openCustom } from './basemap.ts'
import type { ThemeName } from './bundled.ts'
import { openBundledTiles, themes } from './bundled.ts'
import type { TileAddress } from './tile-address.ts'
import { parseTile } from './tile-address.ts'

export interface TilesDeps {
  config: { basemap: CustomBasemap | null }
}

const FOR_EVER = 'public, max-age=31536000, immutable'
/** An address without the right version may come to mean other pictures: ask again after an hour. */
const FOR_AN_HOUR = 'public, max-age=3600'

/** One clear pixel: an archive may leave out empty tiles, and a missing picture would be an error in the browser. */
const CLEAR = createCanvas(1, 1).toBuffer('image/png')

interface Picture {
  bytes: Buffer
  contentType: string
  version: string
}

type Find = (theme: ThemeName, tile: TileAddress) => Promise<Picture | null>

function bundledPictures(): Find {
  const bundled = openBundledTiles()
  return async (theme, tile) => {
    const bytes = await bundled.tile(theme, tile)
    return bytes && { bytes, contentType: 'image/webp', version: await bundled.version() }
  }
}

function customPictures(basemap: CustomBasemap | null): Find {
  let archives: ReturnType<typeof openCustom> | null = null
  return async (theme, tile) => {
    // Opened by the first request: an unusable archive must not keep the bundled map from being served.
    const archive = basemap && (await (archives ??= openCustom(basemap)))[theme]
    if (!archive || tile.z < archive.minZoom || tile.z > archive.maxZoom) return null
    const bytes = await archive.tile(tile)
    const { version } = archive
    return bytes
      ? { bytes, contentType: archive.contentType, version }
      : { bytes: CLEAR, contentType: 'image/png', version }
  }
}

const isTheme = (name: unknown): name is ThemeName => themes.some((theme) => theme === name)

function serve(find: Find) {
  return async (req: Request, res: Response) => {
    const theme = req.params.theme
    const tile = parseTile(req.params)
    const picture = tile && isTheme(theme) ? await find(theme, tile) : null
    if (!picture) {
      res.status(404).set('Cache-Control', 'no-cache').type('text/plain').send('There is no such tile.\n')
      return
    }
    res.set('Cache-Control', req.query.v === picture.version ? FOR_EVER : FOR_AN_HOUR)
    res.type(picture.contentType).send(picture.bytes)
  }
}

/**
 * The map's pictures, to be mounted at `/tiles`: `/light/3/1/2.webp` of the bundled map and `/custom/light/3/1/2` of the
 * organisation's own. Tiles are public: they show no record of the program.
 */
export function tilesRouter({ config }: TilesDeps): Router {
  const router = Router()
  router.get('/custom/:theme/:z/:x/:y', serve(customPictures(config.basemap)))
  router.get('/:theme/:z/:x/:y.webp', serve(bundledPictures()))
  return router
}
