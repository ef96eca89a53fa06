import type { RefusalReason } from '#shared/geodesy/crs.ts'
import type { PlaceErrorCode } from '#shared/geodesy/place.ts'
import type { Slip } from '#shared/geodesy/slip.ts'
import type { ErrorEntry, ErrorParams } from './errors/catalogue.ts'

const reasons: Record<RefusalReason | 'projected', string> = {
  grid: 'its datum shift needs a grid file, and without one no accuracy is published',
  operation: 'no shift from its datum to WGS 84 is published',
  projection: 'its projection cannot be calculated here to a centimetre',
  axes: 'its axes point in unusual directions',
  projected: 'it counts in degrees, and distances need a projected system in metres',
}

const reasonText = (reason: string | number | undefined) => reasons[reason as keyof typeof reasons] ?? String(reason)
const system = ({ epsg, name }: ErrorParams) => (name ? `${name} (EPSG:${epsg})` : `EPSG:${epsg}`)

/** Coordinate systems and typed places that cannot be used: what is wrong and what to do. */
export const geodesyErrors = {
  'crs/unknown': {
    status: 400,
    sentence: ({ epsg }) =>
      `EPSG:${epsg} is not among the offered coordinate systems. Check the code or choose another system.`,
  },
  'crs/refused': {
    status: 400,
    sentence: (params) =>
      `${system(params)} is not offered: ${reasonText(params.reason)}. Convert to another system first.`,
  },
  'crs/not-finite': {
    status: 400,
    sentence: (params) =>
      `These coordinates have no place in ${system(params)}. Check the numbers, their order and the system.`,
  },
  'crs/outside-area': {
    status: 400,
    sentence: (params) =>
      `These coordinates lie far outside the area of ${system(params)}${params.area ? `: ${params.area}` : ''}. Check their order and the system.`,
  },
  'place/two-numbers': {
    status: 400,
    sentence: ({ epsg }) => `After EPSG:${epsg} two numbers are needed: east, then north.`,
  },
  'place/letters': {
    status: 400,
    sentence: () => 'The compass letters contradict each other: one of N or S and one of E or W are needed.',
  },
  'place/minutes': {
    status: 400,
    sentence: () => 'Minutes and seconds must be below 60, and only the last number may have decimals.',
  },
  'place/sign-and-letter': {
    status: 400,
    sentence: () => 'A sign and a compass letter together are unclear. Leave out one of them.',
  },
  'place/range': {
    status: 400,
    sentence: () =>
      'A latitude is at most 90° and a longitude at most 180°. Typed numbers are read as latitude, longitude.',
  },
  'place/swapped': {
    status: 400,
    sentence: () =>
      'The first number is too large for a latitude. Typed numbers are read as latitude, longitude: swap them.',
  },
  'place/needs-system': {
    status: 400,
    sentence: ({ text }) => `Put the coordinate system before projected coordinates, for example 32727: ${text}`,
  },
} satisfies Record<PlaceErrorCode, ErrorEntry>

/** The question under a place far from the region. `meant` is the other place, as text. */
export function slipQuestion(code: Slip['code'], meant: string): string {
  const slip = code === 'place/swapped' ? 'Are latitude and longitude swapped' : 'Is a minus sign missing'
  return `This place is far from the region. ${slip}? Then it would be ${meant}.`
}
