import { describe, expect, it } from 'vitest'
import { readLog } from '#shared/readings/read.ts'
import { issuesOf, makeClockMapping, makeContext, makeMapping, pairs, taken } from './make.ts'

describe('readLog with elapsed times', () => {
  it('gives every line of the file one row with its fate', () => {
    const text = 'min;m\n0;12.30\n\n1;12.45\n2;dry\n;12.60\n5;12.71\nend of log\n'
    const log = taken(readLog(text, makeMapping({ firstDataRow: 2 }), makeContext()))
    expect(log.rows.map(({ row }) => row)).toEqual([1, 2, 3, 4, 5, 6, 7, 8])
    expect(log.rows.map(({ raw }) => raw).join('\n')).toBe(text.trimEnd())
    expect(log.rows.map((row) => (row.taken ? 'taken' : (row.flags[0] ?? 'issue')))).toEqual([
      'readings/preamble',
      'taken',
      'readings/blank-line',
      'taken',
      'issue',
      'issue',
      'taken',
      'issue',
    ])
    expect(issuesOf(log)).toEqual(['5 value-unreadable', '6 time-missing', '8 too-few-columns'])
    expect(log.summary).toMatchObject({
      lines: 8,
      taken: 3,
      notTaken: 3,
      first_s: 0,
      last_s: 300,
      min_m: 12.3,
      max_m: 12.71,
      resolution_m: 0.01,
    })
  })

  it('converts time and value to SI and adds the zero of the log', () => {
    const mapping = makeMapping({
      decimalMark: ',',
      time: { kind: 'elapsed', column: 1, unit: 'h', zero_s: -1800 },
      value: { column: 0, quantity: 'level', unit: 'ft' },
    })
    expect(pairs(readLog('10;0,5\n10,5;1\n', mapping, makeContext()))).toEqual([
      [0, 10 * 0.3048],
      [1800, 10.5 * 0.3048],
    ])
  })

  it('takes the other decimal mark where it is clear, and refuses it where it may part thousands', () => {
    const log = readLog('0;12.30\n1;12,45\n2;1,234\n1,5;12.5\n', makeMapping(), makeContext())
    expect(pairs(log)).toEqual([
      [0, 12.3],
      [60, 12.45],
      [90, 12.5],
    ])
    expect(issuesOf(log)).toEqual(['2 other-decimal-mark', '3 value-ambiguous-separator', '4 other-decimal-mark'])
    expect(taken(log).issues[1]?.params).toEqual({ text: '1,234', asDecimal: 1.234, asThousands: 1234 })
  })

  it('keeps sentinels as rows that are not taken, in any unit', () => {
    const mapping = makeMapping({ value: { column: 1, quantity: 'depth', unit: 'ft' } })
    const log = taken(readLog('0;12.3\n1;-999\n2;-9999.00\n3;12.4\n', mapping, makeContext()))
    expect(log.rows.map((row) => row.taken)).toEqual([true, false, false, true])
    expect(log.rows[1]).toMatchObject({ flags: ['readings/sentinel'], elapsed_s: 60 })
    expect(log.issues.map(({ params }) => params.text)).toEqual(['-999', '-9999.00'])
  })

  it('takes and flags duplicates and steps back, naming the earlier row', () => {
    const log = taken(
      readLog('t;d\n0;1.0\n1;1.1\n1;1.1\n3;1.3\n2;1.2\n', makeMapping({ firstDataRow: 2 }), makeContext()),
    )
    expect(log.summary.taken).toBe(5)
    expect(issuesOf(log)).toEqual(['4 duplicate-time', '6 time-backwards'])
    expect(log.issues[0]?.params).toEqual({ elapsed_s: 60, earlier: 3 })
    expect(log.issues[1]?.params).toEqual({ by_s: 60 })
    expect(log.summary.counts).toEqual({
      'readings/preamble': 1,
      'readings/duplicate-time': 1,
      'readings/time-backwards': 1,
    })
  })

  it('flags a spike at the resolution that the file is written in', () => {
    const rows = Array.from({ length: 30 }, (_, i) => `${i + 1};${(i === 15 ? 12.9 : 12.3 + i * 0.01).toFixed(2)}`)
    const log = readLog(rows.join('\n'), makeMapping(), makeContext())
    expect(issuesOf(log)).toEqual(['16 spike'])
    expect(taken(log).rows[15]?.taken).toBe(true)
  })

  it('exempts readings about the events it is told', () => {
    const rows = Array.from({ length: 30 }, (_, i) => `${i + 1};${(i === 15 ? 12.9 : 12.3 + i * 0.01).toFixed(2)}`)
    const log = readLog(rows.join('\n'), makeMapping(), { ...makeContext(), events_s: [0, 960] })
    expect(issuesOf(log)).toEqual([])
  })
})

describe('readLog with clock times', () => {
  const dated = (times: string[]) => times.map((time, i) => `${time};${12 + i / 100}`).join('\n')

  it('counts from the start of the test in its zone', () => {
    const text = dated(['2021-03-04 10:59:00', '2021-03-04 11:00:00', '2021-03-04 11:00:30.5'])
    const context = makeContext({ zone: 'Europe/Paris' })
    expect(pairs(readLog(text, makeClockMapping(), context)).map(([time]) => time)).toEqual([-60, 0, 30.5])
  })

  it('takes the zone of the logger where it is given, and an offset where it is written', () => {
    const text = dated(['2021-07-04 10:00', '2021-07-04T12:00:00+01:00', '2021-07-04 12:00Z'])
    const context = makeContext({ instant: '2021-07-04T10:00:00Z', zone: 'Europe/Paris' })
    const times = pairs(readLog(text, makeClockMapping({ zone: 'Etc/UTC' }), context)).map(([time]) => time)
    expect(times).toEqual([0, 3600, 7200])
  })

  it('reads dates in a column of their own, month first with AM and PM', () => {
    const mapping = makeMapping({
      time: { kind: 'clock', column: 1, dateColumn: 0, dateOrder: 'mdy', zone: null },
      value: { column: 2, quantity: 'depth', unit: 'm' },
    })
    const log = readLog(
      '3/4/2021;11:59 AM;1\n3/4/2021;12:01 PM;2\n13/4/2021;1:00 PM;3\n;1:00 PM;4\n',
      mapping,
      makeContext(),
    )
    expect(pairs(log).map(([time]) => time)).toEqual([7140, 7260])
    expect(issuesOf(log)).toEqual(['3 date-unreadable', '4 date-missing'])
  })

  it('takes a date alone for its midnight', () => {
    const text = '2021-03-04;1\n2021-03-05;2\n'
    expect(pairs(readLog(text, makeClockMapping(), makeContext())).map(([time]) => time)).toEqual([-36_000, 50_400])
  })

  it('finds the order of dates in the whole column, and refuses to guess it', () => {
    const open = dated(['04/03/2021 10:00', '05/03/2021 10:00'])
    expect(readLog(open, makeClockMapping(), makeContext())).toEqual({
      ok: false,
      code: 'readings/date-order-ambiguous',
      params: { text: '04/03/2021', readings: '2021-03-04 or 2021-04-03' },
    })
    const told = pairs(readLog(open, makeClockMapping({ dateOrder: 'dmy' }), makeContext()))
    const seen = pairs(readLog(dated(['04/03/2021 10:00', '13/03/2021 10:00']), makeClockMapping(), makeContext()))
    expect(told.map(([time]) => time)).toEqual([0, 86_400])
    expect(seen.map(([time]) => time)).toEqual([0, 9 * 86_400])
  })

  it('counts days on from the start where the log has the time alone', () => {
    const text = dated(['09:50', '10:10', '23:50', '00:10', '09:00', '08:55', '09:10', '03:00'])
    const log = readLog(text, makeClockMapping(), makeContext())
    const hours = pairs(log).map(([time]) => (time ?? NaN) / 3600)
    const expected = [-1 / 6, 1 / 6, 83 / 6, 85 / 6, 23, 23 - 1 / 12, 23 + 1 / 6, 41]
    hours.forEach((hour, i) => expect(hour).toBeCloseTo(expected[i] ?? NaN, 9))
    expect(issuesOf(log).filter((issue) => issue.endsWith('next-day'))).toEqual(['4 next-day', '8 next-day'])
    expect(issuesOf(log)).toContain('6 time-backwards')
  })

  it('puts the first time on the day nearest to the start', () => {
    const late = makeContext({ instant: '2021-03-04T23:55:00Z' })
    expect(pairs(readLog('00:05;1\n00:06;2\n', makeClockMapping(), late))[0]?.[0]).toBe(600)
    const early = makeContext({ instant: '2021-03-04T00:05:00Z' })
    expect(pairs(readLog('23:55;1\n00:06;2\n', makeClockMapping(), early)).map(([time]) => time)).toEqual([-600, 60])
  })

  it('does not take a row out of order at midnight for a day passed', () => {
    const log = readLog(
      '23:58;1\n00:01;2\n23:59;3\n00:02;4\n',
      makeClockMapping(),
      makeContext({ instant: '2021-03-04T23:58:00Z' }),
    )
    expect(pairs(log).map(([time]) => time)).toEqual([0, 180, 60, 240])
  })

  it('reads on through the hour that autumn repeats, and flags it', () => {
    const times = ['01:30', '02:00', '02:30', '02:00', '02:30', '03:00'].map((time) => `2021-10-31 ${time}`)
    const context = makeContext({ instant: '2021-10-30T23:30:00Z', zone: 'Europe/Paris' })
    const log = readLog(dated(times), makeClockMapping(), context)
    expect(pairs(log).map(([time]) => time)).toEqual([0, 1800, 3600, 5400, 7200, 9000])
    expect(issuesOf(log)).toEqual([2, 3, 4, 5].map((row) => `${row} ambiguous-hour`))
  })

  it('refuses times that spring skips, row by row', () => {
    const times = ['01:59', '02:00', '02:59', '03:00'].map((time) => `2021-03-28 ${time}`)
    const context = makeContext({ instant: '2021-03-28T00:59:00Z', zone: 'Europe/Paris' })
    const log = readLog(dated(times), makeClockMapping(), context)
    expect(pairs(log).map(([time]) => time)).toEqual([0, 60])
    expect(issuesOf(log)).toEqual(['2 hour-nonexistent', '3 hour-nonexistent'])
  })

  it('says of each row what is wrong with its time', () => {
    const log = readLog(
      '2021-03-04 10:00;1\n;2\n2021-03-04 25:00;3\n10:02;4\n2021-03-04 10:03;5\n',
      makeClockMapping(),
      makeContext(),
    )
    expect(issuesOf(log)).toEqual(['2 time-missing', '3 time-unreadable', '4 date-missing'])
    expect(pairs(log)).toHaveLength(2)
  })
})

describe('readLog refuses a file', () => {
  it.each([
    ['of one time throughout', '5;1\n5;2\n5;3\n', makeMapping(), 'readings/all-times-equal'],
    ['whose value column has no number', '0;dry\n1;dry\n', makeMapping(), 'readings/no-numeric-column'],
    ['without the mapped column', '0,1\n1,2\n', makeMapping(), 'readings/no-such-column'],
    [
      'for a zone that does not exist',
      '10:00;1\n',
      makeClockMapping({ zone: 'Mars/Olympus' }),
      'readings/unknown-zone',
    ],
    ['without content', ' \n', makeMapping(), 'readings/empty-file'],
    ['that is binary', '0;1\n\u0000', makeMapping(), 'readings/not-text'],
    ['of a million rows', '1;2\n'.repeat(1_000_000), makeMapping(), 'readings/too-many-rows'],
  ])('%s', (_name, text, mapping, code) => {
    expect(readLog(text, mapping, makeContext())).toMatchObject({ ok: false, code })
  })

  it('takes a start without an instant, or an unknown unit, for a fault of the caller', () => {
    expect(() => readLog('0;1\n', makeMapping(), makeContext({ instant: 'yesterday' }))).toThrow(RangeError)
    const mapping = makeMapping({ value: { column: 1, quantity: 'depth', unit: 'cubit' } })
    expect(() => readLog('0;1\n', mapping, makeContext())).toThrow(RangeError)
  })

  it('reads an instant without a zone as UTC, wherever the code runs', () => {
    const [first] = pairs(
      readLog('2021-03-04 10:00;1\n', makeClockMapping(), makeContext({ instant: '2021-03-04T10:00:00' })),
    )
    expect(first?.[0]).toBe(0)
  })
})
