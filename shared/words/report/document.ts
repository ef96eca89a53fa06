import type { Analysis } from '#shared/contracts/analyses.ts'
import type { KindWorkbenchInputs, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { UnitSystem } from '#shared/quantities/systems.ts'

/** Parts of which a report is made; page and PDF lay out each in their own way and add no words. */
export type ReportBlock =
  | { kind: 'facts'; facts: ReportFact[] }
  | { kind: 'text'; text: string }
  | { kind: 'table'; caption: string; head: string[]; rows: string[][] }
  | { kind: 'marked'; items: ReportMark[] }
  /** The test from above. */
  | { kind: 'sketch' }
  /** All readings, or the plot of the analysis with this id. */
  | { kind: 'plot'; analysisId: number | null; caption: string }
  /** Estimates of one quantity under each other, in the reader's unit. */
  | { kind: 'forest'; caption: string; rows: ReportEstimate[] }

export interface ReportEstimate {
  label: string
  value: number
  low: number
  high: number
  determined: boolean
}

export interface ReportFact {
  label: string
  text: string
}

export interface ReportMark {
  severity: 'good' | 'note' | 'caution' | 'bad'
  word: string
  text: string
}

export interface ReportSection {
  id: string
  title: string
  blocks: ReportBlock[]
}

export interface AnalysisReport {
  kind: string
  title: string
  facts: string
  sections: ReportSection[]
  /** Under every page of the PDF, and at the end of the page. */
  made: string
}

/** What a report is written from: what its reader may see, and nothing else. */
export interface ReportGiven {
  test: PumpingTest
  analyses: readonly Analysis[]
  snapshot: WorkbenchInputs | KindWorkbenchInputs
  units: UnitSystem
  region: string
  /** ISO instant. */
  madeAt: string
}
