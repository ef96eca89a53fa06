import type { Draws } from '../random.ts'
import type { Recorder } from './reading-times.ts'

/** Standard deviation in metres and memory in seconds: loggers err together for a while, dips do not. */
const NOISE: Record<Recorder, { sd: number; memory: number }> = {
  hand: { sd: 0.004, memory: 1 },
  logger: { sd: 0.003, memory: 1_200 },
}

/** First-order autoregressive noise at uneven times: the correlation of two readings is exp(−Δt/memory). */
export function levelNoise({ normal }: Draws, recorder: Recorder, times: readonly number[]): number[] {
  const { sd, memory } = NOISE[recorder]
  let value = normal(0, sd)
  return times.map((time, i) => {
    if (i === 0) return value
    const kept = Math.exp(-(time - times[i - 1]!) / memory)
    value = kept * value + normal(0, sd * Math.sqrt(1 - kept * kept))
    return value
  })
}
