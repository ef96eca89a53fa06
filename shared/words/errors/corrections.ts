import type { ErrorCatalogue } from './catalogue.ts'

export const correctionErrors = {
  'correction/unit': { status: 400, sentence: () => 'This unit does not measure such a series. Choose another.' },
  'correction/lags': {
    status: 400,
    sentence: () => 'More than 400 lags would be tried. Shorten the longest lag, or widen the step.',
  },
  'correction/wrong-kind': {
    status: 400,
    sentence: () =>
      'Only pumping tests at a constant rate or in steps are corrected; other wells are superposed in tests at a constant rate.',
  },
  'correction/refused': { status: 400, sentence: ({ well, reason }) => `${well}: ${reason}` },
  'correction/twice': {
    status: 409,
    sentence: ({ well, correction }) =>
      `${well} is corrected for ${correction} already. Change that correction, or switch it off first.`,
  },
  'correction/unknown-well': {
    status: 400,
    sentence: () => 'A chosen well is not part of this test. Choose the wells again.',
  },
  'correction/unknown-series': {
    status: 400,
    sentence: () => 'This series is not there any more, or measures something else. Choose another.',
  },
  'correction/series-in-use': {
    status: 409,
    sentence: () => 'A correction follows this series. Remove the correction first, or replace the series.',
  },
  'correction/other-quantity': {
    status: 400,
    sentence: () => 'A series is replaced by one that measures the same. Upload this one beside it.',
  },
  'correction/single-value': {
    status: 400,
    sentence: ({ found }) =>
      `The file gives ${found} usable values; a series needs at least two. Check the columns and the first row.`,
  },
  'correction/constant': {
    status: 400,
    sentence: ({ found }) =>
      `All ${found} values are the same, so the series corrects nothing. Check which column was chosen.`,
  },
  'correction/no-overlap': {
    status: 400,
    sentence: ({ from, to, first, last }) =>
      `The series runs from ${from} to ${to} after pump on, the readings from ${first} to ${last}: they share no time. Check dates, zone, and the zero of elapsed times.`,
  },
  'correction/far-times': {
    status: 400,
    sentence: ({ from, to }) =>
      `The series runs from ${from} to ${to} after pump on, which is decades away. Check the column of times, their unit, and lines with a mistyped time.`,
  },
  'correction/pressure-swing': {
    status: 400,
    sentence: ({ swing, unit }) =>
      `Air pressure does not change by ${swing}. Check the column, and whether ${unit} is its unit.`,
  },
  'correction/pressure-high': {
    status: 400,
    sentence: ({ highest, unit }) =>
      `${highest} is more than air weighs. Check whether ${unit} is the unit, and that this is no logger under water.`,
  },
  'correction/stage-swing': {
    status: 400,
    sentence: ({ swing, unit }) =>
      `A stage does not change by ${swing}. Check the column, and whether ${unit} is its unit.`,
  },
  'correction/other-well-name': { status: 400, sentence: () => 'Give the well a name.' },
  'correction/other-well-twice': {
    status: 409,
    sentence: ({ label }) => `${label} is among the other wells already. Add its rates there, or choose another name.`,
  },
  'correction/other-wells-many': {
    status: 409,
    sentence: ({ most }) =>
      `A test takes up to ${most} other wells. Remove those that are far away, or enter a well field as one well.`,
  },
  'correction/other-well-private': {
    status: 400,
    sentence: () =>
      'This well is private and the test is not. Type its place and another name, or ask a steward to show it.',
  },
  'correction/other-well-in-test': {
    status: 400,
    sentence: ({ label }) => `${label} stands on a well of this test. Its rates belong to the test itself.`,
  },
} satisfies ErrorCatalogue
