import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { Problem } from '#shared/contracts/problem.ts'
import { enterTest, readAnalysis } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit, saveAnalysis } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let testId: number

beforeAll(async () => {
  await makeRegion(tested)
  analyst = await tested.signIn('analyst')
  testId = (await enterTest(analyst, { unitId: await makeUnit(tested) })).id
})

const match = { T: 0.006, S: 1.5e-4 }

describe('a curve laid by hand', () => {
  it('is kept with its match, calculated by the server, and says that it is by hand', async () => {
    const wellIds = await observed()
    const saved = await saveAnalysis(analyst, testId, 'theis', { wellIds, match })
    expect(saved.status).toBe(201)
    const kept = await readAnalysis(analyst, (saved.body as Analysis).id)
    expect(kept.options).toMatchObject({ match })
    expect([kept.result.T!.value, kept.result.S!.value]).toEqual([
      expect.closeTo(match.T, 12),
      expect.closeTo(match.S, 12),
    ])
    expect(kept.result.findings.map(({ code }) => code)).toContain('hand-curve')
    // The readings are exactly T 0.005: so far the hand is off, and the interval reaches there.
    expect(kept.result.T!.low).toBeLessThan(0.005)
  })

  it('is refused with other numbers than its match gives, and without a value that its method needs', async () => {
    const wellIds = await observed()
    const { sha256 } = (await analyst.get(`/api/pumping-tests/${testId}/inputs`)).body as { sha256: string }
    const post = (method: string, T: number) =>
      analyst.post(`/api/pumping-tests/${testId}/analyses`).send({
        method,
        options: { wellIds, window: null, match },
        label: null,
        expected: { methodVersion: 1, T, S: match.S },
        inputsSha256: sha256,
      })
    const codes = [await post('theis', 0.005), await post('leaky', match.T)].map(({ body }) => (body as Problem).code)
    expect(codes).toEqual(['analysis/result-differs', 'analysis/refused'])
  })
})

async function observed(): Promise<string[]> {
  const { inputs } = (await analyst.get(`/api/pumping-tests/${testId}/inputs`)).body as {
    inputs: { series: { wellId: string }[] }
  }
  return inputs.series.map(({ wellId }) => wellId)
}
