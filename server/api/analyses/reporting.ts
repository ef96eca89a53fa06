import { createHash } from 'node:crypto'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { evidenceOf } from '#shared/hydraulics/evidence.ts'
import { limitRules } from '#shared/hydraulics/limits.ts'
import type { Executor } from '../../db/client.ts'
import { packJson } from '../../db/packed-json.ts'
import { inTransaction } from '../../db/transaction.ts'
import type { Deps } from '../../deps.ts'
import { notFound } from '../../errors.ts'
import { recordAudit } from '../audit-trail/record-audit.ts'
import * as repository from './analyses.repository.ts'
import { checkAdoptable } from './check-adoptable.ts'
import type { createInputsService } from './inputs.service.ts'
import { reportedFacts, reportedResult, type ReportedValue } from './reported.ts'

interface ReportingNeeds<Shown> {
  inputs: Pick<ReturnType<typeof createInputsService>, 'hold'>
  view: (executor: Executor, viewer: Viewer, id: number) => Promise<Shown>
}

// Nobody can be asked about a value that was measured long ago: the reviewer sees the question instead.
const everyQuestionAnswered = limitRules.map(({ code }) => code)

export function createReporting<Shown>(deps: Deps, { inputs, view }: ReportingNeeds<Shown>) {
  async function insert(executor: Executor, viewer: Viewer, testId: number, value: ReportedValue, at: Date) {
    const { T: _T, K: _K, S, storageClass, ...known } = value
    const snapshot = { version: 1 as const, kind: 'reported' as const, ...known }
    const result = reportedResult(value, evidenceOf(reportedFacts(known, S === null ? null : storageClass)))
    checkAdoptable(result, everyQuestionAnswered)
    return repository.insertAnalysis(executor, {
      pumpingTestId: testId,
      method: 'reported',
      methodVersion: 1,
      state: 'submitted',
      packedInputs: packJson(snapshot),
      inputsSha256: createHash('sha256').update(JSON.stringify(snapshot)).digest('hex'),
      options: null,
      result,
      label: known.source.slice(0, 120),
      rationale: known.source,
      submittedAt: at,
      createdBy: viewer.id,
      createdAt: at,
    })
  }

  return {
    /** Enters a value that came down without readings, submitted; it still needs a reviewer. */
    report: (viewer: Viewer, testId: number, value: ReportedValue) =>
      inTransaction(deps, async (tx) => {
        if (!(await inputs.hold(tx, viewer, testId))) throw notFound()
        const at = deps.now()
        const id = await insert(tx, viewer, testId, value, at)
        await repository.addEditor(tx, id, viewer)
        const about = { subject: 'analysis', subjectId: id, details: { testId } }
        await recordAudit(tx, { viewer, at, action: 'analyses/report', ...about })
        return view(tx, viewer, id)
      }),
  }
}
