import { analyseTask, repeatAnalysisTask } from './analyse.ts'
import { fitModelTask } from './fit-model.ts'
import { readLogTask } from './read-log.ts'

/** Work for threads. To add a task: its function, and a line here. */
const tasks = {
  analyse: analyseTask,
  'repeat-analysis': repeatAnalysisTask,
  'fit-model': fitModelTask,
  'read-log': readLogTask,
} as const

export type TaskName = keyof typeof tasks

export default function run({ name, input }: { name: TaskName; input: never }): unknown {
  return tasks[name](input)
}
