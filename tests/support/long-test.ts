import type { Page } from '@playwright/test'
import { makeMapping, makeTestInput } from './domain.ts'

/** A log of drawdown at even steps of a day's pumping: a straight line on semi-logarithmic paper, with noise of 2 mm. */
export function longLog(readings: number): string {
  const step = 1440 / readings
  const drawdown = (minutes: number, i: number) =>
    0.2 * Math.log10(1 + 30 * minutes) + 0.002 * Math.sin(i * 12.9898) * Math.cos(i * 7.233)
  const rows = Array.from({ length: readings }, (_, i) => {
    const minutes = step * (i + 1)
    return `${minutes.toFixed(5)},${drawdown(minutes, i).toFixed(5)}`
  })
  return ['time (min),drawdown (m)', ...rows].join('\n')
}

/** Enters a test with a long log in the wells of a test of the demo region, as the person who is signed in. */
export async function longTest(page: Page, readings: number): Promise<number> {
  const input = makeTestInput({ wellId: 0, units: [] })
  return page.evaluate(
    async ({ given, log, mapping }) => {
      const get = async (path: string) => (await fetch(path)).json() as Promise<Record<string, unknown>>
      const { csrfToken } = (await get('/api/session')) as { csrfToken: string }
      const post = async (path: string, body: BodyInit, type: Record<string, string>) => {
        const key = { 'X-CSRF-Token': csrfToken, 'Idempotency-Key': crypto.randomUUID() }
        const answer = await fetch(path, { method: 'POST', body, headers: { ...key, ...type } })
        if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`)
        return (await answer.json()) as Record<string, unknown>
      }
      const { items } = (await get('/api/pumping-tests?kind=constant-rate&limit=50&sort=start')) as {
        items: { id: number; wellCount: number }[]
      }
      const model = (await get(`/api/pumping-tests/${items.find(({ wellCount }) => wellCount >= 2)?.id}`)) as {
        wellId: number
        wells: { wellId: number; role: string }[]
        units: { unitId: number }[]
      }
      const observed = model.wells.find(({ role }) => role === 'observation')?.wellId
      const test = {
        ...given,
        wellId: model.wellId,
        units: [{ unitId: model.units[0]?.unitId, share: 1, basis: 'single-unit' }],
        observationWells: [
          { wellId: observed, distanceBasis: 'measured', distanceM: 90, reason: null, staticLevelM: null },
        ],
      }
      const json = { 'Content-Type': 'application/json' }
      const { id } = (await post('/api/pumping-tests', JSON.stringify(test), json)) as { id: number }
      const { wells } = (await get(`/api/pumping-tests/${id}`)) as { wells: { id: number; role: string }[] }
      const testWellId = wells.find(({ role }) => role === 'observation')?.id
      const form = new FormData()
      form.append('request', JSON.stringify({ testWellId, mapping }))
      form.append('file', new Blob([log]), 'log.csv')
      await post(`/api/pumping-tests/${id}/reading-series`, form, {})
      return id
    },
    { given: input, log: longLog(readings), mapping: makeMapping() },
  )
}
