import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import { meanRate } from '../rates.ts'
import { theisU } from '../small-u.ts'
import type { SolutionReadings } from '../solution.ts'
import { theis } from '../theis.ts'
import { radiusOf } from '../wells.ts'

/** Storativities to begin from where no observation well shows it. */
const NOMINAL_STORATIVITIES = [1e-5, 1e-3]
/** Skins to begin from are kept to what wells show (common practice). */
const SKIN_RANGE = { low: -4, high: 50 }

/** T, S and skin to begin from: T and S from an observation well where there is one, skin from the pumped well's last reading. */
export function largeDiameterStarts(readings: SolutionReadings): [number, number, number][] {
  const observed = readings.wells.filter(({ series }) => series.role === 'observation')
  if (observed.some(({ time_s }) => time_s.length >= 2))
    return theis.guess({ ...readings, wells: observed }).map(([T = NaN, S = NaN]) => [T, S, skinAt(T, S, readings)])
  return theis
    .guess(readings)
    .flatMap(([T = NaN]) => NOMINAL_STORATIVITIES.map((S): [number, number, number] => [T, S, skinAt(T, S, readings)]))
}

/** The skin that, with T and S, gives the last drawdown of the pumped well once storage is over; 0 without readings there. */
function skinAt(T: number, S: number, { wells, history }: SolutionReadings): number {
  const pumped = wells.find(({ series, time_s }) => series.role === 'pumped' && time_s.length > 0)
  if (!pumped) return 0
  const last_s = pumped.time_s.at(-1) as number
  const rate = meanRate(history, history.start_s + last_s)
  const formation = exponentialIntegral(theisU(T, S, radiusOf(pumped.series), last_s)) / 2
  const skin = (2 * Math.PI * T * (pumped.drawdown_m.at(-1) as number)) / rate - formation
  return Math.max(SKIN_RANGE.low, Math.min(SKIN_RANGE.high, skin))
}
