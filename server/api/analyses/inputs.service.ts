import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import type { Executor } from '../../db/client.ts'
import type { createBoundariesService } from '../boundaries/boundaries.service.ts'
import type { CorrectionsService } from '../corrections/corrections.service.ts'
import type { OtherWellsService } from '../other-wells/other-wells.service.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import { openAt } from '../pumping-tests/tested-interval.ts'
import type { createStreamsService } from '../streams/streams.service.ts'
import type { WellsService } from '../wells/wells.service.ts'
import { buildInputs, type BuiltInputs, type InputParts } from './build-inputs.ts'
import { listEdits, listReadings } from './inputs.repository.ts'
import { buildKindInputs, detailsOf, type BuiltKind } from './kind-inputs.ts'
import type { Construction } from './placement.ts'
import { edgeOfBoundary, surroundingsOf } from './surroundings.ts'
import { settingOf, sha256Of, sha256OfKind, type Setting } from './setting.ts'

export interface InputsNeeds {
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'whole' | 'withUnits' | 'maySee' | 'hold'>
  streams: Pick<ReturnType<typeof createStreamsService>, 'nearestConnected' | 'pathsConnected'>
  boundaries: Pick<ReturnType<typeof createBoundariesService>, 'affecting'>
  wells: Pick<WellsService, 'screensOf' | 'picksOf'>
  corrections: Pick<CorrectionsService, 'partsOf'>
  otherWells: Pick<OtherWellsService, 'partsOf'>
}

type WholeTest = Awaited<ReturnType<InputsNeeds['pumpingTests']['whole']>>

interface Surroundings {
  setting: Setting
  sha256: string
  test: WholeTest
}

/** Inputs by the kind of the test; a reported test is as one at a constant rate without readings. */
export type Snapshot = ((BuiltInputs & { kind: 'constant-rate' }) | BuiltKind) & Surroundings

function snapshotOf(parts: InputParts, test: WholeTest): Snapshot {
  const setting = settingOf(test)
  const details = detailsOf(parts.test)
  if (details) {
    const built = buildKindInputs(parts, details)
    return { ...built, setting, sha256: sha256OfKind(built.kind, built.inputs, setting), test }
  }
  const built = buildInputs(parts)
  return { ...built, kind: 'constant-rate', setting, sha256: sha256Of(built.inputs, setting), test }
}

/** What analyses of a test are made from, as the viewer sees the test. */
export function createInputsService(needs: InputsNeeds) {
  const { pumpingTests, streams, boundaries, wells: wellsService, corrections, otherWells } = needs

  /** By well: screens that were open at the test's date, and depths of the units. */
  async function constructions(executor: Executor, { found: { test }, parts }: WholeTest) {
    const ids = parts.wells.map(({ row }) => row.wellId)
    const screens = (await wellsService.screensOf(executor, ids)).filter(openAt(test.startAt))
    const picks = await wellsService.picksOf(executor, ids)
    const at = (id: number): Construction => ({
      screens: screens.filter(({ wellId }) => wellId === id),
      picks: picks.filter(({ wellId }) => wellId === id),
    })
    return new Map(ids.map((id) => [id, at(id)]))
  }

  return {
    maySee: pumpingTests.maySee,
    hold: pumpingTests.hold,
    testOf: pumpingTests.withUnits,

    /** Ids of the wells of a test that the viewer may see; null where all of them are, as for those who analyse. */
    async wellsSeen(executor: Executor, viewer: Viewer, testId: number): Promise<Set<string> | null> {
      if (atLeast(viewer, 'analyst')) return null
      const { parts } = await pumpingTests.whole(executor, viewer, testId)
      const others = await otherWells.partsOf(executor, viewer, testId, parts.wells)
      const listed = others.flatMap(({ wellId }) => (wellId === null ? [] : [wellId]))
      return new Set([...parts.wells.map(({ row }) => String(row.wellId)), ...listed])
    },

    /** Streams and edges of the aquifer near the pumped well: offered to analyses, and no part of what they rest on. */
    async surroundings(executor: Executor, { parts }: WholeTest) {
      const pumped = parts.wells.find(({ row }) => row.role === 'pumped')
      const unitIds = parts.units.map(({ unitId }) => unitId)
      if (!pumped || unitIds.length === 0) return []
      const fed = await streams.pathsConnected(executor, unitIds)
      const bounded = await boundaries.affecting(executor, unitIds)
      const watered = fed.map(({ name, path }) => ({ kind: 'recharge' as const, name, path }))
      return surroundingsOf(pumped.position, [...watered, ...bounded.map(edgeOfBoundary)])
    },

    async snapshot(executor: Executor, viewer: Viewer, testId: number): Promise<Snapshot> {
      const test = await pumpingTests.whole(executor, viewer, testId)
      const { wells, units, series } = test.parts
      const seriesIds = series.map(({ id }) => id)
      const readings = await listReadings(executor, seriesIds)
      const edits = await listEdits(executor, seriesIds)
      const pumped = wells.find(({ row }) => row.role === 'pumped')
      const unitIds = units.map(({ unitId }) => unitId)
      const stream = pumped ? await streams.nearestConnected(executor, unitIds, pumped.position) : null
      const parts = {
        test: test.found.test,
        ...test.parts,
        readings,
        edits,
        streamDistanceM: stream?.distanceM ?? null,
        constructions: await constructions(executor, test),
        corrections: await corrections.partsOf(executor, testId),
        otherWells: await otherWells.partsOf(executor, viewer, testId, wells),
      }
      return snapshotOf(parts, test)
    },
  }
}
