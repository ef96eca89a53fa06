import { beforeEach, describe, expect, it } from 'vitest'
import TestWorkbench from '../../../../src/components/analyses/TestWorkbench.vue'
import KindWorkbench from '../../../../src/components/kind-tests/KindWorkbench.vue'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { makeStepInputs } from '../../../shared/hydraulics/make-steps.ts'
import { makeRecord } from '../corrections/make.ts'
import { fakeServer } from '../../support/fake-server.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeTest } from './make.ts'

beforeEach(() => sessionStorage.clear())

const wells = [{ wellId: 7, code: 'OB-1' }]
const blocked = [{ wellId: '7', code: 'analysis/correction-readings', params: { needed: 3, found: 1 } }]
const rest = { sha256: 'a'.repeat(64), readings: [], problems: blocked }

/** The page of a test of which a correction keeps every reading back. */
const workbenches = {
  'constant-rate': { page: TestWorkbench, inputs: { ...makeTestInputs(), series: [] }, surroundings: [] },
  step: {
    page: KindWorkbench,
    kind: 'step',
    inputs: { ...makeStepInputs(), well: { ...makeStepInputs().well, elapsed_s: [], drawdown_m: [], included: [] } },
  },
}

async function makePage(kind: keyof typeof workbenches, path: string) {
  const { page, ...snapshot } = workbenches[kind]
  const test = makeTest({ kind, wells, wellCode: 'PW-1', mayEdit: true } as never)
  const props = { test, snapshot: { ...snapshot, ...rest }, analyses: [], opened: null }
  const mounted = await mountWith(page, { props, path })
  await settle()
  return mounted
}

describe.each(['constant-rate', 'step'] as const)('The page of a %s test without any drawdown', (kind) => {
  it('says what is in the way, and leads to the corrections', async () => {
    const page = await makePage(kind, '/pumping-tests/1')
    const tabs = page.findAll('[role="tab"]').map((tab) => tab.text())
    expect(tabs).toEqual(['Analyses', 'Corrections', 'The test'])
    expect(page.text()).toContain('A correction cannot be applied any more.')
    expect(page.get('a.v-btn').text()).toBe('Open the corrections')
    expect(page.get('[role="tabpanel"]').text()).toContain('No drawdown yet')
  })

  it('lets the correction in the way be switched off', async () => {
    fakeServer({
      'GET /api/pumping-tests/1/corrections': () => ({
        body: { corrections: [makeRecord()], series: [], otherWells: [], mayEdit: true },
      }),
    })
    const page = await makePage(kind, '/pumping-tests/1?part=corrections')
    expect(page.get('article button[aria-pressed="true"]').text()).toBe('Switch off')
  })
})
