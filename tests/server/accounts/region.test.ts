import request from 'supertest'
import { beforeAll, describe, expect, it } from 'vitest'
import { wells } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeClock, seconds } from '../../support/clock.ts'

const clock = makeClock()
const test = useApp({ now: clock.now })
let administrator: SignedIn
beforeAll(async () => {
  administrator = await test.signIn('administrator')
})

const makeWell = (): typeof wells.$inferInsert => ({
  code: 'R-1',
  kind: 'well',
  position: [-21.2, -38.4],
  mx: 0,
  my: 0,
  originalX: -21.2,
  originalY: -38.4,
  originalEpsg: 4326,
  positionOperation: 'none',
  positionAccuracyM: 1,
  visibility: 'published',
  createdAt: clock.now(),
})

const openable = '/api/adopted-values'

const current = async () => (await request(test.app).get('/api/region').expect(200)).body
const edit = async (body: object) =>
  administrator.patch('/api/region').send({ rowVersion: (await current()).rowVersion, ...body })

describe('the region', () => {
  it('is there before anybody named it, and says so', async () => {
    expect(await current()).toMatchObject({ name: 'New region', zone: 'UTC', openToVisitors: false, rowVersion: 1 })
  })

  it('takes name, extent, units and zone, and reaches every session', async () => {
    const wanted = {
      name: 'Isle of Veldray',
      extent: [-21.5, -38.6, -20.9, -38.2],
      unitSystem: 'us',
      zone: 'Atlantic/Azores',
    }
    const answer = await edit(wanted)
    expect(answer.body).toMatchObject({ ...wanted, rowVersion: 2 })
    const session = await request(test.app).get('/api/session')
    expect(session.body.region).toEqual(answer.body)
    const { body } = await administrator.get('/api/audit-trail?action=region/edit')
    expect(body.items).toMatchObject([{ actorId: administrator.id, subject: 'region', details: wanted }])
  })

  it('tells whoever comes second', async () => {
    const answer = await administrator.patch('/api/region').send({ rowVersion: 1, name: 'Too late' })
    expect(answer.body).toMatchObject({ status: 409, code: 'edit/conflict' })
  })

  it.each([
    [{ extent: [10, 0, 5, 1] }, 'extent', 'region/extent'],
    [{ extent: [0, 0, 200, 1] }, 'extent.2', 'field/too-large'],
    [{ unitSystem: 'furlongs' }, 'unitSystem', 'field/choice'],
    [{ zone: 'Veldray/Harbour' }, 'zone', 'region/zone-unknown'],
    [{ epsg: 4326 }, 'epsg', 'region/system-unknown'],
    [{ name: '   ' }, 'name', 'field/required'],
  ])('refuses %j', async (body, path, code) => {
    expect((await edit(body)).body).toMatchObject({ status: 400, fields: [{ path, code }] })
  })

  it('changes its coordinate system only while it has no wells', async () => {
    expect((await edit({ epsg: 32727 })).body.epsg).toBe(32727)
    await test.deps.connection.db.insert(wells).values(makeWell())
    expect((await edit({ epsg: 32631 })).body).toMatchObject({ status: 409, code: 'region/system-fixed' })
    expect((await edit({ epsg: 32727, name: 'Unchanged system' })).status).toBe(200)
  })

  it('opens to visitors and closes again, in another process within seconds', async () => {
    const status = async () => (await request(test.app).get(openable)).status
    expect(await status()).toBe(401)
    await edit({ openToVisitors: true })
    expect(await status()).not.toBe(401)
    await edit({ openToVisitors: false })
    clock.forward(5 * seconds)
    expect(await status()).toBe(401)
  })
})
