/** Keeps the most recently used values, at most `limit` of them. A promise is kept at once, so that work is shared. */
export function createCache<Value>(limit: number) {
  const kept = new Map<string, Promise<Value>>()
  return (key: string, make: () => Promise<Value>): Promise<Value> => {
    const found = kept.get(key)
    const value = found ?? make()
    kept.delete(key)
    kept.set(key, value)
    if (!found) value.catch(() => kept.delete(key))
    const oldest = kept.keys().next()
    if (kept.size > limit && !oldest.done) kept.delete(oldest.value)
    return value
  }
}
