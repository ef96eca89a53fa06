import type { AquiferCode } from '../fields/models.ts'
import type { Point } from '../island/frame.ts'
import { layersAt } from '../fields/structure.ts'
import type { Draws } from '../random.ts'
import { draws } from '../random.ts'
import type { Drilled } from './construction.ts'
import { construct } from './construction.ts'
import type { Participant } from './full-test.ts'
import type { Plan, PlannedTest } from './plan.ts'
import type { Site } from './sites.ts'
import type { DemoWell } from './types.ts'

export interface BuiltWells {
  wells: DemoWell[]
  /** The pumped well and its observation wells, by the test's number. */
  participants: Participant[][]
  wellAt: (site: Site) => DemoWell
}

/** Wells with a second, shallower piezometer beside them. */
const NESTS = 14
const BESIDE = 1.5

const drilledSite = (site: Site, year: number, radius: number | null = null): Drilled => ({
  ...site,
  kind: 'well',
  year,
  wellRadius: radius,
})

function earliestTest(plan: Plan, site: Site): number {
  const years = [...plan.tests, ...plan.reports].filter((test) => test.site === site).map(({ year }) => year)
  return Math.min(2024, ...years)
}

const observersOf = ({ site, design, year }: PlannedTest): Drilled[] =>
  design.observations.map((at) => ({ unit: site.unit, at, kind: 'piezometer', year, wellRadius: 0.03 }))

/** Piezometers in a unit above the one that the well beside them takes its water from. */
function nestsBeside(stream: Draws, sites: readonly Site[]): Drilled[] {
  const upper = ({ unit, at }: Site): AquiferCode | null => {
    const above = layersAt(...at).map((layer) => layer.unit)
    const found = above.slice(0, above.indexOf(unit)).find((code) => code !== 'PC')
    return (found as AquiferCode | undefined) ?? null
  }
  return sites
    .flatMap((site): Drilled[] => {
      const unit = upper(site)
      const at: Point = [site.at[0] + BESIDE, site.at[1]]
      return unit ? [{ unit, at, kind: 'piezometer', year: stream.whole(2001, 2022), wellRadius: 0.03 }] : []
    })
    .slice(0, NESTS)
}

/** Older wells have the lower numbers, as in a register that grew with the years. */
function inOrder(drilled: readonly Drilled[]): Map<Drilled, string> {
  const sorted = [...drilled].sort((a, b) => a.year - b.year || a.at[0] - b.at[0])
  return new Map(sorted.map((hole, i) => [hole, `V-${String(i + 1).padStart(4, '0')}`]))
}

/** Drills every well of the plan: tested ones in time for their first test, observation wells, nests, and the rest. */
export function buildWells(plan: Plan): BuiltWells {
  const stream = draws(plan.seed, 'wells')
  const sites = [...new Set([...plan.tests, ...plan.reports].map(({ site }) => site)), ...plan.idle]
  const radii = new Map(plan.tests.map(({ site, design }) => [site, design.wellRadius]))
  const main = new Map(
    sites.map((site) => {
      const latest = earliestTest(plan, site)
      return [site, drilledSite(site, stream.whole(Math.max(1958, latest - 22), latest), radii.get(site))]
    }),
  )
  const observers = plan.tests.map(observersOf)
  const drilled = [...main.values(), ...observers.flat(), ...nestsBeside(stream, sites)]
  const codes = inOrder(drilled)
  const built = new Map(drilled.map((hole) => [hole, construct(stream, codes.get(hole)!, hole)]))
  const participant = (hole: Drilled): Participant => ({ well: built.get(hole)!, at: hole.at })
  return {
    wells: [...built.values()].sort((a, b) => a.code.localeCompare(b.code)),
    participants: plan.tests.map(({ site }, i) => [main.get(site)!, ...observers[i]!].map(participant)),
    wellAt: (site) => built.get(main.get(site)!)!,
  }
}
