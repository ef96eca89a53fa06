import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { createCanvas, loadImage } from '@napi-rs/canvas'
import express from 'express'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ArchiveError, openArchive } from '../../../server/tiles/archive.ts'
import { basemapInfo, openBasemaps } from '../../../server/tiles/basemap.ts'
import type { TilesDeps } from '../../../server/tiles/tiles.routes.ts'
import { tilesRouter } from '../../../server/tiles/tiles.routes.ts'
import { writePmtiles } from '../../support/pmtiles-writer.ts'

const folder = mkdtempSync(join(tmpdir(), 'bb-tiles-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

function makePicture(colour: string): Buffer {
  const canvas = createCanvas(256, 256)
  const context = canvas.getContext('2d')
  context.fillStyle = colour
  context.fillRect(0, 0, 256, 256)
  return canvas.toBuffer('image/png')
}

function makeApp(basemap: TilesDeps['config']['basemap'] = null) {
  const app = express()
  app.set('query parser', 'simple')
  app.use('/tiles', tilesRouter({ config: { basemap } }))
  return app
}

async function pixel(bytes: Buffer, x: number, y: number): Promise<number[]> {
  const image = await loadImage(bytes)
  const context = createCanvas(image.width, image.height).getContext('2d')
  context.drawImage(image, 0, 0)
  return [...context.getImageData(x, y, 1, 1).data]
}

const land = (colour: number[]) => colour[0]! > colour[2]!

describe('the bundled map', () => {
  const app = makeApp()

  it('answers every kept zoom as WebP, in both themes', async () => {
    for (const path of ['light/0/0/0', 'dark/0/0/0', 'light/5/14/19', 'dark/9/225/315']) {
      const { status, headers } = await request(app).get(`/tiles/${path}.webp`)
      expect([path, status, headers['content-type']]).toEqual([path, 200, 'image/webp'])
    }
  })

  it('is kept for ever under its version and asked for again without', async () => {
    const [bundled] = await basemapInfo(await openBasemaps(null))
    const path = bundled!.urls.light.replace('{z}', '5').replace('{x}', '3').replace('{y}', '7')
    expect((await request(app).get(path)).headers['cache-control']).toBe('public, max-age=31536000, immutable')
    const other = await request(app).get('/tiles/light/5/3/7.webp?v=000000000000')
    expect(other.headers['cache-control']).toBe('public, max-age=3600')
  })

  it('shows land where there is land and sea where there is sea', async () => {
    const world = await request(app).get('/tiles/light/0/0/0.webp').responseType('blob')
    expect(land(await pixel(world.body, 142, 122))).toBe(true)
    expect(land(await pixel(world.body, 40, 128))).toBe(false)
  })

  it('draws no land across the date line at 69° north, where rings of the source are stitched', async () => {
    const tile = await request(app).get('/tiles/light/2/2/0.webp').responseType('blob')
    // 4° east, 75° north: open sea between Greenland and Norway.
    expect(land(await pixel(tile.body, 12, 170))).toBe(false)
  })

  it('fills Antarctica down to the edge of the map', async () => {
    const tile = await request(app).get('/tiles/light/1/1/1.webp').responseType('blob')
    expect(land(await pixel(tile.body, 80, 250))).toBe(true)
  })

  it('enlarges the deepest ancestor where it keeps no tile of its own', async () => {
    // 7° east, 46° north at zoom 12: inland, far from the island.
    const inland = await request(app).get('/tiles/light/12/2127/1457.webp').responseType('blob')
    expect(inland.status).toBe(200)
    expect(land(await pixel(inland.body, 128, 128))).toBe(true)
    const sea = await request(app).get('/tiles/light/14/7000/9900.webp').responseType('blob')
    expect(land(await pixel(sea.body, 128, 128))).toBe(false)
  })

  it.each([
    'light/3/8/0.webp',
    'light/3/0/8.webp',
    'light/15/0/0.webp',
    'light/1/-1/0.webp',
    'light/1/0.5/0.webp',
    'light/1/01/0.webp',
    'sepia/1/0/0.webp',
    'light/1/0/0.png',
    'light/1/0/..%2f..%2fversion.webp',
    'custom/light/1/0/0',
  ])('answers 404 for %s', async (path) => {
    expect((await request(app).get(`/tiles/${path}`)).status).toBe(404)
  })
})

describe("an organisation's own map", () => {
  const path = join(folder, 'own.pmtiles')
  const pictures = { sand: makePicture('#d0b080'), sky: makePicture('#80b0d0') }
  beforeAll(() =>
    writePmtiles(
      path,
      [
        { z: 1, x: 0, y: 0, bytes: pictures.sky },
        { z: 2, x: 3, y: 1, bytes: pictures.sand },
        { z: 2, x: 0, y: 2, bytes: pictures.sky },
      ],
      { metadata: { attribution: '<a href="https://maps.example">Survey &amp; Sons</a>' }, bounds: [-22, -39, -20, -38] },
    ),
  )
  const makeCustom = (attribution = '') => ({ light: path, dark: path, attribution })

  it('serves the pictures that the archive holds, as they are', async () => {
    const app = makeApp(makeCustom())
    const answer = await request(app).get('/tiles/custom/light/2/3/1').responseType('blob')
    expect(answer.headers['content-type']).toBe('image/png')
    expect(Buffer.compare(answer.body, pictures.sand)).toBe(0)
  })

  it('answers a clear picture where the archive leaves a tile out, and 404 outside its zooms', async () => {
    const app = makeApp(makeCustom())
    const gap = await request(app).get('/tiles/custom/dark/2/1/1').responseType('blob')
    expect(gap.status).toBe(200)
    expect((await pixel(gap.body, 0, 0))[3]).toBe(0)
    expect((await request(app).get('/tiles/custom/light/3/1/1')).status).toBe(404)
    expect((await request(app).get('/tiles/custom/light/0/0/0')).status).toBe(404)
  })

  it('is offered first, with its own zooms, bounds and plain attribution', async () => {
    const [custom, bundled] = await basemapInfo(await openBasemaps(makeCustom()))
    expect(custom).toMatchObject({ id: 'custom', minZoom: 1, maxNativeZoom: 2, attribution: 'Survey & Sons' })
    expect(custom!.bounds).toEqual([-22, -39, -20, -38])
    expect(bundled).toMatchObject({ id: 'bundled', minZoom: 0, maxNativeZoom: 14, bounds: null })
  })

  it('carries the configured attribution before its own', async () => {
    const [custom] = await basemapInfo(await openBasemaps(makeCustom()), 'Our surveyors')
    expect(custom!.attribution).toBe('Our surveyors')
  })

  it('may be kept for ever under the version that its addresses carry', async () => {
    const [custom] = await basemapInfo(await openBasemaps(makeCustom()))
    const address = custom!.urls.dark.replace('{z}/{x}/{y}', '1/0/0')
    const { headers } = await request(makeApp(makeCustom())).get(address)
    expect(headers['cache-control']).toBe('public, max-age=31536000, immutable')
  })

  it('is refused with its path and the reason when it is missing, broken or not made of pictures', async () => {
    const broken = join(folder, 'broken.pmtiles')
    writeFileSync(broken, 'not an archive')
    const vector = join(folder, 'vector.pmtiles')
    writePmtiles(vector, [{ z: 0, x: 0, y: 0, bytes: Buffer.from([1]) }], { tileType: 1 })
    for (const wrong of [join(folder, 'absent.pmtiles'), broken, vector]) {
      const error = await openArchive(wrong).then(
        () => null,
        (thrown: unknown) => thrown,
      )
      expect(error).toBeInstanceOf(ArchiveError)
      expect((error as Error).message).toContain(wrong)
    }
  })
})
