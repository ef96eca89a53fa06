import type { Request, RequestHandler } from 'express'
import type { SessionData } from 'express-session'
import { visitor, type Viewer } from '#shared/contracts/permissions.ts'
import type { Config } from '../config/config.ts'
import { isLoopback } from '../config/loopback.ts'
import type { Deps } from '../deps.ts'
import { findAccount, markSeen, type Account } from './viewer.repository.ts'

const accounts = new WeakMap<Request, Account>()
const seenMs = 15 * 60_000

/** Demo accounts have published passwords: they exist on the computer itself only. */
export const mayEnter = ({ active, demo }: Pick<Account, 'active' | 'demo'>, config: Pick<Config, 'host'>): boolean =>
  active && (!demo || isLoopback(config.host))

/** The signed-in person's account, or null for a visitor. */
export const accountOf = (req: Request): Account | null => accounts.get(req) ?? null

export function setAccount(req: Request, account: Account | null): void {
  if (account) accounts.set(req, account)
  else accounts.delete(req)
}

const asViewer = ({ id, name, role, mayReview }: Account): Viewer => ({ id, name, role, mayReview })

/** Who asks. Rights are read from the database each time: a change works at once in every process. */
export function viewerOf(req: Request): Viewer {
  const account = accounts.get(req)
  return account ? asViewer(account) : visitor
}

const storedSession = (req: Request) =>
  new Promise<SessionData | null>((resolve, reject) =>
    req.sessionStore.get(req.sessionID, (error: unknown, session) =>
      error ? reject(error as Error) : resolve(session ?? null),
    ),
  )

/**
 * Who asks by now, for an answer that goes on for long: null once the session has ended, the account was closed, or
 * another person signed in over it.
 */
export async function viewerNow({ connection: { db }, config }: Deps, req: Request): Promise<Viewer | null> {
  const before = accountOf(req)
  const session = await storedSession(req)
  if (!before || session?.userId !== before.id) return null
  const account = await findAccount(db, before.id)
  return account && mayEnter(account, config) ? asViewer(account) : null
}

export function withViewer({ connection: { db }, config, now }: Deps): RequestHandler {
  return async (req, _res, next) => {
    const { userId } = req.session
    if (userId === undefined) return next()
    const account = await findAccount(db, userId)
    if (!account || !mayEnter(account, config)) return next()
    accounts.set(req, account)
    if (now().getTime() - (account.lastSeenAt?.getTime() ?? 0) > seenMs) await markSeen(db, userId, now())
    next()
  }
}
