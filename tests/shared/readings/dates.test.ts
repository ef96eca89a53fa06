import { describe, expect, it } from 'vitest'
import { isDateLike, parseDate, possibleOrders } from '#shared/readings/dates.ts'
import type { DateOrder } from '#shared/readings/model.ts'

const iso = (text: string, order: DateOrder) => {
  const ms = parseDate(text, order)
  return ms === null ? null : new Date(ms).toISOString().slice(0, 10)
}

describe('parseDate', () => {
  it.each([
    ['2021-03-04', 'ymd', '2021-03-04'],
    ['2021/3/4', 'dmy', null],
    ['04.03.2021', 'dmy', '2021-03-04'],
    ['04.03.2021', 'mdy', '2021-04-03'],
    ['4/3/21', 'dmy', '2021-03-04'],
    ['4/3/71', 'dmy', '1971-03-04'],
    ['21-03-04', 'ymd', '2021-03-04'],
    ['20210304', 'dmy', '2021-03-04'],
    ['4 Mar 2021', 'ymd', '2021-03-04'],
    ['04-mai-2021', 'mdy', '2021-05-04'],
    ['4. Dezember 2021', 'dmy', '2021-12-04'],
    ['Dec 4, 2021', 'dmy', '2021-12-04'],
    ['29.02.2020', 'dmy', '2020-02-29'],
    ['29.02.2021', 'dmy', null],
    ['31/04/2021', 'dmy', null],
    ['13/25/2021', 'mdy', null],
    ['2021-03/04', 'ymd', null],
    ['4 Foo 2021', 'dmy', null],
    ['202-03-04', 'ymd', null],
  ] as const)('reads %s in the order %s as %s', (text, order, expected) => {
    expect(iso(text, order)).toBe(expected)
  })

  it('does not take a decimal number for a date', () => {
    expect(isDateLike('12.5')).toBe(false)
    expect(isDateLike('1.234.567')).toBe(false)
  })
})

describe('possibleOrders', () => {
  it('tells the order from one day above twelve anywhere in the column', () => {
    expect(possibleOrders(['04/03/2021', '05/03/2021', '13/03/2021'])).toEqual(['dmy'])
    expect(possibleOrders(['03/04/2021', '03/13/2021'])).toEqual(['mdy'])
  })

  it('leaves both orders open when every day would do as a month', () => {
    expect(possibleOrders(['04/03/2021', '05/03/2021'])).toEqual(['dmy', 'mdy'])
    expect(possibleOrders(['04-03-05'])).toEqual(['ymd', 'dmy', 'mdy'])
  })

  it('counts orders that give the same days as one', () => {
    expect(possibleOrders(['05/05/2021', '05/05/2021'])).toHaveLength(1)
    expect(possibleOrders(['4 Mar 2021'])).toHaveLength(1)
    expect(possibleOrders(['2021-03-04'])).toEqual(['ymd'])
  })

  it('is not misled by a broken date among good ones', () => {
    expect(possibleOrders(['04/03/2021', '13/03/2021', 'end of log', '31/02/2021'])).toEqual(['dmy'])
  })

  it('finds none where there are no dates', () => {
    expect(possibleOrders(['10:00', '10:01'])).toEqual([])
    expect(possibleOrders([])).toEqual([])
  })
})
