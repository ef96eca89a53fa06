import type { Deps } from '../deps.ts'

/** All services, made once; a service reaches another resource through this object only. */
export function createServices(_deps: Deps) {
  return {}
}

export type Services = ReturnType<typeof createServices>
