import type { StepInputs } from '#shared/hydraulics/step/step-test.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { logSpaced, makeSeries } from './make-inputs.ts'

export const HOUR = 3600

interface Truth {
  /** Drawdown per unit of rate one second after a change, and per factor of ten in time. */
  start: number
  trend: number
  C: number
  P: number
}

export const stepTruth: Truth = { start: 150, trend: 40, C: 1200, P: 2 }

/** Drawdowns of the straight-line solution in steps, exactly, plus noise where given. */
export function makeStepInputs({
  rates = [0.01, 0.016, 0.022, 0.03],
  hours = rates.map(() => 1),
  truth = stepTruth,
  noise = () => 0,
  stop = true,
}: {
  rates?: number[]
  hours?: number[]
  truth?: Truth
  noise?: (index: number) => number
  stop?: boolean
} = {}): StepInputs {
  const starts = rates.map((_, i) => hours.slice(0, i).reduce((sum, value) => sum + value, 0) * HOUR)
  const end = hours.reduce((sum, value) => sum + value, 0) * HOUR
  const steps = [
    ...rates.map((rate_m3_s, i) => ({ start_s: starts[i] as number, rate_m3_s })),
    ...(stop ? [{ start_s: end, rate_m3_s: 0 }] : []),
  ]
  const elapsed_s = starts.flatMap((start, i) => logSpaced(20, 60, (hours[i] as number) * HOUR).map((t) => start + t))
  const { increments } = rateHistory(steps)
  const drawdown_m = elapsed_s.map((time, k) => {
    const running = steps.filter(({ start_s }) => start_s < time).at(-1)?.rate_m3_s ?? 0
    const aquifer = increments
      .filter(({ start_s }) => start_s < time)
      .reduce(
        (sum, { start_s, change_m3_s }) => sum + change_m3_s * (truth.start + truth.trend * Math.log10(time - start_s)),
        0,
      )
    return aquifer + truth.C * running ** truth.P + noise(k)
  })
  const well = makeSeries({
    wellId: 'p',
    role: 'pumped',
    elapsed_s,
    drawdown_m,
    wellRadius_m: 0.15,
    casingRadius_m: 0.1,
  })
  return { version: 1, rates: steps, rateError: 0, well }
}
