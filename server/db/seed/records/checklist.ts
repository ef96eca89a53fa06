import type { TestChecklist } from '#shared/contracts/test-checklist.ts'
import type { Draws } from '../random.ts'

export interface TestedSite {
  year: number
  /** Distance to a connected stream that the test feels, m; null where there is none. */
  streamM: number | null
  /** Pumping rate in m³/s. */
  rate_m3_s: number
}

/** From then on crews filled in a form; before, little was written down. */
const FORMS_SINCE = 2000
/** What a container and a watch can still measure, m³/s. */
const MOST_BY_CONTAINER = 0.004

const measuredWith = (stream: Draws, { year, rate_m3_s }: TestedSite): TestChecklist['dischargeMeasured'] => {
  if (rate_m3_s <= MOST_BY_CONTAINER && stream.chance(0.5)) return 'container'
  return year > 2004 ? stream.pick(['meter', 'meter', 'orifice']) : stream.pick(['weir', 'orifice', 'meter'])
}

/**
 * What a crew wrote down of the conditions of its test. The made-up levels hold neither weather nor tide nor other
 * pumping, and no series of air pressure comes with them, so nothing else is claimed.
 */
export function makeChecklist(stream: Draws, site: TestedSite): TestChecklist {
  const known = site.year >= FORMS_SINCE || stream.chance(0.4)
  const watched = known && stream.chance(0.8)
  const toStream = site.streamM !== null
  return {
    version: 1,
    staticTrend: watched ? 'steady' : known ? 'not-watched' : 'not-recorded',
    trendWatchedS: watched ? stream.pick([6, 12, 24, 48]) * 3600 : null,
    dischargeMeasured: measuredWith(stream, site),
    disposal: toStream ? 'stream' : stream.pick(['drain', 'drain', 'tank', 'supply']),
    disposalDistanceM: toStream ? Math.max(50, Math.round(site.streamM ?? 0)) : stream.whole(10, 40) * 10,
    nearbyPumping: known ? 'none' : 'not-recorded',
    rain: known ? stream.pick(['none', 'none', 'none', 'before']) : 'not-recorded',
    barometer: known ? 'not-watched' : 'not-recorded',
    tide: known ? 'no-effect' : 'not-recorded',
  }
}
