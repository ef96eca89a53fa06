import { describe, expect, it } from 'vitest'
import { makeCoast } from '../../../server/db/seed/island/coast.ts'
import { signedArea, zeroRings } from '../../../server/db/seed/island/contour.ts'
import { fault, faultBlock } from '../../../server/db/seed/island/fault.ts'
import { toLocal, toLonLat } from '../../../server/db/seed/island/frame.ts'
import { distanceTo, footOn, lineLength, smoothLine } from '../../../server/db/seed/island/lines.ts'
import { fractalNoise } from '../../../server/db/seed/island/noise.ts'
import { settlements } from '../../../server/db/seed/island/settlements.ts'
import { inland } from '../../../server/db/seed/island/shape.ts'
import { brooks, river, streams } from '../../../server/db/seed/island/streams.ts'
import { elevation, riverBed } from '../../../server/db/seed/island/terrain.ts'
import { outlines, unitOf, units } from '../../../server/db/seed/island/units.ts'
import { makeWays } from '../../../server/db/seed/island/ways.ts'

describe('the frame', () => {
  it('goes to longitude and latitude and back within a millimetre', () => {
    const [x, y] = toLocal(toLonLat([12_345.678, -9_876.543]))
    expect(x).toBeCloseTo(12_345.678, 3)
    expect(y).toBeCloseTo(-9_876.543, 3)
  })

  it('has its centre at about 38.4° south, 21.2° west', () => {
    const [lon, lat] = toLonLat([0, 0])
    expect(Math.abs(lon + 21.2)).toBeLessThan(0.02)
    expect(Math.abs(lat + 38.4)).toBeLessThan(0.02)
  })
})

describe('contours', () => {
  it('give back the area of a circle, anticlockwise, within a thousandth', () => {
    const [ring, ...others] = zeroRings((x, y) => 9_000 - Math.hypot(x, y), 200)
    expect(others).toHaveLength(0)
    expect(signedArea(ring!) / (Math.PI * 9_000 ** 2)).toBeCloseTo(1, 3)
  })

  it('give holes the other way round', () => {
    const rings = zeroRings((x, y) => 3_000 - Math.abs(Math.hypot(x, y) - 9_000), 200)
    expect(rings.map((ring) => Math.sign(signedArea(ring)))).toEqual([1, -1])
  })
})

describe('lines', () => {
  it('find the foot of a point beside a bent line', () => {
    const foot = footOn(
      [
        [0, 0],
        [100, 0],
        [100, 100],
      ],
      [130, 40],
    )
    expect(foot).toMatchObject({ distance: 30, along: 140, point: [100, 40] })
    expect(foot.heading).toBeCloseTo(Math.PI / 2, 12)
  })

  it('pass through the points that they smooth', () => {
    const through = [
      [0, 0],
      [500, 300],
      [900, -200],
    ] as const
    for (const [x, y] of through) expect(distanceTo(smoothLine(through), x, y)).toBeLessThan(1e-9)
  })
})

describe('noise', () => {
  it('is the same for the same seed and another for another', () => {
    const at = (seed: number) => fractalNoise(seed, 'check', 1_000, 4)(1_234, -567)
    expect(at(1)).toBe(at(1))
    expect(at(1)).not.toBe(at(2))
  })

  it('is continuous across its lattice', () => {
    const noise = fractalNoise(1, 'check', 1_000, 4)
    expect(Math.abs(noise(2_000 - 1e-6, 300) - noise(2_000 + 1e-6, 300))).toBeLessThan(1e-6)
  })
})

describe('the island', () => {
  const coast = makeCoast()

  it('is one piece of land of some 44 by 30 km', () => {
    expect(coast).toHaveLength(1)
    const xs = coast[0]!.map(([x]) => x)
    const ys = coast[0]!.map(([, y]) => y)
    const width = (Math.max(...xs) - Math.min(...xs)) / 1000
    const height = (Math.max(...ys) - Math.min(...ys)) / 1000
    expect(width).toBeGreaterThan(40)
    expect(width).toBeLessThan(48)
    expect(height).toBeGreaterThan(26)
    expect(height).toBeLessThan(34)
  })

  it('rises from the sea to hills and never sinks below it', () => {
    let highest = 0
    for (let x = -24_000; x <= 24_000; x += 500) {
      for (let y = -17_000; y <= 17_000; y += 500) {
        const height = elevation(x, y)
        expect(height > 0).toBe(inland(x, y) > 0)
        highest = Math.max(highest, height)
      }
    }
    expect(highest).toBeGreaterThan(250)
    expect(highest).toBeLessThan(500)
  })

  it('has the Tarrow and at least eight brooks that join it', () => {
    expect(river.name).toBe('Tarrow')
    expect(brooks.filter(({ joinsAt }) => joinsAt !== null).length).toBeGreaterThanOrEqual(8)
    expect(streams.length).toBeGreaterThanOrEqual(9)
    expect(new Set(streams.map(({ code }) => code)).size).toBe(streams.length)
  })

  it('lets every stream end on the river or at the coast, and run over land', () => {
    for (const { line, joinsAt } of streams) {
      const mouth = line[line.length - 1]!
      const gap = joinsAt === null ? Math.abs(inland(...mouth)) : distanceTo(river.line, ...mouth)
      expect(gap).toBeLessThan(1)
      expect(line.slice(0, -1).every((point) => inland(...point) > 0)).toBe(true)
      expect(lineLength(line)).toBeGreaterThan(4_000)
    }
  })

  it('lets the river only fall', () => {
    for (let along = 500; along <= river.length; along += 500) {
      expect(riverBed(along)).toBeLessThanOrEqual(riverBed(along - 500))
    }
  })

  it('has eight to ten settlements on dry land, joined by roads', () => {
    expect(settlements.length).toBeGreaterThanOrEqual(8)
    const roads = makeWays().filter(({ kind }) => kind === 'road')
    for (const { at } of settlements) {
      expect(inland(...at)).toBeGreaterThan(300)
      expect(Math.min(...roads.map(({ line }) => distanceTo(line, ...at)))).toBeLessThan(1)
    }
  })
})

describe('the units', () => {
  it('lie on the island with one outline each', () => {
    for (const unit of units) {
      const rings = outlines(unit.extent)
      expect([unit.code, rings.length]).toEqual([unit.code, 1])
      for (const point of rings[0]!) expect(inland(...point)).toBeGreaterThan(-60)
    }
  })

  it('keep the gravels along the Tarrow', () => {
    const [ring] = outlines(unitOf('TG').extent)
    expect(Math.max(...ring!.map((point) => distanceTo(river.line, ...point)))).toBeLessThan(4_500)
    const middle = river.line[Math.floor(river.line.length / 2)]!
    expect(unitOf('TG').extent(...middle)).toBeGreaterThan(0)
  })

  it('keep the limestone under the clay', () => {
    for (const point of outlines(unitOf('FL').extent)[0]!) {
      expect(unitOf('PC').extent(...point)).toBeGreaterThan(-150)
    }
  })

  it('are cut right through by the fault, with a block on either side', () => {
    for (const code of fault.units) {
      const ends = [fault.line[0]!, fault.line[fault.line.length - 1]!]
      for (const end of ends) expect(unitOf(code).extent(...end)).toBeLessThan(0)
      expect(fault.line.some((point) => unitOf(code).extent(...point) > 1_000)).toBe(true)
    }
    expect([faultBlock(-5_000, 0), faultBlock(15_000, 0)]).toEqual(['west', 'east'])
  })
})
