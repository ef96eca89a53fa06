import { describe, expect, it } from 'vitest'
import { formatLonLat, formatPlanar } from '#shared/geodesy/format-position.ts'
import { geodesicDistance } from '#shared/geodesy/geodesic.ts'
import { parsePlace } from '#shared/geodesy/place.ts'
import { likelySlip } from '#shared/geodesy/slip.ts'
import { fromWgs84 } from '#shared/geodesy/transform.ts'
import type { Box } from '#shared/geodesy/types.ts'
import { geodesyErrors, slipQuestion } from '#shared/words/geodesy.ts'

/** Home extent of the Isle of Veldray. */
const region: Box = [-21.5, -38.6, -20.9, -38.2]

function found(text: string) {
  const result = parsePlace(text, { region })
  if (result.kind !== 'place') throw new Error(`${text}: ${JSON.stringify(result)}`)
  return result
}

describe('typed degrees', () => {
  it.each([
    '-38.4172, -21.1840',
    '-38.4172 -21.1840',
    '-38.4172,-21.1840',
    '-38,4172; -21,1840',
    '-38,4172 -21,1840',
    '-38,4172, -21,1840',
    '38.4172° S, 21.1840° W',
    '38.4172S 21.1840W',
    'S38.4172 W21.1840',
    '21.184 W, 38.4172 S',
    '−38.4172°, −21.1840°',
    '  -38.4172 ,  338.816 ',
  ])('are latitude, longitude: %s', (text) => {
    expect(geodesicDistance(found(text), { lat: -38.4172, lon: -21.184 })).toBeLessThan(1e-3)
  })

  it.each([
    '38°25\'02" S 21°11\'02.4" W',
    '38° 25′ 02″ S, 21° 11′ 02.4″ W',
    'S 38 25 02, W 21 11 02.4',
    "38 25 02 S; 21°11.04'W",
    '-38 25 02, -21 11 2.4',
    "38°25'02''s 21°11'02,4''w",
  ])('may be degrees, minutes, seconds: %s', (text) => {
    const place = { lat: -(38 + 25 / 60 + 2 / 3600), lon: -(21 + 11 / 60 + 2.4 / 3600) }
    expect(geodesicDistance(found(text), place)).toBeLessThan(1e-3)
  })

  it('keep every digit and say that they are on WGS 84', () => {
    const { source, lat, slip } = found('-38.41720001, -21.184')
    expect(lat).toBe(-38.41720001)
    expect(source).toMatchObject({ epsg: 4326, x: -21.184, y: -38.41720001, accuracy_m: 0 })
    expect(slip).toBeNull()
  })

  it('as the program writes them are read back', () => {
    const place = { lat: -38.4172, lon: -21.184 }
    expect(found(formatLonLat(place))).toMatchObject(place)
  })
})

describe('typed projected coordinates', () => {
  it.each([
    '32727: 482540 5748670',
    'EPSG:32727 482540 5748670',
    'epsg 32727: 482540, 5748670',
    'EPSG:32727: 482540.0;5748670.0',
    '32727: 482540,00 5748670,00',
    '32727: 482 540 E, 5 748 670 N',
    '32727: 5748670 N 482540 E',
    '32727: N5748670 E482540',
  ])('are east, north in the system named before them: %s', (text) => {
    const { lon, lat, source } = found(text)
    const { x, y } = fromWgs84(32727, lon, lat)
    expect(Math.hypot(x - 482_540, y - 5_748_670)).toBeLessThan(1e-3)
    expect(source).toMatchObject({ epsg: 32727, x: 482_540, y: 5_748_670 })
  })

  it('as the program writes them are read back', () => {
    expect(found(`32727: ${formatPlanar({ x: 483_940, y: 5_747_880 })}`).source).toMatchObject({
      x: 483_940,
      y: 5_747_880,
    })
  })
})

describe('what is no place', () => {
  it.each([
    '',
    '   ',
    '101',
    '4 12',
    'TG-101',
    'Well 4, 12',
    'Tarrow, 3',
    '1203: north',
    '1203:45',
    '7, rue',
    '2024-05-01',
    ',',
  ])('is left to the search for names: %s', (text) => expect(parsePlace(text)).toEqual({ kind: 'none' }))

  it.each([
    ['482540 5748670', 'place/needs-system'],
    ['482540, 5748670', 'place/needs-system'],
    ['120, 45', 'place/swapped'],
    ['91, 200', 'place/range'],
    ['38 61, 21', 'place/minutes'],
    ['38.5 10, 21.1', 'place/minutes'],
    ['-38.4 S, 21.2 W', 'place/sign-and-letter'],
    ['38.4 N, 21.2 S', 'place/letters'],
    ['38.4 S, 21.2', 'place/letters'],
    ['EPSG:32727 482540', 'place/two-numbers'],
    ['EPSG:32727', 'place/two-numbers'],
    ['EPSG:32727 482540 abc', 'place/two-numbers'],
    ['32727: 482540 N 5748670 S', 'place/letters'],
    ['99999: 482540 5748670', 'crs/unknown'],
    ['4490: 100.5 30.5', 'crs/refused'],
    ['27700: 1 99000000', 'crs/outside-area'],
  ])('gets a sentence: %s', (text, code) => {
    const result = parsePlace(text)
    expect(result).toMatchObject({ kind: 'error', code })
    if (result.kind !== 'error') return
    const sentence = geodesyErrors[result.code].sentence(result.params)
    expect(sentence).toMatch(/^[A-Z(].*$/)
    expect(sentence).not.toMatch(/undefined|NaN|\[object/)
  })

  it('is never the place of HTML or a long text', () => {
    expect(parsePlace('<b>1.5, 2.5</b>')).toEqual({ kind: 'none' })
    expect(parsePlace(`${'1 '.repeat(20_000)}, 2.5`).kind).toBe('none')
  })
})

describe('a likely slip', () => {
  it('is latitude and longitude the other way round', () => {
    expect(found('-21.2, -38.4').slip).toEqual({ code: 'place/swapped', lon: -21.2, lat: -38.4 })
  })

  it('is a forgotten minus sign', () => {
    expect(found('38.4, -21.2').slip).toEqual({ code: 'place/sign', lon: -21.2, lat: -38.4 })
    expect(found('38.4, 21.2').slip).toEqual({ code: 'place/sign', lon: -21.2, lat: -38.4 })
  })

  it('is not sought inside or near the region, nor where nothing explains the distance', () => {
    expect(likelySlip({ lon: -21.2, lat: -38.4 }, region)).toBeNull()
    expect(likelySlip({ lon: -21.9, lat: -38.7 }, region)).toBeNull()
    expect(likelySlip({ lon: 7, lat: 51 }, region)).toBeNull()
  })

  it('is asked about in a sentence', () => {
    expect(slipQuestion('place/swapped', '38.4000° S, 21.2000° W')).toBe(
      'This place is far from the region. Are latitude and longitude swapped? Then it would be 38.4000° S, 21.2000° W.',
    )
  })
})
