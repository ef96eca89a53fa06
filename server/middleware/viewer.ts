import type { Request, RequestHandler } from 'express'
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

/** Who asks. Rights are read from the database each time: a change works at once in every process. */
export function viewerOf(req: Request): Viewer {
  const account = accounts.get(req)
  if (!account) return visitor
  const { id, name, role, mayReview } = account
  return { id, name, role, mayReview }
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
