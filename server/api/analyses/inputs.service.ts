import { createHash } from 'node:crypto'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import type { createStreamsService } from '../streams/streams.service.ts'
import { buildInputs, type BuiltInputs } from './build-inputs.ts'
import { listEdits, listReadings } from './inputs.repository.ts'

export interface InputsNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'whole' | 'maySee'>
  streams: Pick<ReturnType<typeof createStreamsService>, 'nearestConnected'>
}

export interface Snapshot extends BuiltInputs {
  sha256: string
  test: Awaited<ReturnType<InputsNeeds['pumpingTests']['whole']>>
}

/** The inputs of an analysis are written field by field in a fixed order, so their JSON text identifies them. */
export const sha256Of = (inputs: AnalysisInputs): string =>
  createHash('sha256').update(JSON.stringify(inputs)).digest('hex')

/** What analyses of a test are made from, as the viewer sees the test. */
export function createInputsService({ pumpingTests, streams }: InputsNeeds) {
  return {
    maySee: pumpingTests.maySee,
    testOf: pumpingTests.whole,

    async snapshot(executor: Executor, viewer: Viewer, testId: number): Promise<Snapshot> {
      const test = await pumpingTests.whole(executor, viewer, testId)
      const { wells, units, series } = test.parts
      const seriesIds = series.map(({ id }) => id)
      const readings = await listReadings(executor, seriesIds)
      const edits = await listEdits(executor, seriesIds)
      const pumped = wells.find(({ row }) => row.role === 'pumped')
      const unitIds = units.map(({ unitId }) => unitId)
      const stream = pumped ? await streams.nearestConnected(executor, unitIds, pumped.position) : null
      const built = buildInputs({
        test: test.found.test,
        ...test.parts,
        readings,
        edits,
        streamDistanceM: stream?.distanceM ?? null,
      })
      return { ...built, sha256: sha256Of(built.inputs), test }
    },
  }
}
