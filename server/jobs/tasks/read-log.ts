import type { LogContext, LogMapping, LogReading, Refusal } from '#shared/readings/model.ts'
import { decodeBytes } from '#shared/readings/decode.ts'
import { readLog } from '#shared/readings/read.ts'

export interface ReadLogInput {
  bytes: Uint8Array
  mapping: LogMapping<string>
  context: LogContext
}

/** Reads a field log away from the main thread: a long one takes a second. */
export function readLogTask({ bytes, mapping, context }: ReadLogInput): LogReading | Refusal {
  const decoded = decodeBytes(bytes)
  return decoded.ok ? readLog(decoded.text, mapping, context) : decoded
}
