import { Router, type Request, type Response } from 'express'
import { z } from 'zod'
import { can, type RegionAccess, type Viewer } from '#shared/contracts/permissions.ts'
import { AppError } from '../errors.ts'
import type { RateLimiters } from '../middleware/rate-limit.ts'
import { fieldProblems } from './field-problems.ts'
import type { Route } from './registry.ts'

export interface MountDeps {
  limiters: RateLimiters
  viewerOf: (req: Request) => Viewer
  regionAccess: () => Promise<RegionAccess>
}

/** Puts registered routes on a router: limit, permission, parsing, handling, sending. */
export function mountRoutes(routes: Route[], deps: MountDeps): Router {
  const router = Router()
  for (const route of routes) {
    router[route.method](
      route.path,
      deps.limiters[route.limit],
      authorise(route, deps),
      ...route.before,
      answer(route, deps),
    )
  }
  return router
}

function authorise(route: Route, { viewerOf, regionAccess }: MountDeps) {
  return async (req: Request, _res: Response, next: (error?: unknown) => void) => {
    const viewer = viewerOf(req)
    // Most rights do not hang on the region: those routes answer without asking the database for it.
    if (can(viewer, route.action) || can(viewer, route.action, await regionAccess())) return next()
    next(new AppError(viewer.id === null ? 'session/required' : 'request/forbidden'))
  }
}

function answer(route: Route, { viewerOf }: MountDeps) {
  return async (req: Request, res: Response) => {
    const call = {
      params: parse(route.params, req.params, 'params'),
      query: parse(route.query, req.query, 'query'),
      body: parse(route.body, req.body ?? {}, ''),
      viewer: viewerOf(req),
      req,
      res,
    }
    const value = await route.handle(call)
    if (route.response === 'sent') return
    res.status(route.status).json(route.response.parse(value))
  }
}

function parse(schema: z.ZodType | undefined, value: unknown, prefix: string): unknown {
  if (!schema) return undefined
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  throw new AppError('request/invalid', {}, fieldProblems(parsed.error, prefix))
}
