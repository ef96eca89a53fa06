import fc from 'fast-check'
import { DateTime } from 'luxon'
import { describe, expect, it } from 'vitest'
import { lengths } from '#shared/quantities/lengths.ts'
import { times } from '#shared/quantities/times.ts'
import { fromSI, toSI } from '#shared/quantities/units.ts'
import { dateOrders } from '#shared/readings/dates.ts'
import type { DateOrder, DecimalMark, Delimiter, ElapsedUnit } from '#shared/readings/model.ts'
import { readLog } from '#shared/readings/read.ts'
import { makeContext, makeMapping, taken } from './make.ts'

const START = Date.UTC(2021, 9, 30, 12)
const zones = ['UTC', 'Europe/Paris', 'America/St_Johns', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'Atlantic/Azores']
const formats: Record<DateOrder, string> = { ymd: 'yyyy-MM-dd', dmy: 'dd.MM.yyyy', mdy: 'M/d/yyyy' }

const layouts = fc.constantFrom<[Delimiter, DecimalMark]>(
  [';', '.'],
  [';', ','],
  ['\t', ','],
  ['\t', '.'],
  ['|', ','],
  [',', '.'],
  [' ', ','],
)
/** Times that grow by whole seconds from a day before the start to some days after it. */
const series = fc
  .array(fc.tuple(fc.integer({ min: 1, max: 20_000 }), fc.integer({ min: -500_000, max: 500_000 })), {
    minLength: 2,
    maxLength: 40,
  })
  .map((steps) => {
    let elapsed_s = -86_400
    return steps.map(([step, millis]) => ({ elapsed_s: (elapsed_s += step), value: millis / 1000 }))
  })
const isTooNear = (value: number, expected: number) =>
  Math.abs(value - expected) <= 1e-9 * Math.max(1, Math.abs(expected))
const write = (value: number, mark: DecimalMark) => String(value).replace('.', mark)

describe('a log written and read again', () => {
  it('is the same in any unit, delimiter and decimal mark', () => {
    const timeUnits = fc.constantFrom(...times.map(({ id }) => id as ElapsedUnit))
    const lengthUnits = fc.constantFrom(...lengths.map(({ id }) => id))
    fc.assert(
      fc.property(series, layouts, timeUnits, lengthUnits, (readings, [delimiter, decimalMark], unit, length) => {
        const text = readings
          .map(({ elapsed_s, value }) =>
            [fromSI(elapsed_s, unit), value].map((n) => write(n, decimalMark)).join(delimiter),
          )
          .join('\n')
        const mapping = makeMapping({
          delimiter,
          decimalMark,
          time: { kind: 'elapsed', column: 0, unit, zero_s: 0 },
          value: { column: 1, quantity: 'level', unit: length },
        })
        const { rows } = taken(readLog(text, mapping, makeContext()))
        rows.forEach((row, i) => {
          expect(isTooNear(row.elapsed_s ?? NaN, readings[i]?.elapsed_s ?? NaN)).toBe(true)
          expect(row.value_m).toBe(toSI(readings[i]?.value ?? NaN, length))
        })
      }),
    )
  })

  it('is the same in any zone and date order, through changes of the clocks', () => {
    fc.assert(
      fc.property(series, fc.constantFrom(...zones), fc.constantFrom(...dateOrders), (readings, zone, dateOrder) => {
        const text = readings
          .map(({ elapsed_s, value }) => {
            const local = DateTime.fromMillis(START + 1000 * elapsed_s, { zone })
            return `${local.toFormat(`${formats[dateOrder]} HH:mm:ss`)};${value}`
          })
          .join('\n')
        const mapping = makeMapping({ time: { kind: 'clock', column: 0, dateColumn: null, dateOrder, zone } })
        const start = { instant: new Date(START).toISOString(), zone: 'UTC' }
        const { rows } = taken(readLog(text, mapping, makeContext(start)))
        rows.forEach((row, i) => {
          const off = (row.elapsed_s ?? NaN) - (readings[i]?.elapsed_s ?? NaN)
          // A reading in the repeated hour that nothing precedes may be an hour out, and says so.
          if (row.flags.includes('readings/ambiguous-hour')) expect([0, -1800, -3600]).toContain(off)
          else expect(off).toBe(0)
        })
      }),
    )
  })
})
