import { describe, expect, it } from 'vitest'
import { isComplete } from '#shared/readings/draft.ts'
import { inspectLog } from '#shared/readings/inspect.ts'
import type { LogInspection } from '#shared/readings/model.ts'

function inspected(text: string): LogInspection {
  const result = inspectLog(text)
  if (!result.ok) throw new Error(`refused: ${result.code}`)
  return result
}

const roles = (log: LogInspection) => log.columns.map(({ role, unit }) => (unit ? `${role} ${unit}` : role))
const asked = (log: LogInspection) => log.questions.map(({ code }) => code.replace('readings/ask-', ''))

const handRead = `Pumping test, well T-7
Observer: crew 2

Time (min),Depth to water (m),Remarks
0,12.30,static
1,12.45,
2,12.52,
5,12.71,pump steady
10,12.86,
`
const german = `Datum;Uhrzeit;Abstich [m]
14.03.2021;10:00:00;12,30
14.03.2021;10:01:00;12,45
14.03.2021;10:02:00;12,52
`
const logger = `Logger export
Serial number: 12345
Place,-38.4,-21.2

Record,Date and Time,Temperature (°C),Level [m]
1,2021-03-28 01:58:00,11.2,101.22
2,2021-03-28 01:59:00,11.2,101.23
3,2021-03-28 02:00:00,11.2,101.25
`
const unitsBelow = 't\ts\nmin\tft\n1\t0.52\n2\t0.61\n4\t0.70\n'
const spaced = '10:58:00  12.30\n10:59:00  12.31\n11:30:00 12.40\n'
const american = '"Date","Depth (ft)"\n"3/4/2021 1:05:00 PM","40.1"\n"3/4/2021 1:06:00 PM","40.3"\n'
const wide =
  'Elapsed time (h);OW-1 (m);OW-2 (m);Flow (L/s)\n0,5;1,20;0,31;12,1\n1,0;1,44;0,40;12,0\n2,0;1,71;0,52;12,2\n'
const spans = 'Elapsed;WL (m bgl)\n0:00:00;4,10\n0:00:30;4,22\n26:15:00;4,80\n'
const zeroClock = 'Time,s (m)\n0:00,0\n0:05,0.12\n0:10,0.2\n'
const bare = '1;0,52\n2;0,61\n3;0,70\n'

describe('inspectLog', () => {
  it('sees a log read by hand behind its preamble', () => {
    const log = inspected(handRead)
    expect(log).toMatchObject({ delimiter: ',', decimalMark: '.', headerRow: 4, firstDataRow: 5, lines: 9 })
    expect(roles(log)).toEqual(['elapsed min', 'depth m', 'ignored'])
    expect(log.questions).toEqual([])
    expect(log.draft).toEqual({
      delimiter: ',',
      decimalMark: '.',
      firstDataRow: 5,
      time: { kind: 'elapsed', column: 0, unit: 'min', zero_s: 0 },
      value: { column: 1, quantity: 'depth', unit: 'm' },
    })
  })

  it('sees semicolons, decimal commas, a date column and German names', () => {
    const log = inspected(german)
    expect(log).toMatchObject({ delimiter: ';', decimalMark: ',', dateOrders: ['dmy'] })
    expect(roles(log)).toEqual(['date', 'clock', 'depth m'])
    expect(log.draft.time).toEqual({ kind: 'clock', column: 1, dateColumn: 0, dateOrder: 'dmy', zone: null })
    expect(isComplete(log.draft)).toBe(true)
  })

  it('passes over counter, temperature and numbers in the preamble of a logger export', () => {
    const log = inspected(logger)
    expect(log).toMatchObject({ headerRow: 5, firstDataRow: 6, dateOrders: ['ymd'] })
    expect(roles(log)).toEqual(['ignored', 'clock', 'ignored', 'level m'])
    expect(log.columns.map(({ reason }) => reason.code)).toEqual(Array(4).fill('readings/guess-header'))
  })

  it('joins a line of units to the names above it', () => {
    const log = inspected(unitsBelow)
    expect(log).toMatchObject({ delimiter: '\t', headerRow: 1, firstDataRow: 3 })
    expect(roles(log)).toEqual(['elapsed min', 'drawdown ft'])
  })

  it('asks what the values are in a log without names', () => {
    const log = inspected(spaced)
    expect(log).toMatchObject({ delimiter: ' ', headerRow: null, firstDataRow: 1 })
    expect(roles(log)).toEqual(['clock', 'depth'])
    expect(asked(log)).toEqual(['quantity', 'value-unit'])
    expect(isComplete(log.draft)).toBe(false)
  })

  it('asks for the order of dates that read both ways', () => {
    const log = inspected(american)
    expect(log.dateOrders).toEqual(['dmy', 'mdy'])
    expect(log.questions).toEqual([{ code: 'readings/ask-date-order', params: { text: '3/4/2021' } }])
  })

  it('offers every well of a wide file and leaves the discharge out', () => {
    const log = inspected(wide)
    expect(roles(log)).toEqual(['elapsed h', 'depth m', 'depth m', 'ignored'])
    expect(asked(log)).toEqual(['quantity'])
  })

  it('sees spans of time and a depth below ground in the unit', () => {
    expect(roles(inspected(spans))).toEqual(['elapsed h:m:s', 'depth m'])
  })

  it('takes times that start at zero for elapsed times', () => {
    const log = inspected(zeroClock)
    expect(roles(log)).toEqual(['elapsed h:m:s', 'drawdown m'])
    expect(log.columns[0]?.reason.code).toBe('readings/guess-zero')
  })

  it('takes a rising column for the time when nothing names it, and asks for its unit', () => {
    const log = inspected(bare)
    expect(roles(log)).toEqual(['elapsed', 'depth'])
    expect(log.columns.map(({ reason }) => reason.code)).toEqual(['readings/guess-rising', 'readings/guess-left-over'])
    expect(asked(log)).toEqual(['time-unit', 'quantity', 'value-unit'])
  })

  it('asks about commas that may part thousands throughout', () => {
    expect(asked(inspected('Time (min);Level (mm)\n1;1,234\n2;1,240\n'))).toContain('decimal-mark')
    expect(asked(inspected('Time (min);Level (m)\n1;1,234\n2;1,24\n'))).not.toContain('decimal-mark')
  })

  it('prefers dated clock times to the elapsed times of the logger', () => {
    const log = inspected('Date;Time;ET (s);Level (m)\n2021-03-04;10:00:00;0;1.5\n2021-03-04;10:00:10;10;1.6\n')
    expect(roles(log)).toEqual(['date', 'clock', 'elapsed s', 'level m'])
    expect(log.draft.time).toMatchObject({ kind: 'clock', column: 1, dateColumn: 0 })
  })

  it('asks for the time when no column can be it', () => {
    const log = inspected('Well;Level (m)\nA;1.5\nB;1.2\nC;1.9\n')
    expect(log.draft.time).toBeNull()
    expect(asked(log)).toEqual(['time-column'])
  })

  it('asks for the time in a file of one column', () => {
    const log = inspected('Depth (m)\n12.5\n12.4\n12.6\n')
    expect(roles(log)).toEqual(['depth m'])
    expect(asked(log)).toEqual(['time-column'])
  })

  it('shows the first twenty lines as they part', () => {
    const log = inspected(`t (min),Depth (m)\n${Array.from({ length: 40 }, (_, i) => `${i},1.${i}`).join('\n')}`)
    expect(log.preview).toHaveLength(20)
    expect(log.preview[19]).toEqual({ row: 20, cells: ['18', '1.18'] })
  })

  it.each([
    ['', 'readings/empty-file'],
    ['\n\n  \n', 'readings/empty-file'],
    ['name,remark\nT-7,dry\nT-8,capped\n', 'readings/no-numeric-column'],
    ['just a letter\nwithout readings\n', 'readings/no-numeric-column'],
    ['\u0000\u0001\u0002', 'readings/not-text'],
    ['1,2\n'.repeat(1_000_000), 'readings/too-many-rows'],
  ])('refuses a file that holds no log (%#)', (text, code) => {
    expect(inspectLog(text)).toMatchObject({ ok: false, code })
  })
})
