import type { LogMapping } from '#shared/readings/model.ts'
import { unitById } from '#shared/quantities/units.ts'
import type { Reading } from './log-faults.ts'

interface LogContext {
  wellCode: string
  /** Wall-clock time at which the pump started, without zone. */
  startLocal: string
  staticDepth_m: number
}

interface LogFormat {
  extension: string
  mapping: LogMapping
  header: (context: LogContext) => string[]
  /** Decimals of the written value, in its unit. */
  decimals: number
}

const SENTINEL = '-999'

const base = { delimiter: ',', decimalMark: '.' } as const
const byMinutes = { kind: 'elapsed', column: 0, unit: 'min', zero_s: 0 } as const
const byClock = { kind: 'clock', column: 0, dateColumn: null, dateOrder: 'ymd', zone: null } as const

/** The kinds of file that crews and loggers of the region hand in. */
export const logFormats = {
  fieldSheet: {
    extension: 'csv',
    decimals: 2,
    header: ({ wellCode }) => [`Well ${wellCode}`, 'Elapsed (min),Depth to water (m)'],
    mapping: { ...base, firstDataRow: 3, time: byMinutes, value: { column: 1, quantity: 'depth', unit: 'm' } },
  },
  logger: {
    extension: 'csv',
    decimals: 3,
    header: () => ['Date and time,Depth to water (m)'],
    mapping: { ...base, firstDataRow: 2, time: byClock, value: { column: 1, quantity: 'depth', unit: 'm' } },
  },
  centimetres: {
    extension: 'txt',
    decimals: 1,
    header: () => ['Elapsed (s);Depth to water (cm)'],
    mapping: {
      delimiter: ';',
      decimalMark: ',',
      firstDataRow: 2,
      time: { ...byMinutes, unit: 's' },
      value: { column: 1, quantity: 'depth', unit: 'cm' },
    },
  },
  feet: {
    extension: 'tsv',
    decimals: 2,
    header: () => ['Elapsed (min)\tDepth to water (ft)'],
    mapping: {
      delimiter: '\t',
      decimalMark: '.',
      firstDataRow: 2,
      time: byMinutes,
      value: { column: 1, quantity: 'depth', unit: 'ft' },
    },
  },
  drawdowns: {
    extension: 'csv',
    decimals: 3,
    header: ({ wellCode }) => [`Elapsed (min),Drawdown ${wellCode} (m)`],
    mapping: { ...base, firstDataRow: 2, time: byMinutes, value: { column: 1, quantity: 'drawdown', unit: 'm' } },
  },
} as const satisfies Record<string, LogFormat>

export type FormatName = keyof typeof logFormats

const trimmed = (value: number) => String(Number(value.toFixed(4)))

function timeText({ time }: LogMapping, time_s: number, startLocal: string): string {
  if (time.kind === 'elapsed') return trimmed(time.unit === 's' ? time_s : time_s / 60)
  const instant = new Date(Date.parse(`${startLocal}:00Z`) + time_s * 1_000)
  return instant.toISOString().slice(0, 19).replace('T', ' ')
}

function valueText({ mapping, decimals }: LogFormat, depth_m: number | null, { staticDepth_m }: LogContext): string {
  if (depth_m === null) return SENTINEL
  const metres = mapping.value.quantity === 'drawdown' ? depth_m - staticDepth_m : depth_m
  return (metres / unitById(mapping.value.unit).toSI).toFixed(decimals)
}

/** The text of a log file in one of the formats, and the mapping by which it is read back. */
export function writeLog(name: FormatName, readings: readonly Reading[], context: LogContext) {
  const format: LogFormat = logFormats[name]
  const { mapping } = format
  const marked = (text: string) => (mapping.decimalMark === ',' ? text.replace('.', ',') : text)
  const lines = readings.map(({ time_s, depth_m }) =>
    [timeText(mapping, time_s, context.startLocal), valueText(format, depth_m, context)]
      .map(marked)
      .join(mapping.delimiter),
  )
  return { text: `${[...format.header(context), ...lines].join('\n')}\n`, mapping, extension: format.extension }
}
