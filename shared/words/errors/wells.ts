import type { ErrorCatalogue } from './catalogue.ts'

export const wellErrors = {
  'well/code-taken': {
    status: 400,
    sentence: ({ code }) => `There is a well ${code} already. Capital letters make no difference.`,
  },
  'well/screen-order': { status: 400, sentence: () => 'The bottom of a screen must be deeper than its top.' },
  'well/screen-too-deep': {
    status: 400,
    sentence: ({ bottom, depth }) => `The screen ends at ${bottom} m, but the well is ${depth} m deep.`,
  },
  'well/pick-order': { status: 400, sentence: () => 'The bottom of a unit must be deeper than its top.' },
  'well/pick-twice': { status: 400, sentence: () => 'A unit is entered once for each well.' },
  'well/at-zero': {
    status: 400,
    sentence: () =>
      'Latitude 0, longitude 0 lies in the Gulf of Guinea: it usually means that coordinates are missing. Enter them.',
  },
  'well/outside-region': {
    status: 400,
    sentence: ({ distanceKm }) =>
      `This position is ${distanceKm} km outside the region. Correct the coordinates or the system, or confirm that it is meant.`,
  },
  'well/swapped': {
    status: 400,
    sentence: ({ lat, lon }) =>
      `This position is far away. Exchanged, latitude ${lat}, longitude ${lon} would lie in the region: were they swapped?`,
  },
  'well/sign': {
    status: 400,
    sentence: ({ lat, lon }) =>
      `This position is far away. Latitude ${lat}, longitude ${lon} would lie in the region: is a minus sign missing?`,
  },
  'well/not-editable': {
    status: 403,
    sentence: () => 'Only the person who entered this well, or a steward, can change it.',
  },
  'well/unknown-unit': { status: 400, sentence: () => 'This aquifer unit does not exist.' },
} satisfies ErrorCatalogue
