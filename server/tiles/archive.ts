import { createHash } from 'node:crypto'
import { open, stat } from 'node:fs/promises'
import type { Header, RangeResponse, Source } from 'pmtiles'
import { PMTiles, TileType } from 'pmtiles'
import { z } from 'zod'
import type { TileAddress } from './tile-address.ts'

/** An organisation's own raster map in one file. */
export interface Archive {
  minZoom: number
  maxZoom: number
  /** West, south, east, north in degrees. */
  bounds: [number, number, number, number]
  /** Plain text; archives often hold markup here. */
  attribution: string
  contentType: string
  /** Changes when the file does. */
  version: string
  /** The picture as stored; null where the archive has none. */
  tile: (tile: TileAddress) => Promise<Buffer | null>
}

export class ArchiveError extends Error {}

const contentTypes: Partial<Record<TileType, string>> = {
  [TileType.Png]: 'image/png',
  [TileType.Jpeg]: 'image/jpeg',
  [TileType.Webp]: 'image/webp',
  [TileType.Avif]: 'image/avif',
}

/** Reads byte ranges of a file; the file is opened once and stays open as long as the process runs. */
async function fileSource(path: string): Promise<Source> {
  const file = await open(path, 'r')
  return {
    getKey: () => path,
    async getBytes(offset, length): Promise<RangeResponse> {
      const bytes = new Uint8Array(length)
      const { bytesRead } = await file.read(bytes, 0, length, offset)
      return { data: bytes.buffer.slice(0, bytesRead) }
    },
  }
}

const plainText = (text: string) =>
  text
    .replace(/<[^>]*>/g, '')
    .replace(/&copy;/g, '©')
    .replace(/&amp;/g, '&')
    .trim()

const metadataOf = z.object({ attribution: z.string().optional() }).catch({})

async function fileVersion(path: string): Promise<string> {
  const { size, mtimeMs } = await stat(path)
  return createHash('sha256').update(`${size}/${mtimeMs}`).digest('hex').slice(0, 12)
}

const reason = (error: unknown) => (error instanceof Error ? error.message : String(error))

async function readHeader(path: string): Promise<{ archive: PMTiles; header: Header }> {
  try {
    const archive = new PMTiles(await fileSource(path))
    return { archive, header: await archive.getHeader() }
  } catch (error) {
    throw new ArchiveError(`The map ${path} cannot be read as a PMTiles archive: ${reason(error)}`)
  }
}

/**
 * Opens a raster PMTiles archive.
 * @throws ArchiveError when the file cannot be read, is no archive, or holds vector tiles.
 */
export async function openArchive(path: string): Promise<Archive> {
  const { archive, header } = await readHeader(path)
  const contentType = contentTypes[header.tileType]
  if (!contentType) {
    throw new ArchiveError(`The map ${path} holds no pictures (PNG, JPEG, WebP or AVIF): only raster maps can be shown.`)
  }
  const metadata = metadataOf.parse(await archive.getMetadata())
  return {
    minZoom: header.minZoom,
    maxZoom: header.maxZoom,
    bounds: [header.minLon, header.minLat, header.maxLon, header.maxLat],
    attribution: plainText(metadata.attribution ?? ''),
    contentType,
    version: await fileVersion(path),
    async tile({ z: zoom, x, y }) {
      const found = await archive.getZxy(zoom, x, y)
      return found ? Buffer.from(found.data) : null
    },
  }
}
