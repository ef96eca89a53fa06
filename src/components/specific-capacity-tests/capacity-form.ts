import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { TestDetails } from '#shared/contracts/test-details.ts'
import type { Well } from '#shared/contracts/wells.ts'

type Details = Extract<TestDetails, { kind: 'specific-capacity' }>

/** One rate, one drawdown and one time, as they are typed: what is not yet known is null. */
export interface CapacityForm {
  rate: number | null
  unit: string | null
  durationS: number | null
  drawdownM: number | null
  drawdownSdM: number | null
  wellRadiusM: number | null
  casingRadiusM: number | null
}

/** Common practice: a dipped level is right to five centimetres. */
export const emptyCapacity = (unit: string): CapacityForm => ({
  rate: null,
  unit,
  durationS: null,
  drawdownM: null,
  drawdownSdM: 0.05,
  wellRadiusM: null,
  casingRadiusM: null,
})

/** The rate from the beginning to the moment at which the level was read. */
export const capacitySteps = ({ rate, unit, durationS }: CapacityForm) =>
  [
    { startS: 0, rate: { value: rate, unit } },
    { startS: durationS, rate: { value: 0, unit } },
  ] as PumpingTestInput['rateSteps']

export const capacityDetailsOf = ({ drawdownM, drawdownSdM, wellRadiusM, casingRadiusM }: CapacityForm) =>
  ({ version: 1, kind: 'specific-capacity', drawdownM, drawdownSdM, wellRadiusM, casingRadiusM }) as Details

export function capacityFormOf(details: Details, steps: PumpingTest['rateSteps']): CapacityForm {
  const { drawdownM, drawdownSdM, wellRadiusM, casingRadiusM } = details
  const [first, stop] = steps
  return {
    rate: first?.enteredValue ?? null,
    unit: first?.enteredUnit ?? null,
    durationS: stop?.startS ?? null,
    ...{ drawdownM, drawdownSdM, wellRadiusM, casingRadiusM },
  }
}

export const capacitySuggestions = ({ wellRadiusM, casingRadiusM }: Well, unit: string): CapacityForm => ({
  ...emptyCapacity(unit),
  wellRadiusM,
  casingRadiusM,
})
