/** A clock that stands until it is moved. */
export function makeClock(start = Date.now()) {
  let at = start
  return {
    now: () => new Date(at),
    forward: (ms: number) => void (at += ms),
  }
}

export const seconds = 1_000
export const minutes = 60 * seconds
export const hours = 60 * minutes
export const days = 24 * hours
