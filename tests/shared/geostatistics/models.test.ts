import { describe, expect, it } from 'vitest'
import { VARIOGRAM_MODEL_IDS, variogramModel } from '#shared/geostatistics/catalogue.ts'
import { checkVariogram, semivariance, type Variogram } from '#shared/geostatistics/variogram.ts'

describe.each(VARIOGRAM_MODEL_IDS)('variogram family %s', (model) => {
  const v: Variogram = { model, nugget: 0.1, sill: 0.4, range: 1000 }

  it('is registered under its own id', () => {
    expect(variogramModel(model).id).toBe(model)
  })

  it('starts at zero, jumps to the nugget and goes to the sill', () => {
    expect(semivariance(v, 0)).toBe(0)
    expect(semivariance(v, 1e-9)).toBeCloseTo(0.1, 9)
    expect(semivariance(v, 1e6)).toBeCloseTo(0.5, 12)
  })

  it('has reached 95 % of its structure at the practical range', () => {
    expect((semivariance(v, 1000) - 0.1) / 0.4).toBeGreaterThan(0.95)
  })

  it('rises with distance', () => {
    const steps = Array.from({ length: 40 }, (_, i) => semivariance(v, i * 40))
    for (let i = 1; i < steps.length; i++) expect(steps[i]).toBeGreaterThanOrEqual(steps[i - 1]!)
  })
})

describe('variogram models beside their printed forms', () => {
  it('spherical is 1.5 h/a − 0.5 (h/a)³ of the sill (Journel & Huijbregts 1978)', () => {
    const v: Variogram = { model: 'spherical', nugget: 0, sill: 2, range: 100 }
    expect(semivariance(v, 50)).toBeCloseTo(2 * (0.75 - 0.0625), 14)
  })

  it('exponential is 1 − exp(−h/a) with practical range 3a (Journel & Huijbregts 1978)', () => {
    const v: Variogram = { model: 'exponential', nugget: 0, sill: 2, range: 300 }
    expect(semivariance(v, 100)).toBeCloseTo(2 * (1 - Math.exp(-1)), 14)
  })

  it.each([{ nugget: -0.1 }, { sill: NaN }, { range: 0 }, { model: 'cubic' as 'spherical' }])('refuses %o', (wrong) => {
    expect(() => checkVariogram({ model: 'spherical', nugget: 0, sill: 1, range: 1, ...wrong })).toThrow(
      'not a variogram',
    )
  })
})
