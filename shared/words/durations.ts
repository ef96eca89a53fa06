/** A waiting time in the largest unit that says it without a fraction of a minute: `40 s`, `15 min`. */
export function waitingTime(seconds: string | number | undefined): string {
  const value = Number(seconds)
  return value < 90 ? `${Math.ceil(value)} s` : `${Math.ceil(value / 60)} min`
}
