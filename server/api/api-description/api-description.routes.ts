import { z } from 'zod'
import type { Deps } from '../../deps.ts'
import { cookieName } from '../../middleware/sessions.ts'
import { route, type Route } from '../registry.ts'
import { openApi } from './openapi.ts'

/** Describes `routes` and itself. */
export function withDescription(routes: Route[], { config }: Deps): Route[] {
  const described: Route[] = [
    ...routes,
    route(
      {
        method: 'get',
        path: '/api/openapi.json',
        action: 'api-description/read',
        summary: 'This description, as OpenAPI 3.0',
        response: z.record(z.string(), z.unknown()),
      },
      () => (document ??= openApi(described, config.publicUrl, cookieName(config))),
    ),
  ]
  let document: Record<string, unknown> | undefined
  return described
}
