import type { ErrorCatalogue } from './catalogue.ts'

export const regionErrors = {
  'region/extent': {
    status: 400,
    sentence: () => 'The west edge must lie west of the east edge, and the south edge south of the north edge.',
  },
  'region/system-fixed': {
    status: 409,
    sentence: () =>
      'The region has wells: their distances were computed in its coordinate system, so it stays as it is.',
  },
  'region/system-unknown': {
    status: 400,
    sentence: ({ epsg }) => `EPSG:${epsg} is not one of the offered projected systems.`,
  },
  'region/zone-unknown': {
    status: 400,
    sentence: ({ zone }) => `"${zone}" is not the name of a time zone, such as Europe/Berlin.`,
  },
} satisfies ErrorCatalogue
