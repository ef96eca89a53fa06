import { describe, expect, it } from 'vitest'
import { inspectLog } from '#shared/readings/inspect.ts'
import type { LogInspection } from '#shared/readings/model.ts'
import { formOf, mappingOf } from '../../../../src/components/pumping-tests/log-draft.ts'

function inspected(text: string): LogInspection {
  const found = inspectLog(text)
  if (!found.ok) throw new Error(found.code)
  return found
}

const plain = inspected('time (min);drawdown (m)\n0,5;0,11\n1,5;0,22\n2,5;0,33')
const dated = inspected('date,time,level\n03/04/2019,10:00,12.1\n05/06/2019,10:05,12.2\n07/08/2019,10:10,12.3')

describe('How a log is to be read', () => {
  it('is complete where the log says everything', () => {
    expect(mappingOf(formOf(plain), plain.dateOrders)).toEqual(plain.draft)
  })

  it('waits for each answer that the log does not give', () => {
    const form = formOf(dated)
    expect(form).toMatchObject({ timeKind: 'clock', dateOrder: null, valueUnit: null })
    expect(mappingOf({ ...form, valueUnit: 'm' }, dated.dateOrders)).toBeNull()
    expect(mappingOf({ ...form, dateOrder: 'dmy' }, dated.dateOrders)).toBeNull()
    expect(mappingOf({ ...form, valueUnit: 'm', dateOrder: 'dmy' }, dated.dateOrders)).toMatchObject({
      time: { kind: 'clock', dateOrder: 'dmy' },
      value: { unit: 'm', quantity: 'level' },
    })
  })

  it('is not complete with a first row before the file', () => {
    expect(mappingOf({ ...formOf(plain), firstDataRow: 0 }, [])).toBeNull()
    expect(mappingOf({ ...formOf(plain), firstDataRow: null }, [])).toBeNull()
  })
})
