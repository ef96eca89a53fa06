import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isZone, localTime } from '#shared/readings/local-time.ts'

type Case = [zone: string, local: string, instants: number[]]
const { cases } = JSON.parse(readFileSync(new URL('../../reference/readings-zones.json', import.meta.url), 'utf8')) as {
  cases: Case[]
}
const zones = [...new Set(cases.map(([zone]) => zone))]
const localMs = (text: string) => Date.parse(`${text}:00Z`)

describe('localTime', () => {
  it.each(zones)('finds the instants of %s that Python finds, through its clock changes', (zone) => {
    const local = localTime(zone)
    const here = cases.filter(([name]) => name === zone)
    expect(here.map(([, text]) => [text, local.instantsOf(localMs(text))])).toEqual(
      here.map(([, text, instants]) => [text, instants]),
    )
  })

  it('has all three kinds of local time in that reference', () => {
    expect(new Set(cases.map(([, , instants]) => instants.length))).toEqual(new Set([0, 1, 2]))
  })

  it('gives back every instant from what clocks show then', () => {
    const instant = fc.integer({ min: Date.UTC(1980, 0), max: Date.UTC(2030, 0) })
    fc.assert(
      fc.property(fc.constantFrom(...zones.filter((zone) => zone !== 'Pacific/Apia')), instant, (zone, ms) => {
        const local = localTime(zone)
        expect(local.instantsOf(local.localOf(ms))).toContain(ms)
      }),
    )
  })

  it('refuses a zone that does not exist', () => {
    expect(isZone('Atlantic/Veldray')).toBe(false)
    expect(() => localTime('Atlantic/Veldray')).toThrow(RangeError)
  })
})
