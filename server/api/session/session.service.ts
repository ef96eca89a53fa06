import type { Request } from 'express'
import { readPreferences } from '#shared/contracts/account.ts'
import type { Session, SignIn } from '#shared/contracts/session.ts'
import type { Deps } from '../../deps.ts'
import { AppError } from '../../errors.ts'
import { beginSession, endSession } from '../../middleware/sessions.ts'
import { accountOf, mayEnter, setAccount, viewerOf } from '../../middleware/viewer.ts'
import { findAccount, markSeen } from '../../middleware/viewer.repository.ts'
import type { RegionService } from '../region/region.service.ts'
import { countAttempt, forgetAttempts } from './attempts.ts'
import { basemapsOf } from './basemaps.ts'
import { passwordFits } from './passwords.ts'
import { findByEmail } from './session.repository.ts'

export function createSessionService(deps: Deps, region: RegionService) {
  const { connection, config, now } = deps
  const { db } = connection
  const basemaps = basemapsOf(deps)

  /** The answer to "who am I", after whatever the request did. */
  async function describe(req: Request): Promise<Session> {
    const account = accountOf(req)
    return {
      viewer: { ...viewerOf(req), email: account?.email ?? null },
      csrfToken: account ? (req.session.csrfToken ?? null) : null,
      region: await region.get(),
      preferences: readPreferences(account?.preferences),
      basemaps: await basemaps(),
    }
  }

  /** Begins a new session for the person of an account, under a new id. */
  async function begin(req: Request, userId: number): Promise<Session> {
    await beginSession(req, userId, now())
    setAccount(req, await findAccount(db, userId))
    return describe(req)
  }

  return {
    describe,
    begin,

    async signIn(req: Request, { email, password }: SignIn): Promise<Session> {
      await countAttempt(db, email, now())
      const found = await findByEmail(db, email)
      const fits = await passwordFits(found?.passwordHash ?? null, password)
      if (!found || !fits || !found.active) throw new AppError('session/wrong')
      if (!mayEnter(found, config)) throw new AppError('session/demo-refused')
      await forgetAttempts(db, email)
      await markSeen(db, found.id, now())
      return begin(req, found.id)
    },

    async signOut(req: Request): Promise<Session> {
      setAccount(req, null)
      const answer = await describe(req)
      await endSession(req)
      return answer
    },
  }
}

export type SessionService = ReturnType<typeof createSessionService>
