import { AnalysisError } from '../analysis-error.ts'
import { rateHistory, type RateHistory } from '../rates.ts'
import type { StepInputs, StepOptions } from './step-test.ts'

export const FEWEST_STEPS = 3

/** One stretch of constant rate; a pause between steps is one with rate zero. */
export interface Step {
  from_s: number
  to_s: number
  rate_m3_s: number
}

export interface StepPlan {
  history: RateHistory
  /** In order of time, up to the final rest. */
  steps: Step[]
  /** Time after the beginning of a step at which increments are read. */
  increment_s: number
}

/**
 * The steps of a test, and the time at which all of them are compared.
 * @throws AnalysisError with fewer than three steps or three different rates, or an increment longer than a step
 */
export function stepPlan({ rates, well }: StepInputs, options: StepOptions): StepPlan {
  const history = rateHistory(rates)
  const last_s = well.elapsed_s.reduce((last, time) => (time > last ? time : last), -Infinity)
  const end_s = history.stop_s ?? last_s
  const steps = stepsOf(history, end_s)
  const pumped = steps.filter(({ rate_m3_s }) => rate_m3_s > 0)
  const different = new Set(pumped.map(({ rate_m3_s }) => rate_m3_s)).size
  if (pumped.length < FEWEST_STEPS || different < FEWEST_STEPS) {
    throw new AnalysisError('analysis/too-few-steps', {
      needed: FEWEST_STEPS,
      found: Math.min(pumped.length, different),
    })
  }
  const shortest_s = Math.min(...pumped.map(({ from_s, to_s }) => to_s - from_s))
  const increment_s = options.increment_s ?? shortest_s
  if (!(increment_s > 0 && increment_s <= shortest_s)) {
    throw new AnalysisError('analysis/step-increment', { increment_s, shortest_s })
  }
  return { history, steps, increment_s }
}

/** Entries of the log that repeat a rate go on with the step before. */
function stepsOf({ steps, start_s }: RateHistory, end_s: number): Step[] {
  const changes = steps.filter(
    (step, i) => step.start_s >= start_s && step.start_s < end_s && step.rate_m3_s !== steps[i - 1]?.rate_m3_s,
  )
  return changes.map((step, i) => ({
    from_s: step.start_s,
    to_s: changes[i + 1]?.start_s ?? end_s,
    rate_m3_s: step.rate_m3_s,
  }))
}
