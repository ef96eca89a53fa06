import type { AquiferCode } from '../fields/models.ts'
import { aquiferCodes } from '../fields/models.ts'
import type { Truth } from '../fields/truth.ts'
import { makeTruth } from '../fields/truth.ts'
import type { Draws } from '../random.ts'
import { draws } from '../random.ts'
import type { Site } from './sites.ts'
import { makeSites } from './sites.ts'
import type { Design } from './test-design.ts'
import { designTest } from './test-design.ts'
import type { DemoOutcome, LogFault, ReportBasis } from './types.ts'

export interface PlannedTest {
  site: Site
  design: Design
  year: number
  faults: LogFault[]
  outcome: DemoOutcome
}

export interface PlannedReport {
  site: Site
  year: number
  basis: ReportBasis
}

export interface Plan {
  seed: number
  truth: Truth
  tests: PlannedTest[]
  reports: PlannedReport[]
  /** Wells at which nothing was ever tested. */
  idle: Site[]
}

const FULL: Record<AquiferCode, number> = { TG: 30, FL: 22, BS: 16 }
const REPORTED: Record<AquiferCode, number> = { TG: 55, FL: 40, BS: 35 }
/** Wells that were tested again with readings, years after a reported test. */
const REPEATED = 10

/** What went wrong with logs, by the test's number; the outcome follows from it. */
const TROUBLES = new Map<number, { faults: LogFault[]; outcome: DemoOutcome }>([
  [3, { faults: ['gap'], outcome: 'adopted' }],
  [9, { faults: ['spikes'], outcome: 'adopted' }],
  [16, { faults: ['sentinel'], outcome: 'adopted' }],
  [22, { faults: ['drift'], outcome: 'returned' }],
  [27, { faults: ['short'], outcome: 'draft' }],
  [35, { faults: ['spikes', 'gap'], outcome: 'adopted' }],
  [41, { faults: ['short'], outcome: 'draft' }],
  [48, { faults: ['drift'], outcome: 'returned' }],
  [60, { faults: ['sentinel', 'gap'], outcome: 'adopted' }],
])
/** Tests of good quality that are still under way. */
const UNDER_WAY = new Map<number, DemoOutcome>([
  [6, 'submitted'],
  [19, 'draft'],
  [31, 'submitted'],
  [44, 'draft'],
  [55, 'submitted'],
])

const SHORT_S = 40 * 60

function shortened(design: Design): Design {
  return { ...design, pumping_s: SHORT_S, recovery_s: 0 }
}

function planTest(truth: Truth, stream: Draws, site: Site, index: number): PlannedTest {
  const design = designTest(truth, stream, site)
  const { faults, outcome } = TROUBLES.get(index) ?? { faults: [], outcome: UNDER_WAY.get(index) ?? 'adopted' }
  return {
    site,
    design: faults.includes('short') ? shortened(design) : design,
    year: stream.whole(1994, 2025),
    faults,
    outcome,
  }
}

const chooseBasis = ({ uniform }: Draws): ReportBasis => {
  const share = uniform()
  if (share < 0.42) return 'checked-report'
  if (share < 0.72) return 'specific-capacity'
  return share < 0.84 ? 'slug-test' : 'bare-number'
}

const planReport = (stream: Draws, site: Site, latest = 2018): PlannedReport => ({
  site,
  year: stream.whole(1985, latest),
  basis: chooseBasis(stream),
})

/** Which wells were tested, when and how; no readings yet. */
export function makePlan(seed: number): Plan {
  const truth = makeTruth(seed)
  const sites = makeSites(seed)
  const stream = draws(seed, 'plan')
  const chosen = aquiferCodes.flatMap((unit) => sites[unit].slice(0, FULL[unit]))
  const tests = chosen.map((site, i) => planTest(truth, stream, site, i))
  const reported = aquiferCodes.flatMap((unit) => sites[unit].slice(FULL[unit], FULL[unit] + REPORTED[unit]))
  const repeated = tests
    .filter(({ year, outcome }) => year > 2002 && outcome === 'adopted')
    .slice(0, REPEATED)
    .map(({ site, year }) => planReport(stream, site, year - 5))
  const idle = aquiferCodes.flatMap((unit) => sites[unit].slice(FULL[unit] + REPORTED[unit]))
  return { seed, truth, tests, reports: [...reported.map((site) => planReport(stream, site)), ...repeated], idle }
}
