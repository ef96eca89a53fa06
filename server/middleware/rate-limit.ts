import type { Request, RequestHandler, Response } from 'express'
import { rateLimit, type RateLimitInfo, type Store } from 'express-rate-limit'
import { AppError } from '../errors.ts'
import type { Limit } from '../api/registry.ts'

export type RateLimiters = Record<Limit, RequestHandler>

interface Rule {
  windowMs: number
  limit: number
  /** Counted in the database, so that all processes count together. */
  shared: boolean
  failuresOnly?: boolean
}

const minute = 60_000

/** Requests per window and address. Limits by account are the services' business. */
const rules: Record<Limit, Rule> = {
  usual: { windowMs: minute, limit: 1_200, shared: false },
  heavy: { windowMs: minute, limit: 240, shared: false },
  upload: { windowMs: minute, limit: 120, shared: false },
  'sign-in': { windowMs: 15 * minute, limit: 60, shared: true, failuresOnly: true },
  mail: { windowMs: 60 * minute, limit: 30, shared: true },
}

function refuse(req: Request, _res: Response, next: (error: unknown) => void) {
  const { resetTime } = (req as Request & { rateLimit: RateLimitInfo }).rateLimit
  const seconds = Math.max(1, Math.ceil(((resetTime?.getTime() ?? 0) - Date.now()) / 1000))
  next(new AppError('request/too-many', { seconds }))
}

export function createRateLimiters(sharedStore: (name: Limit) => Store): RateLimiters {
  const make = (name: Limit): RequestHandler => {
    const { windowMs, limit, shared, failuresOnly = false } = rules[name]
    return rateLimit({
      windowMs,
      limit,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      skipSuccessfulRequests: failuresOnly,
      // TRUST_PROXY says how many forwarded addresses to believe; a header beyond that is not an error here.
      validate: { xForwardedForHeader: false, forwardedHeader: false },
      ...(shared ? { store: sharedStore(name) } : {}),
      handler: refuse,
    })
  }
  const entries = (Object.keys(rules) as Limit[]).map((name) => [name, make(name)])
  return Object.fromEntries(entries) as RateLimiters
}
