import { beforeAll, describe, expect, it } from 'vitest'
import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import type { WellInput } from '#shared/contracts/wells.ts'
import { enterTest } from '../../support/analysed-test.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'

const tested = useApp()
let analyst: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
})

const open = (topM: number, bottomM: number, validTo: string | null = null) => ({
  topM,
  bottomM,
  validFrom: null,
  validTo,
})
const pickAt = (topM: number): Pick<WellInput, 'picks'> => ({
  picks: [{ unitId, topM, bottomM: topM + 20, source: 'driller' }],
})

async function placed(
  pumped: Partial<WellInput>,
  observation: Partial<WellInput> = {},
  test: Partial<PumpingTestInput> = {},
) {
  const { id } = await enterTest(analyst, { unitId, pumped, observation, test })
  const { inputs } = (await analyst.get(`/api/pumping-tests/${id}/inputs`).expect(200)).body as WorkbenchInputs
  return { ...inputs.series[0]!, pumpedWell: inputs.pumpedWell }
}

describe('The wells of a test in its inputs', () => {
  it('stand in their direction from the pumped well', async () => {
    // The observation well lies east of the pumped one.
    expect((await placed({})).bearing_deg).toBeCloseTo(90, 2)
  })

  it('are open below the top of the unit at their own place, cut to its thickness', async () => {
    const { screen, pumpedWell } = await placed(
      { screens: [open(32, 40)], ...pickAt(30) },
      { screens: [open(20, 55)], ...pickAt(28) },
    )
    expect(pumpedWell?.screen).toEqual({ top_m: 2, bottom_m: 10 })
    expect(screen).toEqual({ top_m: 0, bottom_m: 20 })
  })

  it('count the screens of the date of the test alone', async () => {
    const screens = [open(30, 34, '2010-01-01T00:00:00Z'), open(40, 45)]
    expect((await placed({ screens, ...pickAt(30) })).pumpedWell?.screen).toEqual({ top_m: 10, bottom_m: 15 })
  })

  it('are open below the water table in an unconfined aquifer', async () => {
    // Static level 35.4 m below a measuring point 0.4 m above ground: the water table lies 35 m down.
    const pumped = { screens: [open(36, 42)], staticDepthM: 35.4, measuringPointM: 0.4, ...pickAt(30) }
    const { pumpedWell } = await placed(pumped, {}, { aquifer: 'unconfined' })
    expect(pumpedWell?.screen?.top_m).toBeCloseTo(1, 9)
    expect(pumpedWell?.screen?.bottom_m).toBeCloseTo(7, 9)
  })

  it('have no open part where the depth of the unit is not known, or the screen lies elsewhere', async () => {
    expect((await placed({})).pumpedWell?.screen).toBeNull()
    expect((await placed({ screens: [open(5, 9)], ...pickAt(30) })).pumpedWell?.screen).toBeNull()
  })
})
