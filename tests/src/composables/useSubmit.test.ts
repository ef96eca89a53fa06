import { describe, expect, it } from 'vitest'
import { ApiProblem } from '../../../src/api/problem.ts'
import { useSubmit } from '../../../src/composables/useSubmit.ts'

/** A form whose sending fails as often as told; the keys under which it arrived. */
function makeForm(failures: number) {
  const keys: string[] = []
  const form = useSubmit(async (_given: { code: string }, key: string) => {
    keys.push(key)
    if (keys.length <= failures) throw ApiProblem.of('client/offline')
    return 'saved'
  })
  return { ...form, keys }
}

describe('sending a form', () => {
  it('keeps its key while the same thing is sent again, so that it cannot be done twice', async () => {
    const { submit, keys } = makeForm(1)
    expect(await submit({ code: 'V-1' })).toBeNull()
    expect(await submit({ code: 'V-1' })).toBe('saved')
    expect(keys[1]).toBe(keys[0])
  })

  it('takes a new key for other content, and after it went through', async () => {
    const { submit, keys } = makeForm(1)
    await submit({ code: 'V-1' })
    await submit({ code: 'V-2' })
    await submit({ code: 'V-2' })
    expect(new Set(keys).size).toBe(3)
  })

  it('shows what went wrong, and no longer once it went through', async () => {
    const { submit, problem } = makeForm(1)
    await submit({ code: 'V-1' })
    expect(problem.value?.code).toBe('client/offline')
    await submit({ code: 'V-1' })
    expect(problem.value).toBeNull()
  })

  it('happens once at a time', async () => {
    const { submit, keys } = makeForm(0)
    const [first, second] = await Promise.all([submit({ code: 'V-1' }), submit({ code: 'V-1' })])
    expect([first, second, keys.length]).toEqual(['saved', null, 1])
  })

  it('puts each field error under the path of its field', async () => {
    const fields = [{ path: 'steps.2.rate', code: 'field/too-small', params: { minimum: 0 } }]
    const invalid = new ApiProblem({ ...ApiProblem.of('client/failed').problem, code: 'request/invalid', fields })
    const { submit, fieldErrors } = useSubmit(() => Promise.reject(invalid))
    await submit(null)
    expect(fieldErrors('steps.2.rate')).toEqual(['Must be at least 0.'])
    expect(fieldErrors('steps.1.rate')).toEqual([])
  })

  it('says something also about an error that is no answer of the server', async () => {
    const { submit, problem } = useSubmit(() => Promise.reject(new RangeError('boom')))
    await submit(null)
    expect(problem.value?.message).toContain('Something went wrong on this page')
  })
})
