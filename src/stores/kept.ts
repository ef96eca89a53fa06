const address = (name: string) => `basinbook:${name}`

/** What this browser kept under a name; null when nothing is kept or keeping is forbidden (private windows). */
export function kept(name: string): unknown {
  try {
    return JSON.parse(localStorage.getItem(address(name)) ?? 'null')
  } catch {
    return null
  }
}

export function keep(name: string, value: unknown) {
  try {
    localStorage.setItem(address(name), JSON.stringify(value))
  } catch {
    // Nothing depends on it: the choice holds until the page is closed.
  }
}
