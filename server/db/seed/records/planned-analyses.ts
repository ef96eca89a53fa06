import { distanceBetween } from '../island/lines.ts'
import { alikeFrom, alikeUntil, growth } from './alike.ts'
import { pumpingCurve, type Curve, type Image, type Observed } from './drawdown.ts'
import type { Participant } from './full-test.ts'
import type { Ground } from './ground.ts'
import type { PlannedTest } from './plan.ts'
import type { DemoAnalysis } from './types.ts'

const FIRST_S = 60
/** The straight line is drawn where u is below this. */
const LINE_U = 0.05
/** A window shorter than this says nothing: the boundary is too near for a curve without it. */
const SHORTEST_S = 45 * 60
/** A boundary is felt, or water from above, when it changes a drawdown by this share, or a slope by the other. */
const FELT = 0.02
const FELT_SLOPE = 0.05
/** A late curve wants its time to double, a line at least half a factor of ten. */
const LATE_SPAN = 2
const SPAN = 3
/** Casing storage is over at this many r²/T (Papadopulos & Cooper 1967); a line in the pumped well waits for it. */
const STORED = 250
/** After the stop of a leaky test, the rise that t/t' stands for is true to a few per cent up to this share of pumping. */
const EARLY_REST = 0.1

/** A test as its analyst knows it in the end. */
export interface Known {
  test: PlannedTest
  ground: Ground
  images: readonly Image[]
  observed: (participant: Participant, pumped: boolean) => Observed
}

interface Observer extends Participant {
  /** Until when boundaries leave its drawdown alone, and until when leakage does so too. */
  until_s: number
  plainUntil_s: number
  /** From when it follows the confined curve of all storage, and from when that curve's slope. */
  plainFrom_s: number
  slopeFrom_s: number
}

interface Curves {
  real: Curve
  unbounded: Curve
  plain: Curve
}

function curvesAt({ test: { design }, ground, images }: Known, where: Observed): Curves {
  return {
    real: pumpingCurve(design, ground.real, images, where),
    unbounded: pumpingCurve(design, ground.real, [], where),
    plain: pumpingCurve(design, ground.plain, [], where),
  }
}

function observerOf(known: Known, participant: Participant): Observer {
  const { pumping_s, unit } = known.test.design
  const { real, unbounded, plain } = curvesAt(known, known.observed(participant, false))
  const until_s = Math.round(alikeUntil(real, unbounded, pumping_s, FELT))
  const drains = unit === 'TG'
  return {
    ...participant,
    until_s,
    plainUntil_s: drains ? until_s : Math.round(alikeUntil(real, plain, pumping_s, FELT)),
    plainFrom_s: drains ? alikeFrom(unbounded, plain, pumping_s, FELT) : FIRST_S,
    slopeFrom_s: drains ? alikeFrom(growth(unbounded), growth(plain), pumping_s / 2, FELT_SLOPE) : FIRST_S,
  }
}

const observersOf = (known: Known, wells: Participant[]): Observer[] =>
  wells
    .map((well) => observerOf(known, well))
    .filter(({ until_s }) => until_s >= Math.min(SHORTEST_S, known.test.design.pumping_s))

const together = (observers: Observer[]) => ({
  wellCodes: observers.map(({ well }) => well.code),
  phase: 'pumping' as const,
  label: 'Observation wells together',
})

/** Delayed drainage is fitted at the nearest well whose driller kept a log. */
function drainageFit([nearest]: Observer[]): DemoAnalysis[] {
  if (!nearest || nearest.well.picks.length === 0) return []
  return [
    {
      method: 'unconfined',
      wellCodes: [nearest.well.code],
      phase: 'pumping',
      window: { from_s: FIRST_S, to_s: nearest.until_s },
      afterDrainage: null,
      label: `Delayed drainage at ${nearest.well.code}`,
    },
  ]
}

/** The gravels: the confined curve once drainage is over, and drainage itself where boundaries are felt before that. */
function gravelFits(observers: Observer[]): DemoAnalysis[] {
  const from = Math.max(...observers.map(({ plainFrom_s }) => plainFrom_s))
  const until = Math.min(...observers.map(({ until_s }) => until_s))
  const window = { from_s: Math.round(from), to_s: until }
  if (from * LATE_SPAN <= until) return [{ ...together(observers), method: 'theis', window, afterDrainage: true }]
  return drainageFit(observers)
}

/** Curve of all observation wells together, up to the moment when a boundary is felt. */
function jointFit({ test: { site } }: Known, observers: Observer[]): DemoAnalysis[] {
  const window = { from_s: FIRST_S, to_s: Math.min(...observers.map(({ until_s }) => until_s)) }
  return [{ ...together(observers), method: site.unit === 'FL' ? 'leaky' : 'theis', window, afterDrainage: null }]
}

function straightLine({ test: { site, design } }: Known, observer: Observer): DemoAnalysis[] {
  const radius = distanceBetween(site.at, observer.at)
  const straightFrom = (radius ** 2 * design.storage) / (4 * design.T * LINE_U)
  const from = Math.max(straightFrom, observer.slopeFrom_s)
  if (!(from * SPAN <= observer.plainUntil_s)) return []
  return [
    {
      method: 'cooper-jacob',
      wellCodes: [observer.well.code],
      window: { from_s: Math.round(from), to_s: observer.plainUntil_s },
      phase: 'pumping',
      afterDrainage: site.unit === 'TG' ? true : null,
      label: `Straight line at ${observer.well.code}`,
    },
  ]
}

/** When the level of the pumped well rises along the line of t/t', seconds after the stop. */
function restWindow(known: Known, pumped: Participant): { from_s: number; to_s: number } {
  const { unit, pumping_s, recovery_s, wellRadius, T } = known.test.design
  const { unbounded, plain } = curvesAt(known, known.observed(pumped, true))
  const stored = (STORED * wellRadius ** 2) / T
  const [real, straight] = [growth(unbounded), growth(plain)]
  if (unit === 'TG')
    return { from_s: Math.max(stored, alikeFrom(real, straight, pumping_s / 2, FELT_SLOPE)), to_s: recovery_s }
  if (unit === 'BS') return { from_s: stored, to_s: recovery_s }
  const leaks = alikeUntil(real, straight, pumping_s / 2, FELT_SLOPE)
  return { from_s: stored, to_s: Math.min(leaks, EARLY_REST * pumping_s, recovery_s) }
}

function recoveryOf(known: Known, pumped: Participant): DemoAnalysis[] {
  const { test, images } = known
  if (test.design.recovery_s === 0 || images.length > 0) return []
  const { from_s, to_s } = restWindow(known, pumped)
  if (!(from_s * SPAN <= to_s)) return []
  return [
    {
      method: 'recovery',
      wellCodes: [pumped.well.code],
      window: { from_s: Math.round(from_s), to_s: Math.round(to_s) },
      phase: 'all',
      afterDrainage: test.site.unit === 'TG' ? true : null,
      label: 'Recovery in the pumped well',
    },
  ]
}

/** What an analyst of the region would make of a test; the first is put forward for adoption. */
export function planAnalyses(known: Known, participants: Participant[]): DemoAnalysis[] {
  const [pumped, ...others] = participants as [Participant, ...Participant[]]
  const observers = observersOf(known, others)
  const [nearest] = observers
  const fits = () => (known.test.site.unit === 'TG' ? gravelFits(observers) : jointFit(known, observers))
  return [...(nearest ? [...fits(), ...straightLine(known, nearest)] : []), ...recoveryOf(known, pumped)]
}
