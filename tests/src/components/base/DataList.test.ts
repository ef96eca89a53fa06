import { describe, expect, it } from 'vitest'
import { defineComponent, h, ref, type Component } from 'vue'
import DataList from '../../../../src/components/base/DataList.vue'
import { mountWith, settle } from '../../support/mount.ts'

const rows = ['V-1', 'V-2', 'V-3'].map((code, index) => ({ id: index + 1, code }))
const columns = [{ key: 'code', title: 'Well', text: (row: { code: string }) => row.code }]

async function makeList(props: Record<string, unknown> = {}) {
  const opened: string[] = []
  const onOpen = (row: { code: string }) => opened.push(row.code)
  const wrapper = await mountWith(DataList, {
    props: { caption: 'Wells', columns, rows, openable: true, onOpen, ...props },
  })
  const body = wrapper.findAll('tbody tr')
  const press = async (key: string) => {
    document.activeElement?.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }))
    await settle()
  }
  return { wrapper, body, press, opened, focused: () => document.activeElement?.textContent?.trim() }
}

describe('a list whose rows can be opened', () => {
  it('is walked with the arrow keys, Home and End, and stops at its ends', async () => {
    const { body, press, focused } = await makeList()
    ;(body[0]!.element as HTMLElement).focus()
    const walk: (string | undefined)[] = []
    for (const key of ['ArrowDown', 'ArrowDown', 'ArrowDown', 'ArrowUp', 'Home', 'ArrowUp', 'End']) {
      await press(key)
      walk.push(focused())
    }
    expect(walk).toEqual(['V-2', 'V-3', 'V-3', 'V-2', 'V-1', 'V-1', 'V-3'])
  })

  it('has exactly one row in the tab order', async () => {
    const { body, press } = await makeList()
    ;(body[0]!.element as HTMLElement).focus()
    await press('ArrowDown')
    expect(body.map((row) => row.attributes('tabindex'))).toEqual(['-1', '0', '-1'])
  })

  it('still has one when there are fewer rows than the one that had the focus', async () => {
    // A generic component is a function to the type checker.
    const list = DataList as unknown as Component
    const shown = ref(rows)
    const parent = defineComponent({
      render: () => h(list, { caption: 'Wells', columns, rows: shown.value, openable: true }),
    })
    const wrapper = await mountWith(parent)
    await wrapper.findAll('tbody tr')[2]!.trigger('focus')
    shown.value = rows.slice(0, 2)
    await settle()
    expect(wrapper.findAll('tbody tr').map((row) => row.attributes('tabindex'))).toEqual(['-1', '0'])
  })

  it('opens a row by Enter and by a click', async () => {
    const { body, press, opened } = await makeList()
    ;(body[0]!.element as HTMLElement).focus()
    await press('ArrowDown')
    await press('Enter')
    await body[2]!.trigger('click')
    expect(opened).toEqual(['V-2', 'V-3'])
  })
})

it('A list that leads nowhere has no row in the tab order', async () => {
  const { body } = await makeList({ openable: false })
  expect(body.every((row) => row.attributes('tabindex') === undefined)).toBe(true)
})
