import type { LogContext, LogMapping, LogReading, Refusal } from '#shared/readings/model.ts'

/** A semicolon log of elapsed minutes and depth in metres, unless overridden. */
export const makeMapping = (overrides: Partial<LogMapping> = {}): LogMapping => ({
  delimiter: ';',
  decimalMark: '.',
  firstDataRow: 1,
  time: { kind: 'elapsed', column: 0, unit: 'min', zero_s: 0 },
  value: { column: 1, quantity: 'depth', unit: 'm' },
  ...overrides,
})

/** A semicolon log of dated clock times and depth in metres. */
export const makeClockMapping = (overrides: Partial<Extract<LogMapping['time'], { kind: 'clock' }>> = {}): LogMapping =>
  makeMapping({ time: { kind: 'clock', column: 0, dateColumn: null, dateOrder: null, zone: null, ...overrides } })

/** A test that started at 10:00 UTC on 4 March 2021. */
export const makeContext = (start: Partial<LogContext['start']> = {}): LogContext => ({
  start: { instant: '2021-03-04T10:00:00Z', zone: 'UTC', ...start },
})

/** The reading, or a failure that shows the refusal. */
export function taken(result: LogReading | Refusal): LogReading {
  if (!result.ok) throw new Error(`refused: ${result.code} ${JSON.stringify(result.params)}`)
  return result
}

/** The pairs of seconds and metres that were taken. */
export const pairs = (result: LogReading | Refusal) =>
  taken(result)
    .rows.filter((row) => row.taken)
    .map((row) => [row.elapsed_s, row.value_m])

/** Row and code of every issue, "8 hour-nonexistent". */
export const issuesOf = (result: LogReading | Refusal) =>
  taken(result).issues.map(({ row, code }) => `${row} ${code.replace('readings/', '')}`)
