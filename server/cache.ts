interface Entry<Value> {
  value: Promise<Value>
  /** Nothing before the value is there. */
  weight: number
}

/**
 * Keeps the most recently used values, as many as together weigh no more than `limit`: each is one, unless `weigh` says
 * otherwise. A promise is kept at once, so that work is shared.
 */
export function createCache<Value>(limit: number, weigh: (value: Value) => number = () => 1) {
  const kept = new Map<string, Entry<Value>>()
  let total = 0

  function drop(key: string) {
    total -= kept.get(key)?.weight ?? 0
    kept.delete(key)
  }

  /** The longest unused stand first. */
  function makeRoom() {
    for (const key of kept.keys()) {
      if (total <= limit) return
      drop(key)
    }
  }

  function begin(key: string, value: Promise<Value>) {
    const entry = { value, weight: 0 }
    const isKept = () => kept.get(key) === entry
    value.then(
      (made) => {
        if (!isKept()) return
        entry.weight = weigh(made)
        total += entry.weight
        makeRoom()
      },
      () => isKept() && drop(key),
    )
    return entry
  }

  return (key: string, make: () => Promise<Value>): Promise<Value> => {
    const entry = kept.get(key) ?? begin(key, make())
    drop(key)
    kept.set(key, entry)
    total += entry.weight
    return entry.value
  }
}
