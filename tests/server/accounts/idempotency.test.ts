import { eq } from 'drizzle-orm'
import { beforeAll, describe, expect, it } from 'vitest'
import { auditTrail, users } from '../../../server/db/schema/index.ts'
import { useApp, type SignedIn } from '../../support/app.ts'

const test = useApp()
let administrator: SignedIn
beforeAll(async () => {
  administrator = await test.signIn('administrator')
})

let counter = 0
const makeInvitation = (overrides: object = {}) => ({
  email: `repeated-${(counter += 1)}@veldray.example`,
  name: 'Repeated',
  role: 'reader',
  mayReview: false,
  ...overrides,
})
type Invitation = ReturnType<typeof makeInvitation>

const send = (key: string, body: object, who = administrator) =>
  who.post('/api/people').set('Idempotency-Key', key).send(body)
const countOf = ({ email }: Invitation) => test.deps.connection.db.$count(users, eq(users.email, email))

describe('a request with an idempotency key', () => {
  it('is done once when sent twice, and the second answer is the first', async () => {
    const invitation = makeInvitation()
    const first = await send('key-1', invitation).expect(201)
    const second = await send('key-1', invitation).expect(201)
    expect(second.body).toEqual(first.body)
    expect(await countOf(invitation)).toBe(1)
    const records = await test.deps.connection.db.$count(auditTrail, eq(auditTrail.subjectId, first.body.id))
    expect(records).toBe(1)
  })

  it('is done once when sent many times at the same moment', async () => {
    const invitation = makeInvitation()
    const answers = await Promise.all(Array.from({ length: 4 }, () => send('key-2', invitation)))
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201, 201])
    expect(new Set(answers.map(({ body }) => body.id)).size).toBe(1)
    expect(await countOf(invitation)).toBe(1)
  })

  it('may be sent again after it failed', async () => {
    const taken = makeInvitation()
    await send('key-3', taken).expect(201)
    await send('key-4', taken).expect(400)
    await test.deps.connection.db.delete(users).where(eq(users.email, taken.email))
    await send('key-4', taken).expect(201)
  })

  it('is refused when the key came with something else before', async () => {
    await send('key-5', makeInvitation()).expect(201)
    const other = makeInvitation()
    expect((await send('key-5', other)).body).toMatchObject({ status: 409, code: 'request/repeated' })
    expect(await countOf(other)).toBe(0)
  })

  it('does not meet another person’s request with the same key', async () => {
    const second = await test.signIn('administrator')
    const [one, two] = [makeInvitation(), makeInvitation()]
    await send('key-6', one).expect(201)
    await send('key-6', two, second).expect(201)
    expect(await countOf(two)).toBe(1)
  })

  it('is refused when the key is longer than a key', async () => {
    const answer = await send('k'.repeat(201), makeInvitation())
    expect(answer.body).toMatchObject({ status: 400, fields: [{ path: 'Idempotency-Key', code: 'field/too-long' }] })
  })
})
