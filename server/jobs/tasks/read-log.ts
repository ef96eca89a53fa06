import type { LogContext, LogMapping, LogReading, Refusal } from '#shared/readings/model.ts'
import { decodeLog, readLog } from '#shared/readings/index.ts'

export interface ReadLogInput {
  bytes: Uint8Array
  mapping: LogMapping
  context: LogContext
}

/** Reads a field log away from the main thread: a long one takes a second. */
export function readLogTask({ bytes, mapping, context }: ReadLogInput): LogReading | Refusal {
  const decoded = decodeLog(bytes)
  return decoded.ok ? readLog(decoded.text, mapping, context) : decoded
}
