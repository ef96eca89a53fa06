import { decodeBytes } from '#shared/readings/decode.ts'
import { inspectLog } from '#shared/readings/inspect.ts'
import { PREVIEW_ROWS } from '#shared/readings/limits.ts'
import type { LogContext, LogInspection, LogMapping, LogReading, Refusal } from '#shared/readings/model.ts'
import { readLog } from '#shared/readings/read.ts'

export type LogRequest =
  | { id: number; ask: 'inspect'; bytes: Uint8Array }
  | { id: number; ask: 'read'; mapping: LogMapping<string>; context: LogContext }

/** The first rows with content, their issues, and the sum of all: a long log itself stays in the worker. */
export type LogPreview = Pick<LogReading, 'ok' | 'rows' | 'issues' | 'summary'>
export type LogAnswer = { id: number; answer: LogInspection | LogPreview | Refusal }

let text = ''

function inspect(bytes: Uint8Array): LogInspection | Refusal {
  const decoded = decodeBytes(bytes)
  if (!decoded.ok) return decoded
  text = decoded.text
  return inspectLog(text)
}

function preview(mapping: LogMapping<string>, context: LogContext): LogPreview | Refusal {
  const reading = readLog(text, mapping, context)
  if (!reading.ok) return reading
  const first = reading.rows.findIndex(({ row }) => row >= mapping.firstDataRow)
  const rows = reading.rows.slice(Math.max(0, first), Math.max(0, first) + PREVIEW_ROWS)
  const shown = new Set(rows.map(({ row }) => row))
  return { ok: true, rows, issues: reading.issues.filter(({ row }) => shown.has(row)), summary: reading.summary }
}

/** Reads logs off the main thread: a long one takes a second, and the page must stay alive. */
addEventListener('message', ({ data }: MessageEvent<LogRequest>) => {
  const answer = data.ask === 'inspect' ? inspect(data.bytes) : preview(data.mapping, data.context)
  postMessage({ id: data.id, answer } satisfies LogAnswer)
})
