export type QueryValue = string | number | boolean | null | undefined | readonly (string | number)[]

/** A path with its query string; empty values are left out, lists are joined by commas. */
export function address(path: string, query: Record<string, QueryValue> = {}): string {
  const search = new URLSearchParams()
  for (const [name, value] of Object.entries(query)) {
    if (value === null || value === undefined || value === '') continue
    search.set(name, Array.isArray(value) ? value.join(',') : String(value))
  }
  const text = search.toString()
  return text === '' ? path : `${path}?${text}`
}

/** A random key that marks repeats of one request. `crypto.randomUUID` is missing on plain http away from loopback. */
export function newIdempotencyKey(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16))
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('')
}
