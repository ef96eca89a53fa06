import { createHash } from 'node:crypto'
import { Store, type SessionData } from 'express-session'
import type { Deps } from '../deps.ts'
import { AppError } from '../errors.ts'
import { deleteSession, extendSession, findSession, saveSession } from './session.repository.ts'

declare module 'express-session' {
  interface SessionData {
    userId: number
    csrfToken: string
    /** When the person signed in, ms; a session never lives longer than `absoluteMs` from here. */
    startedAt: number
    /** When the stored row runs out, ms; tells whether it is worth moving. */
    storedUntil: number
  }
}

export const idleMs = 12 * 3_600_000
export const absoluteMs = 7 * 24 * 3_600_000
/** The end of a session in use is moved at most this often, so that reading a page does not write. */
const touchMs = 5 * 60_000

/** A copy of the table (a backup, say) must not open a session: only hashes are kept. */
const keyOf = (sid: string) => createHash('sha256').update(sid).digest('hex')

type Callback<T = unknown> = (error?: unknown, value?: T) => void

/**
 * Sessions in MariaDB, shared by all processes.
 * Every failure is passed on as "unavailable": express-session would take a bare ENOENT of a missing socket for a
 * session that does not exist, and the person would be told to sign in.
 */
export class DatabaseSessionStore extends Store {
  constructor(private readonly deps: Pick<Deps, 'connection' | 'now' | 'log'>) {
    super()
  }

  override get(sid: string, done: Callback<SessionData | null>): void {
    this.settle(done, async ({ connection: { db }, now }) => {
      const row = await findSession(db, keyOf(sid), now())
      return row ? ({ ...row.data, storedUntil: row.expiresAt.getTime() } as SessionData) : null
    })
  }

  override set(sid: string, session: SessionData, done: Callback = () => undefined): void {
    this.settle(done, async ({ connection: { db } }) => {
      const { storedUntil: _, ...data } = session
      const createdAt = new Date(session.startedAt)
      await saveSession(db, { id: keyOf(sid), userId: session.userId, data, createdAt, expiresAt: this.endOf(session) })
    })
  }

  override touch(sid: string, session: SessionData, done: Callback = () => undefined): void {
    const end = this.endOf(session)
    if (end.getTime() - session.storedUntil < touchMs) return done()
    // The answer is ready: a session that could not be extended is no reason to withhold it.
    extendSession(this.deps.connection.db, keyOf(sid), end)
      .catch((error: unknown) => this.deps.log.warn({ err: error }, 'a session could not be extended'))
      .finally(() => done())
  }

  override destroy(sid: string, done: Callback = () => undefined): void {
    this.settle(done, async ({ connection: { db } }) => void (await deleteSession(db, keyOf(sid))))
  }

  private endOf({ startedAt }: SessionData): Date {
    return new Date(Math.min(this.deps.now().getTime() + idleMs, startedAt + absoluteMs))
  }

  private settle<T>(done: Callback<T>, work: (deps: DatabaseSessionStore['deps']) => Promise<T>): void {
    work(this.deps).then(
      (value) => done(null, value),
      (error: unknown) => {
        this.deps.log.error({ err: error }, 'the session store failed')
        done(new AppError('server/unavailable'))
      },
    )
  }
}
