import { distanceBetween } from '../island/lines.ts'
import type { Image } from './drawdown.ts'
import { undisturbedUntil } from './drawdown.ts'
import type { Participant } from './full-test.ts'
import type { PlannedTest } from './plan.ts'
import type { DemoAnalysis } from './types.ts'

/** Readings of the gravels count from here: before, delayed drainage would rule a real log. */
const DRAINED_S = 6 * 3_600
const FIRST_S = 60
/** The straight line is drawn where u is below this. */
const LINE_U = 0.05

/** A window shorter than this says nothing: the boundary is too near for a curve without it. */
const SHORTEST_S = 45 * 60

interface Observer extends Participant {
  /** Until when boundaries leave its drawdown alone. */
  until_s: number
}

const observersOf = ({ design }: PlannedTest, images: readonly Image[], wells: Participant[]): Observer[] =>
  wells
    .map((observer) => ({ ...observer, until_s: Math.round(undisturbedUntil(design, images, observer.at)) }))
    .filter(({ until_s }) => until_s >= Math.min(SHORTEST_S, design.pumping_s))

/** Curve of all observation wells together, up to the moment when a boundary is felt. */
function jointFit({ site }: PlannedTest, observers: Observer[]): DemoAnalysis {
  const until = Math.min(...observers.map(({ until_s }) => until_s))
  const drained = site.unit === 'TG' && until > 2 * DRAINED_S
  return {
    method: 'theis',
    wellCodes: observers.map(({ well }) => well.code),
    window: { from_s: drained ? DRAINED_S : FIRST_S, to_s: until },
    phase: 'pumping',
    afterDrainage: site.unit === 'TG' ? drained : null,
    label: 'Observation wells together',
  }
}

function straightLine({ site, design }: PlannedTest, observer: Observer): DemoAnalysis[] {
  const radius = distanceBetween(site.at, observer.at)
  const from = (radius ** 2 * design.storage) / (4 * design.T * LINE_U)
  if (from > observer.until_s / 3) return []
  return [
    {
      method: 'cooper-jacob',
      wellCodes: [observer.well.code],
      window: { from_s: Math.round(from), to_s: observer.until_s },
      phase: 'pumping',
      afterDrainage: site.unit === 'TG' ? from > DRAINED_S : null,
      label: `Straight line at ${observer.well.code}`,
    },
  ]
}

function recoveryOf({ site, design }: PlannedTest, images: readonly Image[], pumped: Participant): DemoAnalysis[] {
  if (design.recovery_s === 0 || images.length > 0) return []
  return [
    {
      method: 'recovery',
      wellCodes: [pumped.well.code],
      window: null,
      phase: 'all',
      afterDrainage: site.unit === 'TG' ? true : null,
      label: 'Recovery in the pumped well',
    },
  ]
}

/** What an analyst of the region would make of a test; the first is put forward for adoption. */
export function planAnalyses(test: PlannedTest, images: readonly Image[], participants: Participant[]): DemoAnalysis[] {
  const [pumped, ...others] = participants as [Participant, ...Participant[]]
  const observers = observersOf(test, images, others)
  const nearest = observers[0]
  return [
    ...(nearest ? [jointFit(test, observers), ...straightLine(test, nearest)] : []),
    ...recoveryOf(test, images, pumped),
  ]
}
