import type { PumpingTest, TestWell } from '#shared/contracts/pumping-tests.ts'
import { formatElapsed } from '#shared/quantities/elapsed.ts'
import { formatInterval, formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'
import { directionText } from '../directions.ts'
import { checklistLines } from '../test-checklist.ts'
import { thicknessBases } from '../values.ts'
import { reportStart } from './dates.ts'
import type { ReportBlock, ReportFact, ReportGiven, ReportSection } from './document.ts'

const intervalBases: Record<PumpingTest['intervalBasis'], string> = {
  screens: 'screens open at that date',
  packers: 'between packers',
  'open-hole': 'open hole',
  unknown: 'not known',
}
const distanceBases: Record<TestWell['distanceBasis'], string> = {
  measured: 'measured',
  map: 'from the map',
  override: 'another distance',
}
const nothing = '–'
const percent = (share: number) => `${formatNumber(100 * share, { figures: 2, trim: true })} %`

const unitShares = ({ units }: PumpingTest) =>
  units.length === 1
    ? (units[0]?.name ?? nothing)
    : units.map(({ name, share }) => `${name} (${percent(share)})`).join(', ')

function intervalText({ intervalBasis, intervalTopM, intervalBottomM }: PumpingTest, length: string): string {
  if (intervalTopM === null || intervalBottomM === null) return intervalBases[intervalBasis]
  return `${formatInterval(intervalTopM, intervalBottomM, length, { trim: true })} below ground, ${intervalBases[intervalBasis]}`
}

const thicknessText = ({ thicknessM, thicknessBasis, thicknessError }: PumpingTest, length: string) =>
  thicknessM === null
    ? 'not known'
    : `${formatQuantity(thicknessM, length, { trim: true })} ± ${percent(thicknessError)}, ${thicknessBases[thicknessBasis]}`

export function identitySection({ test, units, region, snapshot }: ReportGiven): ReportSection {
  const facts: ReportFact[] = [
    { label: 'Region', text: region },
    { label: test.kind === 'slug' ? 'Well' : 'Pumped well', text: test.wellCode },
    { label: 'Start', text: reportStart(test) },
    { label: 'Aquifer unit', text: `${unitShares(test)}, ${test.aquifer}` },
    { label: 'Tested interval', text: intervalText(test, units.length) },
    { label: 'Thickness', text: thicknessText(test, units.length) },
    { label: 'Entered by', text: test.createdBy?.name ?? nothing },
    ...(test.source ? [{ label: 'Source', text: test.source }] : []),
    { label: 'Fingerprint of the data', text: snapshot.sha256.slice(0, 16) },
  ]
  return { id: 'identity', title: 'Test', blocks: [{ kind: 'facts', facts }] }
}

export function conditionsSection({ test, units }: ReportGiven): ReportSection {
  const facts = checklistLines(test.checklist, units, test.kind).map(({ label, text }) => ({ label, text }))
  const notes: ReportBlock[] = test.conditions ? [{ kind: 'text', text: test.conditions }] : []
  return { id: 'conditions', title: 'Conditions of the test', blocks: [{ kind: 'facts', facts }, ...notes] }
}

export function wellsSection(given: ReportGiven): ReportSection {
  const { test, units, snapshot } = given
  const bearings = new Map(
    'kind' in snapshot ? [] : snapshot.inputs.series.map(({ wellId, bearing_deg }) => [wellId, bearing_deg] as const),
  )
  const rows = test.wells.map((well) => {
    const bearing = bearings.get(String(well.wellId))
    const pumped = well.role === 'pumped'
    return [
      well.code,
      pumped ? 'pumped' : 'observation',
      pumped ? nothing : formatQuantity(well.distanceM, units.length),
      pumped || bearing == null ? nothing : directionText(bearing),
      pumped ? nothing : [distanceBases[well.distanceBasis], well.distanceReason].filter(Boolean).join(': '),
      well.staticLevelM === null
        ? 'mean before pumping'
        : formatQuantity(well.staticLevelM, units.length, { figures: 4 }),
    ]
  })
  const head = ['Well', 'Role', 'Distance', 'Direction', 'Distance is', 'Static level']
  const table: ReportBlock = { kind: 'table', caption: 'Wells of the test', head, rows }
  return { id: 'wells', title: 'Wells', blocks: [...('kind' in snapshot ? [] : [sketch]), table] }
}
const sketch: ReportBlock = { kind: 'sketch' }

const rateRows = ({ rateSteps }: PumpingTest) =>
  rateSteps.map(({ startS, enteredValue, enteredUnit }) => [
    formatElapsed(startS),
    `${formatNumber(enteredValue, { figures: 4, trim: true })} ${unitById(enteredUnit).label}`,
  ])

export function dataSection({ test, snapshot }: ReportGiven): ReportSection {
  const codes = new Map(test.wells.map(({ id, code }) => [id, code]))
  const logs = test.series.map(({ testWellId, fileName, rowCount, takenCount, quantity }) => [
    codes.get(testWellId) ?? nothing,
    fileName,
    quantity,
    String(rowCount),
    String(takenCount),
  ])
  const rates = rateRows(test)
  const blocks: ReportBlock[] = [
    ...(rates.length > 0
      ? [
          { kind: 'table' as const, caption: 'Rates', head: ['From', 'Rate'], rows: rates },
          { kind: 'text' as const, text: `Relative error of the rate: ${percent(test.rateError)}.` },
        ]
      : []),
    logs.length > 0
      ? {
          kind: 'table',
          caption: 'Logs',
          head: ['Well', 'File', 'Read as', 'Rows', 'Readings taken'],
          rows: logs,
        }
      : { kind: 'text', text: 'No readings are kept with this test.' },
    ...(!('kind' in snapshot) && snapshot.inputs.series.length > 0
      ? [{ kind: 'plot' as const, analysisId: null, caption: 'All readings of the test' }]
      : []),
  ]
  return { id: 'data', title: 'Data', blocks }
}
