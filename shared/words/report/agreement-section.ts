import type { Analysis } from '#shared/contracts/analyses.ts'
import { agreements, type Agreement, type ComparedAnalysis } from '#shared/hydraulics/agreement.ts'
import { methods, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { formatNumber } from '#shared/quantities/format.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'
import { fromSI, unitById } from '#shared/quantities/units.ts'
import { agreementText } from '../agreement.ts'
import { estimateInterval, estimateText } from '../estimate-text.ts'
import { analysisName, stateWords } from './analysis-section.ts'
import type { ReportBlock, ReportMark, ReportSection } from './document.ts'

const severities: Record<Agreement['code'], ReportMark['severity']> = {
  agree: 'good',
  'agree-roughly': 'note',
  disagree: 'caution',
}
const words: Record<Agreement['code'], string> = {
  agree: 'Agree',
  'agree-roughly': 'Roughly',
  disagree: 'Disagree',
}

/** What was returned or withdrawn is evidence of nothing, and is not compared. */
const isCompared = ({ method, state, result }: Analysis): boolean =>
  state !== 'returned' && state !== 'withdrawn' && result.T !== null && Object.hasOwn(methods, method)

function compared(analysis: Analysis): ComparedAnalysis[] {
  const { id, method, label, result, options } = analysis
  if (!isCompared(analysis) || !result.T) return []
  const { phase, wells } = methods[method as MethodId].needs
  const wellIds = options && 'wellIds' in options ? options.wellIds : []
  const name = `${analysisName({ method, label })} (${id})`
  return [
    { id: String(id), label: name, T: result.T, wellIds, phase, usesDistances: wells.least > 1 || wellIds.length > 1 },
  ]
}

/** Names of picture and table: the number tells two of one name apart. */
const numbered = (analysis: Analysis, i: number) => `${i + 1}. ${analysisName(analysis)}`

function comparisonTable(analyses: readonly Analysis[], units: UnitSystem): ReportBlock {
  const base = analyses[0]?.result.T?.value ?? Number.NaN
  const rows = analyses.map((analysis, i) => {
    const { T, S } = analysis.result
    return [
      numbered(analysis, i),
      stateWords[analysis.state],
      T ? `${estimateText(T, units.transmissivity)} (${estimateInterval(T, units.transmissivity)})` : '–',
      S ? `${estimateText(S, units.storage)} (${estimateInterval(S, units.storage)})` : '–',
      T && i > 0 ? formatNumber(T.value / base) : '–',
    ]
  })
  const head = ['Analysis', 'State', 'Transmissivity', 'Storativity', 'T over the first']
  return { kind: 'table', caption: 'Analyses compared, with 95 % intervals', head, rows }
}

function forest(analyses: readonly Analysis[], units: UnitSystem): ReportBlock {
  const inUnit = (value: number) => fromSI(value, units.transmissivity)
  const rows = analyses.flatMap((analysis, i) => {
    const { T } = analysis.result
    if (!T) return []
    const { value, low, high } = T
    const estimate = { value: inUnit(value), low: inUnit(low), high: inUnit(high), determined: T.determined }
    return [{ label: numbered(analysis, i), ...estimate }]
  })
  const caption = `Transmissivity, ${unitById(units.transmissivity).label}, with 95 % intervals`
  return { kind: 'forest', caption, rows }
}

/** Analyses of a test beside each other; none where fewer than two can be compared. */
export function agreementSection(analyses: readonly Analysis[], units: UnitSystem): ReportSection[] {
  const found = analyses.filter(isCompared)
  if (found.length < 2) return []
  const items = agreements(found.flatMap(compared)).map((pair): ReportMark => ({
    severity: severities[pair.code],
    word: words[pair.code],
    text: agreementText(pair),
  }))
  const marked: ReportBlock[] = items.length > 0 ? [{ kind: 'marked', items }] : []
  const blocks = [comparisonTable(found, units), forest(found, units), ...marked]
  return [{ id: 'agreement', title: 'Agreement', blocks }]
}
