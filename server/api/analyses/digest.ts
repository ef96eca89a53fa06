import {
  analysisInputs,
  analysisOptions,
  analysisResult,
  type StoredResult,
} from '#shared/contracts/analysis-result.ts'
import { parseInputs } from '#shared/contracts/kind-analyses.ts'
import type { AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { kindOfMethod } from '#shared/hydraulics/any-kind.ts'
import { evidenceFacts } from '#shared/hydraulics/evidence-facts.ts'
import type { EvidenceFacts } from '#shared/hydraulics/evidence.ts'
import type { KindShapes } from '#shared/hydraulics/kinds.ts'
import type { AnalysisRow } from './analyses.repository.ts'
import { reportedFacts, reportedInputs } from './reported.ts'

/** An analysis as far as its digest needs it. */
export type Digested = Pick<AnalysisRow, 'method' | 'options' | 'result'>

interface NamedWell {
  /** Null for a well that stands in no list. */
  wellId: string | null
  label: string
}

/** What the view of an analysis takes from its snapshot, which itself may hold hundreds of thousands of readings. */
export interface Digest {
  /** Without the recovery, of which other analyses of the test tell; null where the analysis gives no value. */
  facts: EvidenceFacts | null
  /** Wells that it rests on, with those whose pumping is taken off; none for a kind of test in a single well. */
  wells: NamedWell[]
}

const named = ({ wellId, label }: NamedWell): NamedWell => ({ wellId, label })

/** Whether anything of an analysis can stand in the regional table. */
export const givesValue = ({ T, K }: StoredResult, method: string): boolean =>
  T !== null || (K !== null && kindOfMethod(method) === 'slug')

/** @param inputs the snapshot of the analysis */
export function digestOf({ method, options, result: stored }: Digested, inputs: unknown): Digest {
  const result = analysisResult.parse(stored)
  const gives = givesValue(result, method)
  if (method === 'reported') {
    const { origin, observationWell, aquifer } = reportedInputs.parse(inputs)
    const facts = reportedFacts({ origin, observationWell, aquifer }, result.S ? result.storageClass : null)
    return { facts: gives ? facts : null, wells: [] }
  }
  const kind = kindOfMethod(method)
  if (kind === 'slug' || kind === 'specific-capacity')
    return { facts: gives ? kindFacts(kind, method, inputs, result) : null, wells: [] }
  if (kind !== 'constant-rate') return { facts: null, wells: [] }
  const parsed = analysisInputs.parse(inputs)
  const facts = () =>
    evidenceFacts(parsed, analysisOptions.parse(options), result as AnalysisResult, { recoveryAgrees: false })
  return { facts: gives ? facts() : null, wells: [...parsed.series, ...(parsed.otherWells ?? [])].map(named) }
}

const kindOrigins = { slug: 'slug-test', 'specific-capacity': 'specific-capacity' } as const

/** Tests in a single well whose evidence follows from their kind, and from their own error where that is larger. */
function kindFacts(kind: keyof typeof kindOrigins, method: string, inputs: unknown, result: StoredResult) {
  const { aquifer } = parseInputs(method, inputs) as KindShapes[typeof kind]['inputs']
  const storageClass = result.S ? result.storageClass : null
  const facts = reportedFacts({ origin: kindOrigins[kind], observationWell: false, aquifer }, storageClass)
  const measured = kind === 'slug' ? result.K : result.T
  return { ...facts, ownLogSdT: measured?.logSd ?? null, ownLogSdS: result.S?.logSd ?? null }
}
