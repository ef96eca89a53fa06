import { computed, ref, shallowRef, type Ref } from 'vue'
import { useSubmit } from './useSubmit.ts'

interface Versioned {
  rowVersion: number
}

interface EditOptions<Item extends Versioned, Field extends keyof Item> {
  start: Item
  /** The fields that the form edits. */
  fields: readonly Field[]
  /** Label and text of each field, for telling two versions apart. */
  show: { [Key in Field]: [label: string, text: (value: Item[Key]) => string] }
  send: (changes: Pick<Item, Field> & Versioned) => Promise<Item>
  /** Reads the record as it is now. */
  fetch: () => Promise<Item>
  saved: (item: Item) => unknown
}

const same = (one: unknown, other: unknown) => JSON.stringify(one) === JSON.stringify(other)

/**
 * An edit of a record that others may edit too. A stale row version is answered by fetching the record:
 * `differences` shows both versions, then the reader takes what is saved or saves theirs over it.
 */
export function useEdit<Item extends Versioned, Field extends keyof Item & string>(options: EditOptions<Item, Field>) {
  const pick = (item: Item) =>
    Object.fromEntries(options.fields.map((field) => [field, item[field]])) as Pick<Item, Field>
  const base = shallowRef(options.start)
  const form = ref(pick(options.start)) as Ref<Pick<Item, Field>>
  const theirs = shallowRef<Item | null>(null)
  const { submit, sending, problem, fieldErrors, met, clear } = useSubmit(options.send)

  const differences = computed(() => {
    const saved = theirs.value
    if (!saved) return []
    return options.fields
      .filter((field) => !same(saved[field], form.value[field]))
      .map((field) => {
        const [label, text] = options.show[field]
        return { label, theirs: text(saved[field]), mine: text(form.value[field]) }
      })
  })

  /** The record as it is now; null while it cannot be fetched, and then why stands on the page. */
  async function newest(): Promise<Item | null> {
    try {
      return await options.fetch()
    } catch (error) {
      met(error)
      return null
    }
  }

  async function save() {
    const answer = await submit({ ...form.value, rowVersion: base.value.rowVersion } as Pick<Item, Field> & Versioned)
    if (answer) {
      base.value = answer
      theirs.value = null
      await options.saved(answer)
    } else if (problem.value?.code === 'edit/conflict') {
      theirs.value = await newest()
    }
  }

  async function takeTheirs() {
    theirs.value ??= await newest()
    if (!theirs.value) return
    base.value = theirs.value
    form.value = pick(theirs.value)
    theirs.value = null
    clear()
  }

  async function keepMine() {
    if (theirs.value) base.value = theirs.value
    await save()
  }

  const changed = computed(() => !same(form.value, pick(base.value)))

  return { form, changed, save, sending, problem, fieldErrors, differences, takeTheirs, keepMine }
}
