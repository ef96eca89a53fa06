/** Drawdown at a moment between two readings, linear in the logarithm of time. */
export function interpolated(time_s: number[], drawdown_m: number[], at: number): number {
  const right = time_s.findIndex((time) => time >= at)
  const t1 = time_s[right] as number
  const s1 = drawdown_m[right] as number
  if (t1 === at || right === 0) return s1
  const t0 = time_s[right - 1] as number
  const s0 = drawdown_m[right - 1] as number
  return s0 + ((s1 - s0) * Math.log(at / t0)) / Math.log(t1 / t0)
}
