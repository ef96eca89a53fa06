import { describe, expect, it } from 'vitest'
import { defineComponent, h, ref } from 'vue'
import FieldNumber from '../../../../src/components/base/FieldNumber.vue'
import { mountWith, settle } from '../../support/mount.ts'

/** The field with a model and a unit that the test can change. */
async function makeField(start: number | null, unit: string | null = null, required = false) {
  const model = ref(start)
  const unitId = ref(unit)
  const parent = defineComponent({
    render: () =>
      h(FieldNumber, {
        label: 'Discharge',
        modelValue: model.value,
        'onUpdate:modelValue': (value: number | null) => (model.value = value),
        unit: unitId.value,
        required,
      }),
  })
  const wrapper = await mountWith(parent)
  const input = wrapper.find('input')
  const type = async (text: string) => {
    await input.setValue(text)
    await input.trigger('blur')
    await settle()
  }
  return {
    model,
    unitId,
    input,
    type,
    text: () => (input.element as HTMLInputElement).value,
    said: () => wrapper.text(),
  }
}

describe('a number field', () => {
  it('takes a decimal comma and a decimal point alike', async () => {
    const { model, type } = await makeField(null)
    await type('12,5')
    expect(model.value).toBe(12.5)
    await type('12.5')
    expect(model.value).toBe(12.5)
  })

  it('refuses "1,234" and names both readings', async () => {
    const { model, type, said } = await makeField(5)
    await type('1,234')
    expect(model.value).toBeNull()
    expect(said()).toContain('1.234')
    expect(said()).toContain('1234')
  })

  it('keeps its model in SI: 12 L/s is 0.012 m³/s', async () => {
    const { model, type } = await makeField(null, 'L/s')
    await type('12')
    expect(model.value).toBeCloseTo(0.012, 15)
  })

  it('shows the same quantity in the new unit when the unit changes', async () => {
    const { model, unitId, text } = await makeField(0.012, 'L/s')
    expect(text()).toBe('12')
    unitId.value = 'm3/h'
    await settle()
    expect(text()).toBe('43.2')
    expect(model.value).toBe(0.012)
  })

  it('leaves the quantity itself alone when its unit changes, to the last digit', async () => {
    const { model, unitId, text } = await makeField(12.5, 'm')
    unitId.value = 'ft'
    await settle()
    expect(text()).toBe('41.01049869')
    expect(model.value).toBe(12.5)
  })

  it('leaves what was typed as it was typed', async () => {
    const { type, text } = await makeField(null, 'L/s')
    await type('12,50')
    expect(text()).toBe('12,50')
  })

  it('writes codes without spaces and negative numbers with a plain minus', async () => {
    expect((await makeField(32727)).text()).toBe('32727')
    expect((await makeField(-38.4)).text()).toBe('-38.4')
  })

  it('asks for a number when it is needed and was left empty', async () => {
    const { type, said } = await makeField(5, null, true)
    await type('')
    expect(said()).toContain('Type a number.')
  })

  it('says when the text is no number', async () => {
    const { model, type, said } = await makeField(5)
    await type('about ten')
    expect(model.value).toBeNull()
    expect(said()).toContain('"about ten" is not a number')
  })

  it('carries the unit beside the number', async () => {
    expect((await makeField(1, 'm3/h')).said()).toContain('m³/h')
  })
})
