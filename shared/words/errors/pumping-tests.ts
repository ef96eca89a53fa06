import type { ErrorCatalogue } from './catalogue.ts'

export const pumpingTestErrors = {
  'pumping-test/unknown-zone': {
    status: 400,
    sentence: () => 'This time zone is not known. Use a name such as Etc/GMT+1 or Europe/Lisbon.',
  },
  'pumping-test/negative-rate': {
    status: 400,
    sentence: () => 'A pumping rate cannot be negative. Enter 0 where pumping stopped.',
  },
  'pumping-test/zero-distance': {
    status: 400,
    sentence: () => 'The distance from the pumped well must be greater than zero.',
  },
  'pumping-test/distance-needed': {
    status: 400,
    sentence: () => 'Enter the measured distance, or take it from the map.',
  },
  'pumping-test/reason-needed': { status: 400, sentence: () => 'Say why this distance replaces the other one.' },
  'pumping-test/start-format': {
    status: 400,
    sentence: () => 'Enter the start as date and time (2019-03-14 09:30), as a date, or as a year.',
  },
  'pumping-test/start-in-gap': {
    status: 400,
    sentence: ({ time, zone }) => `${time} did not exist in ${zone}: the clocks were put forward over it.`,
  },
  'pumping-test/start-too-early': {
    status: 400,
    sentence: ({ year }) => `The test cannot have started before ${year}. Check the year.`,
  },
  'pumping-test/start-read': {
    status: 400,
    sentence: () =>
      'Readings with clock times were read from the start as it is. Delete those logs, change the start, and upload them again.',
  },
  'pumping-test/start-series': {
    status: 400,
    sentence: () =>
      'A series of air pressure, stage or tides has clock times, which were read from the start as it is. Remove its corrections and the series, change the start, and upload it again.',
  },
  'pumping-test/well-has-readings': {
    status: 400,
    sentence: () => 'A well with readings cannot leave the test. Delete its readings first.',
  },
  'pumping-test/start-in-future': { status: 400, sentence: () => 'The test cannot start in the future.' },
  'pumping-test/shares': { status: 400, sentence: () => 'The shares of the aquifer units must add up to 1.' },
  'pumping-test/steps-order': { status: 400, sentence: () => 'Each step must start later than the one before.' },
  'pumping-test/no-pumping': { status: 400, sentence: () => 'No step has a rate above zero.' },
  'pumping-test/slug-rates': { status: 400, sentence: () => 'A slug test has no pumping rate.' },
  'pumping-test/single-rate': {
    status: 400,
    sentence: () => 'A specific capacity belongs to one rate, and to the time at which the drawdown was read.',
  },
  'pumping-test/only-one-well': {
    status: 400,
    sentence: () => 'A test of this kind is made in one well; it has no observation wells.',
  },
  'pumping-test/single-unit': {
    status: 400,
    sentence: () => 'A slug test belongs to one aquifer unit. Choose the one that the screen is open to.',
  },
  'pumping-test/zero-displacement': {
    status: 400,
    sentence: () => 'The first displacement cannot be zero. Leave it empty to take the largest of the log.',
  },
  'pumping-test/kind-stays': {
    status: 400,
    sentence: () => 'The kind of a test stays. Enter a new test of the other kind.',
  },
  'pumping-test/same-well': {
    status: 400,
    sentence: ({ code }) => `Well ${code} is in this test already. A test has each well once.`,
  },
  'pumping-test/unknown-well': { status: 400, sentence: () => 'This well does not exist, or you may not see it.' },
  'pumping-test/unknown-unit': { status: 400, sentence: () => 'This aquifer unit does not exist.' },
  'pumping-test/same-place': {
    status: 400,
    sentence: ({ code }) =>
      `Well ${code} has the same position on the map as the pumped well. Enter the measured distance.`,
  },
  'pumping-test/no-screens': {
    status: 400,
    sentence: ({ code }) =>
      `Well ${code} has no screens recorded for that date. Enter the tested interval, or choose "unknown".`,
  },
  'pumping-test/interval-needed': { status: 400, sentence: () => 'Enter top and bottom of the tested interval.' },
  'pumping-test/interval-order': {
    status: 400,
    sentence: () => 'The bottom of the interval must be deeper than its top.',
  },
  'pumping-test/interval-too-deep': {
    status: 400,
    sentence: ({ bottom, depth }) => `The interval ends at ${bottom} m, but the well is ${depth} m deep.`,
  },
  'pumping-test/not-editable': {
    status: 403,
    sentence: () => 'Only the person who entered this test, or a steward, can change it.',
  },
  'pumping-test/more-visible-than-well': {
    status: 400,
    sentence: () => 'A test cannot be more visible than its well. Publish the well first.',
  },
  'pumping-test/in-use': {
    status: 409,
    sentence: () =>
      'Readings behind a submitted or adopted value cannot be deleted. Take the analysis back or withdraw the value first.',
  },
} satisfies ErrorCatalogue
