import type { RateStep, Series } from '../analysis.ts'

/** A step-drawdown test: rates and the level in the pumped well, all in SI. */
export interface StepInputs {
  version: 1
  rates: RateStep[]
  /** Relative standard deviation of the rate, 0.05 unless known better. */
  rateError: number
  /** The pumped well's readings, on the clock of the rates. */
  well: Series
}

export interface StepOptions {
  /** Time after the beginning of each step at which increments are read; null: the shortest step. */
  increment_s?: number | null
  /** Share of that time after which readings are taken to follow the trend. Default 0.1. */
  trendFrom?: number
  /** Rate for which drawdown and specific capacity are wanted; null: none. */
  predictedRate_m3_s?: number | null
}
