import { mkdtemp, rm } from 'node:fs/promises'
import { createServer, type Server } from 'node:http'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { folderStorage } from '../../../server/storage/folder-storage.ts'
import { s3Storage } from '../../../server/storage/s3-storage.ts'
import type { Storage } from '../../../server/storage/storage.ts'

/** The three calls of an S3-compatible service that the program makes, over HTTP, with objects in memory. */
function makeObjectServer(): Server {
  const objects = new Map<string, Buffer>()
  const calls = {
    PUT: (key: string, body: Buffer) => (objects.set(key, body), { status: 200, body: '' }),
    DELETE: (key: string) => (objects.delete(key), { status: 204, body: '' }),
    GET: (key: string) =>
      objects.has(key)
        ? { status: 200, body: objects.get(key)! }
        : { status: 404, body: '<?xml version="1.0"?><Error><Code>NoSuchKey</Code></Error>' },
  }
  return createServer(async (req, res) => {
    const chunks: Buffer[] = []
    for await (const chunk of req) chunks.push(chunk as Buffer)
    const key = new URL(req.url ?? '/', 'http://localhost').pathname
    const { status, body } = calls[req.method as keyof typeof calls](key, plain(Buffer.concat(chunks), req.headers))
    res.writeHead(status, { 'Content-Type': 'application/xml' }).end(body)
  })
}

/** The SDK may send a body in signed chunks: size in hex, line, bytes. */
function plain(body: Buffer, headers: NodeJS.Dict<string | string[]>): Buffer {
  if (!String(headers['content-encoding'] ?? '').includes('aws-chunked')) return body
  const parts: Buffer[] = []
  for (let at = 0; at < body.length;) {
    const end = body.indexOf('\r\n', at)
    const size = Number.parseInt(body.subarray(at, end).toString(), 16)
    if (!(size > 0)) break
    parts.push(body.subarray(end + 2, end + 2 + size))
    at = end + 2 + size + 2
  }
  return Buffer.concat(parts)
}

const server = makeObjectServer()
let folder: string
const kinds: Record<string, () => Storage> = {
  'a folder': () => folderStorage(folder),
  'an S3-compatible service': () =>
    s3Storage({
      bucket: 'logs',
      region: 'local',
      endpoint: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    }),
}

beforeAll(async () => {
  process.env.AWS_ACCESS_KEY_ID = 'local'
  process.env.AWS_SECRET_ACCESS_KEY = 'local'
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true'
  folder = await mkdtemp(join(tmpdir(), 'bb-storage-'))
  server.listen(0, '127.0.0.1')
  await once(server, 'listening')
})
afterAll(async () => {
  server.close()
  await rm(folder, { recursive: true })
})

describe.each(Object.keys(kinds))('storage in %s', (kind) => {
  const bytes = new Uint8Array([0, 255, 10, 13, 128])

  it('gives back what was put, byte for byte', async () => {
    const storage = kinds[kind]!()
    await storage.put('logs/abc', bytes)
    expect(new Uint8Array((await storage.get('logs/abc'))!)).toEqual(bytes)
  })

  it('has nothing under an unknown or removed key', async () => {
    const storage = kinds[kind]!()
    expect(await storage.get('logs/unknown')).toBeNull()
    await storage.put('logs/gone', bytes)
    await storage.remove('logs/gone')
    expect(await storage.get('logs/gone')).toBeNull()
  })
})

it.each(['../outside', 'a/../../b', '/etc/passwd', ''])('a folder refuses the key %j', async (key) => {
  await expect((async () => folderStorage(folder).put(key, new Uint8Array()))()).rejects.toThrow('not a storage key')
})
