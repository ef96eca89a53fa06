import type { LogMapping } from '#shared/readings/model.ts'
import { readLogTask } from '../../server/jobs/tasks/read-log.ts'
import { fromPython, medianMilliseconds, report } from '../support/bench.ts'

/** A logger’s file of 300,000 lines, the most that are taken, by clock time: decoded, read and flagged, as the worker does, beside Python's csv. */
const [rows, step_s, startMs] = [299_999, 10, Date.UTC(2024, 2, 14, 9)]
const stamp = (i: number) => new Date(startMs + (i - 360) * step_s * 1000).toISOString().slice(0, 19).replace('T', ' ')
const depth = (i: number) => (5 + (i > 360 ? 0.2 * Math.log10(i - 359) : 0) + 0.002 * Math.sin(i)).toFixed(3)
const lines = Array.from({ length: rows }, (_, i) => `${stamp(i)},${depth(i)}`)
const text = ['Date and time,Depth to water (m)', ...lines].join('\n')

const mapping: LogMapping = {
  delimiter: ',',
  decimalMark: '.',
  firstDataRow: 2,
  time: { kind: 'clock', column: 0, dateColumn: null, dateOrder: 'ymd', zone: null },
  value: { column: 1, quantity: 'depth', unit: 'm' },
}
const context = { start: { instant: new Date(startMs).toISOString(), zone: 'UTC' } }
const bytes = new TextEncoder().encode(text)

let taken = 0
const spent = medianMilliseconds(2, () => {
  const found = readLogTask({ bytes, mapping, context })
  if (!found.ok) throw new Error(found.code)
  taken = found.summary.taken
})
if (taken !== rows) throw new Error(`Only ${taken} of ${rows} rows were read`)
const reference = fromPython<{ seconds: number }>('read-log.py', { text })
report('read-log', 'time to read a log of 300,000 lines', spent / 1000, 's', {
  name: 'Python csv, datetime.fromisoformat and float, nothing checked',
  value: reference.seconds,
})
