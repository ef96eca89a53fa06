import { timingSafeEqual } from 'node:crypto'
import type { Request, RequestHandler } from 'express'
import type { Config } from '../config/config.ts'
import { isLoopback } from '../config/loopback.ts'
import { AppError } from '../errors.ts'

const reading = new Set(['GET', 'HEAD', 'OPTIONS'])

function same(given: string, wanted: string): boolean {
  const [a, b] = [Buffer.from(given), Buffer.from(wanted)]
  return a.length === b.length && timingSafeEqual(a, b)
}

/** On one's own computer the page may come by any local name and port (the development server's, for one). */
function isOwnHost(origin: URL, req: Request): boolean {
  return isLoopback(origin.hostname) && origin.host === req.get('host')
}

function originFits(req: Request, config: Pick<Config, 'publicUrl' | 'host'>): boolean {
  const given = req.get('origin')
  if (given === undefined) return true
  if (!URL.canParse(given)) return false
  const origin = new URL(given)
  return origin.origin === new URL(config.publicUrl).origin || (isLoopback(config.host) && isOwnHost(origin, req))
}

/**
 * Refuses writes that another site made the browser send. The token is asked of whoever has a session; a visitor's
 * cookie opens nothing, and one whose session has run out must hear "sign in" rather than "out of date".
 */
export function csrfGuard(config: Pick<Config, 'publicUrl' | 'host'>): RequestHandler {
  return (req, _res, next) => {
    if (reading.has(req.method)) return next()
    if (!originFits(req, config)) throw new AppError('request/origin')
    const { csrfToken } = req.session
    if (csrfToken !== undefined && !same(req.get('x-csrf-token') ?? '', csrfToken)) throw new AppError('request/csrf')
    next()
  }
}
