import { promisify } from 'node:util'
import { deflateSync, inflate } from 'node:zlib'

const unzip = promisify(inflate)
const headerBytes = 4

/** A long log is packed in a tenth of a second; a higher level takes twice as long and saves nothing. */
const level = 3

/**
 * JSON text as MariaDB's COMPRESS() writes it: its length in bytes, four bytes little-endian, and a zlib stream. So the
 * database itself packs older rows, and an administrator reads new ones by UNCOMPRESS().
 */
export function packJson(value: unknown): Uint8Array {
  const text = Buffer.from(JSON.stringify(value), 'utf8')
  const header = Buffer.alloc(headerBytes)
  header.writeUInt32LE(text.length)
  return Buffer.concat([header, deflateSync(text, { level })])
}

/** @throws where the bytes are not what `packJson` or COMPRESS() wrote */
export async function unpackJson(packed: Uint8Array): Promise<unknown> {
  const text = await unzip(packed.subarray(headerBytes))
  return JSON.parse(text.toString('utf8')) as unknown
}
