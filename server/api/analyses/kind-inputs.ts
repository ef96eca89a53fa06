import { testDetails, type TestDetails } from '#shared/contracts/test-details.ts'
import type { OwnKindId, KindShapes } from '#shared/hydraulics/kinds.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { buildInputs, type BuiltInputs, type InputParts } from './build-inputs.ts'
import { buildSlugInputs } from './slug-inputs.ts'

type Built<Id extends OwnKindId> = Omit<BuiltInputs, 'inputs'> & { kind: Id; inputs: KindShapes[Id]['inputs'] }
export type BuiltKind = { [Id in OwnKindId]: Built<Id> }[OwnKindId]
type DetailsOf<Id extends OwnKindId> = Extract<TestDetails, { kind: Id }>

/** Details of a test of a kind of its own; null for every other test. */
export const detailsOf = ({ details }: InputParts['test']): TestDetails | null =>
  details === null ? null : testDetails.parse(details)

/** The pumped well's readings with the rates; without a log there is nothing to read from, and the method says so. */
function buildStep(parts: InputParts): Built<'step'> {
  const { inputs, readings, problems } = buildInputs(parts)
  const { rates, rateError, series } = inputs
  const { row, code, wellRadiusM, casingRadiusM } = pumpedOf(parts)
  const none = {
    wellId: String(row.wellId),
    label: code,
    role: 'pumped' as const,
    distance_m: 0,
    distanceSd_m: 0,
    wellRadius_m: wellRadiusM,
    casingRadius_m: casingRadiusM,
    elapsed_s: [],
    drawdown_m: [],
    included: [],
  }
  const well = series.find(({ role }) => role === 'pumped') ?? none
  return { kind: 'step', inputs: { version: 1, rates, rateError, well }, readings, problems }
}

function buildSpecificCapacity(parts: InputParts, details: DetailsOf<'specific-capacity'>): Built<'specific-capacity'> {
  const { test, steps } = parts
  const { row, code } = pumpedOf(parts)
  const history = rateHistory(steps.map(({ startS, rateM3S }) => ({ start_s: startS, rate_m3_s: rateM3S })))
  const { intervalTopM: top, intervalBottomM: bottom } = test
  return {
    kind: 'specific-capacity',
    inputs: {
      version: 1,
      wellId: String(row.wellId),
      label: code,
      rate_m3_s: steps[0]?.rateM3S ?? 0,
      rateError: test.rateError,
      drawdown_m: details.drawdownM,
      drawdownSd_m: details.drawdownSdM,
      duration_s: (history.stop_s ?? history.start_s) - history.start_s,
      wellRadius_m: details.wellRadiusM,
      casingRadius_m: details.casingRadiusM,
      aquifer: test.aquifer,
      thickness_m: test.thicknessM,
      thicknessError: test.thicknessError,
      screenLength_m: top === null || bottom === null ? null : openLength(bottom - top, test.thicknessM),
    },
    readings: [],
    problems: [],
  }
}

/** A screen that reaches beyond the aquifer is open to all of it. */
const openLength = (length_m: number, thickness_m: number | null) => Math.min(length_m, thickness_m ?? length_m)

function pumpedOf({ wells }: InputParts) {
  const pumped = wells.find(({ row }) => row.role === 'pumped')
  if (!pumped) throw new Error('A test has a pumped well')
  return pumped
}

const builders: { [Id in OwnKindId]: (parts: InputParts, details: DetailsOf<Id>) => Built<Id> } = {
  slug: buildSlugInputs,
  step: buildStep,
  'specific-capacity': buildSpecificCapacity,
}

/** The snapshot that analyses of a test of a kind of its own are made from. */
export function buildKindInputs(parts: InputParts, details: TestDetails): BuiltKind {
  const build = builders[details.kind] as (given: InputParts, described: TestDetails) => BuiltKind
  return build(parts, details)
}
