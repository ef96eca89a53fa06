import type { TestChecklist } from '#shared/contracts/test-checklist.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import type { TimeWindow } from '#shared/hydraulics/analysis.ts'
import type { LogMapping } from '#shared/readings/model.ts'
import type { LonLat } from '../island/frame.ts'
import type { AquiferCode } from '../fields/models.ts'
import type { UnitCode } from '../island/units.ts'

export interface DemoRegion {
  name: string
  epsg: number
  /** West, south, east, north in degrees. */
  extent: [number, number, number, number]
  zone: string
  /** What elevations of wells are counted from. */
  verticalDatum: string
}

export interface DemoUnit {
  code: UnitCode
  name: string
  kind: 'confined' | 'leaky' | 'unconfined' | 'aquitard'
  depthOrder: number
  connectedStreams: readonly string[]
  /** One closed ring, degrees. */
  outline: LonLat[]
  description: string
}

export interface DemoStream {
  code: string
  name: string
  /** 1 is the main river. */
  order: 1 | 2
  path: LonLat[]
}

export interface DemoBoundary {
  code: string
  name: string
  kind: 'fault'
  units: readonly UnitCode[]
  path: LonLat[]
}

export interface DemoScreen {
  /** Metres below ground. */
  topM: number
  bottomM: number
  /** ISO dates; null: from the beginning, until further notice. */
  validFrom: string | null
  validTo: string | null
}

export interface DemoPick {
  unit: UnitCode
  topM: number
  /** Null where the well ends inside the unit. */
  bottomM: number | null
  source: string
}

export interface DemoWell {
  code: string
  name: string | null
  kind: 'well' | 'piezometer'
  unit: AquiferCode
  lon: number
  lat: number
  /** As surveyed: easting and northing in the region's system. */
  original: { epsg: number; x: number; y: number }
  positionAccuracyM: number
  groundElevationM: number
  /** Above ground. */
  measuringPointM: number
  depthM: number
  wellRadiusM: number
  casingRadiusM: number
  /** Depth to water below the measuring point, undisturbed. */
  staticDepthM: number
  drilledYear: number
  ownerLabel: string
  screens: DemoScreen[]
  picks: DemoPick[]
  visibility: 'published' | 'internal'
  embargoUntil: string | null
}

export type LogFault = 'gap' | 'spikes' | 'sentinel' | 'drift' | 'short'

export interface DemoSeries {
  wellCode: string
  fileName: string
  /** The file as the logger or the field sheet gave it. */
  text: string
  mapping: LogMapping
}

export interface DemoAnalysis {
  method: MethodId
  wellCodes: string[]
  window: TimeWindow | null
  phase: 'pumping' | 'all'
  /** Of the unconfined unit: the window lies after delayed drainage. */
  afterDrainage: boolean | null
  label: string
}

/** How far a test has come in the program. */
export type DemoOutcome = 'adopted' | 'submitted' | 'returned' | 'draft'

interface DemoTestBase {
  wellCode: string
  unit: AquiferCode
  aquifer: 'confined' | 'leaky' | 'unconfined'
  /** Wall-clock time in `zone`, or the year alone. */
  startLocal: string
  zone: string
  thicknessM: number
  thicknessBasis: 'aquifer' | 'saturated'
  conditions: string | null
  visibility: 'published' | 'internal'
  /** That of its well. */
  embargoUntil: string | null
}

export interface DemoFullTest extends DemoTestBase {
  kind: 'constant-rate'
  rateSteps: { startS: number; rate: { value: number; unit: string } }[]
  staticLevelM: number
  /** What the crew wrote down of the circumstances. */
  checklist: TestChecklist
  observationWells: { wellCode: string; distanceM: number; staticLevelM: number }[]
  series: DemoSeries[]
  faults: LogFault[]
  /** In the order in which they were made; the first is the one put forward for adoption. */
  analyses: DemoAnalysis[]
  outcome: DemoOutcome
  rationale: string
}

export type ReportBasis = 'specific-capacity' | 'slug-test' | 'checked-report' | 'bare-number'

export interface DemoReportedTest extends DemoTestBase {
  kind: 'reported'
  source: string
  basis: ReportBasis
  evidence: 'fair' | 'slight'
  /** Values as reported, SI, rounded as reports do; a slug test gives K, of which T is derived. */
  values: { quantity: 'T' | 'S' | 'K'; value: number; log10Error: number; storageClass: StorageClass | null }[]
}

export type StorageClass = 'elastic' | 'specific-yield' | 'unclassified'
export type DemoTest = DemoFullTest | DemoReportedTest

export interface DemoRecords {
  region: DemoRegion
  units: DemoUnit[]
  streams: DemoStream[]
  boundaries: DemoBoundary[]
  wells: DemoWell[]
  tests: DemoTest[]
}
