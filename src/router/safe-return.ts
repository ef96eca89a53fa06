/** Where to go after signing in: only an address of this application, never one that a link from outside smuggled in. */
export function safeReturn(then: unknown): string {
  return typeof then === 'string' && /^\/(?![/\\])/.test(then) ? then : '/'
}
