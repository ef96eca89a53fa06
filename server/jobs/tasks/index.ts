import { createRequire } from 'node:module'
import type { AnalysisReportInput } from './analysis-report.ts'
import { analyseTask, repeatAnalysisTask } from './analyse.ts'
import { digestAnalysisTask } from './digest-analysis.ts'
import { fitModelTask } from './fit-model.ts'
import { readLogTask } from './read-log.ts'
import { unitOverviewTask } from './unit-overview.ts'

/**
 * Charts and layout are large packages: a thread loads them with its first report. By `require`, because a thread that
 * reads TypeScript through tsx does not do so for a later `import()`.
 */
function analysisReport(input: AnalysisReportInput): Promise<Uint8Array> {
  const load = createRequire(import.meta.url)
  return (load('./analysis-report.ts') as typeof import('./analysis-report.ts')).analysisReportTask(input)
}

/** Work for threads. To add a task: its function, and a line here. */
const tasks = {
  analyse: analyseTask,
  'repeat-analysis': repeatAnalysisTask,
  'analysis-report': analysisReport,
  'digest-analysis': digestAnalysisTask,
  'fit-model': fitModelTask,
  'read-log': readLogTask,
  'unit-overview': unitOverviewTask,
} as const

export type TaskName = keyof typeof tasks

export default function run({ name, input }: { name: TaskName; input: never }): unknown {
  return tasks[name](input)
}
