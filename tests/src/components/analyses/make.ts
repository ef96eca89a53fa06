import type { Analysis } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import { makeFit } from '../../../shared/charts/make-plot.ts'

/** A draft of the signed-in person, by least squares in the one observation well. */
export const makeAnalysis = (overrides: Partial<Analysis> = {}): Analysis => ({
  id: 3,
  pumpingTestId: 1,
  method: 'theis',
  methodVersion: 1,
  state: 'draft',
  options: { wellIds: ['o1'], window: null },
  result: makeFit('theis').result,
  label: null,
  rationale: null,
  adoption: null,
  inputsChanged: false,
  questions: [],
  refusals: [],
  createdBy: null,
  createdAt: '2026-01-01T00:00:00.000Z',
  submittedAt: null,
  reviews: [],
  rowVersion: 1,
  mayEdit: true,
  mayTakeBack: false,
  mayReview: false,
  ...overrides,
})

/** What the workbench needs of a test. */
export const makeTest = (overrides: Partial<PumpingTest> = {}) => ({ id: 1, ...overrides }) as PumpingTest
