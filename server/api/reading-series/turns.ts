/** Runs at most `most` tasks at the same time; others wait, the first to come being the first to go on. */
export function createTurns(most: number) {
  let running = 0
  const waiting: (() => void)[] = []

  /** A turn goes to who waits longest, without being free in between. */
  function pass() {
    const next = waiting.shift()
    if (next) next()
    else running -= 1
  }

  return async function inTurn<Result>(task: () => Promise<Result>): Promise<Result> {
    if (running < most) running += 1
    else await new Promise<void>((resolve) => waiting.push(resolve))
    try {
      return await task()
    } finally {
      pass()
    }
  }
}
