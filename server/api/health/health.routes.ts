import { z } from 'zod'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

const alive = z.object({ alive: z.literal(true) })
const ready = z.object({ ready: z.literal(true), cluster: z.enum(['none', 'ready']) })

/** For whatever watches the process; outside /api, so that no session is looked up. */
export function healthRoutes({ health }: Services): Route[] {
  const action = 'health/read'
  return [
    route({ method: 'get', path: '/healthz', action, summary: 'The process lives', response: alive }, () => ({
      alive: true as const,
    })),
    route({ method: 'get', path: '/readyz', action, summary: 'Requests can be served', response: ready }, () =>
      health.ready(),
    ),
  ]
}
