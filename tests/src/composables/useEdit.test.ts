import { describe, expect, it } from 'vitest'
import { ApiProblem } from '../../../src/api/problem.ts'
import { useEdit } from '../../../src/composables/useEdit.ts'

interface Well {
  rowVersion: number
  name: string
  depth: number
}

const makeWell = (overrides: Partial<Well> = {}): Well => ({ rowVersion: 1, name: 'V-1', depth: 40, ...overrides })

/** A record on a server that somebody else has changed since it was read. */
function makeEdit(stored: Well, fetch?: () => Promise<Well>) {
  let server = stored
  const edit = useEdit<Well, 'name' | 'depth'>({
    start: makeWell(),
    fields: ['name', 'depth'],
    show: { name: ['Name', String], depth: ['Depth', (depth) => `${depth} m`] },
    send: async (changes) => {
      if (changes.rowVersion !== server.rowVersion)
        throw new ApiProblem({ ...ApiProblem.of('client/failed').problem, code: 'edit/conflict', status: 409 })
      return (server = { ...server, ...changes, rowVersion: server.rowVersion + 1 })
    },
    fetch: fetch ?? (async () => server),
    saved: () => undefined,
  })
  return { ...edit, server: () => server }
}

describe('an edit of what somebody else changed meanwhile', () => {
  const theirs = makeWell({ rowVersion: 2, name: 'Old mill' })

  it('is not saved, and shows both versions', async () => {
    const { form, save, differences, server } = makeEdit(theirs)
    form.value.depth = 44
    await save()
    expect(server()).toEqual(theirs)
    expect(differences.value).toEqual([
      { label: 'Name', theirs: 'Old mill', mine: 'V-1' },
      { label: 'Depth', theirs: '40 m', mine: '44 m' },
    ])
  })

  it('is saved over theirs when the reader says so', async () => {
    const { form, save, keepMine, differences, problem, server } = makeEdit(theirs)
    form.value.depth = 44
    await save()
    await keepMine()
    expect(server()).toEqual({ rowVersion: 3, name: 'V-1', depth: 44 })
    expect(differences.value).toEqual([])
    expect(problem.value).toBeNull()
  })

  it('gives way to theirs when the reader says so, and can then be saved', async () => {
    const { form, save, takeTheirs, server } = makeEdit(theirs)
    await save()
    takeTheirs()
    expect(form.value).toEqual({ name: 'Old mill', depth: 40 })
    form.value.depth = 41
    await save()
    expect(server()).toEqual({ rowVersion: 3, name: 'Old mill', depth: 41 })
  })

  it('says so when what is saved cannot be fetched, and can be saved again', async () => {
    const answers = [() => Promise.reject(ApiProblem.of('client/offline')), () => Promise.resolve(theirs)]
    const { form, save, problem, differences } = makeEdit(theirs, () => answers.shift()!())
    form.value.depth = 44
    await save()
    expect([problem.value?.code, differences.value]).toEqual(['client/offline', []])
    await save()
    expect([problem.value?.code, differences.value.length]).toEqual(['edit/conflict', 2])
  })
})

it('An edit that nobody crossed is saved under the next version', async () => {
  const { form, changed, save, server } = makeEdit(makeWell())
  expect(changed.value).toBe(false)
  form.value.name = 'V-2'
  expect(changed.value).toBe(true)
  await save()
  expect(server()).toEqual({ rowVersion: 2, name: 'V-2', depth: 40 })
  expect(changed.value).toBe(false)
})
