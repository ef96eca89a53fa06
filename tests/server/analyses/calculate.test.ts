import { afterAll, describe, expect, it } from 'vitest'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import type { AnalysisInputs, AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { calculate, checkRepeats } from '../../../server/api/analyses/calculate.ts'
import { unpackJson } from '../../../server/db/packed-json.ts'
import { createWorkers } from '../../../server/jobs/piscina-workers.ts'

const workers = createWorkers(1)
const small = createWorkers(1, 48)
afterAll(() => Promise.all([workers.close(), small.close()]))

const setting = { wellId: 1, year: '2019', intervalTopM: null, intervalBottomM: null, units: [{ unitId: 1, share: 1 }] }
const options: AnalysisOptions = { wellIds: ['2'], window: null }

/** T 0.005 m²/s, S 2e-4, 12 L/s at 30 m, a reading every so many seconds. */
function makeInputs(readings: number, step = 600): AnalysisInputs & { setting: typeof setting } {
  const elapsed_s = Array.from({ length: readings }, (_, i) => 60 + i * step)
  const drawdown = (t: number) => (0.012 / (4 * Math.PI * 0.005)) * exponentialIntegral((900 * 2e-4) / (0.02 * t))
  const radii = { wellRadius_m: 0.15, casingRadius_m: 0.125 }
  const distance = { distance_m: 30, distanceSd_m: 0.1 }
  const observed = { wellId: '2', label: 'Brønn 2', role: 'observation' as const, ...distance, ...radii }
  return {
    version: 1,
    rates: [{ start_s: 0, rate_m3_s: 0.012 }],
    rateError: 0.05,
    series: [{ ...observed, elapsed_s, drawdown_m: elapsed_s.map(drawdown), included: elapsed_s.map(() => true) }],
    aquifer: 'confined',
    thickness_m: 20,
    thicknessBasis: 'aquifer',
    thicknessError: 0.1,
    streamDistance_m: null,
    setting,
  }
}

describe('a calculation on a worker thread', () => {
  it('gives what the method gives, and packs its inputs with their setting into less than half of their length', async () => {
    const inputs = makeInputs(2_000)
    const { result, packedInputs } = await calculate(workers, inputs, { method: 'theis', options })
    expect(result).toEqual(analyse('theis', inputs, options))
    expect(await unpackJson(packedInputs)).toEqual(inputs)
    expect(packedInputs.length).toBeLessThan(JSON.stringify(inputs).length / 2)
  })

  it('refuses with the sentence of the method', async () => {
    const attempt = calculate(workers, makeInputs(2), { method: 'cooper-jacob', options })
    await expect(attempt).rejects.toMatchObject({ code: 'analysis/refused', status: 400 })
    await expect(attempt).rejects.toThrow(/reading/)
  })

  it('is stopped when it takes too long, and the next one goes on', async () => {
    const attempt = calculate(workers, makeInputs(200_000, 5), { method: 'theis', options }, 0.001)
    await expect(attempt).rejects.toMatchObject({ code: 'analysis/too-long', params: { seconds: 0.001 } })
    await expect(calculate(workers, makeInputs(100), { method: 'theis', options })).resolves.toBeDefined()
  })

  it('is stopped when it wants too much memory, and the server lives on', async () => {
    const attempt = calculate(small, makeInputs(600_000, 5), { method: 'theis', options })
    await expect(attempt).rejects.toMatchObject({ code: 'analysis/too-much-memory', status: 422 })
    await expect(calculate(workers, makeInputs(100), { method: 'theis', options })).resolves.toBeDefined()
  })
})

describe('a stored analysis', () => {
  it('repeats from its packed inputs alone, and is refused where another number was stored', async () => {
    const { result, packedInputs } = await calculate(workers, makeInputs(200), { method: 'theis', options })
    await expect(checkRepeats(workers, { method: 'theis', options, result }, packedInputs)).resolves.toBeUndefined()
    const changed = { ...result, T: { ...result.T!, value: result.T!.value * 1.001 } }
    const attempt = checkRepeats(workers, { method: 'theis', options, result: changed }, packedInputs)
    await expect(attempt).rejects.toMatchObject({ code: 'analysis/result-differs' })
  })
})
