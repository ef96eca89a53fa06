import { existsSync, mkdirSync, readdirSync, statSync, utimesSync, writeFileSync } from 'node:fs'
import { createServer, request, type IncomingMessage } from 'node:http'
import { connect, type AddressInfo } from 'node:net'
import { join } from 'node:path'
import { Readable } from 'node:stream'
import { beforeAll, describe, expect, it } from 'vitest'
import { uploadFolder } from '../../../server/api/reading-series/upload.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, upload } from '../../support/domain.ts'
import { createTest, makeLog, makeSite, siteInput } from '../pumping-tests/support.ts'

const tested = useApp()
let analyst: SignedIn
let other: SignedIn
let test: PumpingTest
let wellId: number

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  other = await tested.signIn('analyst')
  test = await createTest(analyst, siteInput(await makeSite(tested, analyst)))
  wellId = test.wells.find(({ role }) => role === 'observation')!.id
})

const folder = () => uploadFolder(tested.deps.config)
const left = () => (existsSync(folder()) ? readdirSync(folder()) : [])
/** Files go when their connection is done with, a moment after the answer. */
const nothingLeft = () => expect.poll(left).toEqual([])
const path = () => `/api/pumping-tests/${test.id}/reading-series`
const send = (person: SignedIn, log: string | Buffer) => upload(person, test.id, wellId, log, makeMapping())

describe('An upload leaves nothing in the folder of uploads', () => {
  it('when it is taken', async () => {
    await send(analyst, makeLog()).expect(201)
    await nothingLeft()
  })

  it('when it is refused: too large, not readable, without a request, or by somebody who may not', async () => {
    await send(analyst, Buffer.alloc(41 * 1024 * 1024, 0x31)).expect(413)
    await send(analyst, Buffer.alloc(0)).expect(400)
    await analyst.post(path()).attach('file', Buffer.from(makeLog()), 'log.csv').expect(400)
    await analyst.post(path()).field('request', 'no JSON').attach('file', Buffer.from(makeLog()), 'a.csv').expect(400)
    await send(other, makeLog()).expect(403)
    await nothingLeft()
  })

  it('when its sender goes away while it arrives', async () => {
    const server = createServer(tested.app).listen(0, '127.0.0.1')
    await new Promise((resolve) => server.once('listening', resolve))
    const cookie = (await analyst.get('/api/session')).request.cookies as string
    const socket = connect((server.address() as AddressInfo).port, '127.0.0.1')
    const head = [
      `POST ${path()} HTTP/1.1`,
      'Host: 127.0.0.1',
      `Cookie: ${cookie}`,
      `X-CSRF-Token: ${analyst.csrfToken}`,
      'Content-Type: multipart/form-data; boundary=cut',
      'Content-Length: 1000000',
    ]
    const part = '--cut\r\nContent-Disposition: form-data; name="file"; filename="log.csv"\r\n\r\n'
    socket.write(`${head.join('\r\n')}\r\n\r\n${part}${'1,0.1\n'.repeat(20_000)}`)
    await expect.poll(() => left().length).toBe(1)
    socket.destroy()
    await nothingLeft()
    await new Promise((resolve) => server.close(resolve))
  })

  it('when 200 MB are sent, of which no more than is allowed is kept meanwhile', async () => {
    const server = createServer(tested.app).listen(0, '127.0.0.1')
    await new Promise((resolve) => server.once('listening', resolve))
    const cookie = (await analyst.get('/api/session')).request.cookies as string
    const headers = {
      Cookie: cookie,
      'X-CSRF-Token': analyst.csrfToken,
      'Content-Type': 'multipart/form-data; boundary=long',
    }
    const megabyte = Buffer.alloc(1024 * 1024, '1,0.1\n')
    const { port } = server.address() as AddressInfo
    const sent = request({ host: '127.0.0.1', port, path: path(), method: 'POST', headers })
    const answer = new Promise<IncomingMessage>((resolve, reject) => sent.on('response', resolve).on('error', reject))
    let most = 0
    function* body() {
      yield '--long\r\nContent-Disposition: form-data; name="file"; filename="log.csv"\r\n\r\n'
      for (let i = 0; i < 200; i += 1) {
        const sizes = left().map((name) => statSync(join(folder(), name), { throwIfNoEntry: false })?.size ?? 0)
        most = Math.max(most, ...sizes)
        yield megabyte
      }
      yield '\r\n--long--\r\n'
    }
    Readable.from(body()).pipe(sent)
    expect((await answer).statusCode).toBe(413)
    expect(most).toBeLessThanOrEqual(41 * 1024 * 1024)
    sent.destroy()
    await nothingLeft()
    await new Promise((resolve) => server.close(resolve))
  })

  it('when many come at once, and every one of them is taken', async () => {
    const answers = await Promise.all(Array.from({ length: 8 }, () => send(analyst, makeLog())))
    expect(answers.map(({ status }) => status)).toEqual(Array(8).fill(201))
    await nothingLeft()
  })
})

describe('What a crash left in the folder of uploads', () => {
  it('is removed once it is a day old', async () => {
    mkdirSync(folder(), { recursive: true })
    const now = tested.deps.now().getTime()
    for (const [name, hours] of [
      ['fresh', 1],
      ['stale', 25],
    ] as const) {
      writeFileSync(join(folder(), name), '1,0.1')
      const at = new Date(now - hours * 3_600_000)
      utimesSync(join(folder(), name), at, at)
    }
    const { connection, jobs } = tested.deps
    await connection.db.transaction((tx) => jobs.enqueue(tx, 'clean-up', {}))
    await jobs.drain()
    expect(left()).toEqual(['fresh'])
  })
})
