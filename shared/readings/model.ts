import type { Params, QuestionCode, ReadingFlag, ReasonCode, RefusalCode, RowErrorCode } from './codes.ts'

export type Delimiter = ',' | ';' | '\t' | '|' | ' '
export type DecimalMark = '.' | ','
/** Order of day, month and year in dates that are written with three numbers. */
export type DateOrder = 'ymd' | 'dmy' | 'mdy'
/** Depth to water below the measuring point, water-level elevation, or drawdown. */
export type Quantity = 'depth' | 'level' | 'drawdown'
/** Unit ids of time, or a clock-like span: "26:15:00", "75:30". */
export type ElapsedUnit = 's' | 'min' | 'h' | 'd' | 'h:m:s' | 'm:s'

/** Elapsed times: `zero_s` is when the log's zero stands, in seconds after the test's start. */
export interface ElapsedMapping {
  kind: 'elapsed'
  column: number
  unit: ElapsedUnit
  zero_s: number
}

/**
 * Clock times: a column with date and time, or with the time alone and `dateColumn` for the date.
 * Without any date the readings are counted on from the day of the test's start.
 * `zone` is the logger's zone when it differs from the test's; `dateOrder` null means "as the whole column shows".
 */
export interface ClockMapping {
  kind: 'clock'
  column: number
  dateColumn: number | null
  dateOrder: DateOrder | null
  zone: string | null
}

/** How to read a log. Columns count from 0, lines of the file from 1. What is measured decides nothing about reading. */
export interface LogMapping<Measured extends string = Quantity> {
  delimiter: Delimiter
  decimalMark: DecimalMark
  firstDataRow: number
  time: ElapsedMapping | ClockMapping
  value: { column: number; quantity: Measured; unit: string }
}

/** A proposed mapping: what could not be told from the file is null. */
export interface LogDraft {
  delimiter: Delimiter
  decimalMark: DecimalMark
  firstDataRow: number
  time: (Omit<ElapsedMapping, 'unit'> & { unit: ElapsedUnit | null }) | ClockMapping | null
  value: { column: number; quantity: Quantity | null; unit: string | null } | null
}

export type ColumnRole = 'elapsed' | 'clock' | 'date' | Quantity | 'ignored'

export interface Reason {
  code: ReasonCode
  params: Params
}

export interface ColumnGuess {
  index: number
  name: string
  role: ColumnRole
  /** Unit id of time ('h:m:s' for clock-like spans) or of length; null when the file does not say. */
  unit: string | null
  reason: Reason
}

export interface Question {
  code: QuestionCode
  params: Params
}

export interface LogInspection {
  ok: true
  delimiter: Delimiter
  decimalMark: DecimalMark
  /** File line of the column names; null without one. */
  headerRow: number | null
  firstDataRow: number
  lines: number
  columns: ColumnGuess[]
  /** Date orders that fit the whole date column equally well; more than one is a question. */
  dateOrders: DateOrder[]
  preview: { row: number; cells: string[] }[]
  draft: LogDraft
  questions: Question[]
}

export interface Refusal {
  ok: false
  code: RefusalCode
  params: Params
}

/** One line of the file and what became of it. */
export interface ReadingRow {
  /** File line, from 1. */
  row: number
  raw: string
  /** Seconds after the test's start; null when the time could not be read. */
  elapsed_s: number | null
  /** The value in SI: metres for a level, pascals for a pressure; null when it could not be read. */
  value_m: number | null
  flags: ReadingFlag[]
  /** Whether the line gives a reading of the series. */
  taken: boolean
}

export type RowField = 'row' | 'date' | 'time' | 'value'

export interface RowIssue {
  row: number
  code: ReadingFlag | RowErrorCode
  field: RowField
  params: Params
}

export interface LogSummary {
  lines: number
  taken: number
  /** Lines with content after the header that gave no reading. */
  notTaken: number
  first_s: number | null
  last_s: number | null
  min_m: number | null
  max_m: number | null
  /** Smallest step that the log can show, m. */
  resolution_m: number
  counts: Partial<Record<ReadingFlag | RowErrorCode, number>>
}

export interface LogReading {
  ok: true
  rows: ReadingRow[]
  issues: RowIssue[]
  summary: LogSummary
}

/** The test that the readings belong to: instant of its start (ISO 8601), its IANA zone, and when the rate changed. */
export interface LogContext {
  start: { instant: string; zone: string }
  /** Seconds after the start at which the pump was started, stopped or changed (default: [0]). */
  events_s?: number[]
}
