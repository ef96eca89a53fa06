import { readFileSync } from 'node:fs'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest, PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { WellInput } from '#shared/contracts/wells.ts'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import type { MethodId } from '#shared/hydraulics/catalogue.ts'
import type { LogMapping } from '#shared/readings/model.ts'
import type { SignedIn } from '../../support/app.ts'
import { createWell, islandMiddle, makeMapping, makeTestInput, saveAnalysis, upload } from '../../support/domain.ts'

/** A raw file beside the reference scripts: two comment lines, a header, then time and value. */
export const publishedFile = (name: string) => readFileSync(new URL(`../../reference/${name}`, import.meta.url), 'utf8')

/** Readings of a synthetic case as the file of a logger, seconds and metres. */
export const synthetic = (t: readonly number[], s: readonly number[]): Log => ({
  text: ['made from published figures', '', 'time (s),drawdown (m)', ...t.map((time, i) => `${time},${s[i]}`)].join(
    '\n',
  ),
  unit: 's',
})

export interface Log {
  text: string
  unit: 's' | 'min' | 'd'
  /** When the log's zero stands, in seconds after the pump was started. */
  zero_s?: number
}

interface Entered {
  unitId: number
  input: Partial<PumpingTestInput>
  /** Piezometers due east of the pumped well, by distance in metres. */
  observed?: (Log & { distanceM: number })[]
  pumped?: Log & { well: Partial<WellInput> }
}

const mappingOf = ({ unit, zero_s = 0 }: Log): LogMapping =>
  makeMapping({
    firstDataRow: 4,
    time: { kind: 'elapsed', column: 0, unit, zero_s },
    value: { column: 1, quantity: 'drawdown', unit: 'm' },
  })

/** A test as a person would enter it: wells, rates, raw files. */
export async function enterPublished(person: SignedIn, { unitId, input, observed = [], pumped }: Entered) {
  const wellId = await createWell(person, pumped?.well)
  const observationWells: PumpingTestInput['observationWells'] = []
  for (const [i, { distanceM }] of observed.entries()) {
    const at = await createWell(person, { x: islandMiddle[0] + 0.001 * (i + 1), kind: 'piezometer' })
    observationWells.push({ wellId: at, distanceBasis: 'measured', distanceM, reason: null, staticLevelM: null })
  }
  const body = makeTestInput({
    wellId,
    units: [{ unitId, share: 1, basis: 'single-unit' }],
    observationWells,
    ...input,
  })
  const { id } = (await person.post('/api/pumping-tests').send(body).expect(201)).body as { id: number }
  const { wells } = (await person.get(`/api/pumping-tests/${id}`).expect(200)).body as PumpingTest
  const pumpedWell = wells.find(({ role }) => role === 'pumped')!
  if (pumped) await upload(person, id, pumpedWell.id, pumped.text, mappingOf(pumped)).expect(201)
  for (const [i, log] of observed.entries()) {
    const well = wells.find(({ wellId: of }) => of === observationWells[i]!.wellId)!
    await upload(person, id, well.id, log.text, mappingOf(log)).expect(201)
  }
  return id
}

/** Analysed as the page does, all readings, and stored; what the server stored. */
export async function storedResult(
  person: SignedIn,
  testId: number,
  method: MethodId,
  options: Partial<AnalysisOptions> = {},
): Promise<Analysis['result']> {
  const answer = await saveAnalysis(person, testId, method, { readingsPerCycle: null, ...options })
  if (answer.status !== 201) throw new Error(JSON.stringify(answer.body))
  return (answer.body as Analysis).result
}
