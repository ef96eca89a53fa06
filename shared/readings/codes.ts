/** The whole file cannot be used. */
export const refusalCodes = [
  'readings/not-text',
  'readings/empty-file',
  'readings/too-many-rows',
  'readings/no-numeric-column',
  'readings/no-such-column',
  'readings/all-times-equal',
  'readings/date-order-ambiguous',
  'readings/unknown-zone',
] as const
export type RefusalCode = (typeof refusalCodes)[number]

/** A line that is no reading, or a reading that is taken and should be looked at. */
export const flagCodes = [
  'readings/preamble',
  'readings/blank-line',
  'readings/sentinel',
  'readings/duplicate-time',
  'readings/time-backwards',
  'readings/gap-before',
  'readings/spike',
  'readings/ambiguous-hour',
  'readings/next-day',
  'readings/other-decimal-mark',
] as const
export type ReadingFlag = (typeof flagCodes)[number]

/** Why a line gave no reading. */
export const rowErrorCodes = [
  'readings/too-few-columns',
  'readings/time-missing',
  'readings/time-unreadable',
  'readings/date-missing',
  'readings/date-unreadable',
  'readings/hour-nonexistent',
  'readings/value-missing',
  'readings/value-unreadable',
  'readings/value-ambiguous-separator',
  'readings/time-ambiguous-separator',
] as const
export type RowErrorCode = (typeof rowErrorCodes)[number]

/** What a person must say before a log can be read. */
export const questionCodes = [
  'readings/ask-time-column',
  'readings/ask-time-unit',
  'readings/ask-value-column',
  'readings/ask-value-unit',
  'readings/ask-quantity',
  'readings/ask-date-order',
  'readings/ask-decimal-mark',
] as const
export type QuestionCode = (typeof questionCodes)[number]

/** Why a column was taken for what it was. */
export const reasonCodes = [
  'readings/guess-header',
  'readings/guess-kind',
  'readings/guess-rising',
  'readings/guess-zero',
  'readings/guess-unit',
  'readings/guess-counter',
  'readings/guess-left-over',
  'readings/guess-nothing',
] as const
export type ReasonCode = (typeof reasonCodes)[number]

/** What can go wrong, or be doubtful, on the way from readings to drawdown. */
export const drawdownCodes = [
  'readings/no-antecedent',
  'readings/no-antecedent-trend',
  'readings/antecedent-short',
] as const
export type DrawdownCode = (typeof drawdownCodes)[number]

export type ReadingCode = RefusalCode | ReadingFlag | RowErrorCode | QuestionCode | ReasonCode | DrawdownCode

export type Params = Record<string, string | number>
