import { describe, expect, it } from 'vitest'
import { packJson } from '../../../server/db/packed-json.ts'
import { calculatingOnce } from '../../../server/db/seed/write/calculating-once.ts'
import {
  analyseTask,
  repeatAnalysisTask,
  type Analysed,
  type AnalysedAndPacked,
  type AnalyseInput,
  type RepeatInput,
} from '../../../server/jobs/tasks/analyse.ts'
import type { Workers } from '../../../server/jobs/workers.ts'
import { makeInputs, makeOptions, makeTheisSeries } from '../../shared/hydraulics/make-inputs.ts'

/** The real tasks, in this thread; tells how often they ran. */
function counting() {
  const ran: string[] = []
  const tasks: Record<string, (input: never) => unknown> = {
    analyse: analyseTask,
    'repeat-analysis': repeatAnalysisTask,
    'read-log': () => 'read',
  }
  const workers: Workers = {
    run: async <Output>(name: string, input: unknown) => {
      ran.push(name)
      return (await tasks[name]!(input as never)) as Output
    },
    close: async () => undefined,
  }
  return { ran, workers: calculatingOnce(workers) }
}

/** Not quite a curve, so that every choice gives another number. */
const noise = Array.from({ length: 40 }, (_, i) => (i % 3) / 50)
const series = [makeTheisSeries({ T: 1e-3, S: 1e-4 }, { noise })]
const asked = (overrides: Partial<AnalyseInput> = {}): AnalyseInput => ({
  inputs: makeInputs({ series }),
  method: 'theis',
  options: makeOptions(),
  ...overrides,
})
/** As the server keeps the inputs. */
const kept = { ...makeInputs({ series }), setting: { wellId: 4, year: '2019' } } as AnalyseInput['inputs']

describe('a calculation that is asked for three times', () => {
  it('is done once, and answers page, server and reviewer as three would', async () => {
    const { ran, workers } = counting()
    const asPage = await workers.run<Analysed>('analyse', asked())
    const asServer = await workers.run<AnalysedAndPacked>('analyse', asked({ inputs: kept }))
    const { method, options } = asked()
    const repeated: RepeatInput = { packedInputs: packJson(kept), method, options }
    const asReviewer = await workers.run<Analysed>('repeat-analysis', repeated)
    expect(ran).toEqual(['analyse'])
    expect(asPage).toMatchObject(await repeatAnalysisTask(repeated))
    expect(asServer).toEqual(analyseTask(asked({ inputs: kept })))
    expect(asReviewer).toMatchObject(await repeatAnalysisTask(repeated))
  })

  it('is another one with other options, methods or readings', async () => {
    const { ran, workers } = counting()
    const others: Partial<AnalyseInput>[] = [
      {},
      { method: 'cooper-jacob' },
      { options: makeOptions({ window: { from_s: 600, to_s: 86_400 } }) },
      { inputs: makeInputs({ series: [makeTheisSeries({ T: 2e-3, S: 1e-4 })] }) },
    ]
    const answers = await Promise.all(others.map((other) => workers.run<Analysed>('analyse', asked(other))))
    expect(ran).toHaveLength(others.length)
    const found = answers.map((answer) => (answer.ok ? answer.result.T?.value : null))
    expect(new Set(found).size).toBe(others.length)
  })

  it('is refused each time where it is refused once', async () => {
    const { workers } = counting()
    const empty = asked({ options: makeOptions({ wellIds: [] }) })
    const refusals = [await workers.run('analyse', empty), await workers.run('analyse', empty)]
    expect(refusals).toEqual([analyseTask(empty), analyseTask(empty)])
    expect(refusals[0]).toMatchObject({ ok: false })
  })

  it('leaves other work to the threads', async () => {
    const { ran, workers } = counting()
    expect([await workers.run('read-log', {}), await workers.run('read-log', {})]).toEqual(['read', 'read'])
    expect(ran).toEqual(['read-log', 'read-log'])
  })
})
