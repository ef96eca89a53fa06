import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'

const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })

interface Started {
  startLocal: string
  startPrecision: PumpingTest['startPrecision']
}

/** The date as its own place counts it, in the precision it is known: "14 March 2019" or "1987". */
export function testDate({ startLocal, startPrecision }: Started): string {
  return startPrecision === 'year'
    ? startLocal.slice(0, 4)
    : day.format(new Date(`${startLocal.slice(0, 10)}T00:00:00Z`))
}

export const kindWords: Record<PumpingTest['kind'], string> = {
  'constant-rate': 'Constant-rate test',
  step: 'Step-drawdown test',
  slug: 'Slug test',
  'specific-capacity': 'Specific capacity',
  reported: 'Reported value',
}

export const testKindLine = ({ kind, units, aquifer }: Pick<PumpingTest, 'kind' | 'units' | 'aquifer'>): string =>
  `${kindWords[kind]} · ${units.map(({ name }) => name).join(' and ')}, ${aquifer}`

type Step = PumpingTest['rateSteps'][number]

const rateText = ({ enteredValue, enteredUnit }: Step) =>
  `${formatNumber(enteredValue, { figures: 4, trim: true })} ${unitById(enteredUnit).label}`

/** "12 L/s for 1 440 min" for one rate, the number of rates for several; the stop where there is one. */
export function pumpingText(steps: readonly Step[]): string {
  const pumping = steps.filter(({ rateM3S }) => rateM3S > 0)
  const [first] = pumping
  if (!first) return 'no pumping rate'
  const last = pumping.at(-1) as Step
  const stop = steps[steps.indexOf(last) + 1]
  const span = stop ? ` for ${formatElapsed(stop.startS - first.startS)}` : ''
  return pumping.length === 1 ? `${rateText(first)}${span}` : `${pumping.length} rates${span}`
}

export function observationText(count: number): string {
  if (count === 0) return 'no observation well'
  return count === 1 ? '1 observation well' : `${count} observation wells`
}

/** What was done in a test of a kind of its own, in place of rates and observation wells. */
export function kindFacts({ kind, rateSteps, series }: Pick<PumpingTest, 'kind' | 'rateSteps' | 'series'>): string[] {
  if (kind === 'reported') return []
  if (kind !== 'slug') return [pumpingText(rateSteps)]
  return [series.length === 1 ? '1 repeat' : `${series.length} repeats`]
}
