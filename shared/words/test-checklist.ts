import type { TestChecklist } from '#shared/contracts/test-checklist.ts'
import { formatNumber, formatQuantity } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { fromSI } from '#shared/quantities/units.ts'

/** Questions that are answered from a list. */
export type ChecklistQuestion = Exclude<keyof TestChecklist, 'version' | 'trendWatchedS' | 'disposalDistanceM'>
type Answers = { [Question in ChecklistQuestion]: Record<TestChecklist[Question], string> }

export const checklistLabels: Record<ChecklistQuestion, string> = {
  staticTrend: 'Static level before the test',
  dischargeMeasured: 'Discharge measured with',
  disposal: 'Water let out',
  nearbyPumping: 'Pumping nearby',
  rain: 'Rain',
  barometer: 'Air pressure',
  tide: 'Tide',
}

const nothing = 'Not recorded'

export const checklistAnswers: Answers = {
  staticTrend: {
    'not-recorded': nothing,
    'not-watched': 'Not watched',
    steady: 'Steady',
    falling: 'Falling',
    rising: 'Rising',
  },
  dischargeMeasured: {
    'not-recorded': nothing,
    container: 'Container and watch',
    meter: 'Flow meter',
    weir: 'Weir or flume',
    orifice: 'Orifice',
    estimated: 'Estimated only',
  },
  disposal: {
    'not-recorded': nothing,
    stream: 'To a stream or lake',
    drain: 'To a drain or sewer',
    ground: 'On the ground',
    tank: 'Into a tank',
    supply: 'Into a supply',
  },
  nearbyPumping: {
    'not-recorded': nothing,
    none: 'None',
    steady: 'At a steady rate',
    changed: 'Changed during the test',
  },
  rain: {
    'not-recorded': nothing,
    none: 'None before or during the test',
    before: 'In the days before',
    during: 'During the test',
  },
  barometer: { 'not-recorded': nothing, 'not-watched': 'Not watched', watched: 'Watched' },
  tide: {
    'not-recorded': nothing,
    'no-effect': 'No effect expected',
    possible: 'May have moved the level',
    watched: 'Watched',
  },
}

const all = Object.keys(checklistLabels) as ChecklistQuestion[]
const ofPumping: readonly ChecklistQuestion[] = ['dischargeMeasured', 'disposal']

/** What is asked about a kind of test: in a slug test nothing is pumped. */
export const checklistQuestions = (kind: string): ChecklistQuestion[] =>
  kind === 'slug' ? all.filter((question) => !ofPumping.includes(question)) : all

/** How long the level was watched belongs to an answer that it was. */
export const asksTrendTime = ({ staticTrend }: Pick<TestChecklist, 'staticTrend'>): boolean =>
  staticTrend !== 'not-recorded' && staticTrend !== 'not-watched'

export const asksDisposalDistance = ({ disposal }: Pick<TestChecklist, 'disposal'>): boolean =>
  disposal !== 'not-recorded'

export interface ChecklistLine {
  question: ChecklistQuestion
  label: string
  text: string
  recorded: boolean
}

const hours = (seconds: number) => `${formatNumber(fromSI(seconds, 'h'), { figures: 3, trim: true })} h`

/** Each question with its answer, as page, print and report say it; all of them `Not recorded` without a checklist. */
export function checklistLines(checklist: TestChecklist | null, units: UnitSystem, kind = ''): ChecklistLine[] {
  return checklistQuestions(kind).map((question) => {
    const answer = checklist?.[question] ?? 'not-recorded'
    const text = (checklistAnswers[question] as Record<string, string>)[answer] ?? nothing
    const detail = checklist && detailOf(question, checklist, units)
    return {
      question,
      label: checklistLabels[question],
      text: detail ? `${text}, ${detail}` : text,
      recorded: answer !== 'not-recorded',
    }
  })
}

function detailOf(question: ChecklistQuestion, checklist: TestChecklist, units: UnitSystem): string | null {
  const { trendWatchedS, disposalDistanceM } = checklist
  if (question === 'staticTrend' && trendWatchedS !== null && asksTrendTime(checklist))
    return `watched for ${hours(trendWatchedS)}`
  if (question === 'disposal' && disposalDistanceM !== null && asksDisposalDistance(checklist))
    return `${formatQuantity(disposalDistanceM, units.length, { trim: true })} from the pumped well`
  return null
}
