import { createHmac, randomBytes } from 'node:crypto'
import type { CookieOptions, Request, RequestHandler } from 'express'
import session from 'express-session'
import type { Config } from '../config/config.ts'
import type { Deps } from '../deps.ts'
import { DatabaseSessionStore, idleMs } from './session-store.ts'

const isHttps = ({ publicUrl }: Pick<Config, 'publicUrl'>) => publicUrl.startsWith('https:')

/** `__Host-` binds the cookie to this host; browsers accept the prefix over https only. */
export const cookieName = (config: Pick<Config, 'publicUrl'>) => `${isHttps(config) ? '__Host-' : ''}basinbook`

export const cookieOptions = (config: Pick<Config, 'publicUrl'>) =>
  ({ httpOnly: true, sameSite: 'lax', path: '/', secure: isHttps(config) }) as const satisfies CookieOptions

/**
 * The same in all processes over one database, without being kept anywhere else. It signs the cookie only because
 * express-session insists: a session id is 256 random bits, so that nothing depends on it.
 */
function cookieSecret({ databaseUrl }: Pick<Config, 'databaseUrl'>): string {
  const { password, pathname } = new URL(databaseUrl)
  return createHmac('sha256', password).update(`session cookie of ${pathname}`).digest('hex')
}

/** Sessions begin at sign-in: a visitor has neither a row nor a cookie. */
export function sessions(deps: Deps): RequestHandler {
  return session({
    name: cookieName(deps.config),
    secret: cookieSecret(deps.config),
    store: new DatabaseSessionStore(deps),
    genid: () => randomBytes(32).toString('base64url'),
    cookie: { ...cookieOptions(deps.config), maxAge: idleMs },
    // Over https the proxy in front speaks plain http to this process and says so in X-Forwarded-Proto.
    proxy: isHttps(deps.config) ? true : undefined,
    resave: false,
    saveUninitialized: false,
    rolling: true,
  })
}

const settled = (work: (done: (error: unknown) => void) => void) =>
  new Promise<void>((resolve, reject) => work((error) => (error ? reject(error) : resolve())))

/** Begins a session under a new id, whatever id the browser came with. */
export async function beginSession(req: Request, userId: number, now: Date): Promise<void> {
  await settled((done) => req.session.regenerate(done))
  Object.assign(req.session, { userId, startedAt: now.getTime(), csrfToken: randomBytes(32).toString('base64url') })
  await settled((done) => req.session.save(done))
}

export async function endSession(req: Request): Promise<void> {
  await settled((done) => req.session.destroy(done))
}
