import { pumpingTestQuery, type PumpingTestQuery } from '#shared/contracts/pumping-tests.ts'
import { useAddressQuestion } from '../../composables/useAddressQuestion.ts'

/** Without an order the newest come first. */
export type TestsAsked = Partial<Pick<PumpingTestQuery, 'text' | 'unitId' | 'state' | 'kind' | 'sort'>>

const names = { text: 'text', unit: 'unitId', state: 'state', kind: 'kind', sort: 'sort' } as const

/** What the list of tests is asked. */
export const useTestsQuestion = () => useAddressQuestion<TestsAsked>({ names, fields: pumpingTestQuery.shape })
