import { defineComponent, h } from 'vue'
import { describe, expect, it } from 'vitest'
import { useTableQuestion } from '../../../../src/components/adopted-values/use-table-question.ts'
import { mountWith, settle } from '../../support/mount.ts'

type Question = ReturnType<typeof useTableQuestion>

async function at(path: string) {
  let question!: Question
  const Asking = defineComponent({
    setup() {
      question = useTableQuestion()
      return () => h('p', JSON.stringify(question.query.value))
    },
  })
  const page = await mountWith(Asking, { path })
  return {
    question,
    asked: () => JSON.parse(page.text()) as Record<string, unknown>,
    address: () => page.vm.$route.fullPath,
  }
}

describe('what the table is asked', () => {
  it('stands in the address', async () => {
    const { asked } = await at(
      '/regional-table?unit=3&quantity=S&class=elastic&from=1990&text=tin+box&sort=-year&page=3',
    )
    expect(asked()).toEqual({
      unitId: 3,
      quantity: 'S',
      storageClass: 'elastic',
      yearFrom: 1990,
      text: 'tin box',
      sort: '-year',
      limit: 50,
      offset: 100,
    })
  })

  it('leaves out what makes no sense, because a link may come from anywhere', async () => {
    const { asked } = await at('/regional-table?unit=x&quantity=Q&from=12&sort=colour&page=-2&evidence=firm')
    expect(asked()).toEqual({ evidence: 'firm', sort: 'well', limit: 50, offset: 0 })
  })

  it('begins again at the first page when filters or order change', async () => {
    const { question, asked, address } = await at('/regional-table?page=4&sort=year')
    await question.setFilters({ evidence: 'firm' })
    await settle()
    expect(asked()).toMatchObject({ evidence: 'firm', sort: 'year', offset: 0 })
    await question.setPage(2)
    await question.setSort('-value')
    await settle()
    expect(address()).toBe('/regional-table?evidence=firm&sort=-value')
  })
})
