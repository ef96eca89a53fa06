import type { RequestHandler } from 'express'
import { rateLimit, type Store } from 'express-rate-limit'
import { AppError } from '../errors.ts'
import type { Limit } from '../api/registry.ts'

export type RateLimiters = Record<Limit, RequestHandler>

/** Requests per window and address. Sign-in is counted in the database, so that all processes count together. */
const limits: Record<Limit, { windowMs: number; limit: number; shared: boolean }> = {
  usual: { windowMs: 60_000, limit: 1_200, shared: false },
  heavy: { windowMs: 60_000, limit: 240, shared: false },
  upload: { windowMs: 60_000, limit: 120, shared: false },
  'sign-in': { windowMs: 15 * 60_000, limit: 60, shared: true },
}

export function createRateLimiters(sharedStore: () => Store): RateLimiters {
  const make = (name: Limit): RequestHandler => {
    const { windowMs, limit, shared } = limits[name]
    return rateLimit({
      windowMs,
      limit,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      ...(shared ? { store: sharedStore() } : {}),
      handler: (_req, _res, next) => next(new AppError('request/too-many', { seconds: Math.ceil(windowMs / 1000) })),
    })
  }
  return { usual: make('usual'), heavy: make('heavy'), upload: make('upload'), 'sign-in': make('sign-in') }
}
