import { writeFileSync } from 'node:fs'
import { zxyToTileId } from 'pmtiles'

export interface ArchiveTile {
  z: number
  x: number
  y: number
  bytes: Buffer
}

export interface ArchiveOptions {
  /** 1 vector, 2 PNG, 3 JPEG, 4 WebP (PMTiles specification version 3). */
  tileType?: number
  metadata?: Record<string, unknown>
  bounds?: [west: number, south: number, east: number, north: number]
}

const HEADER = 127

function varint(value: number): number[] {
  return value < 128 ? [value] : [(value % 128) + 128, ...varint(Math.floor(value / 128))]
}

interface Entry {
  id: number
  offset: number
  bytes: Buffer
}

/** Root directory: ids as differences, run lengths, lengths, then offsets plus one (specification, section 4). */
function directory(entries: readonly Entry[]): Buffer {
  const ids = entries.map(({ id }, i) => id - (entries[i - 1]?.id ?? 0))
  const columns = [
    ids,
    entries.map(() => 1),
    entries.map(({ bytes }) => bytes.length),
    entries.map((e) => e.offset + 1),
  ]
  return Buffer.from([entries.length, ...columns.flat()].flatMap(varint))
}

function header(sections: readonly Buffer[], entries: readonly ArchiveTile[], options: ArchiveOptions): Buffer {
  const bytes = Buffer.alloc(HEADER)
  bytes.write('PMTiles', 0, 'ascii')
  bytes[7] = 3
  const [root, metadata, data] = sections as [Buffer, Buffer, Buffer]
  const lengths = [root.length, metadata.length, 0, data.length]
  let at = HEADER
  lengths.forEach((length, i) => {
    bytes.writeBigUInt64LE(BigInt(at), 8 + 16 * i)
    bytes.writeBigUInt64LE(BigInt(length), 16 + 16 * i)
    at += length
  })
  for (const place of [72, 80, 88]) bytes.writeBigUInt64LE(BigInt(entries.length), place)
  const zooms = entries.map(({ z }) => z)
  bytes.set([1, 1, 1, options.tileType ?? 2, Math.min(...zooms), Math.max(...zooms)], 96)
  const bounds = options.bounds ?? [-180, -85, 180, 85]
  bounds.forEach((degrees, i) => bytes.writeInt32LE(Math.round(degrees * 1e7), 102 + 4 * i))
  return bytes
}

/** Writes an uncompressed PMTiles archive, version 3, for tests: the package `pmtiles` only reads. */
export function writePmtiles(path: string, tiles: readonly ArchiveTile[], options: ArchiveOptions = {}): void {
  let offset = 0
  const entries = [...tiles]
    .map((tile) => ({ id: zxyToTileId(tile.z, tile.x, tile.y), bytes: tile.bytes, offset: 0 }))
    .sort((a, b) => a.id - b.id)
  for (const entry of entries) {
    entry.offset = offset
    offset += entry.bytes.length
  }
  const metadata = Buffer.from(JSON.stringify(options.metadata ?? {}))
  const sections = [directory(entries), metadata, Buffer.concat(entries.map(({ bytes }) => bytes))]
  writeFileSync(path, Buffer.concat([header(sections, tiles, options), ...sections]))
}
