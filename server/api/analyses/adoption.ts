import type { Analysis } from '#shared/contracts/analyses.ts'
import { analysisOptions, analysisResult, type StoredResult } from '#shared/contracts/analysis-result.ts'
import { recoveryConfirms } from '#shared/hydraulics/agreement.ts'
import { kindOfMethod } from '#shared/hydraulics/any-kind.ts'
import { phaseOfMethod } from '#shared/hydraulics/catalogue.ts'
import { evidenceOf, type EvidenceFacts } from '#shared/hydraulics/evidence.ts'
import type { NewValue } from '../adopted-values/adopted-values.service.ts'
import { localStart } from '../pumping-tests/start-time.ts'
import type { PumpingTestRow, TestParts } from '../pumping-tests/view.ts'
import type { AnalysisRow } from './analyses.repository.ts'
import type { Digest } from './digest.ts'

/** Common practice: apportioning a composite value to its units leaves at least this error of log10. */
const leastCompositeError = 0.35

type Weighed = Pick<AnalysisRow, 'id' | 'method' | 'options' | 'result' | 'state'>

const resultOf = (row: Weighed): StoredResult => analysisResult.parse(row.result)

/** Null where there is nothing to compare: another kind of test, or a value that came down without readings. */
function compared(row: Weighed) {
  if (row.method === 'reported') return null
  const { T } = resultOf(row)
  if (kindOfMethod(row.method) !== 'constant-rate') return null
  const { wellIds } = analysisOptions.parse(row.options)
  return T && { id: String(row.id), label: '', T, wellIds, phase: phaseOfMethod(row.method), usesDistances: false }
}

/** An analysis that a reviewer sent back, or whose value was withdrawn, is evidence of nothing. */
const refused = new Set<Weighed['state']>(['returned', 'withdrawn'])

/** Whether a recovery analysis of the same test, other than this one, gives the same transmissivity. */
function recoveryAgrees(row: Weighed, siblings: Weighed[]): boolean {
  const mine = compared(row)
  return siblings.some((sibling) => {
    if (sibling.id === row.id || phaseOfMethod(sibling.method) !== 'recovery' || refused.has(sibling.state))
      return false
    const other = compared(sibling)
    return mine !== null && other !== null && recoveryConfirms(mine, other)
  })
}

const asReasons = (codes: (string | null | undefined)[]): NonNullable<Analysis['adoption']>['reasons'] =>
  codes.flatMap((code) => (code ? [{ code, severity: 'note' as const, params: {} }] : []))

type Told = Pick<NewValue, 'quantity' | 'evidence' | 'evidenceReason' | 'log10Error' | 'usable'>

/**
 * What rows of the regional table say of their analysis, those that were written or those that would be: every unit of
 * a composite test has the same evidence. Null where there is none.
 */
export function adoptionOf(rows: Told[]): Analysis['adoption'] {
  const T = rows.find(({ quantity }) => quantity === 'T')
  const S = rows.find(({ quantity }) => quantity === 'S')
  const K = rows.find(({ quantity }) => quantity === 'K')
  const first = T ?? K
  if (!first) return null
  return {
    evidence: first.evidence,
    log10ErrorT: T?.log10Error ?? null,
    log10ErrorK: K?.log10Error ?? null,
    log10ErrorS: S?.log10Error ?? null,
    storageUsable: S?.usable ?? false,
    reasons: asReasons([first.evidenceReason, S?.evidenceReason]),
  }
}

export interface AdoptedTest {
  found: { test: PumpingTestRow }
  parts: Pick<TestParts, 'units'>
}

const origins = {
  'slug-test': 'slug-test',
  'specific-capacity': 'pumped-well',
  'legacy-number': 'other',
  'legacy-reviewed': 'other',
} as const

function originOf({ origin, observationWell }: EvidenceFacts): NewValue['origin'] {
  if (origin !== 'pumping-test') return origins[origin]
  return observationWell ? 'observation-well' : 'pumped-well'
}

/**
 * The rows of the regional table that an accepted analysis stands for: T, and S and K where it gives them, for each
 * unit. A test of several units gives each its share of T, with the error that apportioning leaves, and no S or K.
 * @param digest of the analysis
 */
export function adoptedRows(
  row: Weighed,
  digest: Digest,
  siblings: Weighed[],
  { found: { test }, parts: { units } }: AdoptedTest,
): NewValue[] {
  const { T, S, K, storageClass } = resultOf(row)
  if (!digest.facts) return []
  const facts = { ...digest.facts, recoveryAgrees: recoveryAgrees(row, siblings) }
  const evidence = evidenceOf(facts)
  const common = {
    pumpingTestId: test.id,
    analysisId: row.id,
    wellId: test.wellId,
    method: row.method,
    origin: originOf(facts),
    thicknessBasis: test.thicknessBasis,
    testYear: Number(localStart(test.startAt, test.zone, 'year')),
  }
  if (T && units.length > 1) {
    const log10Error = Math.max(leastCompositeError, evidence.logErrorT)
    return units.map(({ unitId, share }) => ({
      ...common,
      unitId,
      quantity: 'T' as const,
      log10Value: Math.log10(T.value * share),
      log10Error,
      evidence: 'slight' as const,
      evidenceReason: 'composite-share',
      composite: true,
    }))
  }
  const unitId = units[0]!.unitId
  const withThickness = Math.hypot(evidence.logErrorT, test.thicknessError / Math.LN10)
  // A slug test measures K, and its T is derived with the thickness; a pumping test the other way round.
  const measuresK = facts.origin === 'slug-test'
  const grade = { evidence: evidence.evidence, evidenceReason: evidence.reason }
  const rows: NewValue[] = []
  if (T) {
    const log10Error = measuresK ? withThickness : evidence.logErrorT
    rows.push({ ...common, unitId, quantity: 'T', log10Value: Math.log10(T.value), log10Error, ...grade })
  }
  if (S && storageClass && evidence.storage) {
    const { logError: log10Error, usable, evidence: storageGrade, reason: evidenceReason } = evidence.storage
    rows.push({
      ...common,
      unitId,
      quantity: 'S',
      storageClass,
      log10Value: Math.log10(S.value),
      log10Error,
      usable,
      evidence: storageGrade,
      evidenceReason,
    })
  }
  if (K) {
    const log10Error = measuresK ? evidence.logErrorT : withThickness
    rows.push({ ...common, unitId, quantity: 'K', log10Value: Math.log10(K.value), log10Error, ...grade })
  }
  return rows
}
