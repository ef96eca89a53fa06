import { describe, expect, it } from 'vitest'
import { h } from 'vue'
import LoadState from '../../../../src/components/base/LoadState.vue'
import { ApiProblem } from '../../../../src/api/problem.ts'
import { mountWith } from '../../support/mount.ts'

const makeState = async (props: Record<string, unknown>) => {
  const slots = { default: ((given: { data: string }) => h('p', `The ${given.data} are here`)) as () => unknown }
  const wrapper = await mountWith(LoadState, { props: { what: 'the wells', data: null, ...props }, slots })
  return wrapper.text()
}

describe('what a query brings', () => {
  it('is said to be on its way while there is nothing', async () => {
    expect(await makeState({ loading: true })).toContain('Fetching the wells')
  })

  it('is shown when it is there', async () => {
    expect(await makeState({ data: 'wells' })).toBe('The wells are here')
  })

  it('is said to be empty when it is', async () => {
    expect(await makeState({ data: 'wells', empty: true })).toBe('Nothing here yet')
  })

  it('that the role may not see is denied and cannot be tried again', async () => {
    const text = await makeState({ error: ApiProblem.of('request/forbidden') })
    expect(text).toContain('Your role does not allow this')
    expect(text).not.toContain('Try again')
  })

  it('that is missing says so', async () => {
    expect(await makeState({ error: ApiProblem.of('request/not-found') })).toContain('or you may not see it')
  })

  it('that failed says why and offers to try again', async () => {
    const text = await makeState({ error: ApiProblem.of('client/offline') })
    expect(text).toContain('The server does not answer at the moment')
    expect(text).toContain('Try again')
  })

  it('stays on the page when only its refreshing failed', async () => {
    const text = await makeState({ data: 'wells', error: ApiProblem.of('client/offline') })
    expect(text).toContain('The server does not answer at the moment')
    expect(text).toContain('The wells are here')
  })
})
