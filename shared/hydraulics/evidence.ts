import type { StorageClass } from './analysis.ts'
import { DISTANCE_ERROR_LIMIT } from './wells.ts'

export type EvidenceClass = 'firm' | 'fair' | 'slight'

/** Where a value of T or S comes from, and what is known of how it was found. */
export interface EvidenceFacts {
  origin: 'pumping-test' | 'slug-test' | 'specific-capacity' | 'legacy-reviewed' | 'legacy-number'
  aquifer: 'confined' | 'leaky' | 'unconfined'
  observationWell: boolean
  /** The pumped well's recovery gives the same T (pair code 'agree' or 'agree-roughly'). */
  recoveryAgrees: boolean
  /** Radial flow is seen in the derivative, after casing storage and, if unconfined, after delayed drainage. */
  radialFlowShown: boolean
  /** No finding casts doubt on the method's conditions. */
  conditionsHold: boolean
  storageClass: StorageClass | null
  /** Largest σ_r/r of the wells behind S. */
  distanceError: number
  /** Standard deviations of log10 T and log10 S from the analysis itself, null where it gives none. */
  ownLogSdT: number | null
  ownLogSdS: number | null
}

/** Default errors (standard deviation of log10), editable by the administrator. */
export const defaultEvidenceErrors = {
  observationFirm: 0.1,
  observationFair: 0.2,
  recoveryAgrees: 0.2,
  legacyReviewed: 0.25,
  singleWell: 0.25,
  specificCapacity: 0.35,
  unconfinedSingleWell: 0.35,
  slug: 0.4,
  legacyNumber: 0.4,
  storageFirm: 0.2,
  storageFair: 0.35,
  specificYieldFirm: 0.15,
  specificYieldFair: 0.25,
}
export type EvidenceErrors = typeof defaultEvidenceErrors

interface EvidenceRule {
  code: string
  evidence: EvidenceClass
  error: keyof EvidenceErrors
  applies: (facts: EvidenceFacts) => boolean
}

/** First rule that applies decides. */
export const evidenceRules: readonly EvidenceRule[] = [
  rule('legacy-number', 'slight', 'legacyNumber', ({ origin }) => origin === 'legacy-number'),
  rule('slug', 'slight', 'slug', ({ origin }) => origin === 'slug-test'),
  rule('specific-capacity', 'slight', 'specificCapacity', ({ origin }) => origin === 'specific-capacity'),
  rule('legacy-reviewed', 'fair', 'legacyReviewed', ({ origin }) => origin === 'legacy-reviewed'),
  rule('observation-firm', 'firm', 'observationFirm', (facts) => facts.observationWell && shown(facts)),
  rule('observation-fair', 'fair', 'observationFair', ({ observationWell }) => observationWell),
  rule(
    'unconfined-single-well',
    'slight',
    'unconfinedSingleWell',
    (facts) => facts.aquifer === 'unconfined' && !facts.recoveryAgrees,
  ),
  rule('recovery-agrees', 'fair', 'recoveryAgrees', ({ recoveryAgrees }) => recoveryAgrees),
  rule('single-well', 'fair', 'singleWell', () => true),
]

export interface Evidence {
  evidence: EvidenceClass
  /** Code of the rule that decided. */
  reason: string
  /** Standard deviation of log10 T: the class's default, or the analysis's own where larger. */
  logErrorT: number
  storage: StorageEvidence | null
}

export interface StorageEvidence {
  evidence: EvidenceClass
  logError: number
  /** Whether estimates may use the value: never from a pumped well alone, a slug test, or a test too short. */
  usable: boolean
  reason: 'storage-usable' | 'storage-pumped-well' | 'storage-slug' | 'storage-apparent' | 'storage-unclassified'
}

/** Evidence class and errors of a value, from facts alone. */
export function evidenceOf(facts: EvidenceFacts, errors: EvidenceErrors = defaultEvidenceErrors): Evidence {
  const decided = evidenceRules.find(({ applies }) => applies(facts)) as EvidenceRule
  return {
    evidence: decided.evidence,
    reason: decided.code,
    logErrorT: Math.max(errors[decided.error], facts.ownLogSdT ?? 0),
    storage: facts.storageClass === null ? null : storageEvidence(facts, decided.evidence, errors),
  }
}

function storageEvidence(facts: EvidenceFacts, ofT: EvidenceClass, errors: EvidenceErrors): StorageEvidence {
  const evidence = facts.distanceError > DISTANCE_ERROR_LIMIT ? 'slight' : ofT
  const kind = facts.storageClass === 'specific-yield' ? 'specificYield' : 'storage'
  const error = errors[`${kind}${evidence === 'firm' ? 'Firm' : 'Fair'}`]
  const reason = storageReason(facts)
  return { evidence, logError: Math.max(error, facts.ownLogSdS ?? 0), usable: reason === 'storage-usable', reason }
}

function storageReason({ origin, observationWell, storageClass }: EvidenceFacts): StorageEvidence['reason'] {
  if (origin === 'slug-test') return 'storage-slug'
  if (storageClass === 'unclassified') return 'storage-unclassified'
  if (storageClass === 'apparent') return 'storage-apparent'
  const pumpedWellAlone = origin === 'specific-capacity' || (origin === 'pumping-test' && !observationWell)
  return pumpedWellAlone ? 'storage-pumped-well' : 'storage-usable'
}

const shown = ({ radialFlowShown, conditionsHold }: EvidenceFacts) => radialFlowShown && conditionsHold

function rule(
  code: string,
  evidence: EvidenceClass,
  error: keyof EvidenceErrors,
  applies: EvidenceRule['applies'],
): EvidenceRule {
  return { code, evidence, error, applies }
}
