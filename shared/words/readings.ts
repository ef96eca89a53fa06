import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatQuantity } from '#shared/quantities/format.ts'
import { defaultUnitSystemId, unitSystemById, type UnitSystem } from '#shared/quantities/systems.ts'
import type {
  DrawdownCode,
  Params,
  QuestionCode,
  ReadingCode,
  ReadingFlag,
  ReasonCode,
  RefusalCode,
  RowErrorCode,
} from '#shared/readings/codes.ts'

interface Words {
  /** A param as text. */
  text: (name: string) => string
  /** A param in metres, in the reader's unit. */
  length: (name: string) => string
  /** A param in seconds. */
  span: (name: string) => string
  /** "column 3 ("Depth")" from the params column and name. */
  column: () => string
}
type Sentences<Code extends string> = Record<Code, (words: Words) => string>

const refusals: Sentences<RefusalCode> = {
  'readings/not-text': ({ text }) =>
    `This is a ${text('kind') || 'binary file'}, not a text file. Save the readings as CSV or text and upload that.`,
  'readings/empty-file': () => 'The file is empty. Choose the file that holds the readings.',
  'readings/too-many-rows': ({ text }) =>
    `The file has ${text('lines')} lines; a series may have ${text('limit')}. Thin the log or upload the part that covers the test.`,
  'readings/no-numeric-column': ({ text }) =>
    text('column')
      ? `Column ${text('column')} holds no numbers. Choose the column with the readings.`
      : 'No column of numbers was found. Check that the file holds readings and that its delimiter is a comma, semicolon, tab, bar or space.',
  'readings/no-such-column': ({ text }) =>
    `The file has no column ${text('column')}. Choose the columns and the delimiter again.`,
  'readings/all-times-equal': ({ text }) =>
    `All ${text('readings')} readings have the same time. Choose another time column.`,
  'readings/date-order-ambiguous': ({ text }) =>
    `The dates can be read in more than one order: ${text('text')} is ${text('readings')}. Choose the order of day, month and year.`,
  'readings/unknown-zone': ({ text }) =>
    `"${text('zone')}" is not a time zone. Choose one by region and city, such as Atlantic/Azores.`,
}

const flags: Sentences<ReadingFlag> = {
  'readings/preamble': () => 'stands before the first reading and was not taken as one.',
  'readings/blank-line': () => 'is blank.',
  'readings/sentinel': ({ length, text }) =>
    `the value ${text('text') || length('value_m')} is a mark for "no reading" and was not taken. Restore it if it was measured.`,
  'readings/duplicate-time': ({ span, text }) =>
    `the time ${span('elapsed_s')} was read before, in row ${text('earlier')}. Keep one of the two.`,
  'readings/time-backwards': ({ span }) =>
    `the time steps back by ${span('by_s')}. Check the order of the rows and whether the clock was reset.`,
  'readings/gap-before': ({ span }) =>
    `no reading for ${span('gap_s')} before this one; the usual step is ${span('usual_s')}. Check whether a part of the log is missing.`,
  'readings/spike': ({ length }) =>
    `the value ${length('value_m')} stands out from the readings around it (${length('median_m')}). Remove it if it is no true reading.`,
  'readings/ambiguous-hour': ({ text }) =>
    `the time ${text('text')} occurs twice in ${text('zone')}, as clocks are set back. The order of the rows decided; check it.`,
  'readings/next-day': ({ text }) =>
    `the time ${text('text')} is earlier than the one before and was counted to the next day. Check that no day is missing.`,
  'readings/other-decimal-mark': ({ text }) =>
    `"${text('text')}" has another decimal mark than the rest of the file. Check the number.`,
}

const rowErrors: Sentences<RowErrorCode> = {
  'readings/too-few-columns': ({ text }) =>
    `has ${text('found')} of the ${text('needed')} columns needed and was not taken. Check the delimiter if many rows say so.`,
  'readings/time-missing': () => 'the time is missing. Add it in the file, or leave the row out.',
  'readings/time-unreadable': ({ text }) =>
    `the time "${text('text')}" cannot be read. Write 14:05, 14:05:30, or a number if the column is elapsed time.`,
  'readings/date-missing': () => 'the date is missing. Add it in the file, or leave the row out.',
  'readings/date-unreadable': ({ text }) =>
    `the date "${text('text')}" is no date in the order ${orderNames[text('order')] ?? text('order')}. Correct it or choose another order.`,
  'readings/hour-nonexistent': ({ text }) =>
    `the time ${text('text')} does not exist in ${text('zone')}: clocks were set forward over it. If the logger kept standard time, choose its zone.`,
  'readings/value-missing': () => 'the value is missing, so the row was not taken.',
  'readings/value-unreadable': ({ text }) =>
    `the value "${text('text')}" is not a number. Write the number alone, without unit or remark.`,
  'readings/value-ambiguous-separator': ({ text }) =>
    `the value "${text('text')}" can be read as ${text('asDecimal')} or as ${text('asThousands')}. Correct it in the file.`,
  'readings/time-ambiguous-separator': ({ text }) =>
    `the time "${text('text')}" can be read as ${text('asDecimal')} or as ${text('asThousands')}. Correct it in the file.`,
}

const questions: Sentences<QuestionCode> = {
  'readings/ask-time-column': () => 'Which column holds the time?',
  'readings/ask-time-unit': ({ column }) => `In which unit does ${column()} give the elapsed time?`,
  'readings/ask-value-column': () => 'Which column holds the water level?',
  'readings/ask-value-unit': ({ column }) => `In which unit does ${column()} give the water level?`,
  'readings/ask-quantity': ({ column }) => `Is ${column()} depth to water, water-level elevation or drawdown?`,
  'readings/ask-date-order': ({ text }) => `In which order are dates such as ${text('text')} written?`,
  'readings/ask-decimal-mark': () => 'Is the comma a decimal mark, or does it part thousands?',
}

const reasons: Sentences<ReasonCode> = {
  'readings/guess-header': ({ text }) => `Its name is "${text('name')}".`,
  'readings/guess-kind': ({ text }) => `It holds ${kindNames[text('kind')] ?? text('kind')}.`,
  'readings/guess-rising': () => 'Its numbers rise from row to row.',
  'readings/guess-zero': () => 'Its times start at zero.',
  'readings/guess-unit': () => 'Its unit is a length.',
  'readings/guess-counter': () => 'Its numbers count the rows.',
  'readings/guess-left-over': () => 'It is the only column of numbers left.',
  'readings/guess-nothing': () => 'Nothing tells what it is.',
}

const drawdown: Sentences<DrawdownCode> = {
  'readings/no-antecedent': () =>
    'No reading was taken before pumping, so the static level is not known from the log. Type it.',
  'readings/no-antecedent-trend': ({ text }) =>
    `A trend needs readings at three times before pumping; the log has ${text('readings')} readings. Use their mean, or type the static level.`,
  'readings/antecedent-short': ({ span }) =>
    `The trend rests on ${span('antecedent_s')} before pumping and is carried over ${span('test_s')} of test. A record as long as the test is needed to trust it.`,
}

const orderNames: Record<string, string> = {
  ymd: 'year, month, day',
  dmy: 'day, month, year',
  mdy: 'month, day, year',
}
const kindNames: Record<string, string> = { date: 'dates', time: 'times of day', datetime: 'dates with times' }

const sentences: Sentences<ReadingCode> = { ...refusals, ...flags, ...rowErrors, ...questions, ...reasons, ...drawdown }

const wordsFor = (params: Params, units: UnitSystem): Words => {
  const text = (name: string) => String(params[name] ?? '')
  return {
    text,
    length: (name) => formatQuantity(Number(params[name]), units.length, { figures: 6, trim: true }),
    span: (name) => formatElapsed(Number(params[name])),
    column: () => `column ${text('column')}${text('name') ? ` ("${text('name')}")` : ''}`,
  }
}

const isSubjectless = (sentence: string) => /^(?:has|is|stands) /.test(sentence)

/**
 * The sentence for a code of the readings: what is wrong, where and what to do. `params` may hold the file's `row`
 * and `field` beside the params of the code; lengths (metres) and spans (seconds) come out in the reader's units.
 */
export function readingIssueText(
  code: ReadingCode,
  params: Params,
  units: UnitSystem = unitSystemById(defaultUnitSystemId),
): string {
  const sentence = sentences[code](wordsFor(params, units))
  const { row } = params
  if (row === undefined) return sentence.charAt(0).toUpperCase() + sentence.slice(1)
  return isSubjectless(sentence) ? `Row ${row} ${sentence}` : `Row ${row}: ${sentence}`
}
