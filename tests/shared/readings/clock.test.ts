import { describe, expect, it } from 'vitest'
import { parseTimeOfDay, splitDateTime } from '#shared/readings/clock.ts'
import { parseSpan, readElapsed } from '#shared/readings/spans.ts'

const hours = 3_600_000

describe('parseTimeOfDay', () => {
  it.each([
    ['0:00', 0],
    ['7:05', 7 * hours + 300_000],
    ['07:05:30,5', 7 * hours + 330_500],
    ['23:59:59.999', 24 * hours - 1],
    ['24:00', 24 * hours],
    ['12:00 AM', 0],
    ['12:30 pm', 12.5 * hours],
    ['1:05:00 p.m.', 13 * hours + 300_000],
  ])('reads %s', (text, ms) => expect(parseTimeOfDay(text)).toEqual({ ms, offset: null }))

  it.each([
    ['10:00Z', 0],
    ['10:00:00+02:00', 120],
    ['10:00 -0330', -210],
  ])('keeps the offset of %s', (text, offset) => {
    expect(parseTimeOfDay(text)).toEqual({ ms: 10 * hours, offset })
  })

  it.each(['25:00', '10:60', '10:00:60', '13:00 pm', '0:30 am', '24:01', '10', 'noon', ''])('refuses %j', (text) => {
    expect(parseTimeOfDay(text)).toBeNull()
  })
})

describe('splitDateTime', () => {
  it.each([
    ['2021-03-04 10:00', '2021-03-04', '10:00'],
    ['2021-03-04T10:00:00Z', '2021-03-04', '10:00:00Z'],
    ['3/4/2021, 1:05 PM', '3/4/2021', '1:05 PM'],
    ['2021-03-04', '2021-03-04', null],
    ['10:00', null, '10:00'],
  ])('parts %s', (text, date, time) => expect(splitDateTime(text)).toEqual({ date, time }))
})

describe('elapsed times', () => {
  it.each([
    ['26:15:00', 'h:m:s', 94_500],
    ['1.02:03:04', 'h:m:s', 93_784],
    ['1 02:03:04', 'h:m:s', 93_784],
    ['-0:05:00', 'h:m:s', -300],
    ['2:30', 'h:m:s', 9000],
    ['2:30', 'm:s', 150],
    ['75:30,5', 'm:s', 4530.5],
  ] as const)('reads the span %s as %s', (text, unit, seconds) => expect(parseSpan(text, unit)).toBe(seconds))

  it.each(['1:60', '1:00:60', '90', '1:2:3:4', ''])('takes %j for no span', (text) => {
    expect(parseSpan(text, 'h:m:s')).toBeNull()
  })

  it.each([
    ['90', 's', 90],
    ['1,5', 'min', 90],
    ['0,5', 'h', 1800],
    ['2', 'd', 172_800],
  ] as const)('reads %s %s in seconds', (text, unit, seconds) => {
    expect(readElapsed(text, unit, ',')).toEqual({ value: seconds, otherMark: false })
  })
})
