import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { Express } from 'express'
import { pino } from 'pino'
import request, { type Test } from 'supertest'
import { afterAll, beforeAll } from 'vitest'
import type { Role } from '#shared/contracts/permissions.ts'
import { createApp } from '../../server/app.ts'
import { hashPassword } from '../../server/api/session/passwords.ts'
import { parseConfig, type Config } from '../../server/config/config.ts'
import { connect } from '../../server/db/client.ts'
import { users } from '../../server/db/schema/index.ts'
import type { Deps } from '../../server/deps.ts'
import { registerHandlers } from '../../server/jobs/handlers.ts'
import { createWorkers } from '../../server/jobs/piscina-workers.ts'
import { createQueue } from '../../server/jobs/queue.ts'
import type { Message } from '../../server/mail/mail.ts'
import { folderStorage } from '../../server/storage/folder-storage.ts'
import { useDatabase } from './database.ts'

export const testPassword = 'a long enough password'
let hashed: Promise<string> | undefined
let people = 0

export interface AppOverrides {
  /** The database; a test file's own, from `useDatabase()`. */
  url: string
  config?: Partial<Config>
  now?: () => Date
}

/** An agent that keeps its cookie and sends the token that every write needs. */
export interface SignedIn {
  id: number
  email: string
  csrfToken: string
  agent: ReturnType<typeof request.agent>
  get(path: string): Test
  post(path: string): Test
  put(path: string): Test
  patch(path: string): Test
  delete(path: string): Test
}

export interface TestApp {
  app: Express
  deps: Deps
  /** What was mailed, oldest first; filled by `deps.jobs.drain()`. */
  mails: Message[]
  makePerson(overrides?: Partial<typeof users.$inferInsert>): Promise<{ id: number; email: string }>
  /** Signs a new person of the role in, or the given one. */
  signIn(role: Role, overrides?: Partial<typeof users.$inferInsert>): Promise<SignedIn>
  signInAs(email: string, password?: string): Promise<SignedIn>
  close(): Promise<void>
}

const makeConfig = (url: string, folder: string, overrides: Partial<Config> = {}): Config => ({
  ...parseConfig({ DATABASE_URL: url, DATA_DIR: folder, LOG_LEVEL: 'silent', DATABASE_CONNECTIONS: '5' }),
  ...overrides,
})

function makeDeps({ url, config, now = () => new Date() }: AppOverrides, folder: string, mails: Message[]): Deps {
  const log = pino({ level: process.env.TEST_LOG ?? 'silent' })
  const connection = connect(url, 5)
  const mail = { send: async (message: Message) => void mails.push(message), close: async () => undefined }
  const jobs = createQueue({ db: connection.db, log, now })
  const storage = folderStorage(join(folder, 'files'))
  const rest = { mail, jobs, storage, workers: createWorkers(1), stopping: new AbortController() }
  return { config: makeConfig(url, folder, config), log, connection, now, ...rest }
}

async function insertPerson(deps: Deps, overrides: Partial<typeof users.$inferInsert> = {}) {
  people += 1
  const email = overrides.email ?? `person-${people}-${process.pid}@veldray.example`
  const passwordHash = await (hashed ??= hashPassword(testPassword))
  const defaults = { name: `Person ${people}`, role: 'reader' as const, passwordHash, createdAt: deps.now() }
  const [row] = await deps.connection.db
    .insert(users)
    .values({ ...defaults, ...overrides, email })
    .$returningId()
  return { id: row!.id, email }
}

async function signedIn(app: Express, email: string, password: string): Promise<SignedIn> {
  const agent = request.agent(app)
  const answer = await agent.post('/api/session').send({ email, password }).expect(200)
  const { csrfToken, viewer } = answer.body as { csrfToken: string; viewer: { id: number } }
  const write = (method: 'post' | 'put' | 'patch' | 'delete') => (path: string) =>
    agent[method](path).set('X-CSRF-Token', csrfToken)
  const writes = { post: write('post'), put: write('put'), patch: write('patch'), delete: write('delete') }
  return { id: viewer.id, email, csrfToken, agent, get: (path) => agent.get(path), ...writes }
}

/** The whole application over a test database, with its mail kept in memory; the caller closes it. */
export function makeApp(overrides: AppOverrides): TestApp {
  const folder = mkdtempSync(join(tmpdir(), 'bb-app-'))
  const mails: Message[] = []
  const deps = makeDeps(overrides, folder, mails)
  const app = createApp(deps)
  registerHandlers(deps)

  const makePerson: TestApp['makePerson'] = (person) => insertPerson(deps, person)
  const signInAs: TestApp['signInAs'] = (email, password = testPassword) => signedIn(app, email, password)
  const signIn: TestApp['signIn'] = async (role, person) => signInAs((await makePerson({ role, ...person })).email)

  let closed = false
  async function close() {
    if (closed) return
    closed = true
    deps.stopping.abort()
    await deps.jobs.stop()
    await deps.workers.close()
    await deps.connection.close()
    rmSync(folder, { recursive: true, force: true })
  }
  return { app, deps, mails, makePerson, signIn, signInAs, close }
}

/** Call at the top of a test file: an application over a database of its own. Its members exist once the hooks ran. */
export function useApp(overrides: Omit<AppOverrides, 'url'> = {}): TestApp {
  const database = useDatabase()
  const held = {} as TestApp
  beforeAll(() => void Object.assign(held, makeApp({ ...overrides, url: database.url })))
  afterAll(() => held.close())
  return held
}
