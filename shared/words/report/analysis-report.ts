import type { Analysis } from '#shared/contracts/analyses.ts'
import { kindLabels } from '#shared/hydraulics/kinds.ts'
import { cautions, type CautionId } from '../cautions.ts'
import { agreementSection } from './agreement-section.ts'
import { analysisSection } from './analysis-section.ts'
import { reportDate, reportStart } from './dates.ts'
import { correctionsSection } from './corrections-section.ts'
import type { AnalysisReport, ReportGiven, ReportSection } from './document.ts'
import { conditionsSection, dataSection, identitySection, wellsSection } from './test-sections.ts'

/** What stands for nothing any more comes last. */
const standing: Record<Analysis['state'], number> = { accepted: 0, submitted: 1, draft: 2, returned: 3, withdrawn: 4 }

/** The report of a test and its analyses: every sentence and number that the page and the PDF show. */
export function analysisReport(given: ReportGiven): AnalysisReport {
  const { test, region, madeAt } = given
  const analyses = [...given.analyses].sort((a, b) => standing[a.state] - standing[b.state] || a.id - b.id)
  return {
    kind: `Analysis report · ${test.kind === 'reported' ? 'Reported value' : kindLabels[test.kind]}`,
    title: `${test.wellCode}, ${reportStart({ ...test, startPrecision: test.startPrecision === 'year' ? 'year' : 'day' })}`,
    facts: [region, test.units.map(({ name }) => name).join(' and '), test.aquifer].filter(Boolean).join(' · '),
    sections: [
      identitySection(given),
      wellsSection(given),
      conditionsSection(given),
      dataSection(given),
      ...correctionsSection(given),
      ...(analyses.length > 0 ? analyses.map((analysis) => analysisSection(analysis, given)) : [noAnalysis]),
      ...agreementSection(analyses, given.units),
      cautionsSection,
    ],
    made: `Made with Basinbook on ${reportDate(madeAt)} from the data of ${test.wellCode} as they were then.`,
  }
}

const noAnalysis: ReportSection = {
  id: 'analyses',
  title: 'Analyses',
  blocks: [{ kind: 'text', text: 'This test has no analysis yet.' }],
}

const ofReport: readonly CautionId[] = ['drawdown', 'discharge', 'site']

const cautionsSection: ReportSection = {
  id: 'cautions',
  title: 'Cautions',
  blocks: [
    {
      kind: 'text',
      text: 'The numbers describe the aquifer around the wells tested, at the time of the test, under the conditions of each method. They give no right to abstract; local codes, licences and a licensed practitioner decide.',
    },
    ...ofReport.map((id) => ({ kind: 'text' as const, text: cautions[id] })),
  ],
}
