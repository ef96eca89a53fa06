import { describe, expect, it } from 'vitest'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import { imageRows, type Boundary } from '#shared/hydraulics/boundaries/image-wells.ts'
import { rowPoints } from '#shared/hydraulics/boundaries/parallel-images.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'

const edge = (kind: Boundary['kind'], distance_m: number, bearing_deg: number): Boundary => ({
  kind,
  distance_m,
  bearing_deg,
})
const rounded = (boundaries: Boundary[]) =>
  imageRows(boundaries)
    .flatMap(({ east_m, north_m, sign, step }) =>
      (step ? [0, 1] : [0]).map((n) => [
        Math.round(east_m + n * (step?.east_m ?? 0)),
        Math.round(north_m + n * (step?.north_m ?? 0)),
        sign,
      ]),
    )
    .sort(([a = NaN, b = NaN], [c = NaN, d = NaN]) => Math.hypot(a, b) - Math.hypot(c, d))
const refusal = (boundaries: Boundary[]) => {
  try {
    imageRows(boundaries)
  } catch (error) {
    return (error as AnalysisError).code
  }
  return null
}

describe('Image wells (Ferris et al. 1962)', () => {
  it('of a stream is one injecting well as far behind it, of a barrier one pumping well', () => {
    expect(rounded([edge('recharge', 150, 90)])).toEqual([[300, 0, -1]])
    expect(rounded([edge('barrier', 80, 180)])).toEqual([[0, -160, 1]])
  })

  it('of two perpendicular edges are three, the one across the corner with both signs multiplied', () => {
    expect(rounded([edge('barrier', 100, 0), edge('recharge', 50, 90)])).toEqual([
      [100, 0, -1],
      [0, 200, 1],
      [100, 200, -1],
    ])
  })

  it('of barriers that meet at 60° are five', () => {
    // The normals of edges that meet at 60° stand 120° apart.
    expect(imageRows([edge('barrier', 40, 0), edge('barrier', 60, 120)])).toHaveLength(5)
  })

  it('between parallel edges repeat at every second width, with the signs of their mirrors', () => {
    const near = rounded([edge('barrier', 100, 0), edge('recharge', 200, 180)]).slice(0, 4)
    const northwards = near.map(([, north = NaN, sign]) => [north, sign]).sort(([one = 0], [other = 0]) => one - other)
    expect(northwards).toEqual([
      [-600, -1],
      [-400, -1],
      [200, 1],
      [600, -1],
    ])
  })

  it('between parallel edges add up as if each stood for itself, to nine digits', () => {
    // Mirrors at every second width, all pumping, and in turns pumping and injecting.
    for (const u of [3e-3, 1e-4, 3e-6, 1e-7]) {
      const response = (n: number) => exponentialIntegral(u * (n + 0.3) ** 2)
      const all = Array.from({ length: 8192 }, (_, n) => response(n)).reduce((sum, value) => sum + value, 0)
      const found = rowPoints().reduce((sum, { n, weight }) => sum + weight * response(n), 0)
      expect(Math.abs(found / all - 1)).toBeLessThan(1e-9)
    }
  })

  it('make no flow across a barrier and no drawdown on a stream, by symmetry', () => {
    // Any function of distance stands for the response of one well.
    const response = (east: number, north: number) => Math.exp(-Math.hypot(east, north) / 300)
    const boundaries = [edge('barrier', 100, 0), edge('recharge', 50, 90)]
    const wells = [{ east_m: 0, north_m: 0, sign: 1 }, ...imageRows(boundaries)]
    const s = (east: number, north: number) =>
      wells.reduce((sum, well) => sum + well.sign * response(east - well.east_m, north - well.north_m), 0)
    for (const along of [-300, 0, 40]) {
      expect(s(50, along)).toBeCloseTo(0, 12)
      expect((s(along, 100 + 0.1) - s(along, 100 - 0.1)) / 0.2).toBeCloseTo(0, 9)
    }
  })

  it('are refused where mirrors contradict each other, with the reason', () => {
    expect(refusal([edge('barrier', 40, 0), edge('recharge', 60, 120)])).toBe('analysis/boundaries-angle')
    expect(refusal([edge('barrier', 40, 0), edge('barrier', 60, 100)])).toBe('analysis/boundaries-angle')
    expect(refusal([edge('barrier', 40, 0), edge('barrier', 60, 0)])).toBe('analysis/boundaries-behind')
    expect(refusal([edge('barrier', 0, 0)])).toBe('analysis/boundary-place')
    expect(refusal([edge('barrier', 4, 0), edge('barrier', 4, 90), edge('barrier', 4, 180)])).toBe(
      'analysis/boundaries-too-many',
    )
  })
})
